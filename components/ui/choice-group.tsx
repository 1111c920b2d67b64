import type { ReactNode } from "react";
import { Checkbox, Radio } from "./check";
import { controlOf, FieldGroup, type FieldText } from "./field";
import { splitField } from "./split-field";

export type Choice = { value: string; label: ReactNode; hint?: ReactNode };
type GroupProps = FieldText & {
  choices: readonly Choice[];
  onChange?: (value: string, isChosen: boolean) => void;
};

// The first control carries the field's own id, so that an error summary lands where the answer starts.
const idAt = (id: string, index: number) => (index === 0 ? id : `${id}-${index + 1}`);

/** Any number of the choices; each ticked value is sent under the same name. */
export function CheckboxGroup({
  choices,
  chosen = [],
  onChange,
  ...props
}: GroupProps & { chosen?: readonly string[] }) {
  const [field] = splitField(props);
  const { id, name, "aria-invalid": isInvalid } = controlOf(field);
  return (
    <FieldGroup {...field}>
      {choices.map((choice, index) => (
        <Checkbox
          key={choice.value}
          {...choice}
          id={idAt(id, index)}
          name={name}
          aria-invalid={isInvalid}
          defaultChecked={chosen.includes(choice.value)}
          onChange={onChange && ((event) => onChange(choice.value, event.target.checked))}
        />
      ))}
    </FieldGroup>
  );
}

/** Exactly one of the choices. `isInline` for two or three short ones: a long list of questions stays half as long. */
export function RadioGroup({
  choices,
  chosen,
  onChange,
  isInline = false,
  ...props
}: GroupProps & { chosen?: string; isInline?: boolean }) {
  const [field] = splitField(props);
  const { id, name } = controlOf(field);
  return (
    <FieldGroup {...field} isOneOf>
      <div className={isInline ? "flex flex-wrap gap-x-8 gap-y-2" : "contents"}>
        {choices.map((choice, index) => (
          <Radio
            key={choice.value}
            {...choice}
            id={idAt(id, index)}
            name={name}
            defaultChecked={chosen === choice.value}
            onChange={onChange && (() => onChange(choice.value, true))}
          />
        ))}
      </div>
    </FieldGroup>
  );
}
