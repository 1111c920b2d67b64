import { QueryTypes } from "sequelize";
import { sequelize } from "@/lib/db/sequelize";

/** One trip to the database and back: the yardstick of everything that asks it. */
export const oneTrip = () => sequelize.query("select 1", { type: QueryTypes.SELECT });
export const ONE_TRIP = "select 1";

/** How many statements one run of something sends, the transaction's own among them. */
export async function statementsOf(work: () => Promise<unknown>): Promise<number> {
  let sent = 0;
  sequelize.options.logging = () => {
    sent += 1;
  };
  try {
    await work();
  } finally {
    sequelize.options.logging = false;
  }
  return sent;
}
