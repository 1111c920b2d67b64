import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { CheckFacts } from "@/components/claims/check-facts";
import { StepHead } from "@/components/claims/step-head";
import { Banner } from "@/components/ui/banner";
import { Button } from "@/components/ui/button";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { SubmitButton } from "@/components/ui/submit-button";
import { draftSentences } from "@/lib/web/draft-wording";
import { draftStepPath } from "@/lib/claims/paths";
import { discardAction, sendAction } from "../actions";
import { loadStep, type StepProps } from "../load-step";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("draft");
  return { title: t("steps.check") };
}

/** Last page of the flow: all that goes out, each with its way back, and what an assessor would still ask for. */
export default async function CheckStepPage(props: StepProps) {
  const { session, checked, showsAll } = await loadStep(props);
  const { claim, draft, context, problems } = checked;
  const [t, sentences] = await Promise.all([
    getTranslations("draft"),
    draftSentences(problems, "check", { showsAll: true, locale: session.actor.locale }),
  ]);
  const isAnswer = claim.state === "answerNeeded";
  return (
    <div className="grid max-w-2xl gap-6">
      <StepHead number={claim.number} step="check" problems={showsAll ? sentences : []} isAnswer={isAnswer} />
      {sentences.length > 0 ? (
        <Card title={t("check.missing", { count: sentences.length })}>
          <ul className="grid gap-2">
            {sentences.map((sentence) => (
              <li key={sentence.fieldId} id={sentence.fieldId}>
                <TextLink href={`${draftStepPath(claim, sentence.step)}?show=all#${sentence.fieldId}`}>
                  {sentence.text}
                </TextLink>
              </li>
            ))}
          </ul>
        </Card>
      ) : (
        <Banner kind="proven">{t("check.complete")}</Banner>
      )}
      <CheckFacts
        number={claim.number}
        draft={draft}
        family={context.family}
        lines={context.lines}
        evidence={context.evidence}
        rows={context.rows}
        currency={context.currency}
      />
      <form action={sendAction} className="grid gap-3">
        <input type="hidden" name="number" value={claim.number} />
        <input type="hidden" name="as" value={isAnswer ? "answer" : "file"} />
        <p className="text-ink-2">{t("check.nothingSent")}</p>
        <SubmitButton wide>{t(isAnswer ? "check.sendAnswer" : "check.send")}</SubmitButton>
      </form>
      {isAnswer ? null : (
        <form action={discardAction}>
          <input type="hidden" name="number" value={claim.number} />
          <Button type="submit" kind="quiet" small>
            {t("check.discard")}
          </Button>
        </form>
      )}
    </div>
  );
}
