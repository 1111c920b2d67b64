import { useTranslations } from "next-intl";
import { ErrorSummary, type Problem } from "@/components/ui/error-summary";
import { PageHeader } from "@/components/ui/page-header";
import { StepNote } from "@/components/ui/step-note";
import { printClaimNumber } from "@/lib/claims/number";
import { DRAFT_STEPS, type DraftStep } from "@/lib/claims/paths";

type StepHeadProps = { number: string; step: DraftStep; problems: readonly Problem[]; isAnswer: boolean };

/** Where somebody is in the flow, and what has to be put right on this page. */
export function StepHead({ number, step, problems, isAnswer }: StepHeadProps) {
  const t = useTranslations("draft");
  return (
    <div className="grid gap-4">
      <PageHeader
        eyebrow={t(isAnswer ? "answering" : "draftOf", { number: printClaimNumber(number) })}
        title={t(`titles.${step}`)}
      />
      <StepNote at={DRAFT_STEPS.indexOf(step) + 1} of={DRAFT_STEPS.length} name={t(`steps.${step}`)} />
      <ErrorSummary problems={problems} />
    </div>
  );
}
