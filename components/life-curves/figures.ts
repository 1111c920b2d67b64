import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { MONTH_DAYS } from "@/lib/reliability/months";
import type { Estimate } from "@/lib/reports/life-curves/view";

/** A figure to so many significant digits as help: two decimals below ten, one below a hundred, none above. */
export const figure = (value: number, locale: Locale): string => {
  const most = value < 9.995 ? 2 : value < 99.95 ? 1 : 0;
  const least = value > 0 && value < 0.095 ? 2 : Math.min(1, most);
  return formatNumber(value, locale, { least: value === 0 ? 0 : least, most });
};

/** Days in service as months, one decimal. */
export const inMonths = (days: number, locale: Locale): string =>
  formatNumber(days / MONTH_DAYS, locale, { least: 1, most: 1 });

const LEAST_P = 0.0001;

type Say = (key: "estimate" | "estimateOpen", values: Record<string, string>) => string;

/** "4.1 (2.6 to 6.3)", or with "at least" where there is no upper limit. */
export const withLimits = ({ value, lower, upper }: Estimate, locale: Locale, say: Say): string =>
  upper === null
    ? say("estimateOpen", { value: figure(value, locale), lower: figure(lower, locale) })
    : say("estimate", {
        value: figure(value, locale),
        lower: figure(lower, locale),
        upper: figure(upper, locale),
      });

/** A p-value, with a floor below which its digits say nothing more. */
export const pValue = (p: number, locale: Locale, below: (least: string) => string): string =>
  p < LEAST_P
    ? below(formatNumber(LEAST_P, locale, { most: 4 }))
    : formatNumber(p, locale, { least: 2, most: p < 0.01 ? 4 : 2 });
