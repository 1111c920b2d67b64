import clsx from "clsx";
import { useTranslations } from "next-intl";

/** Where somebody is in a flow, in words; the ruled segments only repeat it. */
export function StepNote({ at, of, name }: { at: number; of: number; name: string }) {
  const t = useTranslations("ui");
  const steps = Array.from({ length: of }, (_, index) => index + 1);
  return (
    <div className="grid gap-1.5">
      <p className="text-small text-ink-2">{t("step", { at, of, name })}</p>
      <div aria-hidden="true" className="flex max-w-60 gap-1">
        {steps.map((step) => (
          <span
            key={step}
            className={clsx("h-0 flex-1 border-t-4", step <= at ? "border-petrol" : "border-rule")}
          />
        ))}
      </div>
    </div>
  );
}
