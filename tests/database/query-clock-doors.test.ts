import { beforeAll, describe, expect, it } from "vitest";
import { findClaimSheet } from "@/lib/claims/reading/queries";
import { letterFor } from "@/lib/mail/letter";
import { answerOf, asRole, NOT_ALLOWED } from "../support/database";
import {
  askedClaim,
  assessor,
  mailsOf,
  manager,
  moveDays,
  openClockWorld,
  OVER,
  overdue,
  queryOf,
  runClock,
  stateOf,
  technician,
  world,
} from "./asked-claims";
import { workerOf } from "./shops";

beforeAll(openClockWorld);

describe("what the clock may do", () => {
  it("is the worker's alone: nobody at work for an organisation can lapse or remind", async () => {
    const claim = await overdue();
    const query = await queryOf(claim.id);
    const org = { org: world.seller.id, actor: world.assessor.id };
    for (const sql of [
      "select guarded.lapse_query($1, '{}')",
      "select guarded.remind_query($1, 2, current_date, '{}')",
      "select * from guarded.hold_query($1)",
      "select guarded.mail_of_query($1, 'claimLapsed', 'x', '{}', true)",
    ])
      expect(await answerOf(asRole("web", org, sql, [query]))).toBe(NOT_ALLOWED);
    expect(await answerOf(asRole("web", org, "select * from guarded.waiting_queries()"))).toBe(NOT_ALLOWED);
    expect(
      await answerOf(asRole("worker", {}, "select guarded.mail_of_query($1, 'a', 'x', '{}', true)", [query])),
    ).toBe(NOT_ALLOWED);
    expect(await answerOf(asRole("worker", {}, "select number from claims"))).toBe(NOT_ALLOWED);
    expect(await answerOf(asRole("worker", {}, "update claims set state = 'lapsed'"))).toBe(NOT_ALLOWED);
  });

  it("ends where the day has not come, whatever the worker says", async () => {
    const claim = await askedClaim({ askedAgo: 10, lastIn: 20 });
    const query = await queryOf(claim.id);
    const said = (sql: string) => asRole<{ done: boolean }>("worker", {}, sql, [query]);
    expect(await said("select guarded.lapse_query($1, '{}') as done")).toEqual([{ done: false }]);
    const moved = "select guarded.remind_query($1, 1, current_date + 90, '{}') as done";
    expect(await answerOf(said(moved))).toBe("PP003");
    await moveDays(claim.id, OVER);
    expect(await said("select guarded.lapse_query($1, '{}') as done")).toEqual([{ done: false }]);
    expect(await stateOf(claim.id)).toMatchObject({ state: "answerNeeded" });
  });
});

describe("a lapse on the screen and in the mail", () => {
  it("is read by both sides and by no stranger", async () => {
    const claim = await overdue();
    await runClock();
    const [, stranger] = world.shops;
    for (const actor of [technician(), assessor()]) {
      const sheet = await findClaimSheet(actor, claim.number);
      expect(
        JSON.stringify(sheet, (_key, value: unknown) => (typeof value === "bigint" ? String(value) : value)),
      ).toContain('"lapse"');
    }
    expect(await findClaimSheet(workerOf(stranger), claim.number)).toBeNull();
    const seen = await asRole(
      "web",
      { org: stranger.workshop.id, actor: stranger.person.id },
      "select 1 from timeline_entries where claim_id = $1",
      [claim.id],
    );
    expect(seen).toEqual([]);
  });

  it("has its words in German and in English, from what the outbox holds", async () => {
    const claim = await askedClaim({ askedAgo: 60, lastIn: -30 });
    await runClock();
    await moveDays(claim.id, { askedAgo: 64, lastIn: -1 });
    await runClock();
    const ofManager = async (kind: string) =>
      (await mailsOf(claim.number, kind)).find(({ recipient }) => recipient === manager.email)?.params ?? {};
    const reminder = await letterFor("queryReminder", await ofManager("queryReminder"), "de");
    expect(reminder.subject).toMatch(/^\d{4}-\d{4}: eine Antwort von Ihnen noch offen$/u);
    expect(reminder.text).toContain("Which air gap?");
    expect(reminder.text).toMatch(/Antworten Sie bis .*20\d\d; danach verfällt die Meldung\.\n/u);
    const wanting = await letterFor(
      "queryReminder",
      { ...(await ofManager("queryReminder")), rowIds: ["label"] },
      "en",
    );
    expect(wanting.text).toMatch(/lapses\. What is wanted:\n\n- \S/u);
    const lapsed = await letterFor("claimLapsed", await ofManager("claimLapsed"), "de");
    expect(lapsed.subject).toMatch(/ist verfallen$/u);
    expect(lapsed.text).toMatch(/kam bis .*20\d\d keine Antwort\. Die Meldung ist verfallen;/u);
    expect(lapsed.text).toContain(`/claims/${claim.number.slice(0, 4)}-${claim.number.slice(4)}`);
  });
});
