import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { Cautions } from "@/components/claims/cautions";
import { DraftForm } from "@/components/claims/draft-form";
import { EvidenceFields } from "@/components/claims/evidence-fields";
import { StepButtons } from "@/components/claims/step-buttons";
import { StepHead } from "@/components/claims/step-head";
import { Banner } from "@/components/ui/banner";
import { findOpenQuery } from "@/lib/claims/filing/queries";
import { draftSentences } from "@/lib/web/draft-wording";
import { listEvidence } from "@/lib/evidence-files/queries";
import { saveStepAction } from "../actions";
import { loadStep, type StepProps } from "../load-step";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("draft");
  return { title: t("steps.evidence") };
}

/** Third page of the flow: the Evidence list of this family and symptom; each row says why it is wanted. */
export default async function EvidenceStepPage(props: StepProps) {
  const { session, checked, showsAll } = await loadStep(props);
  const { draft, claim, context } = checked;
  const [t, sentences, query, files] = await Promise.all([
    getTranslations("draft"),
    draftSentences(checked.problems, "evidence", { showsAll, locale: session.actor.locale }),
    findOpenQuery(session.actor, claim.id),
    listEvidence(session.actor, claim.id),
  ]);
  return (
    <div className="grid max-w-2xl gap-6">
      <StepHead
        number={claim.number}
        step="evidence"
        problems={sentences}
        isAnswer={claim.state === "answerNeeded"}
      />
      {query ? (
        <Banner kind="wanting" title={t("queryTitle")}>
          {query.question}
        </Banner>
      ) : null}
      <Cautions family={context.family} isFolded />
      <DraftForm number={claim.number} action={saveStepAction} savedAt={checked.savedAt.toISOString()}>
        <input type="hidden" name="step" value="evidence" />
        <EvidenceFields
          claimId={claim.id}
          number={claim.number}
          draft={draft}
          family={context.family}
          rows={context.rows}
          files={files}
          askedRows={query?.rowIds ?? []}
          problems={sentences}
        />
        <StepButtons />
      </DraftForm>
    </div>
  );
}
