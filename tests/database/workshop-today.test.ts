import { beforeAll, describe, expect, it } from "vitest";
import { findWorkshopToday } from "@/lib/reports/workshop-today/queries";
import { actorAt } from "../support/actor";
import { buildClaim, buildLine, buildPerson, DECIDED, FILED, insertRow } from "../support/build";
import { adminQuery } from "../support/database";
import { twoShops, type Shop } from "./shops";

type World = Awaited<ReturnType<typeof twoShops>>;
let world: World;
let shop: Shop;
let manager: ReturnType<typeof actorAt>;

beforeAll(async () => {
  world = await twoShops();
  [shop] = world.shops;
  manager = actorAt(shop.workshop, await buildPerson(shop.workshop, ["workshopManager"]), [
    "workshopManager",
  ]);
});

const day = async (plus: number): Promise<string> => {
  const [row] = await adminQuery(
    "select ((now() at time zone 'Europe/Berlin')::date + $1::int)::text as day",
    [plus],
  );
  return String(row?.["day"]);
};

const parties = () => ({ seller_id: shop.seller.id, workshop_id: shop.workshop.id });

/** A decided claim whose verdict promises so much. */
async function promised(totalMinor: number, over = {}) {
  const claim = await buildClaim(shop, {
    ...DECIDED,
    state: "decided",
    contest_until: await day(20),
    ...over,
  });
  const sha256 = "a".repeat(64);
  await insertRow("claim_revisions", {
    claim_id: claim.id,
    ...parties(),
    revision: 1,
    facts: "{}",
    sha256,
    sent_by_id: shop.person.id,
  });
  const verdict = await insertRow("verdicts", {
    claim_id: claim.id,
    ...parties(),
    revision: 1,
    revision_sha256: sha256,
    outcome: "upheldInPart",
    letter: "Half.",
    decided_by_id: world.assessor.id,
    credit_net_minor: totalMinor,
    credit_total_minor: totalMinor,
  });
  return { claim, verdict };
}

let notes = 0;
async function noted(of: Awaited<ReturnType<typeof promised>>, totalMinor: number, allocatedMinor: number) {
  notes += 1;
  const note = await insertRow("credit_notes", {
    ...parties(),
    account_id: shop.account.id,
    claim_id: of.claim.id,
    verdict_id: of.verdict["id"],
    kind: "credit",
    year: Number((await day(0)).slice(0, 4)),
    sequence: notes,
    number: `T-${notes}`,
    issued_on: await day(0),
    currency: "EUR",
    net_minor: totalMinor,
    tax_minor: 0,
    total_minor: totalMinor,
    document: "{}",
    issued_by_id: world.assessor.id,
  });
  if (allocatedMinor > 0)
    await insertRow("credit_allocations", {
      note_id: note["id"],
      ...parties(),
      amount_minor: allocatedMinor,
      how: "invoice",
      reference: "R 1",
      allocated_on: await day(0),
      allocated_by_id: world.assessor.id,
    });
}

const euros = (amounts: readonly { minor: bigint; currency: string }[] | undefined) =>
  amounts?.map(({ minor, currency }) => [currency, minor]);

describe("a workshop's day", () => {
  it("promises what verdicts gave until it is allocated, and credits what was allocated this month", async () => {
    await promised(10_000);
    await noted(await promised(5_000), 5_000, 0);
    await noted(await promised(8_000), 8_000, 3_000);
    const today = await findWorkshopToday(manager);
    expect(euros(today?.promised)).toEqual([["EUR", 20_000n]]);
    expect(euros(today?.creditedThisMonth)).toEqual([["EUR", 3_000n]]);
  });

  it("counts open claims by age, and what they ask for", async () => {
    await buildClaim(shop, { ...FILED, state: "filed", filed_on: await day(-8), asked_minor: 700 });
    await buildClaim(shop, { ...FILED, state: "answerNeeded", filed_on: await day(0), asked_minor: 50 });
    const today = await findWorkshopToday(manager);
    expect(today?.openCount).toBe(2);
    expect(today?.ages.oldestDays).toBe(8);
    expect(euros(today?.asked)).toEqual([["EUR", 750n]]);
  });

  it("names parts to send and verdicts whose days run out, the first due first", async () => {
    const claim = await buildClaim(shop, { ...FILED, state: "beingJudged", filed_on: await day(-1) });
    const line = await buildLine(shop, claim, world.part, { return_state: "awaited" });
    const called = await insertRow("part_returns", {
      number: "512408337",
      claim_id: claim.id,
      ...parties(),
      send_to: "Dock 2",
      due_on: await day(4),
      called_in_by_id: world.assessor.id,
    });
    await insertRow("return_lines", { return_id: called["id"], line_id: line.id, ...parties() });
    const soon = await promised(0, { contest_until: await day(7), outcome: "declined" });
    await promised(0, { contest_until: await day(8), outcome: "declined" });
    await promised(0, { contest_until: await day(3), outcome: "declined", contest_waived_at: new Date() });
    const today = await findWorkshopToday(manager);
    expect(today?.toSend).toEqual([{ number: claim.number, dueOn: await day(4) }]);
    expect(today?.contestSoon).toEqual([{ number: soon.claim.number, until: await day(7) }]);
  });

  it("tells another workshop nothing of it, and a role without the right nothing at all", async () => {
    const [, other] = world.shops;
    const stranger = actorAt(other.workshop, await buildPerson(other.workshop, ["workshopManager"]), [
      "workshopManager",
    ]);
    expect(await findWorkshopToday(stranger)).toMatchObject({
      openCount: 0,
      promised: [],
      toSend: [],
      contestSoon: [],
    });
    expect(await findWorkshopToday(actorAt(shop.workshop, shop.person, ["goodsIn"]))).toBeNull();
  });
});
