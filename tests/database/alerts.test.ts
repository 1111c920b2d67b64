import { beforeAll, describe, expect, it } from "vitest";
import { countUnread, listAlerts } from "@/lib/alerts/queries";
import { markAllRead, openAlert } from "@/lib/alerts/service";
import { saveDraft } from "@/lib/claims/filing/service";
import { answerQuery } from "@/lib/claims/sending/service";
import { actorAt } from "../support/actor";
import { buildPerson, insertRow } from "../support/build";
import { adminQuery, answerOf, asRole, inTransaction, NOT_ALLOWED } from "../support/database";
import {
  askedClaim,
  assessor,
  mailsOf,
  manager,
  openClockWorld,
  overdue,
  runClock,
  technician,
  world,
  type Asked,
} from "./asked-claims";

type Person = { readonly id: string; readonly name: string; readonly email: string };
let colleague: Person;
let goodsIn: Person;

beforeAll(async () => {
  await openClockWorld();
  colleague = await buildPerson(world.seller, ["assessor"]);
  goodsIn = await buildPerson(world.seller, ["goodsIn"]);
});

const RECENT = { askedAgo: 1, lastIn: 29 };
const FIRST = { page: 1 };

/** Who was told what of a claim, with how often, as the table holds it. */
const toldOf = async (number: string, kind: string) =>
  (
    await adminQuery<{ user: string }>(
      `select user_id as "user" from alerts where claim_number = $1 and kind = $2 order by user_id`,
      [number, kind],
    )
  ).map(({ user }) => user);

const sorted = (...people: readonly { readonly id: string }[]) => people.map(({ id }) => id).toSorted();
const managerActor = () =>
  actorAt(world.shops[0].workshop, { ...manager, name: "Manager" }, ["workshopManager"]);
const colleagueActor = () => actorAt(world.seller, colleague, ["assessor"]);

async function answered(): Promise<Asked> {
  const claim = await askedClaim(RECENT);
  await saveDraft(technician(), claim.number, { note: "The gap is 0.35 mm." });
  expect(await answerQuery(technician(), claim)).toMatchObject({ ok: true });
  return claim;
}

describe("who is told", () => {
  it("of a question: whoever gets the mail, once each, and nobody else", async () => {
    const claim = await askedClaim(RECENT);
    const people = sorted(world.shops[0].person, manager);
    expect(await toldOf(claim.number, "queryAsked")).toEqual(people);
    expect(await mailsOf(claim.number, "queryAsked")).toHaveLength(people.length);
    expect(await toldOf(claim.number, "claimFiled")).toEqual(people);
  });

  it("of an answer: every assessor, though the mail goes to the one who holds the claim alone", async () => {
    const claim = await answered();
    expect(await toldOf(claim.number, "queryAnswered")).toEqual(sorted(world.assessor, colleague));
    expect((await mailsOf(claim.number, "queryAnswered")).length).toBeLessThanOrEqual(1);
    expect(await toldOf(claim.number, "queryAnswered")).not.toContain(goodsIn.id);
  });

  it("of a lapse: the workshop's people and who asked, each where they work", async () => {
    const claim = await overdue();
    await runClock();
    expect(await toldOf(claim.number, "claimLapsed")).toEqual(
      sorted(world.shops[0].person, manager, world.assessor),
    );
    const places = await adminQuery<{ user_id: string; organisation_id: string }>(
      "select user_id, organisation_id from alerts where claim_number = $1 and kind = 'claimLapsed'",
      [claim.number],
    );
    for (const { user_id, organisation_id } of places)
      expect(organisation_id).toBe(
        user_id === world.assessor.id ? world.seller.id : world.shops[0].workshop.id,
      );
  });

  it("counts what a person did themselves as read", async () => {
    const before = [await countUnread(technician()), await countUnread(managerActor())];
    const claim = await askedClaim(RECENT);
    const rows = await adminQuery<{ kind: string; unread: boolean }>(
      `select kind, read_at is null as unread from alerts where claim_number = $1 and user_id = $2 order by kind`,
      [claim.number, world.shops[0].person.id],
    );
    expect(rows).toEqual([
      { kind: "claimFiled", unread: false },
      { kind: "queryAsked", unread: true },
    ]);
    // The manager filed nothing: both are news to them.
    expect([await countUnread(technician()), await countUnread(managerActor())]).toEqual([
      (before[0] ?? 0) + 1,
      (before[1] ?? 0) + 2,
    ]);
  });

  it("leaves out who is switched off, and whose invitation is open", async () => {
    const [off, invited] = [
      await buildPerson(world.seller, ["assessor"]),
      await buildPerson(world.seller, ["assessor"]),
    ];
    await adminQuery("update memberships set disabled_at = now() where user_id = $1", [off.id]);
    await adminQuery(
      `update memberships set accepted_at = null, invited_name = 'Kim', invited_email = 'kim@example.test' where user_id = $1`,
      [invited.id],
    );
    const claim = await answered();
    expect(await toldOf(claim.number, "queryAnswered")).toEqual(sorted(world.assessor, colleague));
  });

  it("tells once, however often the same thing is told", async () => {
    const claim = await askedClaim(RECENT);
    const context = { org: world.seller.id, actor: world.assessor.id };
    const tell = "select guarded.mail_claim_people($1, 'workshop', 'queryAsked', '{}', $2)";
    const key = `queryAsked:${claim.id}:1`;
    // The mail's own key refuses the second, and with it goes the alert: both or neither.
    expect(await answerOf(asRole("web", context, tell, [claim.id, key]))).toBe("23505");
    expect(await toldOf(claim.number, "queryAsked")).toEqual(sorted(world.shops[0].person, manager));
    await adminQuery("delete from outbox where dedupe_key like $1 || ':%'", [key]);
    expect(await answerOf(asRole("web", context, tell, [claim.id, key]))).toBe("done");
    expect(await toldOf(claim.number, "queryAsked")).toEqual(sorted(world.shops[0].person, manager));
  });

  it("goes with its mail: what is rolled back told nobody", async () => {
    const claim = await askedClaim(RECENT);
    await inTransaction("web", { org: world.seller.id, actor: world.assessor.id, rollback: true }, (run) =>
      run("select guarded.mail_claim_people($1, 'workshop', 'news', '{}', 'rolledBack')", [claim.id]),
    );
    expect(await toldOf(claim.number, "news")).toEqual([]);
  });
});

describe("what an alert holds", () => {
  it("is the number and the facts of its sentence, not the letter, the question or an address", async () => {
    const claim = await askedClaim(RECENT);
    const [alert] = await adminQuery<{ params: Record<string, unknown> }>(
      "select params from alerts where claim_number = $1 and kind = 'queryAsked' limit 1",
      [claim.number],
    );
    expect(Object.keys(alert?.params ?? {}).toSorted()).toEqual(["answerBy", "distributor", "family"]);
  });

  it("has a sentence for a kind this version does not know", async () => {
    const someone = await buildPerson(world.seller, ["assessor"]);
    await buildAlert(someone, { kind: "notYetInvented" });
    const [alert] = (await listAlerts(actorAt(world.seller, someone, ["assessor"]), FIRST)).alerts;
    expect(alert).toMatchObject({ kind: "other", number: "4107-3826", isUnread: true });
  });
});

const buildAlert = (person: { readonly id: string }, over: Record<string, unknown> = {}) =>
  insertRow("alerts", {
    organisation_id: world.seller.id,
    user_id: person.id,
    kind: "queryAnswered",
    claim_number: "41073826",
    dedupe_key: crypto.randomUUID(),
    params: "{}",
    ...over,
  });

describe("row security", () => {
  it("shows a person their own, where they work now, and nobody else's", async () => {
    await answered();
    const own = { org: world.seller.id, actor: world.assessor.id };
    const users = async (context: { org: string; actor: string }) =>
      new Set(
        (await asRole<{ user_id: string }>("web", context, "select user_id from alerts")).map(
          ({ user_id }) => user_id,
        ),
      );
    expect(await users(own)).toEqual(new Set([world.assessor.id]));
    expect(await users({ ...own, actor: colleague.id })).toEqual(new Set([colleague.id]));
    // The same person at work for somebody else, and somebody of another organisation, see nothing of it.
    expect(await users({ ...own, org: world.shops[1].workshop.id })).toEqual(new Set());
    expect(await users({ org: world.shops[1].workshop.id, actor: world.shops[1].person.id })).toEqual(
      new Set(),
    );
  });

  it("lets web write no alert and change none but when it was read, and only one's own", async () => {
    await answered();
    const own = { org: world.seller.id, actor: world.assessor.id };
    for (const sql of [
      "insert into alerts (organisation_id, user_id, kind, claim_number, dedupe_key, params) select organisation_id, user_id, kind, claim_number, 'again', params from alerts limit 1",
      "update alerts set kind = 'claimDecided'",
      "update alerts set claim_number = '00000000'",
      "delete from alerts",
    ])
      expect([sql, await answerOf(asRole("web", own, sql))]).toEqual([sql, NOT_ALLOWED]);
    const touched = await inTransaction("web", { ...own, rollback: true }, (run) =>
      run<{ user_id: string }>("update alerts set read_at = now() returning user_id"),
    );
    expect(new Set(touched.map(({ user_id }) => user_id))).toEqual(new Set([world.assessor.id]));
  });
});

describe("reading", () => {
  it("marks the alert that is opened, leads to its claim, and keeps the day it was first read", async () => {
    const someone = await buildPerson(world.seller, ["assessor"]);
    const reader = actorAt(world.seller, someone, ["assessor"]);
    const [first] = [await buildAlert(someone), await buildAlert(someone)];
    const id = String(first["id"]);
    expect(await countUnread(reader)).toBe(2);
    expect(await openAlert(reader, id)).toBe("/claims/4107-3826");
    expect(await countUnread(reader)).toBe(1);
    const readAt = () => adminQuery("select read_at from alerts where id = $1", [id]);
    const before = await readAt();
    expect(await openAlert(reader, id)).toBe("/claims/4107-3826");
    expect(await readAt()).toEqual(before);
  });

  it("finds no alert of somebody else, and leaves it unread", async () => {
    const someone = await buildPerson(world.seller, ["assessor"]);
    const id = String((await buildAlert(someone))["id"]);
    for (const stranger of [assessor(), colleagueActor(), technician()])
      expect(await openAlert(stranger, id)).toBeNull();
    expect(await countUnread(actorAt(world.seller, someone, ["assessor"]))).toBe(1);
  });

  it("of all of them stops at what was on the page", async () => {
    const someone = await buildPerson(world.seller, ["assessor"]);
    const reader = actorAt(world.seller, someone, ["assessor"]);
    await buildAlert(someone, { at: "2026-05-01T08:00:00Z" });
    await buildAlert(someone, { at: "2026-05-01T09:00:00Z" });
    await buildAlert(someone, { at: "2026-05-01T09:00:01Z" });
    expect(await markAllRead(reader, { until: "2026-05-01T09:00:00.000Z" })).toEqual({
      ok: true,
      value: { count: 2 },
    });
    const { alerts, total } = await listAlerts(reader, FIRST);
    expect(alerts.map(({ at, isUnread }) => [at, isUnread])).toEqual([
      ["2026-05-01T09:00:01.000Z", true],
      ["2026-05-01T09:00:00.000Z", false],
      ["2026-05-01T08:00:00.000Z", false],
    ]);
    expect(total).toBe(3);
  });

  it("counts unread ones from their own index and no further than a hundred", async () => {
    const someone = await buildPerson(world.seller, ["assessor"]);
    await adminQuery(
      `insert into alerts (organisation_id, user_id, kind, claim_number, dedupe_key, params)
       select $1, $2, 'queryAnswered', '41073826', 'many:' || n, '{}' from generate_series(1, 150) n`,
      [world.seller.id, someone.id],
    );
    expect(await countUnread(actorAt(world.seller, someone, ["assessor"]))).toBe(100);
    const plan = await inTransaction("web", { org: world.seller.id, actor: someone.id }, async (run) => {
      await run("set local enable_seqscan = off");
      return run<{ "QUERY PLAN": string }>(
        "explain select 1 from alerts where organisation_id = $1 and user_id = $2 and read_at is null limit 100",
        [world.seller.id, someone.id],
      );
    });
    expect(plan.map((line) => line["QUERY PLAN"]).join("\n")).toContain("alerts_unread");
  });
});
