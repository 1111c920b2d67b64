import { beforeAll, describe, expect, it } from "vitest";
import { adminQuery, answerOf, asRole, NOT_ALLOWED, type Row } from "../support/database";
import { allOf, contextOf, listTables, partiesOf, type Table } from "./organisation-tables";
import { twoDistributors, type Member, type World } from "./two-distributors";

let world: World;
let tables: readonly Table[];

beforeAll(async () => {
  world = await twoDistributors();
  tables = await listTables();
});

/** What a trading partner reads too: a workshop what is sold to it, a distributor where its buyers have their workshops. */
const BUYERS_READ = ["makers", "parts", "batches", "rule_book_versions"];
/** Also a vehicle that carries a part of the distributor's. */
const SELLERS_READ = ["sites", "vehicles"];

/** Whether an organisation may read a row by the rules of the product. */
const mayRead = (table: Table, row: Row, { id }: Member): boolean => {
  const parties = partiesOf(table, row);
  if (parties.includes(id)) return true;
  const isSeller = [world.north.id, world.south.id].includes(id);
  const isPartners = parties.some((party) => world.partnersOf.get(id)?.includes(party));
  return isPartners && (isSeller ? SELLERS_READ : BUYERS_READ).includes(table.name);
};

/** What web reads of a table; nothing where it may read none of it. */
async function readAs(member: Member, { name }: Table, context = contextOf(member)): Promise<Row[]> {
  const sql = `select * from ${name}`;
  try {
    return await asRole("web", context, sql);
  } catch (fault) {
    expect(await answerOf(Promise.reject(fault))).toBe(NOT_ALLOWED);
    return [];
  }
}

describe("row security, asked as web by SQL", () => {
  it("is tried on every table that holds organisations' rows, and on rows of more than one of them", async () => {
    expect(tables.length).toBeGreaterThanOrEqual(32);
    for (const table of tables) {
      const parties = new Set((await allOf(table)).flatMap((row) => partiesOf(table, row)));
      expect([table.name, parties.size >= 2]).toEqual([table.name, true]);
    }
  });

  it("shows an organisation no row of another, in any table", async () => {
    for (const table of tables)
      for (const member of world.members) {
        const foreign = (await readAs(member, table)).filter((row) => !mayRead(table, row, member));
        expect([table.name, foreign]).toEqual([table.name, []]);
      }
  });

  it("shows each side of a claim what is theirs", async () => {
    const seen = async (member: Member, name: string) =>
      (
        await readAs(
          member,
          tables.find((table) => table.name === name) ?? { name, parties: [], columns: [] },
        )
      ).length;
    for (const name of [
      "claims",
      "claim_lines",
      "claim_revisions",
      "readings",
      "claim_queries",
      "verdicts",
      "verdict_lines",
    ]) {
      expect([name, await seen(world.north, name)]).toEqual([name, 3]);
      expect([name, await seen(world.south, name)]).toEqual([name, 2]);
    }
    for (const name of ["claim_messages", "timeline_entries", "revision_evidence", "evidence_files"])
      expect([name, await seen(world.north, name)]).toEqual([name, 3]);
    for (const [member, count] of [
      [world.north, 3],
      [world.south, 2],
    ] as const)
      expect(await seen(member, "vehicles")).toBe(count);
    expect(await seen(world.workshops[0], "claims")).toBe(2);
    expect(await seen(world.workshops[2], "claims")).toBe(4);
    expect(await seen(world.north, "claim_flags")).toBe(3);
    expect(await seen(world.workshops[0], "claim_flags")).toBe(0);
    expect(await seen(world.north, "claim_drafts")).toBe(0);
  });

  it("shows a distributor nothing of a draft", async () => {
    const draft = world.drafts.get(`${world.north.id} ${world.workshops[0].id}`);
    const count = (member: Member, column: string, sql: string) =>
      asRole("web", contextOf(member), sql, [draft?.id]).then((rows) => [column, rows.length]);
    for (const [name, sql] of [
      ["claims", "select 1 from claims where id = $1"],
      ["claim_lines", "select 1 from claim_lines where claim_id = $1"],
      ["evidence_files", "select 1 from evidence_files where claim_id = $1"],
    ] as const) {
      expect(await count(world.north, name, sql)).toEqual([name, 0]);
      expect(await count(world.workshops[0], name, sql)).toEqual([name, 1]);
    }
  });

  it("shows what one side says among its own people to that side alone", async () => {
    const [shop] = world.workshops;
    const body = "Among ourselves.";
    await adminQuery(
      `insert into claim_messages (claim_id, seller_id, workshop_id, author_id, author_name, author_organisation_id, audience, body)
         select claim_id, seller_id, workshop_id, author_id, author_name, workshop_id, 'own', $3 from claim_messages
         where seller_id = $1 and workshop_id = $2 limit 1`,
      [world.north.id, shop.id, body],
    );
    const sql = "select author_organisation_id as by from claim_messages where body = $1";
    expect(await asRole("web", contextOf(shop), sql, [body])).toEqual([{ by: shop.id }]);
    expect(await asRole("web", contextOf(world.north), sql, [body])).toEqual([]);
  });

  it("shows nothing at all without a context, and after a context that has ended", async () => {
    const [member] = world.members;
    if (!member) throw new Error("nobody");
    for (const table of tables) {
      expect([table.name, (await readAs(member, table, { actor: "", org: "" })).length]).toEqual([
        table.name,
        0,
      ]);
    }
    for (const table of ["users", "login_attempts", "single_use_links", "timeline_heads", "organisations"]) {
      const sql = `select count(*)::integer as count from ${table}`;
      const answer = await asRole<{ count: number }>("web", {}, sql).catch(() => [{ count: 0 }]);
      expect([table, answer[0]?.count]).toEqual([table, 0]);
    }
  });
});
