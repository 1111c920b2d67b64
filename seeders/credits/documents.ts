import {
  counterDocument,
  noteDocument,
  type NoteDocument,
  type NoteParty,
} from "@/lib/credits/note-document";
import { nextNoteNumber, yearOfNote, type NoteSeries } from "@/lib/credits/note-number";
import { printClaimNumber } from "@/lib/claims/number";
import { calendarDay, dayInZone, type CalendarDay } from "@/lib/kernel/calendar-day";
import { reasonText } from "../claims/deciding";
import type { Scene } from "../claims/scene";
import { accountBetween, ORGANISATIONS, type OrganisationKey, type SellerKey } from "../story/organisations";
import { ruleOn } from "../story/rule-book";
import type { Movement } from "./movements";

/** A numbered document of the story: a credit note, or the one that counters it. */
export type Document = {
  readonly movement: Movement;
  readonly document: NoteDocument;
  readonly year: number;
  readonly sequence: number;
};

type Books = { readonly documents: readonly Document[]; readonly series: readonly NoteSeries[] };

/** Numbers the documents of a distributor year by year in the order of their days, without a gap. */
export function documentsOf(seller: SellerKey, movements: readonly Movement[]): Books {
  const series = new Map<number, NoteSeries>();
  const notes = new Map<Scene, NoteDocument>();
  const documents = movements.flatMap((movement): Document[] => {
    if (movement.what === "allocated") return [];
    const issuedOn = dayInZone(movement.at, ORGANISATIONS[seller].timeZone);
    const year = yearOfNote(issuedOn);
    const before = series.get(year) ?? newSeries(movement, year, issuedOn);
    const next = nextNoteNumber(before, issuedOn);
    if (!next.ok) throw new RangeError(`${movement.scene.one.number}: ${next.code}`);
    const { number, sequence } = next.value;
    series.set(year, next.value.series);
    const document = documentFor(movement, { number, issuedOn, note: notes.get(movement.scene) ?? null });
    notes.set(movement.scene, document);
    return [{ movement, document, year, sequence }];
  });
  return { documents, series: [...series.values()] };
}

function newSeries({ scene: { one, world } }: Movement, year: number, on: CalendarDay): NoteSeries {
  const { notePrefix } = ruleOn(world.ruleBook, { seller: one.seller, kind: "credit", on }).body;
  return { prefix: notePrefix, year, lastSequence: 0, lastIssuedOn: null };
}

type Head = { readonly number: string; readonly issuedOn: CalendarDay; readonly note: NoteDocument | null };

function documentFor({ scene, note: made }: Movement, { number, issuedOn, note }: Head): NoteDocument {
  if (note && made.countered)
    return counterDocument(note, { number, issuedOn, reason: made.countered.reason });
  const { one, given } = scene;
  const seen = scene.sent.at(-1);
  if (!given || !seen) throw new RangeError(`${one.number}: a note without a verdict`);
  return noteDocument({
    number,
    issuedOn,
    seller: partyOf(one.seller),
    buyer: partyOf(one.workshop),
    accountNumber: accountBetween(one.seller, one.workshop).number,
    claim: {
      number: printClaimNumber(one.number),
      filedOn: calendarDay(seen.facts.filedOn),
      decidedOn: given.decidedOn,
    },
    credit: given.credit,
    claimLines: one.lines.map((line, place) => {
      const reasonCode = given.lines[place]?.reasonCode ?? "faultOfThePart";
      return {
        lineNumber: place + 1,
        partNumber: line.part.number,
        partName: line.part.name,
        serial: line.serialTyped === "" ? null : line.serialTyped,
        quantity: line.quantity,
        invoicedOn: line.sale?.day ?? null,
        reasonCode,
        reason: reasonText(scene, reasonCode),
      };
    }),
  });
}

function partyOf(key: OrganisationKey): NoteParty {
  const { name, legalName, address, country, taxNumber } = ORGANISATIONS[key];
  return { name, legalName, address, country, taxNumber };
}
