import { countOf, type Observation } from "./observation";

/** A month as ages are grouped: a twelfth of a Julian year, in days. */
export const MONTH_DAYS = 365.25 / 12;

/**
 * Rows grouped by months in service: cell k stands for ages in [k, k + 1) months and is placed at k + 0.5; entries go to
 * the start of their month. Age 0 stays, so that a fit refuses a failure there as it does in days. Throws RangeError for
 * rows no unit can have.
 */
export function groupedByMonth(rows: readonly Observation[]): Observation[] {
  const cells = new Map<
    string,
    Required<Pick<Observation, "ageDays" | "failed" | "count">> & Pick<Observation, "entryDays">
  >();
  for (const row of rows) {
    const count = countOf(row);
    const ageDays = row.ageDays === 0 ? 0 : (Math.floor(row.ageDays / MONTH_DAYS) + 0.5) * MONTH_DAYS;
    const entry =
      row.entryDays === undefined ? {} : { entryDays: Math.floor(row.entryDays / MONTH_DAYS) * MONTH_DAYS };
    const key = `${ageDays} ${row.failed} ${entry.entryDays}`;
    cells.set(key, { ...entry, ageDays, failed: row.failed, count: count + (cells.get(key)?.count ?? 0) });
  }
  return [...cells.values()];
}
