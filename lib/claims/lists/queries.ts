import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { normaliseSerial } from "@/lib/labels/serial";
import type { ClaimState, VerdictOutcome } from "../lifecycle";
import {
  COLUMNS,
  DETAILS,
  HANDS,
  MINE,
  ORDER,
  ORDER_IN_STATE,
  OTHER_PARTY,
  SEARCHED,
  VIEWS,
  viewOf,
  type Side,
} from "./list-sql";
import { seesSide } from "../seeing";
import { presentList } from "./present";
import { PAGE_SIZE, type ListQuery, type ListView } from "./schema";
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

const escapeLike = (text: string) => text.replace(/[\\%_]/gu, (sign) => `\\${sign}`);

/** $1 to $3 of every statement: the organisation, the person, the states of the view. */
const bindings = (work: Work, states: readonly ClaimState[]): unknown[] => [
  work.actor.organisationId,
  work.actor.userId,
  states,
];

/** $4 to $6 of a search. */
const searchBindings = (q: string): unknown[] => {
  const typed = q.trim();
  return [typed.replace(/\D/gu, ""), normaliseSerial(typed), `%${escapeLike(typed)}%`];
};

type Asked = ListQuery & { view: ListView };
type Page = Omit<ClaimList, "counts">;
type Viewed = NonNullable<ReturnType<typeof viewOf>>;

async function listSide(work: Work, side: Side, query: Asked): Promise<ClaimList> {
  const counts = await countViews(work, side);
  const view = viewOf(side, query.view);
  if (!view) return { claims: [], total: 0, counts };
  if (query.q.trim() !== "") return { ...(await searchedPage(work, { side, view, query })), counts };
  const claims = await wholePage(work, { side, view, query });
  const counted = counts[query.view] ?? 0;
  // A count below its limit is the total already.
  const total = counted < COUNT_TO ? counted : await countAll(work, side, view);
  return { claims, total, counts };
}

type OfPage = { side: Side; view: Viewed; query: Asked };

/** The page is picked state by state in the order of an index, and only its own claims are looked up in full. */
function wholePage(work: Work, { side, view, query }: OfPage): Promise<ListedClaim[]> {
  const offset = (query.page - 1) * PAGE_SIZE;
  return rows<ListedClaim>(
    work,
    `with page as (
       select c.* from unnest($3::text[]) s (state) cross join lateral (
         select c.* from claims c where ${MINE[side]} and c.state = s.state and ${HANDS[view.of]}
         order by ${ORDER_IN_STATE[query.order]} limit $4) c
       order by ${ORDER[query.order]} limit ${PAGE_SIZE} offset $5)
     select ${COLUMNS} from page c ${OTHER_PARTY[side]} ${DETAILS} order by ${ORDER[query.order]}`,
    [...bindings(work, view.states), offset + PAGE_SIZE, offset],
  );
}

/** A search starts from what it finds and not from the whole list. */
async function searchedPage(work: Work, { side, view, query }: OfPage): Promise<Page> {
  const bind = [...bindings(work, view.states), ...searchBindings(query.q)];
  const claims = await rows<ListedClaim>(
    work,
    `with page as (
       select c.* from claims c where c.id in (${SEARCHED[side]}) and ${MINE[side]} and c.state = any ($3::text[])
         and ${HANDS[view.of]} order by ${ORDER[query.order]} limit ${PAGE_SIZE} offset $7)
     select ${COLUMNS} from page c ${OTHER_PARTY[side]} ${DETAILS} order by ${ORDER[query.order]}`,
    [...bind, (query.page - 1) * PAGE_SIZE],
  );
  const [total] = await rows<{ count: number }>(
    work,
    `select count(*)::int as count from claims c where c.id in (${SEARCHED[side]}) and ${MINE[side]}
       and c.state = any ($3::text[]) and ${HANDS[view.of]}`,
    bind,
  );
  return { claims, total: total?.count ?? 0 };
}

async function countAll(work: Work, side: Side, view: Viewed): Promise<number> {
  const [total] = await rows<{ count: number }>(
    work,
    `select count(*)::int as count from claims c
     where ${MINE[side]} and c.state = any ($3::text[]) and ${HANDS[view.of]}`,
    bindings(work, view.states),
  );
  return total?.count ?? 0;
}

/** Counts stop at a thousand: nobody reads further, and they cost the same however large the table grows. */
const COUNT_TO = 1000;

async function countViews(work: Work, side: Side): Promise<ClaimList["counts"]> {
  const counts: Partial<Record<ListView, number>> = {};
  for (const name of VIEWS[side]) {
    const view = viewOf(side, name);
    if (!view) continue;
    const [found] = await rows<{ count: number }>(
      work,
      `select count(*)::int as count from (select 1 from claims c
         where ${MINE[side]} and c.state = any ($3::text[]) and ${HANDS[view.of]} limit ${COUNT_TO}) counted`,
      bindings(work, view.states),
    );
    counts[name] = found?.count ?? 0;
  }
  return counts;
}

const NO_CLAIMS: ClaimList = { claims: [], total: 0, counts: {} };

/** A page of one side; empty for a person none of whose roles goes with that side. */
const pageOf = (actor: Actor, side: Side, query: Asked): Promise<ClaimItems> =>
  unitOfWork(actor, async (work) => {
    const sees = seesSide(actor, side);
    return presentList(sees ? await listSide(work, side, query) : NO_CLAIMS, query.page);
  });

/** Claims as the distributor works them. */
export const listReceivedClaims = (actor: Actor, query: ListQuery): Promise<ClaimItems> =>
  pageOf(actor, "received", { ...query, view: query.view ?? "toJudge" });

/** Claims as the workshop follows them. */
export const listOwnClaims = (actor: Actor, query: ListQuery): Promise<ClaimItems> =>
  pageOf(actor, "own", { ...query, view: query.view ?? "onUs" });
