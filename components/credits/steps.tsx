import { useTranslations } from "next-intl";
import { readableCreditValues } from "@/lib/credits/amount-text";
import type { Step } from "@/lib/kernel/explanation";
import type { Locale } from "@/lib/kernel/locale";

/** A chain of steps of a credit, each with its rule, its input and its figure. */
export function CreditSteps({ steps, locale }: { steps: readonly Step[]; locale: Locale }) {
  const t = useTranslations("creditSteps");
  const words = useTranslations("credits.card");
  return (
    <ol className="grid list-decimal gap-1 pl-6 text-small">
      {steps.map((step, place) => (
        // The same rule may come twice with the same figure; a chain never changes its order.
        <li key={place}>
          {t(step.rule, readableCreditValues(step.input, locale))}:{" "}
          <strong className="tabular-nums">
            {readableCreditValues({ figure: step.result }, locale).figure}
          </strong>
          {step.source ? (
            <span className="text-ink-2"> {words("source", { source: step.source })}</span>
          ) : null}
        </li>
      ))}
    </ol>
  );
}
