import "server-only";
import { rows, type Work } from "@/lib/db/unit-of-work";
import { dayInZone, type CalendarDay } from "@/lib/kernel/calendar-day";
import { addWorkingDays, endOfWorkingDay } from "@/lib/kernel/working-time";
import { evidenceRowsFor, type EvidenceRow } from "./evidence-list-shape";
import { ruleBody, type RuleBody, type RuleKind } from "./shapes";

/** A dated version in force: its number and title are what people cite. */
export type Rule<Kind extends RuleKind> = {
  readonly id: string;
  readonly ruleNumber: string;
  readonly title: string;
  readonly validFrom: CalendarDay;
  readonly body: RuleBody<Kind>;
};

type Question = { sellerId: string; family?: string | null; partId?: string | null; on: CalendarDay };

/**
 * The version that answers a question on a day: the one for the part before the one for its family before the general
 * one, and of those the newest already in force. Null where the distributor has written none.
 */
export async function findRule<Kind extends RuleKind>(
  work: Work,
  kind: Kind,
  { sellerId, family, partId, on }: Question,
): Promise<Rule<Kind> | null> {
  const [found] = await rows<Omit<Rule<Kind>, "body"> & { body: unknown }>(
    work,
    `select id, rule_number as "ruleNumber", title, valid_from as "validFrom", body
     from rule_book_versions
     where seller_id = $1 and kind = $2 and valid_from <= $5
       and (family is null or family = $3) and (part_id is null or part_id = $4)
     order by (part_id is not null) desc, (family is not null) desc, valid_from desc limit 1`,
    [sellerId, kind, family ?? null, partId ?? null, on],
  );
  return found ? { ...found, body: ruleBody(kind, found.body) } : null;
}

/** The Evidence list for a family and symptom on the filing day; without one, nothing is asked for. */
export async function evidenceListOn(
  work: Work,
  question: Question & { symptom: string },
): Promise<{ id: string | null; rows: readonly EvidenceRow[] }> {
  const rule = await findRule(work, "evidenceList", question);
  return { id: rule?.id ?? null, rows: rule ? evidenceRowsFor(rule.body, question.symptom) : [] };
}

/** When the distributor owes an answer to what was filed at this instant: the close of the working day its rules name. */
export async function answerDueAt(work: Work, sellerId: string, filedAt: Date): Promise<Date | null> {
  const rule = await findRule(work, "serviceLevels", { sellerId, on: dayInZone(filedAt, "UTC") });
  if (!rule) return null;
  const { calendar, answerWorkingDays } = rule.body;
  const dueOn = addWorkingDays(calendar, dayInZone(filedAt, calendar.timeZone), answerWorkingDays);
  return endOfWorkingDay(calendar, dueOn);
}
