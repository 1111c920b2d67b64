import { beforeEach, describe, expect, it } from "vitest";
import { beforeSignIn, newRequestId } from "@/lib/db/unit-of-work";
import { findLinkOwner, requestReset, setPasswordByLink } from "@/lib/people/service";
import { buildOrganisation, buildPerson, insertMembership } from "../support/build";
import { adminQuery, asRole } from "../support/database";
import { contextOf, hash, invitationFor, linkFor, startSession } from "./signed-in";

const PASSWORD = "harbour-flint-opal-42";

let workshop: { id: string };
let person: { id: string; email: string };

beforeEach(async () => {
  workshop = await buildOrganisation();
  person = await buildPerson(workshop, ["technician"]);
});

describe("a session ends at the very next request", () => {
  it.each([
    [
      "the person is disabled",
      () => adminQuery("update users set disabled_at = now() where id = $1", [person.id]),
    ],
    [
      "the membership is disabled",
      () => adminQuery("update memberships set disabled_at = now() where user_id = $1", [person.id]),
    ],
    [
      "a role is given",
      () =>
        adminQuery("insert into membership_roles values ($1, $2, 'workshopManager')", [
          workshop.id,
          person.id,
        ]),
    ],
    ["a role is taken", () => adminQuery("delete from membership_roles where user_id = $1", [person.id])],
    ["a new password is set by link", async () => setPasswordByLink(await linkFor(person), PASSWORD)],
    [
      "the person sets a new password",
      () =>
        asRole("web", { actor: person.id, org: workshop.id }, "select guarded.set_password($1, 'x')", [
          person.id,
        ]),
    ],
    ["it is ended", (session: string) => beforeSignIn("select guarded.end_session($1)", [session])],
    [
      "it was left alone too long",
      (session: string) =>
        adminQuery("update sessions set last_seen_at = now() - interval '8 hours 1 second' where id = $1", [
          session,
        ]),
    ],
    [
      "its longest life is over",
      (session: string) => adminQuery("update sessions set expires_at = now() where id = $1", [session]),
    ],
  ] as const)("when %s", async (_name, change) => {
    const sessions = [await startSession(person, workshop), await startSession(person, workshop)] as const;
    for (const session of sessions)
      expect(await contextOf(session)).toMatchObject([{ user_id: person.id, roles: ["technician"] }]);
    await change(sessions[0]);
    expect(await contextOf(sessions[0])).toEqual([]);
  });

  it("in the organisation where the role changed, and in no other", async () => {
    const second = await buildOrganisation();
    await insertMembership(person, second, ["technician"]);
    const [here, there] = [await startSession(person, workshop), await startSession(person, second)];
    await adminQuery("delete from membership_roles where user_id = $1 and organisation_id = $2", [
      person.id,
      workshop.id,
    ]);
    expect(await contextOf(here)).toEqual([]);
    expect(await contextOf(there)).toHaveLength(1);
    await adminQuery("update users set session_version = session_version + 1 where id = $1", [person.id]);
    expect(await contextOf(there)).toEqual([]);
  });

  it("and none starts for who is disabled or no member", async () => {
    expect(await startSession(person, await buildOrganisation())).toBe("");
    await adminQuery("update memberships set disabled_at = now() where user_id = $1", [person.id]);
    expect(await startSession(person, workshop)).toBe("");
  });
});

describe("a single-use link", () => {
  it("used twice at the same moment works once, in each of ten rounds", async () => {
    for (let round = 0; round < 10; round += 1) {
      const secret = await linkFor(person);
      const use = (password: string) =>
        beforeSignIn<{ email: string | null }>("select guarded.use_link($1, $2) as email", [
          hash(secret),
          password,
        ]);
      const answers = (await Promise.all([use("first"), use("second")])).map(([row]) => row?.email);
      expect(answers.toSorted()).toEqual([person.email, null].toSorted());
    }
  });

  it("is refused when it has expired, was used, or belongs to a disabled person", async () => {
    const expired = await linkFor(person, { expires_at: "2026-05-04T00:00:00Z" });
    expect(await findLinkOwner(expired)).toBeNull();
    expect(await setPasswordByLink(expired, PASSWORD)).toBeNull();
    const used = await linkFor(person);
    expect(await setPasswordByLink(used, PASSWORD)).toBe(person.email);
    expect(await setPasswordByLink(used, PASSWORD)).toBeNull();
    const open = await linkFor(person);
    expect(await findLinkOwner(open)).toMatchObject({ email: person.email });
    await adminQuery("update users set disabled_at = now() where id = $1", [person.id]);
    expect(await findLinkOwner(open)).toBeNull();
    expect(await setPasswordByLink(open, PASSWORD)).toBeNull();
  });

  it("closes the older ones: when a new one is asked for, and when one is used", async () => {
    const [older, other] = [await linkFor(person), await invitationFor(person, await buildOrganisation())];
    await requestReset(person.email, newRequestId());
    expect(await findLinkOwner(older)).toBeNull();
    expect(await findLinkOwner(other)).not.toBeNull();
    await setPasswordByLink(other, PASSWORD);
    const open = await adminQuery("select 1 from single_use_links where user_id = $1 and used_at is null", [
      person.id,
    ]);
    expect(open).toEqual([]);
  });

  it("is kept as a hash: the database cannot give it away", async () => {
    const secret = await linkFor(person);
    const [row] = await adminQuery<{ text: string }>(
      "select l::text as text from single_use_links l where token_hash = $1",
      [hash(secret)],
    );
    expect(row?.text).not.toContain(secret);
  });
});
