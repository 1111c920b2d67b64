import { createHash } from "node:crypto";
import { beforeAll, describe, expect, it } from "vitest";
import { canonicalText, claimFacts } from "@/lib/claims/facts-shape";
import { saveDraft, startClaim } from "@/lib/claims/filing/service";
import { fileClaim } from "@/lib/claims/sending/service";
import { DEFAULT_EVIDENCE_LISTS } from "@/lib/evidence/default-lists";
import { buildAccount, buildDistributor, buildPart, buildUnit, insertRow } from "../support/build";
import { adminQuery } from "../support/database";
import { draftReady, excuseMissingRows } from "./draft-ready";
import { twoShops, workerOf } from "./shops";

let world: Awaited<ReturnType<typeof twoShops>>;
beforeAll(async () => {
  world = await twoShops();
});

describe("a claim from the serial to the distributor", () => {
  it("is started, written and sent by the product's own services", async () => {
    const {
      shops: [shop],
    } = world;
    const own = await buildDistributor();
    const account = await buildAccount(own, shop.workshop);
    const brake = await buildPart(own);
    await insertRow("rule_book_versions", {
      seller_id: own.id,
      kind: "evidenceList",
      family: "brake",
      rule_number: "E 1",
      title: "Evidence for brakes",
      valid_from: "2024-01-01",
      body: JSON.stringify(DEFAULT_EVIDENCE_LISTS.brake),
    });
    const unit = await buildUnit({ seller: own, buyer: shop.workshop, account, part: brake });
    const actor = workerOf(shop);
    const started = await startClaim(actor, {
      unitId: unit.id,
      invoiceLineId: "",
      accountId: "",
      partId: "",
      serial: "",
    });
    if (!started.ok) throw new Error(started.code);
    const { number } = started.value;
    expect(number).toMatch(/^\d{8}$/u);
    await saveDraft(actor, number, {
      frameSerial: "FR 20417",
      symptom: "drags",
      failedOn: "2026-05-04",
      lines: { "0": { fittedOn: "2026-02-03", installer: "Jo Lind" } },
    });
    expect(await fileClaim(actor, { number })).toMatchObject({ ok: false, code: "draftIncomplete" });
    await excuseMissingRows(actor, number);
    expect(await fileClaim(actor, { number })).toEqual({ ok: true, value: { number } });
    const [claim] = await adminQuery("select state, revision from claims where number = $1", [number]);
    expect(claim).toEqual({ state: "filed", revision: 1 });
  });

  it("keeps facts and hash of what was sent, and never the installer's name", async () => {
    const {
      shops: [shop],
    } = world;
    const unit = await world.sell(shop);
    const claim = await draftReady(shop, { unitId: unit.id, serial: unit.serial, installer: "Jo Lind" });
    expect((await fileClaim(workerOf(shop), claim)).ok).toBe(true);
    const [revision] = await adminQuery<{ facts: unknown; sha256: string }>(
      "select facts, sha256 from claim_revisions where claim_id = $1",
      [claim.id],
    );
    const text = canonicalText(claimFacts.parse(revision?.facts));
    expect(createHash("sha256").update(text).digest("hex")).toBe(revision?.sha256);
    expect(text).not.toContain("Jo Lind");
  });
});
