import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { Money } from "@/lib/kernel/money";
import type { Ages } from "./ages";

/** What a workshop's overview says above its list. Sums are by currency; none where there is nothing. */
export type WorkshopToday = {
  readonly ages: Ages;
  readonly openCount: number;
  readonly asked: readonly Money[];
  readonly promised: readonly Money[];
  readonly creditedThisMonth: readonly Money[];
  /** Parts the distributor called in that are still here, by claim, the first due first. */
  readonly toSend: readonly { readonly number: string; readonly dueOn: CalendarDay }[];
  /** Verdicts that can be contested for a week or less. */
  readonly contestSoon: readonly { readonly number: string; readonly until: CalendarDay }[];
};
