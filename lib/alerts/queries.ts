import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";
import { presentAlert, type AlertRow } from "./present";
import { ALERTS_A_PAGE, COUNT_TO, LISTED_TO } from "./schema";
import type { AlertPage } from "./view";

// Row security shows a person their own alone; naming both again is what makes the statement use the index.
const MINE = "organisation_id = $1 and user_id = $2";
const bindings = ({ organisationId, userId }: Actor): unknown[] => [organisationId, userId];

/** How many alerts the actor has not read where they work now; never more than `COUNT_TO`. */
export const countUnread = (actor: Actor): Promise<number> =>
  unitOfWork(actor, async (work) => {
    const [found] = await rows<{ count: number }>(
      work,
      `select count(*)::int as count from (
         select 1 from alerts where ${MINE} and read_at is null limit ${COUNT_TO}) counted`,
      bindings(actor),
    );
    return found?.count ?? 0;
  });

/** A page of the actor's alerts, newest first, read and unread. */
export const listAlerts = (actor: Actor, { page }: { page: number }): Promise<AlertPage> =>
  unitOfWork(actor, async (work) => {
    const found = await rows<AlertRow>(
      work,
      `select id, kind, claim_number as "claimNumber", params, at, read_at as "readAt" from alerts
       where ${MINE} order by at desc, id limit ${ALERTS_A_PAGE} offset $3`,
      [...bindings(actor), (page - 1) * ALERTS_A_PAGE],
    );
    const [all] = await rows<{ count: number }>(
      work,
      `select count(*)::int as count from (select 1 from alerts where ${MINE} limit ${LISTED_TO}) counted`,
      bindings(actor),
    );
    const total = all?.count ?? 0;
    const alerts = found.map((row) => presentAlert(row, actor.locale));
    return { alerts, total, pages: Math.max(1, Math.ceil(total / ALERTS_A_PAGE)) };
  });
