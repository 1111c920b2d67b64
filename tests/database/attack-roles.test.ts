import { beforeAll, describe, expect, it } from "vitest";
import type { Role } from "@/lib/access/roles";
import { checkDraft } from "@/lib/claims/filing/queries";
import { listOwnClaims, listReceivedClaims } from "@/lib/claims/lists/queries";
import { listQuery } from "@/lib/claims/lists/schema";
import { findClaimSheet } from "@/lib/claims/reading/queries";
import { fileClaim } from "@/lib/claims/sending/service";
import { listMessages } from "@/lib/claims/talk/queries";
import { sayOnClaim } from "@/lib/claims/talk/service";
import { listEvidenceOfClaim, openOriginal } from "@/lib/evidence-files/queries";
import { withdrawEvidence } from "@/lib/evidence-files/service";
import { actorAt } from "../support/actor";
import { buildAccount, buildDistributor, buildFile, buildPerson } from "../support/build";
import { adminQuery } from "../support/database";
import { draftReady } from "./draft-ready";
import { twoShops, workerOf } from "./shops";

type World = Awaited<ReturnType<typeof twoShops>>;
let world: World;
let received: { id: string; number: string };
let file: { id: string };
let own: { id: string; number: string };

// A distributor that buys as well: people of both sides work under one roof.
beforeAll(async () => {
  world = await twoShops();
  const [shop] = world.shops;
  await adminQuery("update organisations set buys = true where id = $1", [world.seller.id]);
  const unit = await world.sell(shop);
  received = await draftReady(shop, { unitId: unit.id, serial: unit.serial });
  file = await buildFile(shop, received);
  expect(await fileClaim(workerOf(shop), received)).toMatchObject({ ok: true });
  const other = await buildDistributor();
  const buyer = world.seller;
  own = await draftReady(
    {
      seller: other,
      workshop: buyer,
      account: await buildAccount(other, buyer),
      person: await buildPerson(buyer, ["technician"]),
    },
    {},
  );
});

const inHouse = (roles: readonly Role[]) => actorAt(world.seller, world.assessor, roles);
const all = listQuery.parse({ view: "all" });

describe("in a distributor that also buys", () => {
  it("who works at its bench has nothing of the claims it received", async () => {
    const technician = inHouse(["technician", "workshopManager"]);
    const { number } = received;
    expect(await findClaimSheet(technician, number)).toBeNull();
    expect(await listMessages(technician, number)).toBeNull();
    expect(await listEvidenceOfClaim(technician, number)).toBeNull();
    expect(await openOriginal(technician, file.id, null)).toBeNull();
    expect(await listReceivedClaims(technician, all)).toMatchObject({ items: [], total: 0, counts: {} });
    const said = { number, body: "Let me see.", audience: "own" } as const;
    expect(await sayOnClaim(technician, said)).toEqual(
      await sayOnClaim(technician, { ...said, number: "00000000" }),
    );
    expect(await findClaimSheet(inHouse(["goodsIn"]), number)).toMatchObject({ side: "distributor" });
    expect((await listReceivedClaims(inHouse(["analyst"]), all)).total).toBe(1);
  });

  it("who judges has nothing of the claims it makes", async () => {
    const assessor = inHouse(["assessor"]);
    expect(await checkDraft(assessor, own.number)).toBeNull();
    expect(await listOwnClaims(assessor, all)).toMatchObject({ items: [], total: 0 });
    expect(await checkDraft(inHouse(["technician"]), own.number)).toMatchObject({ claim: { id: own.id } });
    expect((await listOwnClaims(inHouse(["workshopManager"]), all)).total).toBe(1);
  });
});

describe("a file of the workshop", () => {
  it("is withdrawn by nobody who writes no claims", async () => {
    const [shop] = world.shops;
    const books = actorAt(shop.workshop, shop.person, ["accounts"]);
    expect(await withdrawEvidence(books, file.id)).toMatchObject({ ok: false, code: "notAllowed" });
  });
});
