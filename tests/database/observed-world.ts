import {
  addDays,
  addMonths,
  calendarDay,
  daysBetween,
  earlier,
  type CalendarDay,
} from "@/lib/kernel/calendar-day";
import type { AgeGroup, UnitOutcome } from "@/lib/reports/life-curves/outcomes";
import {
  buildAccount,
  buildBatch,
  buildClaim,
  buildDistributor,
  buildFitting,
  buildLine,
  buildOrganisation,
  buildPart,
  buildPerson,
  buildUnit,
  insertRow,
  unlike,
} from "../support/build";

export type Told = "undecided" | "upheld" | "carrier" | "declined" | "withdrawn";
export type UnitPlan = {
  readonly shippedOn: string | null;
  /** Supplied under a claim in place of this unit. */
  readonly replaces?: string;
  readonly fittings?: readonly (readonly [fittedOn: string, removedOn: string | null])[];
  readonly claims?: readonly {
    readonly told: Told;
    readonly failedOn: string;
    readonly filedOn?: string;
    readonly decidedOn?: string;
  }[];
};

export const FIRST_TERMS = { months: 12, shelf: 6, filing: 30, from: "2024-01-01" };
const LATER_TERMS = { months: 24, shelf: 6, filing: 45, from: "2025-01-01" };

const bodyOf = ({ months, shelf, filing }: typeof FIRST_TERMS) =>
  JSON.stringify({
    coverMonths: months,
    shelfLimitMonths: shelf,
    filingLimitDays: filing,
    startsWithoutFitting: "shipment",
    replacementMinimumDays: 90,
  });

/** A distributor with its analyst, a superseded part and the one that took its place, and a workshop that buys. */
export async function observedWorld() {
  const seller = await buildDistributor();
  const analyst = await buildPerson(seller, ["analyst"]);
  const workshop = await buildOrganisation();
  const person = await buildPerson(workshop, ["technician"]);
  const account = await buildAccount(seller, workshop);
  const part = await buildPart(seller);
  const old = await buildPart(seller, { superseded_by_id: part.id });
  for (const terms of [FIRST_TERMS, LATER_TERMS])
    await insertRow("rule_book_versions", {
      seller_id: seller.id,
      kind: "terms",
      rule_number: "1.1",
      title: "Terms",
      valid_from: terms.from,
      body: bodyOf(terms),
    });
  const between = { seller, workshop, account, person };
  return { seller, analyst, part, old, between, buyer: workshop };
}

export type World = Awaited<ReturnType<typeof observedWorld>>;

const STATE = {
  undecided: { state: "filed" },
  upheld: { state: "decided", outcome: "upheld" },
  carrier: { state: "decided", outcome: "upheld" },
  declined: { state: "decided", outcome: "declined" },
  withdrawn: { state: "withdrawn" },
} as const;

/** Sells, fits and claims a unit as planned; answers with its id. */
export async function playUnit(world: World, batch: { id: string }, plan: UnitPlan, part = world.part) {
  const { seller, between, buyer } = world;
  const line = plan.shippedOn && (await invoiceLine(world, part, plan.shippedOn));
  const sale = { seller, buyer, account: between.account, part };
  const unit = await buildUnit(sale, {
    batch_id: batch.id,
    invoice_line_id: line || null,
    ...(plan.replaces ? { replaces_unit_id: plan.replaces, supplied_under_claim: true } : {}),
  });
  for (const [fittedOn, removedOn] of plan.fittings ?? [])
    await buildFitting(seller, buyer, unit, { fitted_on: fittedOn, removed_on: removedOn });
  for (const { told, failedOn, filedOn, decidedOn } of plan.claims ?? []) {
    const isDecided = told !== "undecided" && told !== "withdrawn";
    const claim = await buildClaim(between, {
      ...STATE[told],
      revision: 1,
      failed_on: failedOn,
      filed_on: filedOn ?? failedOn,
      filed_at: `${filedOn ?? failedOn}T12:00:00Z`,
      ...(isDecided ? { decided_at: `${decidedOn ?? filedOn ?? failedOn}T12:00:00Z` } : {}),
    });
    await buildLine(between, claim, part, {
      unit_id: unit.id,
      verdict: isDecided ? STATE[told].outcome : null,
      attribution: isDecided ? JSON.stringify(told === "carrier" ? { carrier: "1" } : { maker: "1" }) : null,
    });
  }
  return unit.id;
}

async function invoiceLine({ seller, buyer, between }: World, part: { id: string }, shippedOn: string) {
  const row = await insertRow("invoice_lines", {
    seller_id: seller.id,
    buyer_id: buyer.id,
    account_id: between.account.id,
    invoice_number: unlike("R"),
    line_number: 1,
    invoiced_on: shippedOn,
    shipped_on: shippedOn,
    part_id: part.id,
    quantity: 1,
    unit_price_minor: 18_450,
    currency: "EUR",
    tax_category: "S",
    tax_rate: 19,
  });
  return String(row["id"]);
}

export const batchOf = (world: World, part = world.part) => buildBatch(world.seller, part);

type Ended = { readonly outcome: UnitOutcome; readonly ageDays: number | null; readonly assumed: boolean };
type Rules = { readonly cutOn: CalendarDay; readonly lagDays: number; readonly start: "fitting" | "lag" };

const ORDER: readonly Told[] = ["undecided", "upheld", "carrier", "declined", "withdrawn"];
const isDenied = (told: Told) => told === "declined" || told === "withdrawn";

/** The rules of observation once more, unit by unit in words of this file: what the database must come to. */
export function endOf(plan: UnitPlan, { cutOn, lagDays, start }: Rules): Ended {
  const never = (outcome: UnitOutcome): Ended => ({ outcome, ageDays: null, assumed: false });
  if (plan.shippedOn === null) return never("noShipment");
  const shippedOn = calendarDay(plan.shippedOn);
  const fittings = (plan.fittings ?? [])
    .map(([on, off]) => ({ on: calendarDay(on), off: off === null ? null : calendarDay(off) }))
    .filter(({ on }) => on <= cutOn);
  const claim = (plan.claims ?? [])
    .filter(({ failedOn, filedOn }) => failedOn <= cutOn && (filedOn ?? failedOn) <= cutOn)
    .toSorted(
      (a, b) =>
        Number(isDenied(a.told)) - Number(isDenied(b.told)) ||
        (a.failedOn < b.failedOn ? -1 : 1) ||
        ORDER.indexOf(a.told) - ORDER.indexOf(b.told),
    )[0];
  const firstOn = fittings.map(({ on }) => on).toSorted()[0] ?? null;
  const byFitting = start === "fitting" && firstOn !== null;
  if (start === "fitting" && firstOn === null && !claim) return never("shelf");
  const startOn = byFitting && firstOn !== null ? firstOn : addDays(shippedOn, lagDays);

  const terms = shippedOn < LATER_TERMS.from ? FIRST_TERMS : LATER_TERMS;
  const coverEndOn =
    firstOn === null
      ? addMonths(shippedOn, terms.months)
      : earlier(addMonths(firstOn, terms.months), addMonths(shippedOn, terms.months + terms.shelf));
  const observedTo = earlier(cutOn, addDays(coverEndOn, terms.filing - 1));
  const removals = fittings.map(({ off }) => (off !== null && off <= cutOn ? off : null));
  const removedOn =
    removals.length > 0 && removals.every((off) => off !== null) ? removals.toSorted().at(-1) : null;

  const failedOn = claim ? calendarDay(claim.failedOn) : null;
  const running: UnitOutcome = observedTo < cutOn ? "coverEnded" : "running";
  const isTold = failedOn !== null && failedOn <= observedTo;
  const isRemoved = !claim && removedOn != null && removedOn <= observedTo;
  const endOn = isTold ? failedOn : isRemoved ? removedOn : observedTo;
  const outcome = isTold && claim ? outcomeOf(claim, cutOn) : isRemoved ? "removed" : running;
  const daysIn = ({ on, off }: (typeof fittings)[number]) =>
    Math.max(0, daysBetween(on, off !== null && off < endOn ? off : endOn));
  const ageDays =
    byFitting && fittings.length > 1
      ? fittings.reduce((sum, fitting) => sum + daysIn(fitting), 0)
      : daysBetween(startOn, endOn);
  if (ageDays >= 0) return { outcome, ageDays, assumed: !byFitting };
  const instead = isTold ? "beforeStart" : observedTo < cutOn ? "afterCover" : "shelf";
  return { outcome: instead, ageDays: null, assumed: !byFitting };
}

function outcomeOf(
  { told, decidedOn, filedOn, failedOn }: NonNullable<UnitPlan["claims"]>[number],
  cutOn: string,
) {
  if (told === "withdrawn") return "declined";
  if (told === "undecided" || (decidedOn ?? filedOn ?? failedOn) > cutOn) return "undecided";
  return ({ upheld: "confirmed", carrier: "otherCause", declined: "declined" } as const)[told];
}

/** Ends gathered as the database answers them, in an order of their own. */
export function gathered(
  ends: readonly (Ended & { readonly batchId: string })[],
): Omit<AgeGroup, "atLargest">[] {
  const groups = new Map<string, Omit<AgeGroup, "atLargest">>();
  for (const end of ends) {
    const key = JSON.stringify(end);
    groups.set(key, { ...end, count: (groups.get(key)?.count ?? 0) + 1 });
  }
  return [...groups.values()];
}
