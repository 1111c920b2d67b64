import { readFile } from "node:fs/promises";
import { QueryTypes } from "sequelize";
import { sequelize } from "@/lib/db/sequelize";

const CONNECTIONS = `select pid from pg_stat_activity where usename = current_user`;

/** Nanoseconds the server's processes of our connections were at work, however long they waited for a core. */
async function workedNs(): Promise<number> {
  const connections = await sequelize.query<{ pid: number }>(CONNECTIONS, { type: QueryTypes.SELECT });
  const each = await Promise.all(connections.map(({ pid }) => readFile(`/proc/${pid}/schedstat`, "utf8")));
  return each.reduce((sum, text) => sum + Number(text.split(" ")[0]), 0);
}

/** Milliseconds the server works for one run of something: what a busy machine does not change. */
export async function serverMs(work: () => Promise<unknown>, runs: number): Promise<number> {
  const before = await workedNs();
  for (let run = 0; run < runs; run += 1) await work();
  return ((await workedNs()) - before) / 1e6 / runs;
}
