import { beforeAll, describe, expect, it } from "vitest";
import { contestVerdict } from "@/lib/claims/contesting/service";
import { takeClaim } from "@/lib/claims/judging/service";
import { thawedCredit } from "@/lib/credits/frozen-credit-shape";
import { allocateCredit, takeBackAllocation } from "@/lib/day-book/allocating/service";
import { listDueCredits } from "@/lib/day-book/due/queries";
import { counterCredit } from "@/lib/day-book/issuing/counter-service";
import { issueCredit } from "@/lib/day-book/issuing/service";
import { findNote } from "@/lib/day-book/notes/queries";
import { adminQuery } from "../support/database";
import { insertRow } from "../support/build";
import {
  creditWorld,
  decidedClaim,
  issued,
  judge,
  statesOf,
  type CreditWorld,
  type DecidedClaim,
} from "./credit-world";

const AT_ONCE = 20;

let world: CreditWorld;
beforeAll(async () => {
  world = await creditWorld();
});

const numbersOf = async (seller: { id: string }): Promise<number[]> =>
  (
    await adminQuery<{ sequence: number }>(
      "select sequence from credit_notes where seller_id = $1 order by sequence",
      [seller.id],
    )
  ).map(({ sequence }) => sequence);
const upTo = (last: number) => Array.from({ length: last }, (_none, at) => at + 1);

const issue = (claim: { number: string }, issuedBefore = 0) =>
  issueCredit(world.clerk, { number: claim.number, issuedBefore });

async function reverse(claim: DecidedClaim, outcome: "upheld" | "upheldInPart" | "declined") {
  const [manager] = world.managers;
  expect(await contestVerdict(manager, { ...claim, reason: "It was hot." })).toMatchObject({ ok: true });
  expect(await takeClaim(world.second, claim)).toMatchObject({ ok: true });
  await judge(world.second, claim, outcome);
}

describe("a verdict", () => {
  it("is kept with the credit it gives and the way to it", async () => {
    const claim = await decidedClaim(world);
    const [verdict] = await adminQuery<{ credit: unknown; net: string; total: string }>(
      `select credit, credit_net_minor as net, credit_total_minor as total from verdicts where claim_id = $1`,
      [claim.id],
    );
    // Reckoned by hand: 3 of 24 months used, 184.50 * 21/24 = 161.4375; 161.44 * 19 % = 30.6736.
    expect([verdict?.net, verdict?.total]).toEqual(["16144", String(16_144 + 3_067)]);
    const credit = thawedCredit(verdict?.credit);
    expect(credit?.totalMinor).toBe(19_211n);
    expect(credit?.lines[0]?.steps.map(({ rule, result }) => [rule, result])).toEqual([
      ["partPriceInvoiced", "184.50 EUR"],
      ["coverStraightLine", "7/8"],
      ["coverAmount", "161.44 EUR"],
    ]);
    expect(await statesOf(claim.id)).toEqual(["due"]);
  });

  it("that declines all leaves nothing due", async () => {
    const claim = await decidedClaim(world, { outcome: "declined" });
    expect(await statesOf(claim.id)).toEqual(["none"]);
    expect(await issue(claim)).toMatchObject({ ok: false, code: "creditNothing" });
  });
});

describe("numbers of credit notes", () => {
  it("follow each other without a gap under 20 issues at once, of which many fail after taking theirs", async () => {
    const own = await creditWorld();
    const claims: DecidedClaim[] = [];
    for (let made = 0; made < AT_ONCE; made += 1) claims.push(await decidedClaim(own));
    await adminQuery(`create sequence test_fails; create function test_fail() returns trigger language plpgsql
      security definer as $$ begin if nextval('test_fails') % 3 = 0 then raise exception 'injected'; end if; return new; end $$;
      create trigger test_fail before insert on credit_note_lines for each row execute function test_fail()`);
    const waiting = new Set(claims);
    let failures = 0;
    while (waiting.size > 0)
      await Promise.all(
        [...waiting].map(async (claim) => {
          try {
            const outcome = await issueCredit(own.clerk, { number: claim.number, issuedBefore: 0 });
            if (outcome.ok) waiting.delete(claim);
          } catch (fault) {
            expect(String(fault)).toContain("injected");
            failures += 1;
          }
        }),
      );
    await adminQuery(
      `drop trigger test_fail on credit_note_lines; drop function test_fail(); drop sequence test_fails`,
    );
    expect(failures).toBeGreaterThan(5);
    expect(await numbersOf(own.seller)).toEqual(upTo(AT_ONCE));
    const [series] = await adminQuery("select last_sequence from credit_note_series where seller_id = $1", [
      own.seller.id,
    ]);
    expect(series).toEqual({ last_sequence: AT_ONCE });
    const [unordered] = await adminQuery(
      `select count(*)::integer as count from (select issued_on < lag(issued_on) over (order by sequence) as back from credit_notes
         where seller_id = $1) o where back`,
      [own.seller.id],
    );
    expect(unordered).toEqual({ count: 0 });
  }, 60_000);

  it("are taken once however often the button is pressed", async () => {
    const claim = await decidedClaim(world);
    const before = (await numbersOf(world.seller)).length;
    const pressed = await Promise.all(Array.from({ length: AT_ONCE }, () => issue(claim)));
    expect(pressed.filter(({ ok }) => ok)).toHaveLength(1);
    expect(new Set(pressed.flatMap((one) => (one.ok ? [] : [one.code])))).toEqual(
      new Set(["creditIssuedAlready"]),
    );
    expect(await numbersOf(world.seller)).toEqual(upTo(before + 1));
  });

  it("never go back behind the last day, whoever writes the row", async () => {
    const own = await creditWorld();
    const claim = await decidedClaim(own);
    const year = Number(new Date().toISOString().slice(0, 4));
    await insertRow("credit_note_series", {
      seller_id: own.seller.id,
      year,
      prefix: "CN-",
      last_sequence: 4,
      last_issued_on: `${year}-12-31`,
    });
    expect(await issueCredit(own.clerk, { number: claim.number, issuedBefore: 0 })).toMatchObject({
      code: "noteDayBeforeLast",
    });
    expect(await numbersOf(own.seller)).toEqual([]);
    for (const change of [
      "last_sequence = 6",
      "last_sequence = 4",
      "last_sequence = 5, last_issued_on = '2026-01-01'",
    ]) {
      const sql = ["update credit_note_series set", change, "where seller_id = $1"].join(" ");
      await expect(adminQuery(sql, [own.seller.id])).rejects.toMatchObject({ code: "PP003" });
    }
  });
});

describe("a contested claim", () => {
  it("has no note issued until it was heard, and its earlier note is countered first", async () => {
    const claim = await decidedClaim(world);
    const first = await issued(world, claim);
    const [manager] = world.managers;
    expect(await contestVerdict(manager, { ...claim, reason: "It was hot." })).toMatchObject({ ok: true });
    expect(await issue(claim, 1)).toMatchObject({ code: "creditContested" });
    expect(await takeClaim(world.second, claim)).toMatchObject({ ok: true });
    await judge(world.second, claim, "upheldInPart");

    expect(await statesOf(claim.id)).toEqual(["due"]);
    expect(await issue(claim, 1)).toMatchObject({ code: "creditCounterFirst" });
    const due = await listDueCredits(world.clerk);
    expect(due.due.find(({ key }) => key === `${claim.number}.1`)?.standing?.number).toBe(first);
    // Half of the same price: what its own note gave is not counted against it.
    expect(due.due.find(({ key }) => key === `${claim.number}.1`)?.credit.netMinor).toBe(8_072n);

    expect(
      await allocateCredit(world.clerk, {
        number: first,
        how: "invoice",
        amount: "1",
        reference: "R 1",
        rowsBefore: 0,
      }),
    ).toMatchObject({ code: "noteReversed" });
    expect(await counterCredit(world.clerk, { number: first, reason: "The verdict changed." })).toMatchObject(
      { ok: true },
    );
    expect(await statesOf(claim.id)).toEqual(["due"]);
    expect(await issue(claim, 1)).toMatchObject({ ok: true });
    expect(await statesOf(claim.id)).toEqual(["noteIssued"]);
    expect(await numbersOf(world.seller)).toEqual(upTo((await numbersOf(world.seller)).length));
  });

  it("whose verdict is confirmed keeps its note", async () => {
    const claim = await decidedClaim(world);
    await issued(world, claim);
    await reverse(claim, "upheld");
    expect(await statesOf(claim.id)).toEqual(["noteIssued"]);
    expect(await issue(claim, 1)).toMatchObject({ code: "creditNothing" });
  });

  it("whose credit falls away waits for the counter note, then owes nothing", async () => {
    const claim = await decidedClaim(world);
    const note = await issued(world, claim);
    await reverse(claim, "declined");
    expect(await statesOf(claim.id)).toEqual(["noteIssued"]);
    expect((await findNote(world.clerk, { number: note, of: "" }))?.isReversed).toBe(true);
    expect(await counterCredit(world.clerk, { number: note, reason: "Declined after all." })).toMatchObject({
      ok: true,
    });
    expect(await statesOf(claim.id)).toEqual(["none"]);
  });
});

describe("a note", () => {
  const allocate = (
    number: string,
    amount: string,
    rowsBefore: number,
    how: "invoice" | "paidOut" = "invoice",
  ) => allocateCredit(world.clerk, { number, how, amount, reference: "R 4711", rowsBefore });

  it("is allocated in parts, never more than is open, and open again when taken back", async () => {
    const claim = await decidedClaim(world);
    const number = await issued(world, claim);
    expect(await allocate(number, "100.00", 0)).toMatchObject({ ok: true });
    expect(await allocate(number, "100.00", 0)).toMatchObject({ code: "allocatedAlready" });
    expect(await allocate(number, "92.12", 1)).toMatchObject({
      code: "allocationMoreThanOpen",
      detail: { open: "92.11 EUR" },
    });
    expect(await statesOf(claim.id)).toEqual(["noteIssued"]);
    expect(await allocate(number, "92,11", 1)).toMatchObject({ ok: true });
    expect(await statesOf(claim.id)).toEqual(["allocated"]);

    const found = await findNote(world.clerk, { number, of: world.seller.id });
    const allocationId = found?.allocations[0]?.id ?? "";
    expect(await counterCredit(world.clerk, { number, reason: "No." })).toMatchObject({
      code: "noteAllocated",
    });
    expect(await takeBackAllocation(world.clerk, { number, allocationId })).toMatchObject({ ok: true });
    expect(await takeBackAllocation(world.clerk, { number, allocationId })).toMatchObject({
      code: "allocationGone",
    });
    expect(await statesOf(claim.id)).toEqual(["noteIssued"]);
    expect((await findNote(world.clerk, { number, of: "" }))?.open.minor).toBe(10_000n);
  });

  it("that is paid out says so on its lines", async () => {
    const claim = await decidedClaim(world);
    const number = await issued(world, claim);
    expect(await allocate(number, "192.11", 0, "paidOut")).toMatchObject({ ok: true });
    expect(await statesOf(claim.id)).toEqual(["paidOut"]);
  });

  it("is not allocated beyond its total by SQL either, nor once countered", async () => {
    const claim = await decidedClaim(world);
    const number = await issued(world, claim);
    const [note] = await adminQuery<{ id: string; workshop_id: string }>(
      "select id, workshop_id from credit_notes where number = $1 and seller_id = $2",
      [number, world.seller.id],
    );
    const put = (amount: number) =>
      insertRow("credit_allocations", {
        note_id: note?.id,
        seller_id: world.seller.id,
        workshop_id: note?.workshop_id,
        amount_minor: amount,
        how: "invoice",
        reference: "R 1",
        allocated_on: "2026-12-01",
        allocated_by_id: world.clerk.userId,
      });
    await expect(put(19_212)).rejects.toMatchObject({ code: "PP003" });
    expect(await counterCredit(world.clerk, { number, reason: "Wrong account." })).toMatchObject({
      ok: true,
    });
    await expect(put(1)).rejects.toMatchObject({ code: "PP003" });
    expect(await statesOf(claim.id)).toEqual(["countered"]);
    // The same verdict may be credited anew: the next note has its own number.
    expect(await issue(claim, 1)).toMatchObject({ ok: true });
  });

  it("together with the others of an invoice line never gives back more than was invoiced", async () => {
    const [first, second] = [await decidedClaim(world), await decidedClaim(world)];
    // Both claims name one line of one piece: the first note takes most of it.
    const [line] = await adminQuery<{ id: string }>(
      "select invoice_line_id as id from claim_lines where claim_id = $1",
      [first.id],
    );
    await adminQuery("alter table claim_revisions disable trigger all");
    await adminQuery(
      "update claim_revisions set facts = jsonb_set(facts, '{lines,0,invoiceLine,id}', to_jsonb($2::text)) where claim_id = $1",
      [second.id, line?.id],
    );
    await adminQuery("alter table claim_revisions enable trigger all");
    expect(await issue(first)).toMatchObject({ ok: true });
    expect(await issue(second)).toMatchObject({ code: "creditOverInvoice" });
  });
});
