import { describe, expect, it } from "vitest";
import { acceptInvitation } from "@/lib/people/accept-service";
import { findOpenLink, listWorkplaces } from "@/lib/people/account/queries";
import { switchWorkplace } from "@/lib/people/account/workplace-service";
import { inviteAgain, invitePerson } from "@/lib/people/invite-service";
import { findPerson, listPeople } from "@/lib/people/people-queries";
import { setPasswordByLink, signIn } from "@/lib/people/service";
import { hashPassword } from "@/lib/web/password";
import { actorAt } from "../support/actor";
import { buildOrganisation, buildPerson, insertMembership } from "../support/build";
import { adminQuery, answerOf, asRole, NOT_ALLOWED } from "../support/database";
import { contextOf, hash, invitationFor, startSession } from "./signed-in";

const PASSWORD = "harbour-flint-opal-42";
const NEW_PASSWORD = "quarry-lantern-moss-17";

const elsewhere = async () => {
  const organisation = await buildOrganisation();
  const person = await buildPerson(organisation, ["technician"], {
    password_hash: await hashPassword(PASSWORD),
  });
  return { organisation, person };
};

const office = async () => {
  const organisation = await buildOrganisation();
  const keeper = await buildPerson(organisation, ["administrator"]);
  return { organisation, actor: actorAt(organisation, keeper, ["administrator"]) };
};

const invite = (actor: ReturnType<typeof actorAt>, email: string) =>
  invitePerson(actor, { name: "As invited", email, language: "en", roles: ["workshopManager"] });

const signInTo = async (email: string, password = PASSWORD) => {
  const sid = await signIn({ email, password, address: "192.0.2.40", device: "" });
  return sid ? (await contextOf(sid))[0]?.organisation_id : null;
};

describe("inviting an address", () => {
  it("shows the inviter the same for a person known elsewhere and for a new one, until they accept", async () => {
    const { actor } = await office();
    const { person } = await elsewhere();
    const fresh = `fresh-${person.email}`;
    for (const email of [person.email, fresh]) expect((await invite(actor, email)).ok).toBe(true);
    const listed = (await listPeople(actor)).filter(({ id }) => id !== actor.userId);
    const seen = { name: "As invited", state: "invited", lastSeenAt: null, roles: ["workshopManager"] };
    expect(listed).toHaveLength(2);
    expect(listed).toEqual(
      expect.arrayContaining(
        [person.email, fresh].map((email) => expect.objectContaining({ ...seen, email })),
      ),
    );
    expect(await findPerson(actor, person.id)).toMatchObject(seen);
    const context = { actor: actor.userId, org: actor.organisationId };
    expect(await asRole("web", context, "select id from users where id = $1", [person.id])).toEqual([]);
    expect(await invite(actor, person.email)).toMatchObject({ ok: false, code: "memberAlready" });
  });

  it("makes nobody a member: no session, no sign-in and no right there", async () => {
    const { actor, organisation } = await office();
    const { organisation: home, person } = await elsewhere();
    await invite(actor, person.email);
    expect(await startSession(person, organisation)).toBe("");
    expect(await signInTo(person.email)).toBe(home.id);
    expect(await listPeople(actorAt(organisation, person, ["administrator"])).catch(() => "refused")).toBe(
      "refused",
    );
  });

  it("cannot be taken for accepted by a statement of the web", async () => {
    const { actor } = await office();
    const { person } = await elsewhere();
    await invite(actor, person.email);
    const context = { actor: actor.userId, org: actor.organisationId };
    for (const sql of [
      "update memberships set accepted_at = now()",
      "update memberships set invited_email = 'x'",
      "insert into memberships (user_id, organisation_id, accepted_at) values (ctx_actor(), ctx_org(), now())",
    ])
      expect(await answerOf(asRole("web", context, sql))).toBe(NOT_ALLOWED);
  });

  it("sends five letters a day to one person at most, also when asked at the same moment", async () => {
    const { actor } = await office();
    const { person } = await elsewhere();
    await invite(actor, person.email);
    const asked = await Promise.all(
      Array.from({ length: 8 }, () => inviteAgain(actor, { personId: person.id })),
    );
    expect(asked.filter(({ ok }) => ok)).toHaveLength(4);
    expect(asked.find(({ ok }) => !ok)).toMatchObject({ code: "invitedOften", detail: { most: 5 } });
    const letters = "select 1 from outbox where kind = 'invitation' and recipient = $1";
    expect(await adminQuery(letters, [person.email])).toHaveLength(5);
  });
});

describe("an invitation of somebody who has an account", () => {
  it("never sets their password, and is not used up by the try", async () => {
    const { person } = await elsewhere();
    const link = await invitationFor(person, await buildOrganisation());
    expect(await setPasswordByLink(link, NEW_PASSWORD)).toBeNull();
    expect(await findOpenLink(link, "invitation")).toMatchObject({ hasAccount: true, email: person.email });
    expect(await signInTo(person.email, NEW_PASSWORD)).toBeNull();
    expect(await signInTo(person.email)).not.toBeNull();
  });

  it("is accepted with their own password, once, and opens the organisation that invited", async () => {
    const { organisation: home, person } = await elsewhere();
    const { actor, organisation } = await office();
    const link = await invitationFor(person, organisation);
    const accept = (password: string) =>
      acceptInvitation({ token: link, password, address: "192.0.2.41", device: "" });
    expect(await accept("wrong")).toBeNull();
    expect(await findPerson(actor, person.id)).toMatchObject({ state: "invited", name: "As invited" });
    const answers = await Promise.all([accept(PASSWORD), accept(PASSWORD)]);
    const sid = answers.find((answer) => answer !== null) ?? "";
    expect(answers.filter((answer) => answer === null)).toHaveLength(1);
    expect(await contextOf(sid)).toMatchObject([{ organisation_id: organisation.id }]);
    expect(await findPerson(actor, person.id)).toMatchObject({
      state: "active",
      name: person.name,
      email: person.email,
    });
    expect((await listWorkplaces(sid)).map(({ id }) => id).toSorted()).toEqual(
      [home.id, organisation.id].toSorted(),
    );
    expect(await inviteAgain(actor, { personId: person.id })).toMatchObject({ code: "invitationUsed" });
  });

  it("ends with the membership, and one of another organisation stays", async () => {
    const { person } = await elsewhere();
    const [first, second] = [await buildOrganisation(), await buildOrganisation()];
    const [link, other] = [await invitationFor(person, first), await invitationFor(person, second)];
    await adminQuery("update memberships set disabled_at = now() where organisation_id = $1", [first.id]);
    expect(await findOpenLink(link, "invitation")).toBeNull();
    expect(await acceptInvitation({ token: link, password: PASSWORD, address: "a", device: "" })).toBeNull();
    expect(await findOpenLink(other, "invitation")).not.toBeNull();
  });

  it("tries no more passwords than the sign-in does", async () => {
    const { person } = await elsewhere();
    const link = await invitationFor(person, await buildOrganisation());
    const accept = (password: string, at: number) =>
      acceptInvitation({ token: link, password, address: `192.0.2.${at}`, device: "" });
    for (let at = 0; at < 10; at += 1) await accept("wrong", at);
    expect(await accept(PASSWORD, 99)).toBeNull();
    expect(await signInTo(person.email)).toBeNull();
  }, 20_000);
});

describe("a person who is new", () => {
  it("has accepted with the first password, under the name of the invitation they took", async () => {
    const { actor } = await office();
    const email = `new-${actor.userId}@example.test`;
    await invite(actor, email);
    const [invited] = (await listPeople(actor)).filter((one) => one.email === email);
    const person = { id: invited?.id ?? "" };
    await adminQuery("update users set name = 'Somebody else wrote this' where id = $1", [person.id]);
    const link = `token-${actor.userId}`;
    await adminQuery("update single_use_links set token_hash = $2 where user_id = $1", [
      person.id,
      hash(link),
    ]);
    expect(await findOpenLink(link, "invitation")).toMatchObject({ hasAccount: false, name: "As invited" });
    expect(await setPasswordByLink(link, NEW_PASSWORD)).toBe(email);
    expect(await findPerson(actor, person.id)).toMatchObject({ state: "active", name: "As invited" });
    expect(await signInTo(email, NEW_PASSWORD)).toBe(actor.organisationId);
  });
});

describe("a person of two organisations", () => {
  it("signs in where they were last, and goes to the other one by ending the session", async () => {
    const { organisation: home, person } = await elsewhere();
    const second = await buildOrganisation();
    await insertMembership(person, second, ["technician"]);
    expect(await signInTo(person.email)).toBe(home.id);
    const sid =
      (await signIn({ email: person.email, password: PASSWORD, address: "b", device: "phone" })) ?? "";
    const outcome = await switchWorkplace({ sessionId: sid, organisation: second.id });
    const next = outcome.ok && outcome.value.fault === null ? outcome.value.sessionId : "";
    expect(await contextOf(sid)).toEqual([]);
    expect(await contextOf(next)).toMatchObject([{ organisation_id: second.id }]);
    expect(await signInTo(person.email)).toBe(second.id);
    // Ended as it is, the first session opens nothing any more.
    expect(await switchWorkplace({ sessionId: sid, organisation: home.id })).toMatchObject({
      value: { fault: "notThere" },
    });
  });

  it("goes nowhere they have not accepted, are switched off, or never were", async () => {
    const { organisation, person } = await elsewhere();
    const [invited, off] = [await buildOrganisation(), await buildOrganisation()];
    await invitationFor(person, invited);
    await insertMembership(person, off, ["administrator"]);
    await adminQuery("update memberships set disabled_at = now() where organisation_id = $1", [off.id]);
    const sid = await startSession(person, organisation);
    for (const target of [invited, off, await buildOrganisation()]) {
      expect(await switchWorkplace({ sessionId: sid, organisation: target.id })).toMatchObject({
        value: { fault: "notThere" },
      });
      const [made] = await asRole("web", {}, "select guarded.switch_session($1, $2, 12, 8) as id", [
        sid,
        target.id,
      ]);
      expect(made).toEqual({ id: null });
    }
    expect(await contextOf(sid)).toHaveLength(1);
  });

  it("does not live longer by going back and forth", async () => {
    const { organisation, person } = await elsewhere();
    const second = await buildOrganisation();
    await insertMembership(person, second, ["administrator"]);
    const sid = await startSession(person, organisation);
    await adminQuery(
      "update sessions set started_at = now() - interval '13 hours', expires_at = now() + interval '6 days' where id = $1",
      [sid],
    );
    expect(await switchWorkplace({ sessionId: sid, organisation: second.id })).toMatchObject({
      value: { fault: "tooOld" },
    });
    expect(await contextOf(sid)).toHaveLength(1);
  });
});

describe("the fifty tries an address", () => {
  it("are failures only: a workshop signs in as often as it likes", async () => {
    const { person } = await elsewhere();
    const from = (email: string, password: string) =>
      signIn({ email, password, address: "198.51.100.77", device: "" });
    for (let at = 0; at < 3; at += 1) expect(await from(person.email, PASSWORD)).not.toBeNull();
    await from("nobody@example.test", PASSWORD);
    const left = await adminQuery("select 1 from login_attempts where key_hash = $1", [
      hash("address:198.51.100.77"),
    ]);
    expect(left).toHaveLength(1);
    await Promise.all(Array.from({ length: 4 }, () => from(person.email, PASSWORD)));
    expect(
      await adminQuery("select 1 from login_attempts where key_hash = $1", [hash("address:198.51.100.77")]),
    ).toHaveLength(1);
  }, 20_000);
});
