type Least = { readonly at: number; readonly value: number };

const GOLDEN = (Math.sqrt(5) - 1) / 2;

/**
 * Least value, and its place, of a function with one valley between two places, by golden section. The valley is flat at
 * its foot, so that the value is known to the square of what the place is.
 */
export function leastOf(f: (at: number) => number, from: number, to: number): Least {
  let [low, high] = [from, to];
  let [left, right] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
  let [atLeft, atRight] = [f(left), f(right)];
  for (let step = 0; step < 26; step += 1)
    if (atLeft < atRight) {
      [high, right, atRight] = [right, left, atLeft];
      left = high - GOLDEN * (high - low);
      atLeft = f(left);
    } else {
      [low, left, atLeft] = [left, right, atRight];
      right = low + GOLDEN * (high - low);
      atRight = f(right);
    }
  return atLeft < atRight ? { at: left, value: atLeft } : { at: right, value: atRight };
}
