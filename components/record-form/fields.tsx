import type { ReactNode } from "react";
import { CheckboxGroup, RadioGroup, type Choice } from "@/components/ui/choice-group";
import { Select, type SelectOption } from "@/components/ui/select";
import { TextArea } from "@/components/ui/text-area";
import { TextField } from "@/components/ui/text-field";
import type { Typed } from "@/lib/kernel/action-result";

type Words = { name: string; label: string; hint?: string; isOptional?: boolean };
type TextWords = Words & { value?: string; maxLength?: number };

/** A field as the server words it; everything in it can travel to the browser. */
export type FormField =
  | ({
      kind: "line";
      isSerial?: boolean;
      type?: "text" | "email";
      suggestions?: readonly string[];
    } & TextWords)
  | ({ kind: "lines"; rows?: number } & TextWords)
  | ({ kind: "choice"; options: readonly SelectOption[]; blank?: string; value?: string } & Words)
  | ({ kind: "oneOf"; choices: readonly Choice[]; value?: string } & Words)
  | ({ kind: "anyOf"; choices: readonly Choice[]; values?: readonly string[] } & Words);

type Kind = FormField["kind"];
type FieldOf<K extends Kind> = Extract<FormField, { kind: K }>;
type Answered = { typed: Typed | undefined; error: string | undefined };

const textFor = (typed: Typed | undefined, name: string, value = ""): string => {
  const sent = typed?.[name];
  return typeof sent === "string" ? sent : value;
};

// A list of boxes without a tick sends nothing at all: after a refusal that means none, not what stood there before.
const listFor = (
  typed: Typed | undefined,
  name: string,
  values: readonly string[] = [],
): readonly string[] => (typed ? [typed[name] ?? []].flat().map(String) : values);

type Drawing = { readonly [K in Kind]: (field: FieldOf<K>, answered: Answered) => ReactNode };

const DRAWING: Drawing = {
  line: ({ suggestions, value, kind: _kind, ...field }, { typed, error }) => (
    <>
      <TextField
        {...field}
        list={suggestions ? `${field.name}-known` : undefined}
        autoComplete="off"
        defaultValue={textFor(typed, field.name, value)}
        error={error}
      />
      {suggestions ? (
        <datalist id={`${field.name}-known`}>
          {suggestions.map((one) => (
            <option key={one} value={one} />
          ))}
        </datalist>
      ) : null}
    </>
  ),
  lines: ({ value, kind: _kind, maxLength, ...field }, { typed, error }) => (
    <TextArea {...field} limit={maxLength} defaultValue={textFor(typed, field.name, value)} error={error} />
  ),
  choice: ({ value, kind: _kind, ...field }, { typed, error }) => (
    <Select {...field} defaultValue={textFor(typed, field.name, value)} error={error} />
  ),
  oneOf: ({ value, kind: _kind, ...field }, { typed, error }) => (
    <RadioGroup {...field} chosen={textFor(typed, field.name, value)} error={error} />
  ),
  anyOf: ({ values, kind: _kind, name, ...field }, { typed, error }) => (
    <CheckboxGroup
      {...field}
      id={name}
      name={`${name}[]`}
      chosen={listFor(typed, name, values)}
      error={error}
    />
  ),
};

/** One field, drawn by its kind, with what was typed and what was wrong with it. */
export function FieldByKind({ field, ...answered }: Answered & { field: FormField }) {
  return drawField(field.kind, field, answered);
}

const isOfKind = <K extends Kind>(kind: K, field: FormField): field is FieldOf<K> => field.kind === kind;

function drawField<K extends Kind>(kind: K, field: FormField, answered: Answered): ReactNode {
  return isOfKind(kind, field) ? DRAWING[kind](field, answered) : null;
}
