import { useTranslations } from "next-intl";
import type { Ages } from "@/lib/reports/workshop-today/ages";

/** Open claims by age: the numbers stand beside the bars, which only repeat them. */
export function AgeBars({ ages }: { ages: Ages }) {
  const t = useTranslations("workshopToday");
  const most = Math.max(1, ...ages.bands.map(({ count }) => count));
  return (
    <div>
      <h3 className="mb-2 text-18">{t("ages")}</h3>
      <dl className="grid gap-1">
        {ages.bands.map(({ code, count }) => (
          <div key={code} className="grid grid-cols-[8rem_2.5rem_minmax(0,1fr)] items-center gap-x-3">
            <dt className="text-small text-ink-2">{t(`bands.${code}`)}</dt>
            <dd className="text-right tabular-nums">{count}</dd>
            <svg aria-hidden="true" viewBox="0 0 100 12" preserveAspectRatio="none" className="h-3 w-full">
              <rect
                width={(100 * count) / most}
                height="12"
                className={code === "older" ? "fill-wanting" : "fill-petrol"}
              />
            </svg>
          </div>
        ))}
      </dl>
      <p className="mt-2 text-small text-ink-2">
        {t("waiting", { days: ages.openDays, oldest: ages.oldestDays })}
      </p>
    </div>
  );
}
