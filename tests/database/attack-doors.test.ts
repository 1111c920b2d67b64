import { randomUUID } from "node:crypto";
import { describe, expect, it } from "vitest";
import { hashPassword } from "@/lib/web/password";
import { authOptions } from "@/lib/web/auth";
import { formValues } from "@/lib/web/form-values";
import { askForReset } from "@/lib/people/account/service";
import { setPasswordByLink, signIn } from "@/lib/people/service";
import { withdrawEvidence } from "@/lib/evidence-files/service";
import { actorAt } from "../support/actor";
import { buildClaim, buildFile, buildOrganisation, buildPerson, insertRow } from "../support/build";
import { adminQuery, inTransaction } from "../support/database";
import { twoShops } from "./shops";
import { contextOf, linkFor, startSession } from "./signed-in";

const PASSWORD = "a long enough sentence";

describe("signing in", () => {
  it("locked by somebody else's tries opens again to who can read the account's mail", async () => {
    const person = await buildPerson(await buildOrganisation(), ["technician"], {
      password_hash: await hashPassword(PASSWORD),
    });
    const attempt = (password: string, address: string) =>
      signIn({ email: person.email, password, address, device: "" });
    for (let at = 0; at < 10; at += 1) await attempt("wrong", `198.51.100.${at}`);
    expect(await attempt(PASSWORD, "192.0.2.21")).toBeNull();
    expect(await setPasswordByLink(await linkFor(person), `${PASSWORD} again`)).toBe(person.email);
    expect(await attempt(`${PASSWORD} again`, "192.0.2.21")).toMatch(/^[0-9a-f-]{36}$/u);
  });

  it("behind the limit costs no hashing: a flood of tries is answered at once", async () => {
    const email = `${randomUUID()}@example.test`;
    const attempt = () => signIn({ email, password: "wrong", address: randomUUID(), device: "" });
    const started = performance.now();
    for (let at = 0; at < 10; at += 1) await attempt();
    const lookedAt = performance.now() - started;
    for (let at = 0; at < 10; at += 1) expect(await attempt()).toBeNull();
    expect(performance.now() - started - lookedAt).toBeLessThan(lookedAt / 3);
  });
});

describe("asking for a new password", () => {
  it("takes the same time for an account and for none", async () => {
    const house = await buildOrganisation();
    const timeOf = async (email: string) => {
      const started = performance.now();
      await askForReset({ email, address: randomUUID(), requestId: randomUUID() });
      return performance.now() - started;
    };
    const [known, unknown]: [number[], number[]] = [[], []];
    for (let round = 0; round < 10; round += 1) {
      known.push(await timeOf((await buildPerson(house, [])).email));
      unknown.push(await timeOf(`${randomUUID()}@example.test`));
    }
    const middle = (times: number[]) => times.toSorted((a, b) => a - b)[5] ?? 0;
    expect(Math.min(...unknown)).toBeGreaterThan(290);
    expect(middle(known) / middle(unknown)).toBeGreaterThan(0.9);
    expect(middle(known) / middle(unknown)).toBeLessThan(1.1);
  });
});

describe("signing out by the session route", () => {
  it("ends the row, so that a copied cookie is worth nothing", async () => {
    const workshop = await buildOrganisation();
    const sid = await startSession(await buildPerson(workshop, ["technician"]), workshop);
    expect(await contextOf(sid)).toHaveLength(1);
    await authOptions().events?.signOut?.({ token: { sid }, session: { user: {}, expires: "" } });
    expect(await contextOf(sid)).toEqual([]);
  });
});

describe("the fields of a form", () => {
  it("cost no more than reading them, however many there are", () => {
    const form = new FormData();
    for (let at = 0; at < 20_000; at += 1) form.append(`a${at}`, "");
    const started = performance.now();
    expect(Object.keys(formValues(form))).toHaveLength(20_000);
    expect(performance.now() - started).toBeLessThan(2000);
  });

  it("are read as before: the last text wins, a list keeps all, files and the framework's own are left out", () => {
    const form = new FormData();
    for (const [name, value] of [
      ["a", "1"],
      ["a", "2"],
      ["l[]", "x"],
      ["l[]", "y\u0000"],
      ["$ACTION_ID", "z"],
      ["__proto__", "p"],
    ] as const)
      form.append(name, value);
    form.append("a", new Blob(["file"]));
    form.append("f", new Blob(["file"]));
    const values = formValues(form);
    expect(Object.entries(values)).toEqual([
      ["a", "2"],
      ["l", ["x", "y"]],
      ["__proto__", "p"],
      ["f", ""],
    ]);
    expect(Object.getPrototypeOf(values)).toBe(Object.prototype);
  });
});

describe("a file of a claim", () => {
  it("that a revision takes along at this moment is not withdrawn under it", async () => {
    const { shops } = await twoShops();
    const [shop] = shops;
    const { seller, workshop, person } = shop;
    const claim = await buildClaim(shop);
    const file = await buildFile(shop, claim);
    const parties = [claim.id, seller.id, workshop.id];
    const revision = await insertRow("claim_revisions", {
      claim_id: claim.id,
      seller_id: seller.id,
      workshop_id: workshop.id,
      revision: 1,
      facts: "{}",
      sha256: "0".repeat(64),
      sent_by_id: person.id,
    });
    const withdrawn = await inTransaction("web", { actor: person.id, org: workshop.id }, async (run) => {
      await run("select id from claims where id = $1 for update", [claim.id]);
      const waiting = withdrawEvidence(actorAt(workshop, person, ["technician"]), file.id);
      await new Promise((resolve) => setTimeout(resolve, 300));
      await run(
        "insert into revision_evidence (revision_id, evidence_id, seller_id, workshop_id) values ($1, $2, $3, $4)",
        [revision["id"], file.id, ...parties.slice(1)],
      );
      return { waiting };
    });
    expect(await withdrawn.waiting).toMatchObject({ ok: false, code: "evidenceSent" });
    const kept = await adminQuery("select withdrawn_at from evidence_files where id = $1", [file.id]);
    expect(kept).toEqual([{ withdrawn_at: null }]);
  });
});
