"use client";

import { useTranslations } from "next-intl";
import { useActionState, useState, type ReactNode } from "react";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { RadioGroup } from "@/components/ui/choice-group";
import { ErrorSummary } from "@/components/ui/error-summary";
import { Select } from "@/components/ui/select";
import { Serial } from "@/components/ui/serial";
import { SubmitButton, SubmitRow } from "@/components/ui/submit-button";
import { TextArea } from "@/components/ui/text-area";
import { TextField } from "@/components/ui/text-field";
import { VERDICT_OUTCOMES, type VerdictOutcome } from "@/lib/claims/lifecycle";
import { CAUSES, REASONS } from "@/lib/claims/verdict";
import type { FormAction, Typed } from "@/lib/kernel/action-result";

type Line = {
  lineId: string;
  lineNumber: number;
  name: string;
  serial: string | null;
  suggestion: VerdictOutcome | null;
  /** What the bench found, whether it is covered and why: read before the verdict is given. */
  beside: ReactNode;
};
type DecideFormProps = {
  action: FormAction;
  number: string;
  revision: number;
  lines: readonly Line[];
  /** True where a line has no finding: the verdict then says why it needs none. */
  asksWhyNoFinding: boolean;
};
type LineProps = {
  line: Line;
  place: number;
  typed: Typed | undefined;
  fields: Readonly<Record<string, string>>;
};

const textIn = (typed: Typed | undefined, name: string): string | undefined => {
  const value = typed?.[name];
  return typeof value === "string" ? value : undefined;
};

const isOutcome = (text: string | undefined): text is VerdictOutcome =>
  VERDICT_OUTCOMES.some((outcome) => outcome === text);

const QUESTIONS = ["outcome", "shares", "reasonCode", "reason", "letter", "returnWaived"] as const;
const BESIDE = "grid items-start gap-6 xl:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]";

/** The verdict of each line, whose doing it was in exact shares, the reason, and the letter the workshop reads. */
export function DecideForm({ action, number, revision, lines, asksWhyNoFinding }: DecideFormProps) {
  const t = useTranslations("live.decide");
  const [state, send] = useActionState(action, null);
  const refused = state && !state.ok ? state : null;
  const fields = refused?.fields ?? {};
  // Several lines may lack the same thing: each problem says which question it belongs to.
  const problems = Object.entries(fields).map(([fieldId, text]) => {
    const last = fieldId.split(".").at(-1) ?? "";
    const question = QUESTIONS.find((name) => last === name || last === `${name}Reason`);
    return { fieldId, text: question ? `${t(question)}: ${text}` : text };
  });
  return (
    <form action={send} noValidate className="grid gap-6">
      <input type="hidden" name="number" value={number} />
      <input type="hidden" name="revision" value={revision} />
      <ErrorSummary problems={problems} />
      {refused?.message ? (
        <Banner kind="refused" isLive>
          {refused.message}
        </Banner>
      ) : null}
      {lines.map((line, place) => (
        <div key={line.lineId} className={BESIDE}>
          <div className="grid min-w-0 gap-6">
            <LineVerdict line={line} place={place} typed={refused?.typed} fields={fields} />
            {/* Under the last line, not under what stands beside it: a drawn log is far longer than the questions. */}
            {place === lines.length - 1 ? (
              <LetterCard typed={refused?.typed} fields={fields} asksWhyNoFinding={asksWhyNoFinding} />
            ) : null}
          </div>
          {/* On a phone it is read before the verdict is given. */}
          <div className="min-w-0 max-xl:order-first">{line.beside}</div>
        </div>
      ))}
    </form>
  );
}

type LetterProps = Pick<LineProps, "typed" | "fields"> & Pick<DecideFormProps, "asksWhyNoFinding">;

function LetterCard({ typed, fields, asksWhyNoFinding }: LetterProps) {
  const t = useTranslations("live.decide");
  return (
    <Card title={t("letterTitle")}>
      <div className="grid gap-5">
        <TextArea
          name="letter"
          label={t("letter")}
          hint={t("letterHint")}
          rows={6}
          limit={4000}
          defaultValue={textIn(typed, "letter") ?? ""}
          error={fields.letter}
        />
        {asksWhyNoFinding ? (
          <TextField
            name="returnWaivedReason"
            label={t("returnWaived")}
            hint={t("returnWaivedHint")}
            maxLength={1000}
            defaultValue={textIn(typed, "returnWaivedReason") ?? ""}
            error={fields.returnWaivedReason}
          />
        ) : null}
        <SubmitRow>
          <SubmitButton>{t("submit")}</SubmitButton>
        </SubmitRow>
      </div>
    </Card>
  );
}

function LineVerdict({ line, place, typed, fields }: LineProps) {
  const t = useTranslations("live.decide");
  const name = (field: string) => `lines.${place}.${field}`;
  const sent = textIn(typed, name("outcome"));
  // Only a press in the browser narrows the reasons: without script every outcome needs its own within reach.
  const [pressed, setPressed] = useState<VerdictOutcome | null>(null);
  const outcome = pressed ?? (isOutcome(sent) ? sent : line.suggestion);
  const reasons = pressed ? REASONS[pressed] : Object.values(REASONS).flat();
  return (
    <Card
      isInCharge={place === 0}
      title={line.name}
      note={line.serial ? <Serial value={line.serial} /> : undefined}
    >
      <input type="hidden" name={name("lineId")} value={line.lineId} />
      <div className="grid gap-5">
        <RadioGroup
          name={name("outcome")}
          label={t("outcome")}
          chosen={outcome ?? undefined}
          onChange={(value) => setPressed(isOutcome(value) ? value : null)}
          choices={VERDICT_OUTCOMES.map((value) => ({ value, label: t(`outcomes.${value}`) }))}
          error={fields[name("outcome")]}
        />
        <fieldset
          className="grid gap-2"
          aria-describedby={`${name("shares")}-hint${fields[name("shares")] ? ` ${name("shares")}-error` : ""}`}
        >
          <legend className="mb-1 font-semibold">{t("shares")}</legend>
          <p id={`${name("shares")}-hint`} className="max-w-measure text-small text-ink-2">
            {t("sharesHint")}
          </p>
          <div className="grid grid-cols-2 gap-3 sm:grid-cols-5">
            {CAUSES.map((cause, index) => (
              <TextField
                key={cause}
                // The first field carries the question's own id, so that the error summary lands there.
                id={index === 0 ? name("shares") : undefined}
                name={name(`shares.${cause}`)}
                label={t(`causes.${cause}`)}
                inputMode="text"
                maxLength={20}
                defaultValue={
                  textIn(typed, name(`shares.${cause}`)) ??
                  (cause === "maker" && line.suggestion === "upheld" ? "1" : "")
                }
              />
            ))}
          </div>
          {fields[name("shares")] ? (
            <p id={`${name("shares")}-error`} className="font-semibold text-refused">
              {fields[name("shares")]}
            </p>
          ) : null}
        </fieldset>
        <Select
          name={name("reasonCode")}
          label={t("reasonCode")}
          blank={t("choose")}
          defaultValue={textIn(typed, name("reasonCode")) ?? ""}
          options={reasons.map((code) => ({ value: code, label: t(`reasons.${code}`) }))}
          error={fields[name("reasonCode")]}
        />
        <TextArea
          name={name("reason")}
          label={t("reason")}
          hint={t("reasonHint")}
          rows={3}
          limit={4000}
          defaultValue={textIn(typed, name("reason")) ?? ""}
          error={fields[name("reason")]}
        />
      </div>
    </Card>
  );
}
