import type pg from "pg";
import type { Actor } from "@/lib/access/actor";
import { checkDraft } from "@/lib/claims/filing/queries";
import { findClaimSheet } from "@/lib/claims/reading/queries";
import { growth, type Measured } from "./measure";
import { ONE_TRIP, againstOneTrip, statementsOf } from "./statements";
import type { Line } from "./table";

export type Sheet = { readonly name: string; readonly read: () => Promise<unknown> };

async function claimOf(admin: pg.Client, sql: string, organisationId: string): Promise<string> {
  const { rows } = await admin.query<{ number: string }>(sql, [organisationId]);
  const [claim] = rows;
  if (!claim) throw new Error("the demo holds no such claim");
  return claim.number;
}

const DECIDED = `select c.number from claims c where c.seller_id = $1 and c.state = 'decided' and c.workshop_id <> $1
  order by (select count(*) from timeline_entries t where t.claim_id = c.id) desc, c.number limit 1`;
const DRAFT = `select c.number from claims c join claim_drafts d on d.claim_id = c.id
  where c.workshop_id = $1 and c.state = 'draft' order by length(d.body::text) desc, c.number limit 1`;

/** The fullest decided claim as its distributor reads it, and the fullest draft as its workshop checks it. */
export async function sheetsOf(admin: pg.Client, distributor: Actor, workshop: Actor): Promise<Sheet[]> {
  const decided = await claimOf(admin, DECIDED, distributor.organisationId);
  const draft = await claimOf(admin, DRAFT, workshop.organisationId);
  return [
    { name: "claim sheet", read: () => findClaimSheet(distributor, decided) },
    { name: "draft checked", read: () => checkDraft(workshop, draft) },
  ];
}

/** Costs of one sheet and one draft at the size the tables have now. */
export async function measureSheets(sheets: readonly Sheet[]): Promise<Map<string, Measured>> {
  const measured = new Map<string, Measured>();
  for (const { name, read } of sheets) {
    if ((await read()) === null) throw new Error(`${name}: nothing was found to measure`);
    measured.set(name, await againstOneTrip(read, 21));
  }
  return measured;
}

/** The costs at the largest size, with their statements and the growth since the smallest. */
export async function sheetLines(
  sheets: readonly Sheet[],
  before: ReadonlyMap<string, Measured>,
  after: ReadonlyMap<string, Measured>,
): Promise<Line[]> {
  const lines: Line[] = [];
  for (const { name, read } of sheets) {
    const [first, measured] = [before.get(name), after.get(name)];
    if (!first || !measured) continue;
    const note = `${await statementsOf(read)} statements, server 50N/N ${growth(first, measured)}`;
    lines.push({ name, measured, yardstick: ONE_TRIP, note });
  }
  return lines;
}
