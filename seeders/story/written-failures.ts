import type { FamilyCode } from "@/lib/parts/families";
import type { BuyerKey } from "./organisations";
import type { Fitting } from "./service";

type Written = { readonly buyer: BuyerKey; readonly family: FamilyCode; readonly failedDaysAgo: number };

const at = (
  buyer: BuyerKey,
  family: FamilyCode,
  ...daysAgo: readonly [number, ...number[]]
): readonly Written[] => daysAgo.map((failedDaysAgo) => ({ buyer, family, failedDaysAgo }));

/** Failures the story needs on certain days, so that every desk has work on it; chance wrote the others. */
const WRITTEN: readonly Written[] = [
  { buyer: "saltmarsh", family: "throttle", failedDaysAgo: 5 },
  { buyer: "quayhead", family: "motor", failedDaysAgo: 6 },
  { buyer: "quayhead", family: "brake", failedDaysAgo: 7 },
  { buyer: "tworivers", family: "gearbox", failedDaysAgo: 8 },
  { buyer: "larkmoor", family: "controller", failedDaysAgo: 9 },
  { buyer: "hollin", family: "controller", failedDaysAgo: 12 },
  { buyer: "saltmarsh", family: "charger", failedDaysAgo: 17 },
  { buyer: "saltmarsh", family: "battery", failedDaysAgo: 24 },
  { buyer: "quayhead", family: "battery", failedDaysAgo: 30 },
  // Fenwright Supply has one assessor and was short of her for a while: its list is long.
  ...at("quayhead", "throttle", 4, 13, 23, 31),
  ...at("quayhead", "charger", 10, 19, 26, 33),
  ...at("quayhead", "brake", 9, 14, 21, 29),
  ...at("quayhead", "gearbox", 11, 25, 34),
  ...at("quayhead", "motor", 16, 28, 35),
  ...at("quayhead", "controller", 18, 27),
  ...at("larkmoor", "motor", 5, 20),
  ...at("larkmoor", "charger", 30),
  ...at("larkmoor", "battery", 8, 22, 32),
  ...at("larkmoor", "throttle", 12, 27),
  ...at("larkmoor", "brake", 17),
];

const LEAST_DAYS_IN_USE = 45;
const LONGEST_DAYS_IN_USE = 480;

/** Lets the first running unit that fits each written failure fail on its day. Throws where none does. */
export function withWrittenFailures(fittings: readonly Fitting[]): Fitting[] {
  const out = [...fittings];
  for (const wanted of WRITTEN) {
    const at = out.findIndex((fitting) => suits(fitting, wanted));
    const found = out[at];
    if (!found)
      throw new RangeError(
        `No ${wanted.family} at ${wanted.buyer} can fail ${wanted.failedDaysAgo} days ago`,
      );
    out[at] = { ...found, failedDaysAgo: wanted.failedDaysAgo };
  }
  return out;
}

/** Usual units well within any term, so that the claim turns on the part and not on its age. */
const suits = ({ unit, fittedDaysAgo, failedDaysAgo }: Fitting, wanted: Written): boolean =>
  failedDaysAgo === null &&
  unit.batch.role === "usual" &&
  unit.account.buyer === wanted.buyer &&
  unit.batch.part.family === wanted.family &&
  fittedDaysAgo - wanted.failedDaysAgo >= LEAST_DAYS_IN_USE &&
  fittedDaysAgo < LONGEST_DAYS_IN_USE;
