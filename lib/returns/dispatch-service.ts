import "server-only";
import type { Actor } from "@/lib/access/actor";
import { todayOf } from "@/lib/access/today-queries";
import { rows } from "@/lib/db/unit-of-work";
import { isAfter } from "@/lib/kernel/calendar-day";
import { ok, refuse } from "@/lib/kernel/outcome";
import { readTypedDay } from "@/lib/kernel/typed-day";
import { changeReturn } from "./change-service";
import type { DispatchInput } from "./schema";

/** The workshop sent the parts: with whom, under which number, on which day. The distributor's clock runs again. */
export const dispatchReturn = (actor: Actor, { number, carrier, trackingNumber, sentOn }: DispatchInput) =>
  changeReturn<"dayUnread" | "dayAhead">(actor, {
    number,
    move: "dispatch",
    decide: async ({ returned, lines }, work) => {
      const today = todayOf(actor);
      const day = readTypedDay(sentOn, actor.locale, today);
      if (!day) return refuse("dayUnread", {}, "sentOn");
      if (isAfter(day, today)) return refuse("dayAhead", {}, "sentOn");
      // The day as typed; today means now. Midday of the workshop's zone is that day in every zone near it.
      await rows(
        work,
        `update part_returns set dispatched_by_id = $2, carrier = $3, tracking_number = nullif($4, ''),
           dispatched_at = case when $5 = $6 then now() else ($5 || ' 12:00')::timestamp at time zone $7 end
         where id = $1 returning id`,
        [returned.id, actor.userId, carrier, trackingNumber, day, today, actor.timeZone],
      );
      return ok({
        lineIds: lines.map(({ lineId }) => lineId),
        detail: {
          returnNumber: number,
          lines: lines.map(({ lineNumber }) => lineNumber),
          carrier,
          trackingNumber,
          sentOn: day,
        },
      });
    },
  });
