import { profileLikelihood, profileSlope, type WeibullData } from "./weibull-likelihood";

// Logarithms of the shapes that are looked at: from one in a thousand to a hundred million.
const LEAST = Math.log(1e-3);
const MOST = Math.log(1e8);
const WIDE = 0.25;

/** Logarithm of the shape with the greatest likelihood; null where the likelihood has no maximum inside. */
export function bestLogShape(data: WeibullData): number | null {
  const bracket = data.hasEntries ? scanned(data) : risen(data);
  return bracket && slopeRoot(data, bracket);
}

type Bracket = readonly [low: number, high: number];

/** Without late entries the slope falls all along: step out from shape 1 until its sign changes. */
function risen(data: WeibullData): Bracket | null {
  const isRising = (logShape: number): boolean => profileSlope(data, Math.exp(logShape)).slope > 0;
  const direction = isRising(0) ? 1 : -1;
  for (let [at, step] = [0, 0.5]; at > 5 * LEAST && at < MOST; step *= 1.5) {
    const next = at + direction * step;
    if (isRising(next) !== direction > 0) return direction > 0 ? [at, next] : [next, at];
    at = next;
  }
  return null;
}

/** With late entries there may be several rises: look all along, take the highest, unless it lies at an end. */
function scanned(data: WeibullData): Bracket | null {
  const places = Array.from(
    { length: 1 + Math.ceil((Math.log(1e3) - LEAST) / WIDE) },
    (_, at) => LEAST + at * WIDE,
  );
  const heights = places.map((place) => profileLikelihood(data, Math.exp(place)));
  const best = heights.reduce((top, height, at) => (height > heights[top]! ? at : top), 0);
  if (best === 0 || best === places.length - 1) return null;
  return [places[best - 1]!, places[best + 1]!];
}

/** Newton steps on the slope, kept inside a bracket that shrinks. */
function slopeRoot(data: WeibullData, [from, to]: Bracket): number {
  let [low, high, at] = [from, to, (from + to) / 2];
  for (let step = 0; step < 200; step += 1) {
    const { slope, bend } = profileSlope(data, Math.exp(at));
    if (slope > 0) low = at;
    else high = at;
    const newton = at - slope / bend;
    const next = newton > low && newton < high ? newton : (low + high) / 2;
    if (Math.abs(next - at) < 1e-14 * (1 + Math.abs(at))) return next;
    at = next;
  }
  return at;
}
