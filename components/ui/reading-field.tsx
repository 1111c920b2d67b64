import clsx from "clsx";
import type { ComponentProps } from "react";
import { controlOf, Field, inputStyle, type FieldText } from "./field";
import { splitField } from "./split-field";

type NativeInput = Omit<ComponentProps<"input">, "name" | "id" | "className" | "type" | "inputMode">;
type ReadingFieldProps = FieldText & NativeInput & { unit: string; unitName?: string };

/**
 * A measured value with its unit fixed at the end. It stays text: a decimal comma or point is taken as typed,
 * and the raw text is kept. `unitName` is read out where the sign alone would not be ("V", "volt").
 */
export function ReadingField({ unit, unitName, ...props }: ReadingFieldProps) {
  const [field, input] = splitField(props);
  const control = controlOf(field);
  const unitId = `${control.id}-unit`;
  return (
    <Field {...field}>
      <span className="flex max-w-60">
        <input
          type="text"
          inputMode="decimal"
          autoComplete="off"
          {...input}
          {...control}
          aria-describedby={clsx(unitId, control["aria-describedby"])}
          className={clsx(inputStyle, "min-w-0 rounded-r-none text-right tabular-nums focus:z-1")}
        />
        <span
          id={unitId}
          className="flex shrink-0 items-center rounded-r-control border border-l-0 border-edge bg-well px-3 text-ink-2"
        >
          {unitName ? <span className="sr-only">{unitName}</span> : null}
          <span aria-hidden={unitName ? true : undefined}>{unit}</span>
        </span>
      </span>
    </Field>
  );
}
