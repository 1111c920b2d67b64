import { beforeAll, describe, expect, it } from "vitest";
import { withdrawClaim } from "@/lib/claims/filing/service";
import { answerQuery } from "@/lib/claims/sending/service";
import { adminQuery, inTransaction } from "../support/database";
import {
  askedClaim,
  AT_ONCE,
  kindsOf,
  mailsOf,
  manager,
  moveDays,
  openClockWorld,
  overdue,
  queryOf,
  remindedBefore,
  runClock,
  stateOf,
  technician,
  world,
} from "./asked-claims";

const ROUNDS = 20;

beforeAll(openClockWorld);

describe("a query nobody answers", () => {
  it("is reminded of once at each of two days, however many workers run", async () => {
    const claim = await askedClaim({ askedAgo: 9, lastIn: 21 });
    await runClock();
    expect(await kindsOf(claim.id)).toEqual([]);
    await moveDays(claim.id, { askedAgo: 10, lastIn: 20 });
    await Promise.all(Array.from({ length: AT_ONCE }, runClock));
    expect(await kindsOf(claim.id)).toEqual(["reminded"]);
    await moveDays(claim.id, { askedAgo: 20, lastIn: 10 });
    await Promise.all(Array.from({ length: AT_ONCE }, runClock));
    await moveDays(claim.id, { askedAgo: 30, lastIn: 0 });
    await runClock();
    expect(await kindsOf(claim.id)).toEqual(["reminded", "reminded"]);
    expect(await stateOf(claim.id)).toMatchObject({ state: "answerNeeded", holds: true });
    // The technician who started it and the manager, twice each, and nobody of the distributor.
    const mails = await mailsOf(claim.number, "queryReminder");
    expect(mails).toHaveLength(4);
    expect(mails.map(({ recipient }) => recipient)).toContain(manager.email);
  });

  it("sends only the newest reminder after a week without a worker", async () => {
    const claim = await askedClaim({ askedAgo: 25, lastIn: 5 });
    await runClock();
    await runClock();
    expect(await kindsOf(claim.id)).toEqual(["reminded"]);
    expect(await mailsOf(claim.number, "queryReminder")).toHaveLength(2);
  });

  it("lapses once with its last day over, lets go of its unit, and tells both sides", async () => {
    const claim = await overdue();
    await Promise.all(Array.from({ length: AT_ONCE }, runClock));
    expect(await kindsOf(claim.id)).toEqual(["lapse"]);
    expect(await stateOf(claim.id)).toMatchObject({ state: "lapsed", holds: false, holder: null });
    const mails = await mailsOf(claim.number, "claimLapsed");
    expect(mails).toHaveLength(3);
    const [asker] = await adminQuery<{ email: string }>("select email from users where id = $1", [
      world.assessor.id,
    ]);
    expect(mails.map(({ recipient }) => recipient)).toEqual(
      expect.arrayContaining([asker?.email, manager.email]),
    );
    const [entry] = await adminQuery(
      "select actor_id, actor_name, actor_organisation_id, only_for_id from timeline_entries where claim_id = $1 and kind = 'lapse'",
      [claim.id],
    );
    const [broken] = await adminQuery(
      `select count(*)::integer as count from timeline_entries t
       where claim_id = $1 and hash <> encode(sha256(convert_to(timeline_text(t), 'UTF8')), 'hex')`,
      [claim.id],
    );
    expect(broken).toEqual({ count: 0 });
    expect(entry).toEqual({
      actor_id: null,
      actor_name: "Partproof",
      actor_organisation_id: null,
      only_for_id: null,
    });
  });

  it("stays open on its last day", async () => {
    const claim = await askedClaim({ askedAgo: 30, lastIn: 0 });
    await remindedBefore(claim.id);
    await runClock();
    expect(await stateOf(claim.id)).toMatchObject({ state: "answerNeeded", left: 0 });
  });

  it("counts its days where the workshop is", async () => {
    const claim = await overdue();
    const moveShop = (zone: string) =>
      adminQuery("update organisations set time_zone = $2 where id = $1", [world.shops[0].workshop.id, zone]);
    // Its day is never the same as at the other end of the world.
    await adminQuery(
      "update claims set query_lapses_on = (now() at time zone 'Pacific/Pago_Pago')::date where id = $1",
      [claim.id],
    );
    await moveShop("Pacific/Pago_Pago");
    await runClock();
    expect(await stateOf(claim.id)).toMatchObject({ state: "answerNeeded" });
    await moveShop("Pacific/Kiritimati");
    await runClock();
    expect(await stateOf(claim.id)).toMatchObject({ state: "lapsed" });
    await moveShop("Europe/Berlin");
  });

  it("that was never reminded of gets its last reminder and three days more, and lapses after them", async () => {
    const claim = await askedClaim({ askedAgo: 60, lastIn: -30 });
    await Promise.all(Array.from({ length: AT_ONCE }, runClock));
    await runClock();
    expect(await kindsOf(claim.id)).toEqual(["reminded"]);
    expect(await stateOf(claim.id)).toMatchObject({ state: "answerNeeded", left: 3 });
    await moveDays(claim.id, { askedAgo: 64, lastIn: -1 });
    await runClock();
    expect(await kindsOf(claim.id)).toEqual(["reminded", "lapse"]);
  });

  it("that lapsed leaves its unit free to be claimed again", async () => {
    const claim = await overdue();
    await runClock();
    const again = await askedClaim({ askedAgo: 1, lastIn: 29 }, claim.unit);
    expect(await stateOf(again.id)).toMatchObject({ holds: true });
    const flags = await adminQuery("select kind from claim_flags where claim_id = $1", [again.id]);
    expect(flags).toEqual([]);
  });

  it("does not stop the others where one of them fails", async () => {
    const [broken, sound] = [await overdue(), await overdue()];
    await adminQuery(`create function break_one() returns trigger language plpgsql as
      $$ begin if new.claim_id = '${broken.id}' then raise exception 'broken'; end if; return new; end $$`);
    await adminQuery(
      "create trigger break_one before insert on timeline_entries for each row execute function break_one()",
    );
    await runClock();
    await adminQuery("drop function break_one() cascade");
    expect(await stateOf(sound.id)).toMatchObject({ state: "lapsed" });
    expect(await stateOf(broken.id)).toMatchObject({ state: "answerNeeded", holds: true });
    await runClock();
    expect(await stateOf(broken.id)).toMatchObject({ state: "lapsed" });
  });
});

describe("an answer at the moment of the lapse", () => {
  it(`counts or comes too late, never both, in ${ROUNDS} rounds`, async () => {
    const ends = new Set<string>();
    for (let round = 0; round < ROUNDS; round += 1) {
      const claim = await overdue();
      const isWithdrawn = round % 4 === 3;
      const press = () =>
        isWithdrawn
          ? withdrawClaim(technician(), { ...claim, reason: "Found the fault." })
          : answerQuery(technician(), claim);
      const wait = (milliseconds: number) => new Promise((resolve) => setTimeout(resolve, milliseconds));
      const [pressed] = await Promise.all([
        wait(round % 2 === 0 ? 0 : 4 * round).then(press),
        wait(round % 2 === 0 ? 4 * round : 0).then(runClock),
      ]);
      const kinds = await kindsOf(claim.id);
      const state = (await stateOf(claim.id))?.state ?? "";
      ends.add(state);
      if (pressed.ok) {
        expect(kinds).toEqual([isWithdrawn ? "withdraw" : "answer"]);
        expect(state).toBe(isWithdrawn ? "withdrawn" : "filed");
        expect(await mailsOf(claim.number, "claimLapsed")).toEqual([]);
      } else {
        expect(pressed).toMatchObject({ code: "moveNotOpen" });
        expect([kinds, state]).toEqual([["lapse"], "lapsed"]);
      }
    }
    expect(ends.size).toBeGreaterThan(1);
  });

  it("waits for a worker that has the claim, and is then refused", async () => {
    const claim = await overdue();
    const query = await queryOf(claim.id);
    const answered = await inTransaction("worker", {}, async (run) => {
      expect(await run("select * from guarded.hold_query($1)", [query])).toHaveLength(1);
      const answering = answerQuery(technician(), claim);
      await run("select pg_sleep(0.2)");
      await run("select guarded.lapse_query($1, '{}')", [query]);
      return { answering };
    });
    expect(await answered.answering).toMatchObject({ ok: false, code: "moveNotOpen" });
    expect(await kindsOf(claim.id)).toEqual(["lapse"]);
  });

  it("that has the claim first is not waited for, and not overtaken", async () => {
    const claim = await overdue();
    await inTransaction("postgres", {}, async (run) => {
      await run("select 1 from claims where id = $1 for update", [claim.id]);
      await runClock();
    });
    expect(await kindsOf(claim.id)).toEqual([]);
  });
});
