import { z } from "zod";

/** What counts as a failure: filed and not declined (the screen), or upheld with a share on the part (the maker's curve). */
export const COUNTINGS = ["filed", "upheld"] as const;
/** Where service starts: as the share of recorded fittings decides, by fittings, or by shipment and lag for every unit. */
export const START_CHOICES = ["auto", "fitting", "lag"] as const;

/** At most so many batches are drawn beside the others pooled. */
export const MOST_DRAWN = 5;

const listOf = (value: unknown): unknown =>
  value === undefined ? [] : Array.isArray(value) ? value : [value];

/** A view of the life curves as it stands in the address; anything else in there falls back to what is usual. */
export const lifeCurvesQuery = z.object({
  part: z.string().max(40).optional().catch(undefined),
  batch: z.preprocess(listOf, z.array(z.string().max(90)).max(MOST_DRAWN)).catch([]),
  count: z.enum(COUNTINGS).default("filed").catch("filed"),
  start: z.enum(START_CHOICES).default("auto").catch("auto"),
  /** As typed; a day that is none, or still to come, is today. */
  cut: z.string().max(40).optional().catch(undefined),
  shop: z.enum(["all", "without"]).default("all").catch("all"),
  axis: z.enum(["whole", "upper"]).default("whole").catch("whole"),
});
export type LifeCurvesQuery = z.infer<typeof lifeCurvesQuery>;

/** Older than any unit: a range up to it has no upper end. */
export const OLDEST_DAYS = 20_000;
const age = z.coerce.number().int().min(0).max(OLDEST_DAYS);

/** Claims behind a point: of these batches or of all others, in a range of ages in days, both ends included. */
export const behindQuery = lifeCurvesQuery.extend({
  of: z.preprocess(listOf, z.array(z.string().max(90)).max(500)).catch([]),
  others: z.enum(["yes", "no"]).default("no").catch("no"),
  from: age.default(0).catch(0),
  to: age.default(OLDEST_DAYS).catch(OLDEST_DAYS),
  page: z.coerce.number().int().min(1).max(2000).default(1).catch(1),
});
export type BehindQuery = z.infer<typeof behindQuery>;

/** From this share of recorded fittings on, they say where service starts; below it, one rule is used for all units. */
const RECORDED_SHARE = 0.5;

/** Whether recorded fittings may say where service starts. */
export const isShareEnough = ({
  recorded,
  due,
}: {
  readonly recorded: number;
  readonly due: number;
}): boolean => due > 0 && recorded >= RECORDED_SHARE * due;
