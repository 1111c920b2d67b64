import "server-only";
import { nextNoteNumber, yearOfNote, type NextNumber } from "@/lib/credits/note-number";
import { rows, type Work } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { Outcome } from "@/lib/kernel/outcome";

type Series = { prefix: string; year: number; lastSequence: number; lastIssuedOn: CalendarDay | null };

/**
 * The next number of the actor's notes in the year of a day. The series stays locked until the transaction ends, and what
 * is rolled back gives its number back: none is left out and none is taken twice.
 */
export async function takeNoteNumber(
  work: Work,
  { issuedOn, prefix }: { readonly issuedOn: CalendarDay; readonly prefix: string },
): Promise<Outcome<NextNumber, "noteDayBeforeLast">> {
  const key = [work.actor.organisationId, yearOfNote(issuedOn)];
  await rows(
    work,
    `insert into credit_note_series (seller_id, year, prefix) values ($1, $2, $3) on conflict (seller_id, year) do nothing`,
    [...key, prefix],
  );
  const [series] = await rows<Series>(
    work,
    `select prefix, year, last_sequence as "lastSequence", last_issued_on as "lastIssuedOn" from credit_note_series
     where seller_id = $1 and year = $2 for update`,
    key,
  );
  if (!series) throw new Error("a year has no series of credit notes");
  const next = nextNoteNumber(series, issuedOn);
  if (!next.ok) return next;
  await rows(
    work,
    "update credit_note_series set last_sequence = $3, last_issued_on = $4 where seller_id = $1 and year = $2 returning year",
    [...key, next.value.sequence, issuedOn],
  );
  return next;
}
