import { z } from "zod";

export const JUDGING_VIEWS = ["toJudge", "held", "parked", "waiting", "decided", "all"] as const;
export const WORKSHOP_VIEWS = ["onUs", "onThem", "decided", "closed", "all"] as const;

const orders = ["urgent", "filed", "-filed", "asked", "-asked", "due"] as const;

/** The state of a list as it stands in the address: anything else in there falls back to the first view. */
export const listQuery = z.object({
  view: z
    .enum([...JUDGING_VIEWS, ...WORKSHOP_VIEWS])
    .optional()
    .catch(undefined),
  order: z.enum(orders).default("urgent").catch("urgent"),
  q: z.string().max(80).default("").catch(""),
  page: z.coerce.number().int().min(1).max(2000).default(1).catch(1),
});

export type ListQuery = z.infer<typeof listQuery>;
export type ListOrder = ListQuery["order"];
export type ListView = NonNullable<ListQuery["view"]>;

export const PAGE_SIZE = 50;
