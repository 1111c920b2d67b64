/**
 * p-values adjusted so that those at or below q have a false discovery rate of at most q, in the order given, at most 1
 * (Benjamini and Hochberg 1995). Throws RangeError for what is no probability.
 */
export function benjaminiHochberg(pValues: readonly number[]): readonly number[] {
  const none = pValues.find((p) => !(p >= 0 && p <= 1));
  if (none !== undefined) throw new RangeError(`No probability: ${none}`);
  const falling = [...pValues.entries()].toSorted(([, one], [, other]) => other - one);
  const adjusted = new Map<number, number>();
  let least = 1;
  for (const [place, [index, p]] of falling.entries()) {
    least = Math.min(least, (p * pValues.length) / (pValues.length - place));
    adjusted.set(index, least);
  }
  return pValues.map((_, index) => adjusted.get(index) ?? 1);
}
