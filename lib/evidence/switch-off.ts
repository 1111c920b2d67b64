import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { figure, shown, type Figure } from "./figure";

export type SwitchOffRefusal = "tooFewPoints" | "resistanceNotPositive" | "notCooling";

/**
 * Resistance of a winding at the moment it was switched off, from readings taken while it cooled: a straight line
 * through log(R - Rcold) carried back to t = 0. Without the cold resistance the line runs through log R, which reads
 * slightly low. Needs two points or more, each above the cold resistance, falling with time.
 */
export function resistanceAtSwitchOff(
  points: readonly { secondsAfter: number; ohm: number }[],
  coldOhm = 0,
): Outcome<Figure, SwitchOffRefusal> {
  if (points.length < 2) return refuse("tooFewPoints", { points: points.length, needed: 2 });
  const bad = points.find(({ ohm, secondsAfter }) => !(ohm > coldOhm && Number.isFinite(ohm + secondsAfter)));
  if (bad || !(coldOhm >= 0)) return refuse("resistanceNotPositive", { ohm: String(bad?.ohm ?? coldOhm) });

  const meanS = mean(points.map((point) => point.secondsAfter));
  const meanLog = mean(points.map((point) => Math.log(point.ohm - coldOhm)));
  const spread = sum(points.map((point) => (point.secondsAfter - meanS) ** 2));
  const together = sum(
    points.map((point) => (point.secondsAfter - meanS) * (Math.log(point.ohm - coldOhm) - meanLog)),
  );
  const slope = together / spread;
  if (!(slope < 0)) return refuse("notCooling");
  const ohm = coldOhm + Math.exp(meanLog - slope * meanS);
  return ok(
    figure({
      rule: "resistanceAtSwitchOff",
      value: ohm,
      decimals: 2,
      input: { points: points.length, coldOhm: shown(coldOhm) },
    }),
  );
}

const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);
const mean = (values: readonly number[]): number => sum(values) / values.length;
