import "server-only";
import type { Coverage } from "@/lib/coverage/coverage";
import { rows, type Work } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { ClaimState, CreditState, ReturnState, VerdictOutcome } from "../lifecycle";
import type { Attribution } from "../verdict";

export type SheetClaim = {
  id: string;
  number: string;
  sellerId: string;
  workshopId: string;
  sellerName: string;
  workshopName: string;
  siteName: string | null;
  accountNumber: string;
  state: ClaimState;
  outcome: VerdictOutcome | null;
  family: string;
  symptom: string | null;
  currency: string;
  askedMinor: string;
  safetyReported: boolean;
  incidentKnownAt: Date | null;
  revision: number;
  holderId: string | null;
  holderName: string | null;
  heldUntil: Date | null;
  parkedWithId: string | null;
  parkedWithName: string | null;
  parkedQuestion: string | null;
  filedAt: Date | null;
  answerDueAt: Date | null;
  clockStoppedAt: Date | null;
  queryLapsesOn: CalendarDay | null;
  decidedById: string | null;
  contestUntil: CalendarDay | null;
  contestWaivedAt: Date | null;
  createdAt: Date;
};

export type SheetLine = {
  id: string;
  lineNumber: number;
  unitId: string | null;
  partId: string;
  askedMinor: string;
  verdict: VerdictOutcome | null;
  attribution: unknown;
  returnState: ReturnState;
  returnWaivedReason: string | null;
  creditState: CreditState;
};

export type SheetRevision = {
  revision: number;
  facts: unknown;
  sha256: string;
  sentAt: Date;
  sentBy: string | null;
};
export type SheetQuery = {
  round: number;
  items: unknown;
  question: string;
  askedAt: Date;
  answeredAt: Date | null;
  answeredRevision: number | null;
};
export type SheetVerdictLine = {
  lineNumber: number;
  outcome: VerdictOutcome;
  attribution: Attribution;
  reasonCode: string;
  reason: string;
  ruleNumber: string | null;
  ruleTitle: string | null;
  ruleValidFrom: CalendarDay | null;
  coverage: Coverage;
  returnWaivedReason: string | null;
};
export type SheetVerdict = {
  id: string;
  revision: number;
  outcome: VerdictOutcome;
  letter: string;
  decidedAt: Date;
  credit: unknown;
  lines: SheetVerdictLine[];
};
/** A credit note that was issued for the claim; one at most stands. */
export type SheetNote = { number: string; sellerId: string; verdictId: string; isStanding: boolean };
export type SheetEvidence = {
  id: string;
  rowId: string;
  kind: "photo" | "runLog" | "document";
  mediaType: string;
  originalName: string;
  sizeBytes: string;
  sha256: string;
  viewState: "waiting" | "ready" | "unreadable" | "notNeeded";
  widthPx: number | null;
  heightPx: number | null;
  captured: unknown;
  summary: unknown;
  receivedAt: Date;
};
export type SheetFlag = { kind: string; lineNumber: number | null; detail: Record<string, string>; at: Date };
export type SheetMessage = {
  id: string;
  authorName: string;
  authorOrganisation: string;
  audience: "both" | "own";
  body: string;
  at: Date;
};
export type SheetEntry = {
  seq: number;
  kind: string;
  actorName: string;
  actorOrganisation: string | null;
  onlyForId: string | null;
  detail: Record<string, unknown>;
  at: Date;
};

/** Everything one page of a claim shows, as stored; `present.ts` makes it a view. */
export type SheetRows = {
  claim: SheetClaim;
  lines: SheetLine[];
  revisions: SheetRevision[];
  queries: SheetQuery[];
  verdicts: SheetVerdict[];
  notes: SheetNote[];
  evidence: SheetEvidence[];
  flags: SheetFlag[];
  messages: SheetMessage[];
  timeline: SheetEntry[];
  installers: { code: string; name: string }[];
};

const CLAIM = `
  select c.id, c.number, c.seller_id as "sellerId", c.workshop_id as "workshopId", s.name as "sellerName",
    w.name as "workshopName", st.name as "siteName", t.account_number as "accountNumber", c.state, c.outcome, c.family,
    c.symptom, c.currency, c.asked_minor as "askedMinor", c.safety_reported as "safetyReported",
    c.incident_known_at as "incidentKnownAt", c.revision, c.holder_id as "holderId", h.name as "holderName",
    c.held_until as "heldUntil", c.parked_with_id as "parkedWithId", pk.name as "parkedWithName",
    c.parked_question as "parkedQuestion", c.filed_at as "filedAt", c.answer_due_at as "answerDueAt",
    c.clock_stopped_at as "clockStoppedAt", c.query_lapses_on as "queryLapsesOn", c.decided_by_id as "decidedById",
    c.contest_until as "contestUntil", c.contest_waived_at as "contestWaivedAt", c.created_at as "createdAt"
  from claims c
    join organisations s on s.id = c.seller_id
    join organisations w on w.id = c.workshop_id
    join trading_accounts t on t.id = c.account_id
    left join sites st on st.id = c.site_id
    left join users h on h.id = c.holder_id
    left join users pk on pk.id = c.parked_with_id
  where c.number = $1`;

const LINES = `select id, line_number as "lineNumber", unit_id as "unitId", part_id as "partId", asked_minor as "askedMinor",
  verdict, attribution, return_state as "returnState", return_waived_reason as "returnWaivedReason",
  credit_state as "creditState" from claim_lines where claim_id = $1 order by line_number`;

const REVISIONS = `select r.revision, r.facts, r.sha256, r.sent_at as "sentAt", u.name as "sentBy" from claim_revisions r
  left join users u on u.id = r.sent_by_id where r.claim_id = $1 order by r.revision`;

const QUERIES = `select round, items, question, asked_at as "askedAt", answered_at as "answeredAt",
  answered_revision as "answeredRevision" from claim_queries where claim_id = $1 order by round`;

const VERDICTS = `select v.id, v.revision, v.outcome, v.letter, v.decided_at as "decidedAt", v.credit,
  (select json_agg(json_build_object('lineNumber', l.line_number, 'outcome', x.outcome, 'attribution', x.attribution,
     'reasonCode', x.reason_code, 'reason', x.reason, 'ruleNumber', b.rule_number, 'ruleTitle', b.title,
     'ruleValidFrom', b.valid_from, 'coverage', x.coverage, 'returnWaivedReason', x.return_waived_reason)
     order by l.line_number)
   from verdict_lines x join claim_lines l on l.id = x.line_id
     left join rule_book_versions b on b.id = x.rule_version_id where x.verdict_id = v.id) as lines
  from verdicts v where v.claim_id = $1 order by v.decided_at desc`;

const NOTES = `select n.number, n.seller_id as "sellerId", n.verdict_id as "verdictId",
  not exists (select 1 from credit_notes x where x.counters_id = n.id) as "isStanding"
  from credit_notes n where n.claim_id = $1 and n.kind = 'credit' order by n.issued_at desc`;

const EVIDENCE = `select id, row_id as "rowId", kind, media_type as "mediaType", original_name as "originalName",
  size_bytes as "sizeBytes", sha256, view_state as "viewState", width_px as "widthPx", height_px as "heightPx", captured,
  summary, received_at as "receivedAt" from evidence_files where claim_id = $1 and withdrawn_at is null
  order by received_at, id`;

const FLAGS = `select kind, line_number as "lineNumber", detail, at from claim_flags where claim_id = $1 order by at`;

const MESSAGES = `select m.id, m.author_name as "authorName", o.name as "authorOrganisation", m.audience, m.body, m.at
  from claim_messages m join organisations o on o.id = m.author_organisation_id where m.claim_id = $1 order by m.at, m.id`;

const TIMELINE = `select e.seq, e.kind, e.actor_name as "actorName", o.name as "actorOrganisation",
  e.only_for_id as "onlyForId", e.detail, e.at
  from timeline_entries e left join organisations o on o.id = e.actor_organisation_id where e.claim_id = $1 order by e.seq`;

const INSTALLERS = `select code, name from installers where workshop_id = $1`;

/**
 * The claim of that number with all that belongs to it; null where this organisation has no such claim. Row security
 * decides which of it is there.
 */
export async function sheetRows(work: Work, number: string): Promise<SheetRows | null> {
  const [claim] = await rows<SheetClaim>(work, CLAIM, [number]);
  if (!claim) return null;
  const of = <Row extends object>(sql: string, bind: unknown = claim.id) => rows<Row>(work, sql, [bind]);
  return {
    claim,
    lines: await of<SheetLine>(LINES),
    revisions: await of<SheetRevision>(REVISIONS),
    queries: await of<SheetQuery>(QUERIES),
    verdicts: await of<SheetVerdict>(VERDICTS),
    notes: await of<SheetNote>(NOTES),
    evidence: await of<SheetEvidence>(EVIDENCE),
    flags: await of<SheetFlag>(FLAGS),
    messages: await of<SheetMessage>(MESSAGES),
    timeline: await of<SheetEntry>(TIMELINE),
    installers: await of<{ code: string; name: string }>(INSTALLERS, work.actor.organisationId),
  };
}
