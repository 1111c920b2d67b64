import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { ClaimState, ReturnState } from "@/lib/claims/lifecycle";
import { seesClaim } from "@/lib/claims/seeing";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { Disposal, FindingKind, ParcelCondition } from "./kinds";
import { presentReturns } from "./present";
import type { ReturnView } from "./view";

export type ReturnRow = {
  id: string;
  number: string;
  claimId: string;
  claimNumber: string;
  claimState: ClaimState;
  holderId: string | null;
  sellerId: string;
  workshopId: string;
  sellerName: string;
  workshopName: string;
  siteName: string | null;
  sendTo: string;
  instructions: string;
  dueOn: CalendarDay;
  calledInAt: Date;
  dispatchedAt: Date | null;
  carrier: string | null;
  trackingNumber: string | null;
};

export type ReturnLineRow = {
  returnId: string;
  lineId: string;
  lineNumber: number;
  partName: string;
  partNumber: string;
  family: string;
  serial: string | null;
  state: ReturnState;
  serialSeen: string | null;
  place: string | null;
  condition: ParcelCondition | null;
  parcelId: string | null;
  receivedAt: Date | null;
  disposedAs: Disposal | null;
};

export type FindingRow = {
  id: string;
  lineId: string;
  kind: FindingKind;
  note: string;
  runMinutes: string | null;
  foundAt: Date;
  foundBy: string | null;
  bench: unknown;
  logId: string | null;
  logSummary: unknown;
  readings: {
    kind: string;
    rawText: string;
    unit: string;
    value: number | null;
    temperatureCelsius: number | null;
    instrument: string | null;
  }[];
};

const RETURNS = `select r.id, r.number, r.claim_id as "claimId", c.number as "claimNumber", c.state as "claimState",
    c.holder_id as "holderId", r.seller_id as "sellerId", r.workshop_id as "workshopId", s.name as "sellerName",
    w.name as "workshopName", st.name as "siteName", r.send_to as "sendTo", r.instructions, r.due_on as "dueOn",
    r.called_in_at as "calledInAt", r.dispatched_at as "dispatchedAt", r.carrier, r.tracking_number as "trackingNumber"
  from part_returns r join claims c on c.id = r.claim_id join organisations s on s.id = r.seller_id
    join organisations w on w.id = r.workshop_id left join sites st on st.id = c.site_id`;

// A line that was called in again belongs to its newest return alone.
const LINES = `select x.return_id as "returnId", l.id as "lineId", l.line_number as "lineNumber", p.name as "partName",
    p.part_number as "partNumber", p.family, coalesce(u.serial, l.serial_typed) as serial, l.return_state as state,
    x.serial_seen as "serialSeen", x.place, k.condition, k.id as "parcelId", x.received_at as "receivedAt", x.disposed_as as "disposedAs"
  from return_lines x join part_returns r on r.id = x.return_id join claim_lines l on l.id = x.line_id
    join parts p on p.seller_id = l.seller_id and p.id = l.part_id
    left join units u on u.seller_id = l.seller_id and u.id = l.unit_id
    left join parcels k on k.seller_id = x.seller_id and k.id = x.parcel_id
  where x.return_id = any ($1::uuid[]) and not exists (select 1 from return_lines y join part_returns n on n.id = y.return_id
    where y.line_id = x.line_id and (n.called_in_at, n.id) > (r.called_in_at, r.id))
  order by l.line_number`;

const FINDINGS = `select distinct on (f.line_id) f.id, f.line_id as "lineId", f.kind, f.note, f.run_minutes as "runMinutes",
    f.found_at as "foundAt", b.name as "foundBy", f.bench, e.id as "logId", e.summary as "logSummary",
    coalesce((select json_agg(json_build_object('kind', g.kind, 'rawText', g.raw_text, 'unit', g.unit,
       'value', g.canonical_value, 'temperatureCelsius', g.temperature_celsius, 'instrument', g.instrument) order by g.kind)
     from readings g where g.finding_id = f.id), '[]') as readings
  from findings f left join users b on b.id = f.found_by_id left join evidence_files e on e.id = f.evidence_id
  where f.line_id = any ($1::uuid[]) order by f.line_id, f.found_at desc, f.id`;

async function complete(work: Work, found: readonly ReturnRow[]): Promise<ReturnView[]> {
  const lines = await rows<ReturnLineRow>(work, LINES, [found.map(({ id }) => id)]);
  const findings = await rows<FindingRow>(work, FINDINGS, [lines.map(({ lineId }) => lineId)]);
  return presentReturns(work.actor, { returns: found, lines, findings });
}

/** The parts of a claim that were called in, newest first; empty where this organisation has no such claim. */
export const listReturnsOfClaim = (actor: Actor, claimNumber: string): Promise<ReturnView[]> =>
  unitOfWork(actor, async (work) => {
    const found = await rows<ReturnRow>(
      work,
      `${RETURNS} where c.number = $1 order by r.called_in_at desc, r.id`,
      [claimNumber],
    );
    return found[0] && seesClaim(actor, found[0]) ? complete(work, found) : [];
  });

/** One return inside a transaction; null where this organisation, or this person's role in it, has no such return. */
export async function returnIn(work: Work, number: string): Promise<ReturnView | null> {
  const [found] = await rows<ReturnRow>(work, `${RETURNS} where r.number = $1`, [number]);
  if (!found || !seesClaim(work.actor, found)) return null;
  const [view] = await complete(work, [found]);
  return view ?? null;
}

/** One return by its nine digits; null where this organisation, or this person's role in it, has no such return. */
export const findReturn = (actor: Actor, number: string): Promise<ReturnView | null> =>
  unitOfWork(actor, (work) => returnIn(work, number));
