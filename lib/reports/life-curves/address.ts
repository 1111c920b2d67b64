import type { LifeCurvesQuery } from "./schema";

type Shown = Partial<LifeCurvesQuery>;

/** The parameters of a view; what is usual stays out of it. */
function paramsOf({ part, batch, count, start, cut, shop, axis }: Shown): URLSearchParams {
  const search = new URLSearchParams();
  if (part !== undefined) search.set("part", part);
  for (const one of batch ?? []) search.append("batch", one);
  if (count === "upheld") search.set("count", count);
  if (start !== undefined && start !== "auto") search.set("start", start);
  if (cut !== undefined) search.set("cut", cut);
  if (shop === "without") search.set("shop", shop);
  if (axis === "upper") search.set("axis", axis);
  return search;
}

/** The address of the curves in another state. */
export const curvesAddress = (query: Shown, change: Shown = {}): `/life-curves?${string}` =>
  `/life-curves?${paramsOf({ ...query, ...change }).toString()}`;

/** The table of a view as a file. */
export const csvAddress = (query: Shown): `/api/v1/life-curves?${string}` =>
  `/api/v1/life-curves?${paramsOf(query).toString()}`;

/** Which claims: of these batches, or of all but these; failed at ages from one day to another, both included. */
export type BehindRange = {
  readonly batches: readonly string[];
  readonly isOthers?: boolean;
  readonly fromDays?: number;
  readonly toDays?: number;
  readonly page?: number;
};

/** The list of the claims behind a point, a cell or a row. */
export function claimsAddress(query: Shown, range: BehindRange): `/life-curves/claims?${string}` {
  const search = paramsOf({ ...query, batch: [] });
  for (const one of range.batches) search.append("of", one);
  if (range.isOthers) search.set("others", "yes");
  for (const one of query.batch ?? []) search.append("batch", one);
  if (range.fromDays !== undefined) search.set("from", String(range.fromDays));
  if (range.toDays !== undefined) search.set("to", String(range.toDays));
  if ((range.page ?? 1) > 1) search.set("page", String(range.page));
  return `/life-curves/claims?${search.toString()}`;
}
