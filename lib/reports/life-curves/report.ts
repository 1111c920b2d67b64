import "server-only";
import type { Actor } from "@/lib/access/actor";
import { hasRight } from "@/lib/access/rights";
import { printClaimNumber } from "@/lib/claims/number";
import { unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { addDays, addMonths, dayInZone, isAfter, type CalendarDay } from "@/lib/kernel/calendar-day";
import { readTypedDay } from "@/lib/kernel/typed-day";
import { batchKeysOf } from "./batch-keys";
import type { BehindItem } from "./behind-view";
import { lifeCurvesView } from "./compute";
import { NO_BATCH } from "./outcomes";
import { FAILING } from "./observations";
import {
  BEHIND_PAGE,
  countGroups,
  countWithoutUnit,
  findLag,
  findLargest,
  findRecorded,
  listBatches,
  listBehind,
  listParts,
  type ClaimBehind,
  type Observing,
} from "./queries";
import { rootPartsOf, type RootPart } from "./root-parts";
import { isShareEnough, type BehindQuery, type LifeCurvesQuery } from "./schema";
import type { LifeCurvesView, Starts } from "./view";

// The question: how long do the parts we sold last in service, and does one batch fail more often than the others of
// its part at the same age?

/** Whoever may see the curves at all; which side their organisation is on, row security and `$1` of the queries know. */
const sees = ({ roles }: Actor): boolean => hasRight(roles, "seeLifeCurves", { sells: true, buys: true });

type Basis = Omit<Starts, "assumed" | "units">;
type Asked = {
  readonly root: RootPart;
  readonly cutOn: CalendarDay;
  readonly start: LifeCurvesQuery["start"];
};

/** The lag of the family, and whether enough starts are recorded to go by them. */
async function findBasis(work: Work, { root, cutOn, start }: Asked): Promise<Basis> {
  const { lagDays, fittings } = await findLag(work, root.family, cutOn);
  const found = await findRecorded(work, root.partIds, addDays(cutOn, -(lagDays ?? 0)));
  const rule = start === "auto" ? (isShareEnough(found) ? "fitting" : "lag") : start;
  return { rule, ...found, lagDays, lagFittings: fittings };
}

type Prepared = {
  readonly roots: readonly RootPart[];
  readonly root: RootPart;
  readonly cutOn: CalendarDay;
  readonly isCutUnread: boolean;
  readonly basis: Basis;
  readonly largest: Awaited<ReturnType<typeof findLargest>>;
  readonly observing: Observing;
};

/** What a view stands on: its part, its day, where service starts. Null where there is no part with serials. */
async function prepare(work: Work, query: LifeCurvesQuery): Promise<Prepared | null> {
  const roots = rootPartsOf(await listParts(work));
  const root = roots.find(({ partNumbers }) => partNumbers.includes(query.part ?? "")) ?? roots[0];
  if (!root) return null;
  const { locale, timeZone } = work.actor;
  const today = dayInZone(new Date(), timeZone);
  const typed = query.cut === undefined ? today : readTypedDay(query.cut, locale, today);
  const isCutUnread = typed === null || isAfter(typed, today);
  const cutOn = typed === null || isAfter(typed, today) ? today : typed;
  const basis = await findBasis(work, { root, cutOn, start: query.start });
  const largest = await findLargest(work, root.partIds);
  const observing = {
    partIds: root.partIds,
    cutOn,
    lagDays: basis.lagDays ?? 0,
    start: basis.rule,
    largestId: largest?.id ?? null,
  };
  return { roots, root, cutOn, isCutUnread, basis, largest, observing };
}

export type LifeCurves = { readonly view: LifeCurvesView; readonly isCutUnread: boolean };

/**
 * The life curves of a part as the address asks for them; null for a person without the right and for a distributor
 * without parts. Two aggregates of counts (this look and the one a month before) and a few small reads.
 */
export const readLifeCurves = (actor: Actor, query: LifeCurvesQuery): Promise<LifeCurves | null> =>
  unitOfWork(actor, async (work) => {
    const prepared = sees(actor) ? await prepare(work, query) : null;
    if (!prepared) return null;
    const { roots, root, cutOn, isCutUnread, basis, largest, observing } = prepared;
    const before = { ...observing, cutOn: addMonths(cutOn, -1) };
    const view = lifeCurvesView({
      roots,
      root,
      query: { ...query, part: root.partNumber, cut: cutOn },
      batches: await listBatches(work, root.partIds),
      groups: await countGroups(work, observing),
      groupsBefore: await countGroups(work, before),
      basis,
      withoutUnit: await countWithoutUnit(work, root.partIds, cutOn),
      largest,
    });
    return { view, isCutUnread };
  });

export type ClaimsBehind = {
  readonly claims: readonly BehindItem[];
  readonly total: number;
  readonly page: number;
  readonly pages: number;
  readonly partNumber: string;
  readonly query: LifeCurvesQuery;
};

/** The claims behind a point of the curves, by the very rules that counted them; null where the curves would be null. */
export const readClaimsBehind = (actor: Actor, asked: BehindQuery): Promise<ClaimsBehind | null> =>
  unitOfWork(actor, async (work) => {
    const prepared = sees(actor) ? await prepare(work, asked) : null;
    if (!prepared) return null;
    const { root, cutOn, observing } = prepared;
    const keys = batchKeysOf(await listBatches(work, root.partIds));
    const batchIds = [...keys, [NO_BATCH, "?"] as const]
      .filter(([, key]) => asked.of.includes(key) !== (asked.others === "yes"))
      .map(([id]) => id);
    const found = await listBehind(work, observing, {
      behind: {
        batchIds: asked.of.length === 0 ? null : batchIds,
        outcomes: FAILING[asked.count],
        withoutLargest: asked.shop === "without",
        fromDays: asked.from,
        toDays: asked.to,
      },
      page: asked.page,
    });
    const total = found[0]?.total ?? 0;
    return {
      claims: found.flatMap(presentBehind),
      total,
      page: asked.page,
      pages: Math.max(1, Math.ceil(total / BEHIND_PAGE)),
      partNumber: root.partNumber,
      query: { ...asked, part: root.partNumber, cut: cutOn },
    };
  });

function presentBehind({ number, state, outcome, counted, total: _total, ...claim }: ClaimBehind) {
  if (counted !== "confirmed" && counted !== "otherCause" && counted !== "undecided") return [];
  const mark = state === "decided" ? (outcome ?? "upheldInPart") : state;
  return [{ ...claim, number: printClaimNumber(number), mark, counted }];
}
