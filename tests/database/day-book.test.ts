import { beforeAll, describe, expect, it, vi } from "vitest";
import { issueCredit } from "@/lib/day-book/issuing/service";
import { allocateCredit } from "@/lib/day-book/allocating/service";
import { disproofs } from "@/lib/day-book/book/proof";
import { readDayBook } from "@/lib/day-book/book/queries";
import { asRole, adminQuery } from "../support/database";
import { runBank, violations } from "./bank";
import { creditWorld, decidedClaim, issued, type CreditWorld, type DecidedClaim } from "./credit-world";

/** Seconds of the bank test; a release runs it for 60. */
const SECONDS = Number(process.env["BANK_SECONDS"] ?? 4);
const CLIENTS = 8;
const CLAIMS = 12;

let world: CreditWorld;
const claims: DecidedClaim[] = [];
beforeAll(async () => {
  world = await creditWorld();
  for (let made = 0; made < CLAIMS; made += 1)
    claims.push(await decidedClaim(world, { at: made % 2 === 0 ? 0 : 1 }));
}, 120_000);

describe("the Day book", () => {
  it(
    "proves itself at every moment while eight clients issue, allocate, take back, counter and reverse",
    async () => {
      const { done, looks, wrong } = await runBank(world, claims, { clients: CLIENTS, seconds: SECONDS });
      expect(wrong).toEqual([]);
      expect(looks).toBeGreaterThan(SECONDS * 2);
      expect(done.get("ok")).toBeGreaterThan(SECONDS * 5);
      expect(done.get("allocationMoreThanOpen")).toBeGreaterThan(0);
      const { entries, sums, closing } = await readDayBook(world.clerk, {
        workshop: "",
        month: "",
        before: undefined,
      });
      expect(sums.flatMap(disproofs)).toEqual([]);
      expect(entries.length).toBeGreaterThan(0);
      // The newest balance of each workshop is what it is owed in the end.
      for (const { workshopId, owedMinor } of closing)
        expect(entries.find((entry) => entry.workshopId === workshopId)?.balanceMinor).toBe(owedMinor);
      if (process.env["BANK_SECONDS"]) process.stdout.write(`${JSON.stringify([...done])} ${looks} looks\n`);
    },
    (SECONDS + 60) * 1000,
  );

  it("has numbers that follow each other, one book a distributor", async () => {
    const [gaps] = await adminQuery(
      `select count(*)::integer = max(sequence) as whole, min(sequence)::integer as first from ledger_entries where seller_id = $1`,
      [world.seller.id],
    );
    expect(gaps).toEqual({ whole: true, first: 1 });
  });

  it("is leafed through without losing or repeating an entry, and by workshop with its own balances", async () => {
    const seen: string[] = [];
    for (let before: string | undefined = undefined, more = true; more;) {
      const book = await readDayBook(world.clerk, { workshop: "", month: "", before });
      seen.push(...book.entries.map(({ sequence }) => sequence));
      before = book.nextBefore ?? undefined;
      more = before !== undefined;
    }
    expect(seen).toEqual(seen.map((_one, at) => String(seen.length - at)));
    const workshop = world.shops[0].workshop.id;
    const own = await readDayBook(world.clerk, { workshop, month: "", before: undefined });
    expect(new Set(own.entries.map(({ workshopId }) => workshopId))).toEqual(new Set([workshop]));
    expect(own.entries[0]?.balanceMinor).toBe(own.closing[0]?.owedMinor);
    const past = await readDayBook(world.clerk, { workshop, month: "2020-01", before: undefined });
    expect([past.entries, past.opening, past.closing]).toEqual([[], [], []]);
  });

  it("is nobody's to read but the distributor's accounts: a workshop sees not one posting", async () => {
    const [manager] = world.managers;
    expect((await readDayBook(manager, { workshop: "", month: "", before: undefined })).entries).toEqual([]);
    expect(
      (await readDayBook(world.assessor, { workshop: "", month: "", before: undefined })).entries,
    ).toEqual([]);
    const as = { actor: manager.userId, org: manager.organisationId };
    for (const table of ["ledger_entries", "ledger_postings", "ledger_heads", "credit_note_series"]) {
      const sql = ["select count(*)::integer as count from", table].join(" ");
      expect(await asRole("web", as, sql)).toEqual([{ count: 0 }]);
    }
    const [theirs] = await asRole<{ count: number }>(
      "web",
      as,
      "select count(*)::integer as count from credit_notes",
    );
    expect(theirs?.count).toBeGreaterThan(0);
  });

  it("is watched by a reader that finds a build without lock and trigger within seconds", async () => {
    const claim = await decidedClaim(world);
    const number = await issued(world, claim);
    const [note] = await adminQuery<{ id: string; workshop: string; total: string }>(
      "select id, workshop_id as workshop, total_minor as total from credit_notes where seller_id = $1 and number = $2",
      [world.seller.id, number],
    );
    expect(await violations(world.seller)).toEqual([]);
    await adminQuery("alter table credit_allocations disable trigger credit_allocations_kept");
    try {
      // What a naive build does: look what is open, think, write.
      const naive = async () => {
        const [open] = await adminQuery<{ open: string }>(
          "select ($2::bigint - coalesce(sum(amount_minor), 0))::text as open from credit_allocations where note_id = $1",
          [note?.id, note?.total],
        );
        await new Promise((resolve) => setTimeout(resolve, 5));
        if (BigInt(open?.open ?? "0") <= 0n) return;
        await adminQuery(
          `insert into credit_allocations (note_id, seller_id, workshop_id, amount_minor, how, reference, allocated_on, allocated_by_id)
           values ($1, $2, $3, $4, 'invoice', 'R 1', '2026-12-01', $5)`,
          [note?.id, world.seller.id, note?.workshop, open?.open, world.clerk.userId],
        );
      };
      const started = Date.now();
      let found: string[] = [];
      while (found.length === 0 && Date.now() - started < 10_000) {
        await Promise.all(Array.from({ length: CLIENTS }, naive));
        found = await violations(world.seller);
      }
      expect(found.join(" ")).toContain("allocated beyond its total");
    } finally {
      await adminQuery("alter table credit_allocations enable always trigger credit_allocations_kept");
    }
  });

  it("refuses an entry whose postings do not sum to nothing, whoever writes it", async () => {
    const own = await creditWorld();
    const claim = await decidedClaim(own);
    await issued(own, claim);
    const add = `insert into ledger_postings (seller_id, sequence, position, account, amount_minor, currency)
      values ($1, 1, 9, 'bank', 1, 'EUR')`;
    await expect(adminQuery(add, [own.seller.id])).rejects.toMatchObject({ code: "PP003" });
    await expect(
      adminQuery("update ledger_postings set amount_minor = 0 where seller_id = $1", [own.seller.id]),
    ).rejects.toThrow();
  });
});

describe("clashes of transactions", () => {
  it("on three commits of ten are tried again: every issue and allocation ends right, and mails once", async () => {
    const own = await creditWorld();
    const mine: DecidedClaim[] = [];
    for (let made = 0; made < 10; made += 1) mine.push(await decidedClaim(own));
    // Deferred, so that the fault comes at the commit itself, both kinds in turn.
    await adminQuery(`create sequence test_commits; create function test_clash() returns trigger language plpgsql
      security definer as $$ declare n bigint := nextval('test_commits'); begin
        if n % 10 in (2, 5) then raise exception 'injected' using errcode = '40001'; end if;
        if n % 10 = 8 then raise exception 'injected' using errcode = '40P01'; end if;
        return null; end $$;
      create constraint trigger test_clash after insert on ledger_entries deferrable initially deferred
        for each row execute function test_clash()`);
    const right: boolean[] = [];
    for (const claim of mine) {
      const outcome = await issueCredit(own.clerk, { number: claim.number, issuedBefore: 0 });
      right.push(outcome.ok);
      if (!outcome.ok) continue;
      const form = { number: outcome.value.noteNumber, how: "invoice" as const, reference: "R 1" };
      right.push((await allocateCredit(own.clerk, { ...form, amount: "10", rowsBefore: 0 })).ok);
      right.push((await allocateCredit(own.clerk, { ...form, amount: "20", rowsBefore: 1 })).ok);
    }
    const [commits] = await adminQuery<{ tried: number }>(
      "select last_value::integer as tried from test_commits",
    );
    await adminQuery(
      "drop trigger test_clash on ledger_entries; drop function test_clash(); drop sequence test_commits",
    );
    // The driver says of each that it threw the connection away; those words are part of this test.
    const said = vi.mocked(console.warn).mock.calls.map(String);
    expect(said.length).toBeGreaterThan(8);
    expect(said.filter((one) => !one.includes("injected"))).toEqual([]);
    vi.mocked(console.warn).mockClear();
    expect(right).toEqual(Array.from({ length: 30 }, () => true));
    // 30 operations and the clashes between them: each one tried again, none more than it needed.
    expect(commits?.tried).toBeGreaterThan(38);
    expect(commits?.tried).toBeLessThan(50);
    const [notes] = await adminQuery(
      `select count(*)::integer as notes, count(distinct number)::integer as numbers, max(sequence) as last,
         (select count(*)::integer from ledger_entries e where e.seller_id = $1) as entries,
         (select count(*)::integer from outbox o where o.organisation_id = $1 and o.kind = 'creditNoteIssued') as mails
       from credit_notes where seller_id = $1`,
      [own.seller.id],
    );
    // One manager reads each note.
    expect(notes).toEqual({ notes: 10, numbers: 10, last: 10, entries: 30, mails: 10 });
    expect(await violations(own.seller)).toEqual([]);
  }, 60_000);
});
