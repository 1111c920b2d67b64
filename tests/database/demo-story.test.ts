import { Client } from "pg";
import { beforeAll, describe, expect, it } from "vitest";
import { thawedCredit } from "@/lib/credits/frozen-credit-shape";
import { thawedNote } from "@/lib/credits/note-shape";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { storyOn } from "@/seeders/demo-story";
import { writeTables } from "@/seeders/write/insert";
import { adminQuery, inTransaction } from "../support/database";
import { databaseUrl } from "../support/database-url";
import { quickRenderer } from "../unit/seeders/quick-renderer";

// The day the clock of this run shows: terms that run out are asked for by the database's own clock.
const TODAY = calendarDay(new Date().toISOString().slice(0, 10));

beforeAll(async () => {
  const story = await storyOn(TODAY, { passwordHash: "hash", render: quickRenderer });
  const database = new URL(process.env["DATABASE_URL"] ?? "").pathname.slice(1);
  const client = new Client({ connectionString: databaseUrl("ADMIN", database) });
  await client.connect();
  await writeTables(client, story.tables);
  await client.end();
}, 60_000);

const only = async (sql: string): Promise<unknown> => Object.values((await adminQuery(sql))[0] ?? {})[0];

describe("the demo story in the database", () => {
  it("is taken whole by every check and trigger of the schema", async () => {
    expect(Number(await only("select count(*) from claims"))).toBeGreaterThan(240);
    expect(Number(await only("select count(*) from units"))).toBeGreaterThan(5700);
  });

  it("leaves nothing to settle: what was due to be settled was", async () => {
    const due = await inTransaction("worker", { rollback: true }, (run) =>
      run("select claim_id from guarded.due_to_settle()"),
    );
    expect(due).toEqual([]);
  });

  it("leaves no query beyond its last day", async () => {
    expect(
      await adminQuery(
        "select number from claims where state = 'answerNeeded' and query_lapses_on < current_date",
      ),
    ).toEqual([]);
  });

  it("keeps credits and notes as the product reads them back", async () => {
    const verdicts = await adminQuery<{ credit: unknown; total: string }>(
      "select credit, credit_total_minor as total from verdicts",
    );
    for (const { credit, total } of verdicts) expect(String(thawedCredit(credit)?.totalMinor)).toBe(total);
    const notes = await adminQuery<{ document: unknown; number: string }>(
      "select document, number from credit_notes",
    );
    for (const { document, number } of notes) expect(thawedNote(document).number).toBe(number);
    expect(notes.length).toBeGreaterThan(80);
  });

  it("owes each workshop what is open of its notes, and the Day book says the same", async () => {
    const [sums] = await adminQuery(
      `select (select -sum(amount_minor) from ledger_postings where account = 'workshopPayable') as payable,
         (select sum(case kind when 'credit' then total_minor else -total_minor end) from credit_notes)
           - (select sum(amount_minor) from credit_allocations) as open`,
    );
    expect(sums?.["payable"]).toBe(sums?.["open"]);
    expect(Number(sums?.["open"])).toBeGreaterThan(0);
  });

  it("gives back on no invoice line more than was invoiced", async () => {
    expect(
      await adminQuery(
        `select i.id from invoice_lines i join credit_note_lines l on l.invoice_line_id = i.id and l.kind = 'part'
           join credit_notes n on n.id = l.note_id and n.kind = 'credit'
         group by i.id having sum(l.net_minor) > i.unit_price_minor * i.quantity`,
      ),
    ).toEqual([]);
  });
});
