/**
 * The units a unit stands in for under earlier claims, the one that was bought first, the unit itself not among them.
 * `replaced` maps each unit supplied under a claim to the unit it replaced. Throws where that leads in a circle.
 */
export function chainTo(unitId: string, replaced: ReadonlyMap<string, string>): readonly string[] {
  const chain: string[] = [];
  const seen = new Set([unitId]);
  for (let earlier = replaced.get(unitId); earlier !== undefined; earlier = replaced.get(earlier)) {
    if (seen.has(earlier)) throw new RangeError(`Unit ${earlier} replaces itself`);
    seen.add(earlier);
    chain.unshift(earlier);
  }
  return chain;
}
