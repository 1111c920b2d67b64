import { run, Logger, parseCronItems } from "graphile-worker";
import { log } from "@/lib/web/log";
import { beat } from "./tasks/beat";
import { remindAndLapse } from "./tasks/remind-and-lapse";
import { sendMails } from "./tasks/send-mails";
import { settleClaims } from "./tasks/settle-claims";
import { sweepUploads } from "./tasks/sweep-uploads";
import { viewCopy } from "./tasks/view-copy";
import { readRunLog } from "./tasks/read-run-log";

const connectionString = process.env.DATABASE_URL;
if (!connectionString) throw new Error("DATABASE_URL is not set: start the product with npm start");

const quiet = new Logger(() => (level, message, meta) => {
  if (level === "error" || level === "warning") log.warn({ event: "worker", message, meta });
});

/** What is done beside the requests: each task may run twice and has its effect once. */
const runner = await run({
  connectionString,
  logger: quiet,
  concurrency: 2,
  noHandleSignals: false,
  pollInterval: 1000,
  taskList: { beat, sendMails, viewCopy, readRunLog, sweepUploads, remindAndLapse, settleClaims },
  parsedCronItems: parseCronItems([
    { task: "sweepUploads", match: "17 * * * *", identifier: "sweepUploads" },
    {
      task: "remindAndLapse",
      match: "23 * * * *",
      identifier: "remindAndLapse",
      // Days pass while nothing runs: a round missed in the last hour is made up for at the start.
      options: { backfillPeriod: 3_600_000 },
    },
    {
      task: "settleClaims",
      match: "41 * * * *",
      identifier: "settleClaims",
      options: { backfillPeriod: 3_600_000 },
    },
  ]),
});

// The first beat makes the product ready; the mail round is asked for often enough that nobody waits for it.
const every = (milliseconds: number, task: string) => {
  const ask = () =>
    runner
      .addJob(task, {}, { jobKey: task, maxAttempts: 1 })
      .catch((fault: unknown) => log.warn({ event: "worker", task, fault: String(fault) }));
  void ask();
  return setInterval(() => void ask(), milliseconds);
};
const timers = [every(15_000, "beat"), every(2_000, "sendMails")];

await runner.promise;
for (const timer of timers) clearInterval(timer);
