import { beforeAll, describe, expect, it } from "vitest";
import { askWorkshop } from "@/lib/claims/judging/service";
import { DEFAULT_EVIDENCE_LISTS } from "@/lib/evidence/default-lists";
import { readCsv } from "@/lib/imports/csv-service";
import { LIMITS } from "@/lib/kernel/limits";
import { actorAt } from "../support/actor";
import { buildClaim, insertRow } from "../support/build";
import { FROM_OUR_PAGES, ask, problemOf } from "../support/http";
import { adminQuery } from "../support/database";
import { rowIn } from "./claim-rows";
import { twoShops, type Shop } from "./shops";
import { startSession } from "./signed-in";
import { csvFile } from "./storage/material";
import { useOwnBucket } from "./storage/own-bucket";

let shop: Shop;
let other: Shop;
let world: Awaited<ReturnType<typeof twoShops>>;
beforeAll(async () => {
  await useOwnBucket();
  world = await twoShops();
  [shop, other] = world.shops;
});

type Part = readonly [name: string, value: string | File];

/** A form whose parts come in this order, also behind the file. */
async function sendParts(person: Shop, parts: readonly Part[]): Promise<Response> {
  const form = new FormData();
  for (const [name, value] of parts) form.append(name, value);
  const whole = new Response(form);
  return ask("POST", "/api/v1/evidence", {
    session: await startSession(person.person, person.workshop),
    headers: { ...FROM_OUR_PAGES(), "content-type": whole.headers.get("content-type") ?? "" },
    body: await whole.arrayBuffer(),
  });
}

const log = () => new File([new Uint8Array(csvFile())], "run.csv");
const fieldsFor = (claimId: string, kind: string): Part[] => [
  ["claimId", claimId],
  ["rowId", "runLog"],
  ["kind", kind],
];

describe("fields behind the file", () => {
  it("make no photo of a log, and no other row of it", async () => {
    const { id } = await buildClaim(shop);
    const behind: Part[] = [
      ["kind", "photo"],
      ["rowId", "label"],
      ["claimId", "no id"],
    ];
    const answer = await sendParts(shop, [...fieldsFor(id, "runLog"), ["file", log()], ...behind]);
    expect(answer.status).toBe(200);
    const rows = await adminQuery("select kind, row_id, media_type from evidence_files where claim_id = $1", [
      id,
    ]);
    expect(rows).toEqual([{ kind: "runLog", row_id: "runLog", media_type: "text/csv" }]);
  });

  it("lead to no claim of another workshop, which is answered as one that is not there", async () => {
    const foreign = await buildClaim(other);
    const own = await buildClaim(shop);
    const to = async (id: string) => {
      const answer = await sendParts(shop, [...fieldsFor(id, "runLog"), ["file", log()]]);
      const { instance: _instance, ...problem } = await problemOf(answer);
      return [answer.status, problem];
    };
    expect(await to(foreign.id)).toEqual(await to(crypto.randomUUID()));
    await sendParts(shop, [...fieldsFor(own.id, "runLog"), ["file", log()], ["claimId", foreign.id]]);
    expect(await adminQuery("select 1 from evidence_files where claim_id = $1", [foreign.id])).toEqual([]);
  });
});

describe("an invoice file", () => {
  it("of nothing but blank lines is refused before they are read one by one", async () => {
    const started = performance.now();
    const read = await readCsv(Buffer.alloc(20_000_000, "\n"), LIMITS.importLines);
    expect(read).toMatchObject({ ok: false, code: "importTooManyLines" });
    expect(performance.now() - started).toBeLessThan(2000);
  });
});

describe("a query to the workshop", () => {
  it("asks for rows of the Evidence list alone: a name nobody knows would keep its mail from being written", async () => {
    const { seller, assessor } = world;
    await insertRow("rule_book_versions", {
      seller_id: seller.id,
      kind: "evidenceList",
      family: "brake",
      rule_number: "E 9",
      title: "Evidence for brakes",
      valid_from: "2024-01-01",
      body: JSON.stringify(DEFAULT_EVIDENCE_LISTS.brake),
    });
    const [first] = DEFAULT_EVIDENCE_LISTS.brake.rows;
    const claim = await buildClaim(shop, { ...rowIn("beingJudged"), holder_id: assessor.id });
    const asked = await askWorkshop(actorAt(seller, assessor, ["assessor"]), {
      number: claim.number,
      question: "One more thing.",
      rowIds: [first?.id ?? "", "nobodyKnowsThisRow", "__proto__"],
    });
    expect(asked).toMatchObject({ ok: true });
    const [query] = await adminQuery("select items from claim_queries where claim_id = $1", [claim.id]);
    expect(query).toEqual({ items: [first?.id] });
  });
});
