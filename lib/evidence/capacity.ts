import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { figure, shown, type Figure } from "./figure";

export type CapacityRefusal = "capacityNotPositive" | "temperatureImpossible" | "ratesDiffer";

/** Change of a lead battery's capacity per kelvin: slow discharge of three hours or more, and fast (from memory). */
const CAPACITY_PER_KELVIN = { slow: 0.006, fast: 0.01 } as const;

/** Charge given in Ah by a constant current over a time. */
export const chargeGiven = (input: { ampere: number; seconds: number }): Figure =>
  figure({
    rule: "chargeGiven",
    value: (input.ampere * input.seconds) / 3600,
    decimals: 2,
    input: {
      ampere: shown(input.ampere),
      seconds: shown(input.seconds, 0),
    },
  });

/**
 * Capacity in Ah brought to 25 °C: C25 = C/(1 + factor (T - 25)) (standby-battery practice, from memory). Without the
 * temperature a capacity decides nothing: 76.7 % at 15 °C can be a pass at 25 °C.
 */
export function capacityAt25(input: {
  ampereHours: number;
  celsius: number;
  perKelvin?: number;
}): Outcome<Figure, CapacityRefusal> {
  const perKelvin = input.perKelvin ?? CAPACITY_PER_KELVIN.slow;
  const divisor = 1 + perKelvin * (input.celsius - 25);
  if (!(input.ampereHours > 0 && Number.isFinite(input.ampereHours))) return refuse("capacityNotPositive");
  if (!(divisor > 0 && Number.isFinite(divisor)))
    return refuse("temperatureImpossible", { celsius: String(input.celsius) });
  const inputs = { ampereHours: shown(input.ampereHours), celsius: shown(input.celsius, 1), perKelvin };
  return ok(figure({ rule: "capacityAt25", value: input.ampereHours / divisor, decimals: 2, input: inputs }));
}

/**
 * Capacity as a share of the rated one, in percent. Both must belong to the same discharge time: a label's 20 hour
 * figure is never compared with a 5 hour test.
 */
export function shareOfRated(input: {
  ampereHoursAt25: number;
  ratedAmpereHours: number;
  testHours: number;
  ratedHours: number;
}): Outcome<Figure, CapacityRefusal> {
  if (!(input.ampereHoursAt25 > 0 && input.ratedAmpereHours > 0)) return refuse("capacityNotPositive");
  if (input.testHours !== input.ratedHours)
    return refuse("ratesDiffer", { testHours: input.testHours, ratedHours: input.ratedHours });
  const percent = (100 * input.ampereHoursAt25) / input.ratedAmpereHours;
  const inputs = { ampereHours: shown(input.ampereHoursAt25), ratedAmpereHours: input.ratedAmpereHours };
  return ok(
    figure({
      rule: "shareOfRated",
      value: percent,
      decimals: 1,
      input: { ...inputs, hours: input.ratedHours },
    }),
  );
}

/** Hours a battery lasts at a current by Peukert's rule: T (C/(I T))^exponent, T the rated time in hours. */
export const hoursAtCurrent = (input: {
  ratedAmpereHours: number;
  ratedHours: number;
  ampere: number;
  exponent: number;
}): number =>
  input.ratedHours * (input.ratedAmpereHours / (input.ampere * input.ratedHours)) ** input.exponent;

/** Difference in V between the two blocks of a pair. A pair can look well together while one block is dead. */
export const pairDifference = (firstVolt: number, secondVolt: number): Figure =>
  figure({
    rule: "pairDifference",
    value: Math.abs(firstVolt - secondVolt),
    decimals: 2,
    input: { firstVolt, secondVolt },
  });
