import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { AskedFields } from "@/components/claims/asked-fields";
import { Cautions } from "@/components/claims/cautions";
import { DraftForm } from "@/components/claims/draft-form";
import { ExclusionFields } from "@/components/claims/exclusion-fields";
import { FaultFields } from "@/components/claims/fault-fields";
import { StepButtons } from "@/components/claims/step-buttons";
import { StepHead } from "@/components/claims/step-head";
import { SwapFields } from "@/components/claims/swap-fields";
import { draftSentences } from "@/lib/web/draft-wording";
import { todayOf } from "@/lib/access/today-queries";
import { saveStepAction } from "../actions";
import { loadStep, type StepProps } from "../load-step";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("draft");
  return { title: t("steps.fault") };
}

/** Second page of the flow: what failed and when, what was ruled out, how the part was found, and the swap that proves it. */
export default async function FaultStepPage(props: StepProps) {
  const { session, checked, showsAll } = await loadStep(props);
  const { draft, claim, context } = checked;
  const sentences = await draftSentences(checked.problems, "fault", {
    showsAll,
    locale: session.actor.locale,
  });
  return (
    <div className="grid max-w-2xl gap-6">
      <StepHead
        number={claim.number}
        step="fault"
        problems={sentences}
        isAnswer={claim.state === "answerNeeded"}
      />
      <Cautions family={context.family} />
      <DraftForm number={claim.number} action={saveStepAction} savedAt={checked.savedAt.toISOString()}>
        <input type="hidden" name="step" value="fault" />
        <FaultFields
          draft={draft}
          family={context.family}
          problems={sentences}
          locale={session.actor.locale}
          today={todayOf(session.actor)}
        />
        <ExclusionFields draft={draft} family={context.family} />
        <SwapFields draft={draft} />
        <AskedFields draft={draft} currency={context.currency} problems={sentences} />
        <StepButtons />
      </DraftForm>
    </div>
  );
}
