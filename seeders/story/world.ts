import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { idOf } from "../identity";
import type { Chance } from "../random";
import { batchesOn, type Batch } from "./batches";
import { ACCOUNTS } from "./organisations";
import { failuresOf, repairsOf, type Failure, type Repair } from "./replacements";
import { ruleBookOn, type RuleBook } from "./rule-book";
import { salesOf, type SaleLine } from "./sales";
import { serviceOf, type Fitting } from "./service";
import { serialOf, unitsOf, type Unit } from "./units";
import type { Vehicle } from "./workshops";
import { withWrittenFailures } from "./written-failures";

/** A unit given in place of a failed one under a claim, which failed again in the same vehicle. */
export type Chain = { readonly first: Failure; readonly second: Failure };

/** Everything that happened before and beside the claims. */
export type World = {
  readonly today: CalendarDay;
  readonly batches: readonly Batch[];
  readonly units: readonly Unit[];
  readonly fittings: readonly Fitting[];
  readonly vehicles: readonly Vehicle[];
  readonly failures: readonly Failure[];
  readonly repairs: ReadonlyMap<string, Repair>;
  readonly sales: readonly SaleLine[];
  /** By the id of the unit that was sold. */
  readonly saleOfUnit: ReadonlyMap<string, SaleLine>;
  readonly chain: Chain;
  /** The failed unit that was sold on the zero-rated invoice. */
  readonly zeroRated: Failure;
  readonly ruleBook: RuleBook;
};

/** Makes the world of the story, reckoned back from a day. The same day and chance make the same world. */
export function worldOn(today: CalendarDay, chance: Chance): World {
  const batches = batchesOn(today);
  const bought = unitsOf(batches, chance.fork("units"));
  const buyers = [...new Set(ACCOUNTS.map((account) => account.buyer))];
  const lived = serviceOf(bought, buyers, chance.fork("service"));
  const service = { ...lived, fittings: withWrittenFailures(lived.fittings) };
  const failures = failuresOf(service.fittings);
  const chain = chainFrom(failures, batches, chance.fork("chain"));
  const zeroRated = firstOf(failures, isForZeroRating);
  const { byFitting, newFittings } = repairsOf(service, chance.fork("repairs"));
  const units = [...bought, chain.second.unit];
  const zeroRatedUnitId = zeroRated.unit.id;
  const sales = salesOf(units, { today, chance, zeroRatedUnitId, freeUnitId: chain.second.unit.id });
  return {
    today,
    batches,
    units,
    vehicles: service.vehicles,
    fittings: [...service.fittings, ...withoutFirst(newFittings, byFitting, chain), chain.second],
    failures: failuresOf([...failures, chain.second]),
    repairs: new Map([...byFitting, ...repairsOfChain(chain)]),
    sales,
    saleOfUnit: new Map(sales.flatMap((sale) => (sale.unitId === null ? [] : [[sale.unitId, sale]]))),
    chain,
    zeroRated,
    ruleBook: ruleBookOn(today),
  };
}

function firstOf(failures: readonly Failure[], fits: (failure: Failure) => boolean): Failure {
  const found = failures.find(fits);
  if (!found) throw new RangeError("No failure of the story fits this part");
  return found;
}

const isForZeroRating = ({ unit, failedDaysAgo, cause }: Failure): boolean =>
  unit.account.buyer === "hollin" && cause === "part" && failedDaysAgo > 100 && failedDaysAgo < 420;

const isForChain = ({ unit, failedDaysAgo }: Failure): boolean =>
  unit.account.buyer === "saltmarsh" &&
  unit.batch.role === "usual" &&
  failedDaysAgo > 130 &&
  failedDaysAgo < 400 &&
  ["brake", "motor", "controller"].includes(unit.batch.part.family);

const DAYS_TO_REPLACEMENT = 34;
const SECOND_FAILURE_DAYS_AGO = 13;

/** The distributor sent a new unit under the claim; the workshop fitted it a week later, and it failed in its turn. */
function chainFrom(failures: readonly Failure[], batches: readonly Batch[], draw: Chance): Chain {
  const first = firstOf(failures, isForChain);
  const shippedDaysAgo = first.failedDaysAgo - DAYS_TO_REPLACEMENT;
  const batch = batches
    .filter(
      ({ part, role, madeDaysAgo }) =>
        part === first.unit.batch.part && role === "usual" && madeDaysAgo > shippedDaysAgo + 30,
    )
    .at(-1);
  const unit: Unit = {
    ...first.unit,
    id: idOf("unit", "second", first.unit.id),
    batch: batch ?? first.unit.batch,
    serial: serialOf(batch ?? first.unit.batch, draw),
    shippedDaysAgo,
  };
  const fittedDaysAgo = shippedDaysAgo - 6;
  const second = {
    ...first,
    id: idOf("fitting", unit.id),
    unit,
    fittedDaysAgo,
    failedDaysAgo: SECOND_FAILURE_DAYS_AGO,
  };
  return { first, second };
}

const repairsOfChain = ({ first, second }: Chain): [string, Repair][] => [
  [first.id, { repairedDaysAgo: second.fittedDaysAgo, replacement: second.unit }],
  [second.id, { repairedDaysAgo: second.failedDaysAgo - 1, replacement: null }],
];

/** The vehicle of the chain waited for the new unit: nothing from the shelf went in. */
const withoutFirst = (
  fittings: readonly Fitting[],
  repairs: ReadonlyMap<string, Repair>,
  { first }: Chain,
): Fitting[] => fittings.filter(({ unit }) => unit !== repairs.get(first.id)?.replacement);
