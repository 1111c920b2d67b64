const GOLDEN = (Math.sqrt(5) - 1) / 2;

/**
 * Place of the least value of a function of one variable: the best of the guesses by a quick form of it, then golden
 * section on the exact form between that guess's neighbours. Null where no guess gives a finite value.
 */
export function minimumOf(
  quick: (at: number) => number,
  exact: (at: number) => number,
  guesses: readonly number[],
): number | null {
  const sorted = guesses.toSorted((first, second) => first - second);
  const values = sorted.map(quick);
  const best = values.reduce(
    (leader, value, index) => (value < (values[leader] ?? Infinity) ? index : leader),
    0,
  );
  const middle = sorted[best];
  if (middle === undefined || !Number.isFinite(values[best] ?? Number.NaN)) return null;
  return goldenSection(exact, sorted[best - 1] ?? middle, sorted[best + 1] ?? middle);
}

function goldenSection(value: (at: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  let [left, right] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
  let [atLeft, atRight] = [value(left), value(right)];
  while (high - low > 1e-10 * (1 + Math.abs(low))) {
    if (atLeft <= atRight) {
      [high, right, atRight] = [right, left, atLeft];
      left = high - GOLDEN * (high - low);
      atLeft = value(left);
    } else {
      [low, left, atLeft] = [left, right, atRight];
      right = low + GOLDEN * (high - low);
      atRight = value(right);
    }
  }
  return (low + high) / 2;
}
