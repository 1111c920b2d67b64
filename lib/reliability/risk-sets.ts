import { countOf, type Observation } from "./observation";

/** Units that left observation at one age, and those that were watched when it came. */
export type RiskSet = {
  readonly ageDays: number;
  /** Entered before this age and not gone before it. */
  readonly atRisk: number;
  readonly failed: number;
  readonly censored: number;
};

type Tally = { failed: number; censored: number };

const ascending = <Value>(tallies: ReadonlyMap<number, Value>): [number, Value][] =>
  [...tallies].toSorted(([one], [other]) => one - other);

/** Units by the age they left at, and by the age they were first watched from; -Infinity is the start. */
function tallied(rows: readonly Observation[], marks: readonly number[]) {
  const [exits, entries] = [new Map<number, Tally>(), new Map<number, number>()];
  for (const age of marks) exits.set(age, { failed: 0, censored: 0 });
  for (const row of rows) {
    const count = countOf(row);
    if (count === 0) continue;
    const tally = exits.get(row.ageDays) ?? { failed: 0, censored: 0 };
    tally[row.failed ? "failed" : "censored"] += count;
    exits.set(row.ageDays, tally);
    const entry = row.entryDays ?? Number.NEGATIVE_INFINITY;
    entries.set(entry, count + (entries.get(entry) ?? 0));
  }
  return { exits: ascending(exits), entries: ascending(entries) };
}

/**
 * The risk set at each age at which somebody left, and at each of the marks, youngest first: entry < age <= end, so a
 * unit that leaves at the age of a failure is still at risk. Throws RangeError for rows no unit can have.
 */
export function riskSets(rows: readonly Observation[], marks: readonly number[] = []): RiskSet[] {
  const { exits, entries } = tallied(rows, marks);
  let [entered, gone, next] = [0, 0, 0];
  return exits.map(([ageDays, { failed, censored }]) => {
    for (; next < entries.length && entries[next]![0] < ageDays; next += 1) entered += entries[next]![1];
    const atRisk = entered - gone;
    gone += failed + censored;
    return { ageDays, atRisk, failed, censored };
  });
}

/**
 * Under a curve: at risk at each of the ages, and how many had failed or ended without a failure before it. Together
 * with those that had not entered they are all units. Throws RangeError for rows no unit can have.
 */
export function atRiskAt(rows: readonly Observation[], agesDays: readonly number[]): readonly RiskSet[] {
  let [failed, censored] = [0, 0];
  const before = new Map<number, RiskSet>();
  for (const set of riskSets(rows, agesDays)) {
    before.set(set.ageDays, { ...set, failed, censored });
    [failed, censored] = [failed + set.failed, censored + set.censored];
  }
  return agesDays.map((ageDays) => before.get(ageDays)!);
}
