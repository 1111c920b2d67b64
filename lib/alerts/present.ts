import { printClaimNumber } from "@/lib/claims/number";
import { parseCalendarDay } from "@/lib/kernel/calendar-day";
import { formatDay } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { alertKind } from "./kinds";
import type { AlertView } from "./view";

export type AlertRow = {
  readonly id: string;
  readonly kind: string;
  readonly claimNumber: string;
  readonly params: Readonly<Record<string, unknown>>;
  readonly at: Date;
  readonly readAt: Date | null;
};

const DAY_OR_INSTANT = /^\d{4}-\d\d-\d\d(T.*)?$/u;

/** A text of the params as it is read: a day, or the day of an instant, in words; everything else as it stands. */
function wordOf(text: string, locale: Locale): string {
  const day = DAY_OR_INSTANT.test(text) ? parseCalendarDay(text.slice(0, 10)) : null;
  return day ? formatDay(day, locale) : text;
}

/** Every value a sentence of ours may ask for; one that is missing is empty and never a fault of the page. */
const NO_VALUES = {
  distributor: "",
  workshop: "",
  part: "",
  answerBy: "",
  contestUntil: "",
  sendBy: "",
  returnNumber: "",
  outcome: "",
  revision: 0,
};

/** A row as the list shows it, in the reader's language. */
export function presentAlert(
  { id, kind, claimNumber, params, at, readAt }: AlertRow,
  locale: Locale,
): AlertView {
  const values: Record<string, string | number> = { ...NO_VALUES };
  for (const [name, value] of Object.entries(params)) {
    if (typeof value === "number") values[name] = value;
    if (typeof value === "string") values[name] = wordOf(value, locale);
  }
  const number = printClaimNumber(claimNumber);
  return {
    id,
    kind: alertKind(kind),
    number,
    values: { ...values, number },
    at: at.toISOString(),
    isUnread: readAt === null,
  };
}
