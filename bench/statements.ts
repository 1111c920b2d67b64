import { QueryTypes } from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import { against, type Measured } from "./measure";
import { serverMs } from "./server-time";

/** One trip to the database and back: the yardstick of everything that asks it. */
const oneTrip = () => sequelize.query("select 1", { type: QueryTypes.SELECT });
export const ONE_TRIP = "select 1";

/** How many statements one run of something sends, the transaction's own among them. */
export async function statementsOf(work: () => Promise<unknown>): Promise<number> {
  let sent = 0;
  const count = () => {
    sent += 1;
  };
  sequelize.addHook("beforeQuery", "bench", count);
  try {
    await work();
  } finally {
    sequelize.removeHook("beforeQuery", "bench");
  }
  return sent;
}

/** A read against one trip to the database, with the server's own work for it. */
export async function againstOneTrip(read: () => Promise<unknown>, rounds: number): Promise<Measured> {
  const measured = await against(oneTrip, read, { rounds });
  return { ...measured, serverMs: await serverMs(read, rounds) };
}
