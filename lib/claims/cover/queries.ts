import "server-only";
import type { Actor } from "@/lib/access/actor";
import { todayOf } from "@/lib/access/today-queries";
import { coverageOn, type Coverage } from "@/lib/coverage/coverage";
import {
  asSeenByWorkshop,
  type CoverageFacts,
  type EarlierUnit,
  type TermsInForce,
} from "@/lib/coverage/facts";
import { chainTo } from "@/lib/coverage/replacement-chain";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { calendarDay, dayInZone, parseCalendarDay, type CalendarDay } from "@/lib/kernel/calendar-day";
import { normaliseSerial } from "@/lib/labels/serial";
import { findRule, type Rule } from "@/lib/rule-book/queries";
import type { ClaimFacts, FactLine } from "../facts-shape";
import { printClaimNumber } from "../number";
import { zoneOf } from "../parties/queries";

/** What is known of a line when its cover is asked: the ids are the database's, the days those of the claim. */
export type LineToCover = {
  readonly claimId: string;
  readonly sellerId: string;
  readonly workshopId: string;
  readonly family: string;
  readonly partId: string;
  readonly unitId: string | null;
  readonly serialTyped: string | null;
  readonly shippedOn: string | null;
  readonly fittedOn: string | null;
  readonly failedOn: CalendarDay;
  readonly filedOn: CalendarDay;
  readonly evidenceMissing: number;
};

type Between = { readonly id: string; readonly sellerId: string; readonly workshopId: string };

/** A line as it was sent, asked for its cover. */
export const lineToCover = (
  claim: Between,
  { facts, line }: { readonly facts: ClaimFacts; readonly line: FactLine },
  evidenceMissing: number,
): LineToCover => ({
  claimId: claim.id,
  sellerId: claim.sellerId,
  workshopId: claim.workshopId,
  family: facts.family,
  partId: line.part.id,
  unitId: line.unit?.id ?? null,
  serialTyped: line.serialTyped,
  shippedOn: line.invoiceLine?.shippedOn ?? null,
  fittedOn: line.fittedOn,
  failedOn: calendarDay(facts.failedOn),
  filedOn: calendarDay(facts.filedOn),
  evidenceMissing,
});

export type CoveredLine = { readonly coverage: Coverage; readonly terms: Rule<"terms"> | null };

type UnitRow = { id: string; buyerId: string | null; shippedOn: CalendarDay | null };
type ChainRow = {
  id: string;
  replaces: string | null;
  shippedOn: CalendarDay | null;
  fittedOn: CalendarDay | null;
};

const citing = (rule: Rule<"terms"> | null): TermsInForce | null =>
  rule && { terms: rule.body, version: `${rule.ruleNumber} (${rule.validFrom})` };

async function findUnit(work: Work, line: LineToCover): Promise<UnitRow | null> {
  const [found] = await rows<UnitRow>(
    work,
    `select u.id, u.buyer_id as "buyerId", l.shipped_on as "shippedOn" from units u
       left join invoice_lines l on l.seller_id = u.seller_id and l.id = u.invoice_line_id
     where u.seller_id = $1 and (u.id = $2 or ($2 is null and u.serial_normal = $3)) limit 1`,
    [line.sellerId, line.unitId, normaliseSerial(line.serialTyped ?? "") || null],
  );
  return found ?? null;
}

/** The units a unit stands in for, the bought one first, with the days that start their terms. */
async function findChain(work: Work, sellerId: string, unitId: string): Promise<EarlierUnit[]> {
  const found = await rows<ChainRow>(
    work,
    `with recursive chain as (
       select u.*, 1 as depth from units u where u.seller_id = $1 and u.id = $2
       union all select e.*, c.depth + 1 from chain c join units e on e.seller_id = c.seller_id and e.id = c.replaces_unit_id
         where c.supplied_under_claim and c.depth < 20)
     select c.id, case when c.supplied_under_claim then c.replaces_unit_id end as replaces, l.shipped_on as "shippedOn",
       (select min(f.fitted_on) from fittings f where f.seller_id = c.seller_id and f.unit_id = c.id) as "fittedOn"
     from chain c left join invoice_lines l on l.seller_id = c.seller_id and l.id = c.invoice_line_id`,
    [sellerId, unitId],
  );
  const byId = new Map(found.map((unit) => [unit.id, unit]));
  const replaced = new Map(
    found.flatMap((unit) => (unit.replaces ? [[unit.id, unit.replaces] as const] : [])),
  );
  return chainTo(unitId, replaced).flatMap((id) => {
    const unit = byId.get(id);
    return unit?.shippedOn ? [{ shippedOn: unit.shippedOn, fittedOn: unit.fittedOn }] : [];
  });
}

type Other = { number: string; workshopId: string; holds: boolean; credited: boolean };

/** Other claims on the unit, as far as the asking organisation may see them. */
const listOthers = (work: Work, line: LineToCover, unitId: string): Promise<Other[]> =>
  rows<Other>(
    work,
    `select c.number, c.workshop_id as "workshopId", l.holds_unit as holds,
       l.credit_state in ('noteIssued', 'allocated', 'paidOut', 'replaced') and l.verdict = 'upheld' as credited
     from claim_lines l join claims c on c.id = l.claim_id
     where l.seller_id = $1 and l.unit_id = $2 and l.claim_id <> $3 order by c.filed_at`,
    [line.sellerId, unitId, line.claimId],
  );

type Gathered = {
  unit: UnitRow | null;
  chain: EarlierUnit[];
  others: Other[];
  terms: Rule<"terms"> | null;
  rootTerms: Rule<"terms"> | null;
};

async function gather(work: Work, line: LineToCover): Promise<Gathered> {
  const unit = line.unitId || line.serialTyped ? await findUnit(work, line) : null;
  const chain = unit ? await findChain(work, line.sellerId, unit.id) : [];
  const others = unit ? await listOthers(work, line, unit.id) : [];
  const shippedOn = unit?.shippedOn ?? parseCalendarDay(line.shippedOn ?? "");
  const termsOn = (on: CalendarDay) =>
    findRule(work, "terms", { sellerId: line.sellerId, family: line.family, partId: line.partId, on });
  const root = chain[0];
  return {
    unit,
    chain,
    others,
    terms: shippedOn ? await termsOn(shippedOn) : null,
    rootTerms: root ? await termsOn(root.shippedOn) : null,
  };
}

function factsOf(line: LineToCover, known: Gathered, timeZone: string): CoverageFacts {
  const { unit, chain, others, terms, rootTerms } = known;
  const shippedOn = unit ? unit.shippedOn : parseCalendarDay(line.shippedOn ?? "");
  const credited = others.find((other) => other.credited);
  const holder = others.find((other) => other.holds);
  return {
    serial: line.serialTyped,
    shipment: shippedOn && {
      shippedOn,
      to: !unit || unit.buyerId === line.workshopId ? "claimant" : "otherOrganisation",
    },
    terms: citing(terms),
    chain,
    rootTerms: citing(rootTerms),
    fittedOn: line.fittedOn ? calendarDay(line.fittedOn) : null,
    failedOn: line.failedOn,
    filing: { filedOn: line.filedOn, timeZone, lateReasonGiven: false },
    todayOn: dayInZone(new Date(), timeZone),
    creditedUnder: credited
      ? {
          claimNumber: printClaimNumber(credited.number),
          ofClaimant: credited.workshopId === line.workshopId,
        }
      : null,
    heldBy: holder ? { claimNumber: printClaimNumber(holder.number) } : null,
    price: shippedOn ? "invoiceLine" : "unknown",
    evidenceMissing: line.evidenceMissing,
  };
}

/**
 * Whether a line is covered, with its steps, as the asking organisation may know it: the workshop's answer never tells
 * of another organisation's unit, claim or credit.
 */
export async function coverageOfLine(work: Work, line: LineToCover): Promise<CoveredLine> {
  const known = await gather(work, line);
  const facts = factsOf(line, known, await zoneOf(work, line.sellerId));
  const seen = work.actor.organisationId === line.sellerId ? facts : asSeenByWorkshop(facts);
  return { coverage: coverageOn(seen), terms: known.terms };
}

/** What the seller knows of a line without what belongs to another organisation: as if the workshop itself had asked. */
const knownToBoth = (line: LineToCover, known: Gathered): Gathered => {
  const others = known.others.filter(({ workshopId }) => workshopId === line.workshopId);
  if (known.unit === null || known.unit.buyerId === line.workshopId) return { ...known, others };
  return { unit: null, chain: [], others, terms: null, rootTerms: null };
};

/**
 * The same as both parties may keep it, whoever asks: the cover a verdict is stored with, which the workshop reads. The
 * terms are those the distributor found.
 */
export async function coverageForBoth(work: Work, line: LineToCover): Promise<CoveredLine> {
  const known = await gather(work, line);
  const facts = factsOf(line, knownToBoth(line, known), await zoneOf(work, line.sellerId));
  return { coverage: coverageOn(asSeenByWorkshop(facts)), terms: known.terms };
}

const NO_CLAIM = "00000000-0000-0000-0000-000000000000";

type UnitToPreview = {
  unitId: string;
  serial: string;
  partId: string;
  family: string;
  sellerId: string;
  shippedOn: CalendarDay;
  fittedOn: CalendarDay | null;
};

/** The cover of a unit as it would stand if it failed today: what a technician wants to know before starting. */
export const previewCover = (actor: Actor, unit: UnitToPreview): Promise<Coverage> =>
  unitOfWork(actor, async (work) => {
    const today = todayOf(actor);
    const { coverage } = await coverageOfLine(work, {
      claimId: NO_CLAIM,
      sellerId: unit.sellerId,
      workshopId: actor.organisationId,
      family: unit.family,
      partId: unit.partId,
      unitId: unit.unitId,
      serialTyped: unit.serial,
      shippedOn: unit.shippedOn,
      fittedOn: unit.fittedOn,
      failedOn: today,
      filedOn: today,
      evidenceMissing: 0,
    });
    return coverage;
  });
