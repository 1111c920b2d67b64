import { z } from "zod";

/** The list as it stands in the address; anything else is the first page and no note. */
export const alertsQuery = z.object({
  page: z.coerce.number().int().min(1).max(20).default(1).catch(1),
  /** What the page may say was just done. */
  note: z.enum(["allRead"]).optional().catch(undefined),
});

/** Nothing newer than what the person saw is marked as read: what came since stays unread. */
export const readAllInput = z.strictObject({ until: z.iso.datetime() });
export type ReadAll = z.infer<typeof readAllInput>;

export const ALERTS_A_PAGE = 50;

/** The most that is counted: beyond it a person reads "99+", and the count costs the same however many there are. */
export const COUNT_TO = 100;

/** How far back the list leads. */
export const LISTED_TO = 1000;

/** What names an alert in an address. */
export const alertId = z.uuid();
