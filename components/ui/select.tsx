import clsx from "clsx";
import type { ComponentProps } from "react";
import { controlOf, Field, inputStyle, type FieldText } from "./field";
import { Glyph } from "./glyph";
import { splitField } from "./split-field";

type NativeSelect = Omit<ComponentProps<"select">, "name" | "id" | "className" | "children">;
export type SelectOption = { value: string; label: string };
type SelectProps = FieldText & NativeSelect & { options: readonly SelectOption[]; blank?: string };

/** A choice from a short list: the phone's own picker on a phone, and it works without script. */
export function Select({ options, blank, ...props }: SelectProps) {
  const [field, select] = splitField(props);
  return (
    <Field {...field}>
      <span className="relative block">
        {/* A form that was refused is reset by its action; a list only shows what was chosen when it is made anew. */}
        <select
          key={String(select.defaultValue ?? "")}
          {...select}
          {...controlOf(field)}
          className={clsx(inputStyle, "appearance-none pr-10")}
        >
          {blank === undefined ? null : <option value="">{blank}</option>}
          {options.map(({ value, label }) => (
            <option key={value} value={value}>
              {label}
            </option>
          ))}
        </select>
        <Glyph
          name="down"
          className="pointer-events-none absolute top-1/2 right-3 -translate-y-1/2 text-ink-2"
        />
      </span>
    </Field>
  );
}
