import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { ReturnState } from "@/lib/claims/lifecycle";
import { todayOf } from "@/lib/access/today-queries";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { daysBetween, type CalendarDay } from "@/lib/kernel/calendar-day";
import { familyOf } from "@/lib/parts/families";
import { isQuarantined } from "./danger";
import type { ParcelCondition } from "./kinds";
import { printReturnNumber } from "./number";
import { receivesParts } from "./parcel-service";
import type { ExpectedItem, GoodsInLists, ParcelItem } from "./view";

const MOST_SHOWN = 50;

type ItemRow = {
  number: string;
  claimNumber: string;
  workshopName: string;
  partName: string;
  lineNumber: number;
  lineCount: number;
  serial: string | null;
  state: ReturnState;
  dueOn: CalendarDay;
  place: string | null;
  family: string;
  condition: ParcelCondition | null;
};

// Found by where their parts are; a claim that ended before its part set out waits for nothing any more.
const DUE =
  "l.seller_id = $1 and l.return_state in ('awaited', 'sent') and c.state not in ('withdrawn', 'lapsed')";
const AT_THE_BENCH = "l.seller_id = $1 and l.return_state = 'received'";
const UNMATCHED = "seller_id = $1 and return_id is null";

const NEWEST_RETURN = `join lateral (select r.number, r.due_on, x.place, x.parcel_id from return_lines x
    join part_returns r on r.id = x.return_id where x.line_id = l.id order by r.called_in_at desc, r.id desc limit 1) r on true`;

const ITEMS = `select r.number, c.number as "claimNumber", w.name as "workshopName", p.name as "partName",
    l.line_number as "lineNumber", (select count(*)::int from claim_lines n where n.claim_id = l.claim_id) as "lineCount",
    coalesce(u.serial, l.serial_typed) as serial, l.return_state as state, r.due_on as "dueOn", r.place, p.family,
    k.condition
  from claim_lines l join claims c on c.id = l.claim_id join organisations w on w.id = l.workshop_id
    join parts p on p.seller_id = l.seller_id and p.id = l.part_id
    left join units u on u.seller_id = l.seller_id and u.id = l.unit_id
    ${NEWEST_RETURN}
    left join parcels k on k.seller_id = l.seller_id and k.id = r.parcel_id`;

export const PARCELS = `select id, arrived_at as "arrivedAt", sender_written as sender, part_written as part,
  serial_written as serial, number_written as "numberWritten", condition, note from parcels`;
export type ParcelRow = Omit<ParcelItem, "arrivedAt"> & { arrivedAt: Date };

/** A parcel as a page shows it. */
export const presentParcel = ({ arrivedAt, ...parcel }: ParcelRow): ParcelItem => ({
  ...parcel,
  arrivedAt: arrivedAt.toISOString(),
});

const presentItem = ({ family, condition, ...item }: ItemRow, today: CalendarDay): ExpectedItem => ({
  ...item,
  printed: printReturnNumber(item.number),
  daysOver: item.state === "awaited" ? Math.max(0, daysBetween(item.dueOn, today)) : 0,
  isQuarantined: isQuarantined(familyOf(family), condition),
});

const count = async (work: Work, sql: string, bind: unknown[]): Promise<number> => {
  const [found] = await rows<{ count: number }>(work, sql, bind);
  return found?.count ?? 0;
};

async function counted(work: Work, today: CalendarDay): Promise<GoodsInLists["counts"]> {
  const own = work.actor.organisationId;
  return {
    due: await count(
      work,
      `select count(*)::int as count from claim_lines l join claims c on c.id = l.claim_id where ${DUE}`,
      [own],
    ),
    overdue: await count(
      work,
      `select count(*)::int as count from claim_lines l join claims c on c.id = l.claim_id ${NEWEST_RETURN}
       where ${DUE} and l.return_state = 'awaited' and r.due_on < $2`,
      [own, today],
    ),
    unmatched: await count(work, `select count(*)::int as count from parcels where ${UNMATCHED}`, [own]),
    toExamine: await count(work, `select count(*)::int as count from claim_lines l where ${AT_THE_BENCH}`, [
      own,
    ]),
  };
}

/** The day of goods-in, at most fifty of each, what is due first at the top; null for whoever opens no parcels. */
export async function goodsInLists(actor: Actor): Promise<GoodsInLists | null> {
  if (!receivesParts(actor)) return null;
  return unitOfWork(actor, async (work) => {
    const today = todayOf(actor);
    const own = [actor.organisationId, MOST_SHOWN];
    const due = await rows<ItemRow>(
      work,
      `${ITEMS} where ${DUE} order by r.due_on, r.number, l.line_number limit $2`,
      own,
    );
    const bench = await rows<ItemRow>(
      work,
      `${ITEMS} where ${AT_THE_BENCH} order by r.due_on, r.number, l.line_number limit $2`,
      own,
    );
    const unmatched = await rows<ParcelRow>(
      work,
      `${PARCELS} where ${UNMATCHED} order by arrived_at, id limit $2`,
      own,
    );
    return {
      due: due.map((item) => presentItem(item, today)),
      unmatched: unmatched.map(presentParcel),
      toExamine: bench.map((item) => presentItem(item, today)),
      counts: await counted(work, today),
    };
  });
}
