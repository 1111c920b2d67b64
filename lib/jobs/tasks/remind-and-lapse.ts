import type { PoolClient } from "pg";
import { stepDue, type QueryStep } from "@/lib/claims/clock/query-clock";
import { printClaimNumber } from "@/lib/claims/number";
import { claimPath } from "@/lib/claims/paths";
import { calendarDay } from "@/lib/kernel/calendar-day";
import type { MailParams } from "@/lib/mail/outbox";
import { log } from "@/lib/web/log";
import { publicUrl } from "@/lib/web/settings";
import type { Connections } from "../connections";

type Waiting = {
  query_id: string;
  asked_on: string;
  lapses_on: string;
  today: string;
  reminders_sent: number;
};

type Held = Waiting & {
  number: string;
  family: string | null;
  distributor: string;
  question: string;
  row_ids: string[];
};

const stepOf = (row: Waiting): QueryStep | null =>
  stepDue(
    {
      askedOn: calendarDay(row.asked_on),
      lapsesOn: calendarDay(row.lapses_on),
      remindersSent: row.reminders_sent,
    },
    calendarDay(row.today),
  );

const claimOf = (held: Held) => ({
  link: publicUrl(claimPath(held)),
  number: printClaimNumber(held.number),
  distributor: held.distributor,
});

const reminderOf = (held: Held, answerBy: string): MailParams["queryReminder"] => ({
  ...claimOf(held),
  question: held.question,
  family: held.family ?? "",
  rowIds: held.row_ids,
  answerBy,
});

const lapseOf = (held: Held): MailParams["claimLapsed"] => ({ ...claimOf(held), answerBy: held.lapses_on });

async function act(client: PoolClient, held: Held, step: QueryStep): Promise<void> {
  if (step.kind === "lapse") {
    await client.query("select guarded.lapse_query($1, $2)", [held.query_id, JSON.stringify(lapseOf(held))]);
    return;
  }
  const params = JSON.stringify(reminderOf(held, step.lapsesOn));
  await client.query("select guarded.remind_query($1, $2, $3, $4)", [
    held.query_id,
    step.reminder,
    step.lapsesOn,
    params,
  ]);
}

/** One step of one query under the lock of its claim. What is due is asked again there: an answer may have come first. */
async function takeStep(client: PoolClient, queryId: string): Promise<void> {
  await client.query("begin");
  try {
    const { rows } = await client.query<Held>("select * from guarded.hold_query($1)", [queryId]);
    const [held] = rows;
    const step = held ? stepOf(held) : null;
    if (held && step) await act(client, held, step);
    await client.query("commit");
    if (held && step) log.info({ event: "queryClock", step: step.kind, claim: held.number });
  } catch (fault) {
    await client.query("rollback");
    throw fault;
  }
}

/**
 * Reminds workshops of queries nobody has answered, and lets a claim lapse once its last day has passed. Each query is
 * a transaction of its own: one that fails keeps no other waiting and is tried again at the next round.
 */
export const remindAndLapse = async (_payload: unknown, { withPgClient }: Connections): Promise<void> => {
  const { rows } = await withPgClient((client) =>
    client.query<Waiting>("select * from guarded.waiting_queries()"),
  );
  for (const row of rows) {
    if (!stepOf(row)) continue;
    try {
      await withPgClient((client) => takeStep(client, row.query_id));
    } catch (fault) {
      log.warn({ event: "queryClockFailed", query: row.query_id, fault: String(fault) });
    }
  }
};
