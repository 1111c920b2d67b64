import type { Observation } from "./observation";
import type { Rate } from "./rates";
import { riskSets } from "./risk-sets";

export type GroupedObservation = Observation & { readonly group: string };
export type GroupExposure = Rate & { readonly id: string };

/**
 * For each group, the failures it would have had at the pooled hazard of every age, and those it had, both over the ages
 * that others have reached: where a group is alone it can be compared with nobody. Groups left out of the pool (those
 * already acted on) are measured by it and lend it nothing. Groups in the order of their first row; throws RangeError
 * for rows no unit can have.
 */
export function expectedExposure(
  rows: readonly GroupedObservation[],
  { leftOut = [] }: { readonly leftOut?: readonly string[] } = {},
): readonly GroupExposure[] {
  const byGroup = new Map<string, GroupedObservation[]>();
  for (const row of rows) {
    const own = byGroup.get(row.group);
    if (own) own.push(row);
    else byGroup.set(row.group, [row]);
  }
  const events = new Set(
    rows.flatMap(({ ageDays, failed, count = 1 }) => (failed && count > 0 ? [ageDays] : [])),
  );
  const ages = [...events];
  const pool = riskSets(
    rows.filter(({ group }) => !leftOut.includes(group)),
    ages,
  );
  const pooled = new Map(pool.map((set) => [set.ageDays, set]));
  return [...byGroup].map(([id, own]) => {
    let [failures, exposure] = [0, 0];
    for (const { ageDays, atRisk, failed } of riskSets(own, ages)) {
      const all = pooled.get(ageDays);
      const others = (all?.atRisk ?? 0) - (leftOut.includes(id) ? 0 : atRisk);
      if (all === undefined || others <= 0) continue;
      failures += failed;
      exposure += (atRisk * all.failed) / all.atRisk;
    }
    return { id, failures, exposure };
  });
}
