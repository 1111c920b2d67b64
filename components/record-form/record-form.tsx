"use client";

import { useActionState, type ReactNode } from "react";
import { Banner } from "@/components/ui/banner";
import { ErrorSummary, type Problem } from "@/components/ui/error-summary";
import { SubmitButton } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";
import { FieldByKind, type FormField } from "./fields";

/** Fields that belong together, under a heading where they need one. */
export type FieldSection = { title?: string; note?: string; fields: readonly FormField[] };

type RecordFormProps = {
  action: FormAction;
  sections: readonly FieldSection[];
  /** Sent along unseen. */
  hidden?: Readonly<Record<string, string>>;
  submit: string;
};

/** A form of the office: plain fields, everything typed kept after a refusal, the problems listed at the top. */
export function RecordForm({ action, sections, hidden = {}, submit }: RecordFormProps) {
  const [state, send] = useActionState(action, null);
  const refused = state && !state.ok ? state : null;
  const typed = refused?.typed;
  const fields = refused?.fields ?? {};
  const problems = problemsOf(sections, fields);
  return (
    <form action={send} noValidate className="grid gap-6">
      {Object.entries(hidden).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <ErrorSummary problems={problems} />
      {refused?.message ? (
        <Banner kind="refused" isLive>
          {refused.message}
        </Banner>
      ) : null}
      {/* A sent form is reset to what its fields first held, so after a refusal they are made anew with what was typed. */}
      <div key={typed ? JSON.stringify(typed) : "fresh"} className="grid gap-8">
        {sections.map((section, place) => (
          <Section key={section.title ?? place} section={section}>
            {section.fields.map((field) => (
              <FieldByKind key={field.name} field={field} typed={typed} error={fields[field.name]} />
            ))}
          </Section>
        ))}
      </div>
      <div className="grid sm:justify-items-start">
        <SubmitButton>{submit}</SubmitButton>
      </div>
    </form>
  );
}

/** Each problem with the name of its field before it: "Fill this in" alone would not say what. */
function problemsOf(sections: readonly FieldSection[], errors: Readonly<Record<string, string>>): Problem[] {
  const labels = new Map(sections.flatMap(({ fields }) => fields.map(({ name, label }) => [name, label])));
  return Object.entries(errors).map(([fieldId, text]) => {
    const label = labels.get(fieldId);
    return { fieldId, text: label === undefined ? text : `${label}: ${text}` };
  });
}

function Section({ section, children }: { section: FieldSection; children: ReactNode }) {
  return (
    <div className="grid gap-5">
      {section.title ? (
        <div className="grid gap-1 border-t border-rule pt-4">
          <h2 className="text-18">{section.title}</h2>
          {section.note ? <p className="max-w-measure text-small text-ink-2">{section.note}</p> : null}
        </div>
      ) : null}
      {children}
    </div>
  );
}
