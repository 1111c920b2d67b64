import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";

/** The first-order course of a temperature: T(t) = final - (final - start) exp(-t/tau), t from the start. */
export type ThermalCurve = {
  readonly startCelsius: number;
  readonly finalCelsius: number;
  readonly tauS: number;
};

/** Temperature in °C after a time from the start. */
export const celsiusAfter = (curve: ThermalCurve, seconds: number): number =>
  curve.finalCelsius - (curve.finalCelsius - curve.startCelsius) * Math.exp(-seconds / curve.tauS);

/** Share of the whole rise reached after a time: 63 % after one time constant. */
export const shareReached = (seconds: number, tauS: number): number => -Math.expm1(-seconds / tauS);

/** Seconds until the curve reaches a temperature; null where it never does. */
export function secondsToReach(curve: ThermalCurve, celsius: number): number | null {
  const left = (curve.finalCelsius - celsius) / (curve.finalCelsius - curve.startCelsius);
  return left > 0 && left <= 1 ? -curve.tauS * Math.log(left) : null;
}

export type ThreePointRefusal = "threePointsNotSettling";

/**
 * Final temperature and time constant from three temperatures at equal steps:
 * final = (T2² - T1 T3)/(2 T2 - T1 - T3), tau = step/ln((T2 - T1)/(T3 - T2)). Needs T2 - T1 > T3 - T2 > 0.
 * Sensitive to noise: a start for a fit, not a result.
 */
export function threePointCurve(
  celsius: readonly [number, number, number],
  stepS: number,
): Outcome<ThermalCurve, ThreePointRefusal> {
  const [first, second, third] = celsius;
  const [early, late] = [second - first, third - second];
  if (!(early > late && late > 0 && stepS > 0)) return refuse("threePointsNotSettling");
  const finalCelsius = (second * second - first * third) / (2 * second - first - third);
  return ok({ startCelsius: first, finalCelsius, tauS: stepS / Math.log(early / late) });
}
