import { useTranslations } from "next-intl";
import { Mark } from "@/components/ui/status-mark";
import type { Coverage } from "@/lib/coverage/coverage";
import { readableValues } from "@/lib/kernel/readable";
import type { Locale } from "@/lib/kernel/locale";

const ANSWER = {
  covered: { shape: "tickSquare", tone: "proven" },
  outside: { shape: "barOctagon", tone: "refused" },
  open: { shape: "openDiamond", tone: "wanting" },
} as const;

/** The cover of a line as a chain of steps, each with its rule, its input and its figure; then the reasons. */
export function CoverageSteps({ coverage, locale }: { coverage: Coverage; locale: Locale }) {
  const t = useTranslations("coverage");
  const steps = useTranslations("steps");
  const sheet = useTranslations("sheet.coverage");
  return (
    <div className="grid gap-3">
      <p>
        <Mark {...ANSWER[coverage.answer]}>
          {t(`answers.${coverage.goodwillMayBeConsidered ? "outsideWithGoodwill" : coverage.answer}`)}
        </Mark>
      </p>
      <ul className="grid list-disc gap-1 pl-5">
        {coverage.reasons.map((reason) => (
          <li
            key={reason.code}
            className={
              reason.effect === "blocks"
                ? "font-semibold text-refused"
                : reason.effect === "opens"
                  ? "text-wanting"
                  : ""
            }
          >
            {t(`reasons.${reason.code}`, readableValues(reason.detail, locale))}
          </li>
        ))}
      </ul>
      <details className="print-open">
        <summary className="min-h-target cursor-pointer py-2 text-petrol underline underline-offset-4">
          {sheet("how")}
        </summary>
        <ol className="grid list-decimal gap-1 pl-6 text-small">
          {coverage.steps.map((step) => (
            <li key={`${step.rule}-${step.result}`}>
              {steps(step.rule, readableValues(step.input, locale))}:{" "}
              <strong className="tabular-nums">
                {readableValues({ result: step.result }, locale).result}
              </strong>
              {step.source ? (
                <span className="text-ink-2"> {sheet("source", { source: step.source })}</span>
              ) : null}
            </li>
          ))}
        </ol>
      </details>
    </div>
  );
}
