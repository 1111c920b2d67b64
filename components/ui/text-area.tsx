"use client";

import clsx from "clsx";
import { useTranslations } from "next-intl";
import { useState, type ComponentProps } from "react";
import { controlOf, Field, inputStyle, type FieldText } from "./field";
import { splitField } from "./split-field";

type NativeArea = Omit<
  ComponentProps<"textarea">,
  "name" | "id" | "className" | "maxLength" | "value" | "defaultValue"
>;
type TextAreaProps = FieldText & NativeArea & { limit?: number; defaultValue?: string };

/** Several lines with what is left of the limit. Nothing pasted is ever cut: what is over is counted, and stays. */
export function TextArea({ limit, defaultValue = "", rows = 4, onChange, ...props }: TextAreaProps) {
  const [field, area] = splitField(props);
  const [length, setLength] = useState(defaultValue.length);
  const control = controlOf(field);
  const countId = `${control.id}-count`;

  return (
    <Field {...field}>
      <textarea
        {...area}
        {...control}
        rows={rows}
        defaultValue={defaultValue}
        aria-describedby={clsx(control["aria-describedby"], limit && countId) || undefined}
        onChange={(event) => {
          setLength(event.target.value.length);
          onChange?.(event);
        }}
        className={clsx(
          inputStyle,
          "field-sizing-content py-2",
          rows > 4 ? "min-h-40!" : rows > 2 ? "min-h-24!" : "min-h-16!",
        )}
      />
      {limit ? <CharacterCount id={countId} left={limit - length} /> : null}
    </Field>
  );
}

/** Read with the field; announced by itself only when little is left. */
function CharacterCount({ id, left }: { id: string; left: number }) {
  const t = useTranslations("ui");
  return (
    <p
      id={id}
      aria-live={left <= 20 ? "polite" : "off"}
      className={clsx("text-small tabular-nums", left < 0 ? "font-semibold text-refused" : "text-ink-2")}
    >
      {left < 0 ? t("charactersOver", { count: -left }) : t("charactersLeft", { count: left })}
    </p>
  );
}
