import { countUnread } from "@/lib/alerts/queries";
import { ok } from "@/lib/kernel/outcome";
import { route } from "@/lib/web/route";

/** How many alerts the person has not read where they work now; counted to a hundred. */
export const GET = route({ name: "GET /alerts" }, async ({ session }) =>
  ok({ unread: await countUnread(session.actor) }),
);
