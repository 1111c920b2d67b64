import { useTranslations } from "next-intl";
import { ReadingValue } from "@/components/returns/finding-view";
import { Card } from "@/components/ui/card";
import type { Locale } from "@/lib/kernel/locale";
import type { BenchStepView, BenchView } from "@/lib/returns/view";

/** What the bench does with a part of this family, the workshop's own figure beside each step. */
export function BenchPlan({ bench, locale }: { bench: BenchView; locale: Locale }) {
  const t = useTranslations("goodsIn.bench");
  const families = useTranslations("families");
  const { line, symptom, workshopNote, steps } = bench;
  return (
    <Card title={t("plan")} note={symptom ? families(`${line.family}.symptoms.${symptom}`) : undefined}>
      <h3 className="text-16">{t("said")}</h3>
      <p className="mb-4 max-w-measure whitespace-pre-wrap">{workshopNote || t("noNote")}</p>
      <ol className="grid list-decimal gap-2 pl-6">
        {steps.map((step) => (
          <li key={step.id}>
            <StepName step={step} />
            {step.does === "look" ? null : (
              <span className="block text-small text-ink-2">
                <Theirs step={step} locale={locale} />
              </span>
            )}
          </li>
        ))}
      </ol>
    </Card>
  );
}

function StepName({ step }: { step: BenchStepView }) {
  const words = useTranslations("returns.steps");
  const names = useTranslations("ruleBook.readings");
  return <>{step.does === "read" ? names(step.reading) : words(step.id)}</>;
}

function Theirs({ step, locale }: { step: BenchStepView; locale: Locale }) {
  const t = useTranslations("goodsIn.bench");
  if (step.theirs.length === 0) return <>{t("noTheirs")}</>;
  return (
    <>
      {t.rich("theirs", {
        values: () =>
          step.theirs.map((reading, place) => (
            <span key={place} className="tabular-nums">
              {place > 0 ? ", " : ""}
              <ReadingValue reading={reading} locale={locale} />
            </span>
          )),
      })}
    </>
  );
}
