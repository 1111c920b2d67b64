import { expect } from "vitest";
import { claimDigits } from "@/lib/claims/number";
import { takeClaim } from "@/lib/claims/judging/service";
import { fileClaim } from "@/lib/claims/sending/service";
import { callInParts } from "@/lib/returns/calling-service";
import { dispatchReturn } from "@/lib/returns/dispatch-service";
import { receiveReturn } from "@/lib/returns/receiving-service";
import { findingInput, receiveInput } from "@/lib/returns/schema";
import { recordFinding } from "@/lib/returns/bench-service";
import { actorAt } from "../support/actor";
import { buildPart, buildPerson, buildUnit } from "../support/build";
import { adminQuery } from "../support/database";
import { draftReady } from "./draft-ready";
import { twoShops, workerOf, type Shop } from "./shops";

export let world: Awaited<ReturnType<typeof twoShops>>;
let bench: Awaited<ReturnType<typeof buildPerson>>;

/** A distributor with an assessor and goods-in, and two workshops; called once by each file of tests. */
export async function openReturnWorld(): Promise<void> {
  world = await twoShops();
  bench = await buildPerson(world.seller, ["goodsIn"]);
}

export const assessor = () => actorAt(world.seller, world.assessor, ["assessor"]);
export const goodsIn = () => actorAt(world.seller, bench, ["goodsIn"]);
export const technician = () => workerOf(world.shops[0]);
export const otherTechnician = () => workerOf(world.shops[1]);

export type Held = { id: string; number: string; lineIds: string[]; serial: string };

const linesOf = (claimId: string) =>
  adminQuery<{ id: string; return_state: string; line_number: number }>(
    "select id, return_state, line_number from claim_lines where claim_id = $1 order by line_number",
    [claimId],
  );

type Said = Parameters<typeof draftReady>[2];

/** A claim that was sent by the services and is held by the assessor. */
export async function heldClaim(said: Said = {}, family = "brake"): Promise<Held> {
  const [shop] = world.shops;
  const unit = await soldUnit(shop, family);
  const claim = await draftReady(shop, { unitId: unit.id, serial: unit.serial }, said);
  if (family !== "brake") await adminQuery("update claims set family = $2 where id = $1", [claim.id, family]);
  expect(await fileClaim(technician(), claim)).toMatchObject({ ok: true });
  expect(await takeClaim(assessor(), claim)).toMatchObject({ ok: true });
  return { ...claim, serial: unit.serial, lineIds: (await linesOf(claim.id)).map(({ id }) => id) };
}

async function soldUnit(shop: Shop, family: string) {
  if (family === "brake") return world.sell(shop);
  const part = await buildPart(world.seller, { family, name: `A ${family}` });
  return buildUnit({ seller: world.seller, buyer: shop.workshop, account: shop.account, part });
}

export const callIn = ({ number, lineIds }: Held, over: object = {}) =>
  callInParts(assessor(), {
    number: claimDigits(number),
    lineIds,
    sendTo: "Goods-in, Harbour Road 12",
    dueOn: "2099-12-15",
    instructions: "Send it warm-tested, with its leads.",
    ...over,
  });

export async function calledIn(claim: Held): Promise<string> {
  const called = await callIn(claim);
  if (!called.ok) throw new Error(called.code);
  return called.value.number;
}

export const send = (number: string, actor = technician()) =>
  dispatchReturn(actor, { number, carrier: "Northern Parcel", trackingNumber: "NP 1", sentOn: "today" });

/** The form of goods-in as it is sent, with what a test changes. */
export const receive = (number: string, claim: Held, over: object = {}, actor = goodsIn()) =>
  receiveReturn(
    actor,
    receiveInput.parse({
      number,
      place: "A-12",
      lines: Object.fromEntries(
        claim.lineIds.map((lineId, at) => [at, { lineId, isHere: "yes", serialSeen: claim.serial }]),
      ),
      ...over,
    }),
  );

export const find = (number: string, over: object = {}, actor = goodsIn()) =>
  recordFinding(
    actor,
    findingInput.parse({
      number,
      lineNumber: 1,
      kind: "faultConfirmed",
      note: "It drags from the first turn.",
      ...over,
    }),
  );

/** A claim whose part lies at the bench. */
export async function atTheBench(
  said: Said = {},
  family = "brake",
): Promise<{ claim: Held; number: string }> {
  const claim = await heldClaim(said, family);
  const number = await calledIn(claim);
  expect(await receive(number, claim, { looked: "yes" })).toMatchObject({ ok: true });
  return { claim, number };
}

export const stateOf = async (claim: Held): Promise<string | undefined> =>
  (await linesOf(claim.id))[0]?.return_state;

export const kindsOf = async (claim: Held): Promise<string[]> =>
  (
    await adminQuery<{ kind: string }>(
      "select kind from timeline_entries where claim_id = $1 and kind like 'part%' order by seq",
      [claim.id],
    )
  ).map(({ kind }) => kind);

export const mailsOf = (claim: Held, kind: string) =>
  adminQuery<{ recipient: string; params: Record<string, unknown> }>(
    "select recipient, params from outbox where kind = $2 and params ->> 'number' = $1 order by recipient",
    [`${claim.number.slice(0, 4)}-${claim.number.slice(4)}`, kind],
  );
