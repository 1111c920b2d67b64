import pg from "pg";
import { afterAll, expect } from "vitest";
import { askWorkshop, takeClaim } from "@/lib/claims/judging/service";
import { fileClaim } from "@/lib/claims/sending/service";
import { remindAndLapse } from "@/lib/jobs/tasks/remind-and-lapse";
import { actorAt } from "../support/actor";
import { buildPerson } from "../support/build";
import { adminQuery } from "../support/database";
import { draftReady } from "./draft-ready";
import { twoShops, workerOf } from "./shops";

export const AT_ONCE = 20;

export let world: Awaited<ReturnType<typeof twoShops>>;
let pool: pg.Pool;
export let manager: { id: string; email: string };

/** A distributor, two workshops and the worker's own connections; called once by each file of tests. */
export async function openClockWorld(): Promise<void> {
  world = await twoShops();
  manager = await buildPerson(world.shops[0].workshop, ["workshopManager"], { locale: "de" });
  pool = new pg.Pool({ connectionString: process.env["DATABASE_URL_WORKER"], max: AT_ONCE });
}
afterAll(() => pool.end());

/** The newest query of a claim. */
export const queryOf = async (claimId: string): Promise<string> => {
  const [row] = await adminQuery<{ id: string }>("select id from claim_queries where claim_id = $1", [
    claimId,
  ]);
  return row?.id ?? "";
};

async function withPgClient<T>(act: (client: pg.PoolClient) => Promise<T>): Promise<T> {
  const client = await pool.connect();
  try {
    return await act(client);
  } finally {
    client.release();
  }
}

/** One round of the task on connections of the worker's own login. */
export const runClock = (): Promise<void> => remindAndLapse({}, { withPgClient });

export const assessor = () => actorAt(world.seller, world.assessor, ["assessor"]);
export const technician = () => workerOf(world.shops[0]);

export type Asked = { id: string; number: string; unit: { id: string; serial: string } };

/** A claim asked about by the services, then moved back in time. */
export async function askedClaim(
  days: { askedAgo: number; lastIn: number },
  unit?: Asked["unit"],
): Promise<Asked> {
  const [shop] = world.shops;
  const sold = unit ?? (await world.sell(shop));
  const claim = await draftReady(shop, { unitId: sold.id, serial: sold.serial });
  expect(await fileClaim(technician(), claim)).toMatchObject({ ok: true });
  expect(await takeClaim(assessor(), claim)).toMatchObject({ ok: true });
  const asked = await askWorkshop(assessor(), { ...claim, question: "Which air gap?", rowIds: [] });
  expect(asked).toMatchObject({ ok: true });
  await moveDays(claim.id, days);
  return { ...claim, unit: sold };
}

export async function moveDays(claimId: string, { askedAgo, lastIn }: { askedAgo: number; lastIn: number }) {
  const today = "(now() at time zone 'Europe/Berlin')::date";
  await adminQuery(
    "update claim_queries set asked_at = now() - make_interval(days => $2) where claim_id = $1",
    [claimId, askedAgo],
  );
  await adminQuery(`update claims set query_lapses_on = ${today} + $2::integer where id = $1`, [
    claimId,
    lastIn,
  ]);
}

export const stateOf = async (claimId: string) => {
  const [row] = await adminQuery<{ state: string; holds: boolean; holder: string | null; left: number }>(
    `select state, holder_id as holder, query_lapses_on - (now() at time zone 'Europe/Berlin')::date as left,
       exists (select 1 from claim_lines l where l.claim_id = c.id and l.holds_unit) as holds
     from claims c where id = $1`,
    [claimId],
  );
  return row;
};

export const kindsOf = async (claimId: string) =>
  (
    await adminQuery<{ kind: string }>(
      "select kind from timeline_entries where claim_id = $1 and kind in ('reminded', 'lapse', 'answer', 'withdraw') order by seq",
      [claimId],
    )
  ).map(({ kind }) => kind);

export const mailsOf = (number: string, kind: string) =>
  adminQuery<{ recipient: string; params: Record<string, unknown>; organisation_id: string | null }>(
    "select recipient, params, organisation_id from outbox where kind = $2 and params ->> 'number' = $1 order by recipient",
    [`${number.slice(0, 4)}-${number.slice(4)}`, kind],
  );

export const OVER = { askedAgo: 31, lastIn: -1 };
export const remindedBefore = (claimId: string, sent = 2) =>
  adminQuery("update claim_queries set reminders_sent = $2 where claim_id = $1", [claimId, sent]);

export async function overdue(unit?: Asked["unit"]): Promise<Asked> {
  const claim = await askedClaim(OVER, unit);
  await remindedBefore(claim.id);
  return claim;
}
