/** The two tails of a distribution at a point; each is accurate where it is small. */
export type Tails = { readonly lower: number; readonly upper: number };

type Search = {
  readonly tailsAt: (at: number) => Tails;
  /** Slope of the lower tail. */
  readonly densityAt: (at: number) => number;
  readonly probability: number;
  readonly tail: keyof Tails;
  readonly start: number;
};

const OPPOSITE = { lower: "upper", upper: "lower" } as const;

/**
 * Where a tail has a probability, by Newton steps on the logarithm of the tail that is below one half, in a bracket that
 * only shrinks: on that scale a step neither goes far astray nor loses a small tail.
 */
export function quantileSearch({ tailsAt, densityAt, probability, tail, start }: Search): number {
  const [near, sought] =
    probability <= 0.5 ? [tail, probability] : ([OPPOSITE[tail], 1 - probability] as const);
  let [low, high, at] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY, start];
  for (let step = 0; step < 500; step += 1) {
    const reached = tailsAt(at)[near];
    const excess = Math.log(reached / sought) * (near === "lower" ? 1 : -1);
    if (excess === 0) return at;
    if (excess > 0) high = at;
    else low = at;
    const newton = at - (excess * reached) / densityAt(at);
    const next = newton > low && newton < high ? newton : between(low, high);
    if (Math.abs(next - at) <= 2e-16 * (1 + Math.abs(at))) return next;
    at = next;
  }
  return at;
}

function between(low: number, high: number): number {
  if (low === Number.NEGATIVE_INFINITY) return high - 1 - Math.abs(high);
  if (high === Number.POSITIVE_INFINITY) return low + 1 + Math.abs(low);
  return (low + high) / 2;
}
