import { beforeEach, describe, expect, it } from "vitest";
import { findLinkOwner, requestReset, signIn } from "@/lib/people/service";
import { beforeSignIn, newRequestId } from "@/lib/db/unit-of-work";
import { hashPassword } from "@/lib/web/password";
import { buildOrganisation, buildPerson } from "../support/build";
import { adminQuery, answerOf, asRole, inTransaction, NOT_ALLOWED } from "../support/database";
import { contextOf, hash, linkFor, startSession, token } from "./signed-in";

const PASSWORD = "harbour-flint-opal-42";

let workshop: { id: string };
let person: { id: string; email: string };

beforeEach(async () => {
  workshop = await buildOrganisation();
  person = await buildPerson(workshop, ["technician"]);
});

const begin = async (account: string, address: string): Promise<boolean> => {
  const [row] = await beforeSignIn<{ allowed: boolean }>("select guarded.begin_attempt($1, $2) as allowed", [
    account,
    address,
  ]);
  return row?.allowed ?? false;
};

const age = (minutes: number) =>
  adminQuery("update login_attempts set at = at - make_interval(mins => $1) returning id", [minutes]);

describe("tries to sign in", () => {
  it("are ten an account in fifteen minutes, from however many addresses", async () => {
    const answers: boolean[] = [];
    for (let at = 0; at < 12; at += 1) answers.push(await begin(hash("one"), hash(`address ${at}`)));
    expect(answers).toEqual([...Array.from({ length: 10 }, () => true), false, false]);
    expect(await begin(hash("another"), hash("address 0"))).toBe(true);
    await age(14);
    expect(await begin(hash("one"), hash("address 20"))).toBe(false);
    await age(2);
    expect(await begin(hash("one"), hash("address 20"))).toBe(true);
  });

  it("are fifty an address in fifteen minutes, for however many accounts", async () => {
    const answers: boolean[] = [];
    for (let at = 0; at < 52; at += 1) answers.push(await begin(hash(`account ${at}`), hash("one address")));
    expect(answers.filter((allowed) => allowed)).toHaveLength(50);
    expect(answers.slice(-2)).toEqual([false, false]);
    await age(16);
    expect(await begin(hash("account 99"), hash("one address"))).toBe(true);
  });

  it("are counted one by one when twenty come at the same moment", async () => {
    const answers = await Promise.all(
      Array.from({ length: 20 }, (_try, at) => begin(hash("many"), hash(`from ${at}`))),
    );
    expect(answers.filter((allowed) => allowed)).toHaveLength(10);
  });

  it("wait for a try on the same account that is not counted yet", async () => {
    for (let at = 0; at < 9; at += 1) await begin(hash("slow"), hash(`from ${at}`));
    const sql = "select guarded.begin_attempt($1, $2) as allowed";
    const second = await inTransaction("web", {}, async (run) => {
      expect(await run(sql, [hash("slow"), hash("tenth")])).toEqual([{ allowed: true }]);
      const waiting = begin(hash("slow"), hash("eleventh"));
      await new Promise((resolve) => setTimeout(resolve, 200));
      return { waiting };
    });
    expect(await second.waiting).toBe(false);
  });

  it("lock the right password out as well, and say the same as for a wrong one", async () => {
    await adminQuery("update users set password_hash = $2 where id = $1", [
      person.id,
      await hashPassword(PASSWORD),
    ]);
    const attempt = (password: string) =>
      signIn({ email: person.email, password, address: "192.0.2.7", device: "browser" });
    expect(await attempt(PASSWORD)).toMatch(/^[0-9a-f-]{36}$/u);
    for (let at = 0; at < 10; at += 1)
      expect(await begin(hash(`account:${person.email}`), hash(`elsewhere ${at}`))).toBe(true);
    expect(await attempt(PASSWORD)).toBeNull();
  });
});

describe("no answer before sign-in tells whether an account exists", () => {
  it("a wrong password, an unknown address, a disabled person and one without a password are all null", async () => {
    const disabled = await buildPerson(workshop, [], {
      disabled_at: "2026-05-04T00:00:00Z",
      password_hash: await hashPassword(PASSWORD),
    });
    for (const email of [person.email, "nobody@example.test", disabled.email, "no address"])
      expect(await signIn({ email, password: PASSWORD, address: "192.0.2.8", device: "" })).toBeNull();
  });

  it("asking for a reset answers nothing either way; only the account's owner has mail", async () => {
    expect(await requestReset("nobody@example.test", newRequestId())).toBeUndefined();
    expect(await requestReset("no address", newRequestId())).toBeUndefined();
    expect(await requestReset(person.email, newRequestId())).toBeUndefined();
    const mails = await adminQuery(
      "select recipient from outbox where kind = 'passwordReset' and recipient = any ($1)",
      [[person.email, "nobody@example.test", ""]],
    );
    expect(mails).toEqual([{ recipient: person.email }]);
  });

  it("an unknown session, link or person answers as an ended one", async () => {
    const session = await startSession(person, workshop);
    await beforeSignIn("select guarded.end_session($1)", [session]);
    expect(await contextOf(session)).toEqual(await contextOf(newRequestId()));
    const spent = await linkFor(person, { used_at: new Date() });
    expect(await findLinkOwner(spent)).toEqual(await findLinkOwner(token()));
    expect(await startSession({ id: newRequestId() }, workshop)).toBe(
      await startSession(person, { id: newRequestId() }),
    );
  });

  it("inviting an address answers the same shape for a new person and for one known elsewhere", async () => {
    const inviter = await buildPerson(workshop, ["administrator"]);
    const elsewhere = await buildPerson(await buildOrganisation(), ["technician"]);
    const invite = (email: string) =>
      asRole<{ id: string }>(
        "web",
        { actor: inviter.id, org: workshop.id },
        "select guarded.invite_person($1, 'Kim', 'en') as id",
        [email],
      );
    for (const email of [
      elsewhere.email,
      `${token()
        .toLowerCase()
        .replaceAll(/[^a-z0-9]/gu, "")}@example.test`,
    ])
      expect((await invite(email))[0]?.id).toMatch(/^[0-9a-f-]{36}$/u);
    expect(
      await answerOf(asRole("web", {}, "select guarded.invite_person('kim@example.test', 'Kim', 'en')")),
    ).toBe("PP002");
  });

  it("no password hash is read by web except through sign-in and one's own", async () => {
    await adminQuery("update users set password_hash = 'secret' where id = $1", [person.id]);
    const context = { actor: person.id, org: workshop.id };
    expect(await answerOf(asRole("web", context, "select password_hash from users"))).toBe(NOT_ALLOWED);
    const other = await buildPerson(workshop, []);
    expect(
      await asRole("web", { ...context, actor: other.id }, "select guarded.own_password_hash() as hash"),
    ).toEqual([{ hash: null }]);
    expect(await answerOf(asRole("web", context, "select guarded.set_password($1, 'x')", [other.id]))).toBe(
      "PP002",
    );
    for (const table of ["login_attempts", "single_use_links"]) {
      const sql = ["select * from", table].join(" ");
      expect(await answerOf(asRole("web", context, sql))).toBe(NOT_ALLOWED);
    }
  });
});
