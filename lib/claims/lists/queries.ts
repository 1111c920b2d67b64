import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { keysOf } from "@/lib/kernel/keys";
import { normaliseSerial } from "@/lib/labels/serial";
import type { ClaimState, VerdictOutcome } from "../lifecycle";
import { presentList } from "./present";
import {
  JUDGING_VIEWS,
  PAGE_SIZE,
  WORKSHOP_VIEWS,
  type ListOrder,
  type ListQuery,
  type ListView,
} from "./schema";
import type { ClaimItems } from "./view";

export type ListedClaim = {
  number: string;
  state: ClaimState;
  outcome: VerdictOutcome | null;
  partName: string | null;
  partNumber: string | null;
  serial: string | null;
  family: string | null;
  symptom: string | null;
  otherParty: string;
  lineCount: number;
  askedMinor: string;
  currency: string;
  filedAt: Date | null;
  updatedAt: Date;
  answerDueAt: Date | null;
  clockStoppedAt: Date | null;
  safetyReported: boolean;
  holderName: string | null;
  isHeldByMe: boolean;
  isParkedWithMe: boolean;
  /** Doubts on record; only ever more than 0 for the distributor. */
  flagCount: number;
};

export type ClaimList = { claims: ListedClaim[]; total: number; counts: Partial<Record<ListView, number>> };

type Side = keyof typeof VIEWS;
type ViewKey = `received.${(typeof JUDGING_VIEWS)[number]}` | `own.${(typeof WORKSHOP_VIEWS)[number]}`;

/** The views of each side, in the order they are shown: claims it received, and claims of its own. */
const VIEWS = { received: JUDGING_VIEWS, own: WORKSHOP_VIEWS } as const;

// Conditions of the views. $1 is the organisation, $2 the person. Every one begins with an indexed state.
const VIEW: Readonly<Record<ViewKey, string>> = {
  "received.toJudge": "c.state in ('filed', 'contested')",
  "received.held": "c.state = 'beingJudged' and c.holder_id = $2",
  "received.parked": "c.state = 'beingJudged' and c.parked_with_id = $2",
  "received.waiting": "c.state = 'answerNeeded'",
  "received.decided": "c.state = 'decided'",
  "received.all": "c.state not in ('draft', 'discarded')",
  "own.onUs": "c.state in ('draft', 'answerNeeded')",
  "own.onThem": "c.state in ('filed', 'beingJudged', 'contested')",
  "own.decided": "c.state = 'decided'",
  "own.closed": "c.state in ('settled', 'withdrawn', 'lapsed')",
  "own.all": "c.state <> 'discarded'",
};

/** The condition of a view, if the side has it. */
const viewKey = (side: Side, view: ListView): ViewKey | undefined =>
  keysOf(VIEW).find((key) => key === `${side}.${view}`);

// Orders are looked up here and never pasted from an address. Every one ends in the id, so that pages never overlap.
const ORDER: Readonly<Record<ListOrder, string>> = {
  urgent: "c.safety_reported desc, c.answer_due_at asc nulls last, c.filed_at asc nulls first, c.id",
  filed: "c.filed_at asc nulls first, c.id",
  "-filed": "c.filed_at desc nulls first, c.id",
  asked: "c.asked_minor asc, c.id",
  "-asked": "c.asked_minor desc, c.id",
  due: "c.answer_due_at asc nulls last, c.id",
};

const COLUMNS = `c.number, c.state, c.outcome, p.name as "partName", p.part_number as "partNumber",
    coalesce(u.serial, d.body #>> '{lines,0,serial}') as serial, c.family, c.symptom,
    o.name as "otherParty", coalesce(n.line_count, 0)::int as "lineCount", c.asked_minor as "askedMinor",
    c.currency, c.filed_at as "filedAt", c.updated_at as "updatedAt", c.answer_due_at as "answerDueAt",
    c.clock_stopped_at as "clockStoppedAt", c.safety_reported as "safetyReported", h.name as "holderName",
    coalesce(c.holder_id = $2, false) as "isHeldByMe", coalesce(c.parked_with_id = $2, false) as "isParkedWithMe",
    (select count(*)::int from claim_flags f where f.claim_id = c.id) as "flagCount"`;

const DETAILS = `left join users h on h.id = c.holder_id
    left join lateral (select count(*) as line_count, min(line_number) as first from claim_lines l where l.claim_id = c.id) n on true
    left join claim_lines l1 on l1.claim_id = c.id and l1.line_number = n.first
    left join claim_drafts d on d.claim_id = c.id and c.state = 'draft'
    left join parts p on p.id = coalesce(l1.part_id, (d.body #>> '{lines,0,partId}')::uuid)
    left join units u on u.id = l1.unit_id`;

// Whose claims they are, and who the other party is.
const CLAIMS: Readonly<Record<Side, string>> = {
  received: "claims c join organisations o on o.id = c.workshop_id",
  own: "claims c join organisations o on o.id = c.seller_id",
};
const MINE: Readonly<Record<Side, string>> = { received: "c.seller_id = $1", own: "c.workshop_id = $1" };

/** A search: a claim number, a serial, or the beginning of a part number or of the other party's name. */
const SEARCH = `($3 = '' or c.number = $4 or exists (select 1 from claim_lines s join parts sp on sp.id = s.part_id
    left join units su on su.id = s.unit_id where s.claim_id = c.id
      and (su.serial_normal = $5 or sp.part_number ilike $6 or sp.name ilike $6)) or o.name ilike $6)`;

const escapeLike = (text: string) => text.replace(/[\\%_]/gu, (sign) => `\\${sign}`);

const bindings = (work: Work, { q }: ListQuery): unknown[] => {
  const typed = q.trim();
  return [
    work.actor.organisationId,
    work.actor.userId,
    typed,
    typed.replace(/\D/gu, ""),
    normaliseSerial(typed),
    `%${escapeLike(typed)}%`,
  ];
};

type Asked = ListQuery & { view: ListView };

async function listSide(work: Work, side: Side, query: Asked): Promise<ClaimList> {
  const counts = await countViews(work, side);
  const view = viewKey(side, query.view);
  if (!view) return { claims: [], total: 0, counts };
  const bind = bindings(work, query);
  const claims = await rows<ListedClaim>(
    work,
    `select ${COLUMNS} from ${CLAIMS[side]} ${DETAILS} where ${MINE[side]} and ${VIEW[view]} and ${SEARCH}
     order by ${ORDER[query.order]} limit ${PAGE_SIZE} offset $7`,
    [...bind, (query.page - 1) * PAGE_SIZE],
  );
  const [total] = await rows<{ count: number }>(
    work,
    `select count(*)::int as count from ${CLAIMS[side]} where ${MINE[side]} and ${VIEW[view]} and ${SEARCH}
       and $2::uuid is not null`,
    bind,
  );
  return { claims, total: total?.count ?? 0, counts };
}

/** Counts stop at a thousand: nobody reads further, and they cost the same however large the table grows. */
const COUNT_TO = 1000;

async function countViews(work: Work, side: Side): Promise<ClaimList["counts"]> {
  const counts: Partial<Record<ListView, number>> = {};
  for (const view of VIEWS[side]) {
    const key = viewKey(side, view);
    if (!key) continue;
    const [found] = await rows<{ count: number }>(
      work,
      `select count(*)::int as count from (select 1 from claims c where ${MINE[side]} and ${VIEW[key]}
         and $2::uuid is not null limit ${COUNT_TO}) counted`,
      [work.actor.organisationId, work.actor.userId],
    );
    counts[view] = found?.count ?? 0;
  }
  return counts;
}

const pageOf = (actor: Actor, side: Side, query: Asked): Promise<ClaimItems> =>
  unitOfWork(actor, async (work) => presentList(await listSide(work, side, query), query.page));

/** Claims as the distributor works them. */
export const listReceivedClaims = (actor: Actor, query: ListQuery): Promise<ClaimItems> =>
  pageOf(actor, "received", { ...query, view: query.view ?? "toJudge" });

/** Claims as the workshop follows them. */
export const listOwnClaims = (actor: Actor, query: ListQuery): Promise<ClaimItems> =>
  pageOf(actor, "own", { ...query, view: query.view ?? "onUs" });
