import type pg from "pg";
import type { Actor } from "@/lib/access/actor";
import { foldLookalikes } from "@/lib/labels/serial";
import { lookUpSerial } from "@/lib/parts/queries";
import { growth, type Measured } from "./measure";
import { ONE_TRIP, againstOneTrip } from "./statements";
import type { Line } from "./table";

type Sizes = { readonly few: number; readonly many: number };

/** Serials as a technician types them: right, with look-alikes taken for one another, and of nobody here. */
export async function serialsOf(admin: pg.Client, workshop: Actor): Promise<Map<string, string>> {
  const { rows } = await admin.query<{ serial: string }>(
    `select serial_normal as serial from units where buyer_id = $1 and serial_normal ~ '[OILSB]' order by 1 limit 1`,
    [workshop.organisationId],
  );
  const known = rows[0]?.serial ?? "";
  return new Map([
    ["serial known", known],
    ["serial alike", foldLookalikes(known)],
    ["serial unknown", "ZZ99 NOBODY"],
  ]);
}

/** Costs of the look-up at the size the table has now. */
export async function measureSerials(
  workshop: Actor,
  serials: ReadonlyMap<string, string>,
): Promise<Map<string, Measured>> {
  const measured = new Map<string, Measured>();
  for (const [name, serial] of serials)
    measured.set(name, await againstOneTrip(() => lookUpSerial(workshop, serial), 41));
  return measured;
}

/** The costs among many units, with the growth since there were few. */
export const serialLines = (
  few: ReadonlyMap<string, Measured>,
  many: ReadonlyMap<string, Measured>,
  sizes: Sizes,
): Line[] =>
  [...many].map(([name, measured]) => {
    const grown = growth(few.get(name), measured);
    return { name, measured, yardstick: ONE_TRIP, note: `server ${sizes.many}/${sizes.few} units ${grown}` };
  });
