import clsx from "clsx";
import type { ComponentProps } from "react";
import { controlOf, Field, inputStyle, type FieldText } from "./field";
import { splitField } from "./split-field";

type NativeInput = Omit<
  ComponentProps<"input">,
  "name" | "id" | "className" | "aria-describedby" | "aria-invalid"
>;

/** One line of text. `isSerial` sets it in the type that cannot be misread and keeps phones from correcting it. */
export function TextField({ isSerial = false, ...props }: FieldText & NativeInput & { isSerial?: boolean }) {
  const [field, input] = splitField(props);
  const asTyped = isSerial ? { autoCapitalize: "characters", autoCorrect: "off", spellCheck: false } : {};
  return (
    <Field {...field}>
      <input
        type="text"
        {...asTyped}
        {...input}
        {...controlOf(field)}
        className={clsx(inputStyle, isSerial && "font-mono")}
      />
    </Field>
  );
}
