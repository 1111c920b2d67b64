"use client";

import { useActionState } from "react";
import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { CheckboxGroup } from "@/components/ui/choice-group";
import { ErrorSummary } from "@/components/ui/error-summary";
import { SubmitButton, SubmitRow } from "@/components/ui/submit-button";
import { TextArea } from "@/components/ui/text-area";
import type { FormAction } from "@/lib/kernel/action-result";

type AskFormProps = {
  action: FormAction;
  number: string;
  rows: readonly { id: string; name: string; isMissing: boolean }[];
  round: number;
  workshop: string;
};

/** Ask once: the rows that are missing are ticked, the words are the assessor's. */
export function AskForm({ action, number, rows, round, workshop }: AskFormProps) {
  const t = useTranslations("live.ask");
  const [state, send] = useActionState(action, null);
  const refused = state && !state.ok ? state : null;
  const typed = refused?.typed;
  const problems = Object.entries(refused?.fields ?? {}).map(([fieldId, text]) => ({ fieldId, text }));
  const ticked = typed
    ? [typed.rowIds ?? []].flat()
    : rows.filter((row) => row.isMissing).map(({ id }) => id);
  return (
    <form action={send} noValidate className="grid gap-5">
      <input type="hidden" name="number" value={number} />
      <ErrorSummary problems={problems} />
      {refused?.message ? (
        <Banner kind="refused" isLive>
          {refused.message}
        </Banner>
      ) : null}
      <p className="text-ink-2">{t("round", { round, workshop })}</p>
      <CheckboxGroup
        name="rowIds[]"
        label={t("rows")}
        choices={rows.map(({ id, name }) => ({ value: id, label: name }))}
        chosen={ticked.map(String)}
      />
      <TextArea
        name="question"
        label={t("question")}
        hint={t("questionHint")}
        limit={4000}
        defaultValue={typeof typed?.question === "string" ? typed.question : ""}
        error={refused?.fields.question}
      />
      <SubmitRow>
        <SubmitButton>{t("send")}</SubmitButton>
      </SubmitRow>
    </form>
  );
}
