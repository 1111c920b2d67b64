import { z } from "zod";
import { isCurrency, type Currency } from "@/lib/kernel/currency";
import { amountMinor, rising, share, wholeDays, wholeMonths } from "./shape-parts";

/**
 * Which share of the price is covered at how many completed months: all of it to the end; the months left over the
 * months covered; or the share of the last step reached, the first from month 0.
 */
const coverFraction = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("full") }),
  z.strictObject({ kind: z.literal("straightLine") }),
  z.strictObject({
    kind: z.literal("step"),
    steps: z
      .array(z.strictObject({ fromMonth: wholeMonths, fraction: share }))
      .min(1)
      .refine(
        (steps) => steps[0]?.fromMonth === 0 && rising(steps.map((one) => one.fromMonth)),
        "stepsOutOfOrder",
      ),
  }),
]);

/** What happens to a claim filed after the limit; `reduce` pays that share of what would have been owed. */
const lateFiling = z.discriminatedUnion("policy", [
  z.strictObject({ policy: z.literal("refuse") }),
  z.strictObject({ policy: z.literal("reduce"), fraction: share }),
  z.strictObject({ policy: z.literal("accept") }),
]);

/** How long after the last covered day a person may still decide on goodwill; of a fraction, whole days rounded down. */
const graceBand = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("days"), days: wholeDays }),
  z.strictObject({ kind: z.literal("fractionOfTerm"), fraction: share }),
]);

const labour = z.strictObject({
  months: wholeMonths,
  standardMinutes: z.int().min(0).max(6000),
  hourlyRateMinor: amountMinor,
});

/** Upper bounds: the first three on what is eligible, the last on what a claim is paid in all. */
const caps = z.strictObject({
  diagnosisMinor: amountMinor,
  consumablesMinor: amountMinor,
  carriageMinor: amountMinor,
  claimMinor: amountMinor.nullable(),
});

/** Warranty terms of a distributor: how long, how much, until when to file. Amounts are in `currency`. */
export const termsShape = z
  .strictObject({
    coverMonths: wholeMonths.min(1),
    /** Months a part may lie on the shelf before its term runs all the same. */
    shelfLimitMonths: wholeMonths,
    /** Which day starts the term of a unit without a recorded fitting; `none`: it must be recorded first. */
    startsWithoutFitting: z.enum(["shipment", "none"]),
    /** Whether cover follows a unit to an organisation it was not shipped to. */
    transfer: z.enum(["refused", "allowed"]),
    coverFraction,
    filingLimitDays: wholeDays,
    lateFiling,
    /** Least cover of a unit supplied under an earlier claim, in days. */
    replacementMinimumDays: wholeDays,
    grace: graceBand,
    contestDays: wholeDays,
    queryLapseDays: wholeDays.min(1),
    currency: z.custom<Currency>(
      (value) => typeof value === "string" && isCurrency(value),
      "currencyUnknown",
    ),
    labour: labour.nullable(),
    caps,
  })
  .refine(({ coverFraction: schedule, coverMonths }) => {
    return schedule.kind !== "step" || schedule.steps.every((one) => one.fromMonth < coverMonths);
  }, "stepsBeyondTerm")
  // The least cover of a replacement must end before a full term would: its months in service stay below the term.
  .refine(
    ({ replacementMinimumDays, coverMonths }) => replacementMinimumDays <= coverMonths * 28,
    "minimumBeyondTerm",
  );

export type Terms = z.infer<typeof termsShape>;
export type CoverFractionSchedule = Terms["coverFraction"];
