"use client";

import clsx from "clsx";
import { useRef, type ComponentProps } from "react";
import { buttonStyle } from "./button-style";
import { controlOf, Field, inputStyle, type FieldText } from "./field";
import { splitField } from "./split-field";

type NativeInput = Omit<ComponentProps<"input">, "name" | "id" | "className" | "type" | "ref">;
export type QuickDay = { label: string; value: string };
type DateFieldProps = FieldText &
  NativeInput & { quickDays?: readonly QuickDay[]; onPick?: (value: string) => void };

/**
 * A day as somebody would write it ("3 mar 24"). The text is sent as typed; whoever receives it reads the day out of it.
 * `quickDays` (Today, Yesterday) write their value into the box.
 */
export function DateField({ quickDays = [], onPick, ...props }: DateFieldProps) {
  const [field, input] = splitField(props);
  const box = useRef<HTMLInputElement>(null);
  const pick = (value: string) => {
    if (box.current) box.current.value = value;
    onPick?.(value);
  };

  return (
    <Field {...field}>
      <span className="flex flex-wrap items-center gap-2">
        <input
          type="text"
          autoComplete="off"
          {...input}
          {...controlOf(field)}
          ref={box}
          className={clsx(inputStyle, "max-w-48")}
        />
        <span className="flex gap-2">
          {quickDays.map(({ label, value }) => (
            <button
              key={label}
              type="button"
              onClick={() => pick(value)}
              className={buttonStyle({ kind: "quiet", small: true })}
            >
              {label}
            </button>
          ))}
        </span>
      </span>
    </Field>
  );
}
