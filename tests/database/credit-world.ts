import { expect } from "vitest";
import type { Actor } from "@/lib/access/actor";
import type { ClaimDraft } from "@/lib/claims/draft";
import { decideClaim } from "@/lib/claims/deciding/service";
import { takeClaim } from "@/lib/claims/judging/service";
import { fileClaim } from "@/lib/claims/sending/service";
import type { VerdictOutcome } from "@/lib/claims/lifecycle";
import { issueCredit } from "@/lib/day-book/issuing/service";
import { actorAt } from "../support/actor";
import { buildPerson, insertRow } from "../support/build";
import { adminQuery } from "../support/database";
import { draftReady } from "./draft-ready";
import { twoShops, workerOf, type Shop } from "./shops";
import { bodies } from "../unit/rule-book/bodies";

export type CreditWorld = Awaited<ReturnType<typeof creditWorld>>;
export type DecidedClaim = { readonly id: string; readonly number: string; readonly shop: Shop };

/** A distributor with terms (24 months, straight line, EUR), an accounts clerk and two assessors, and two workshops with managers. */
export async function creditWorld() {
  const world = await twoShops();
  const { seller, shops } = world;
  await insertRow("rule_book_versions", {
    seller_id: seller.id,
    kind: "terms",
    rule_number: "G 1",
    title: "Terms",
    valid_from: "2024-01-01",
    body: JSON.stringify({ ...bodies.terms, currency: "EUR", filingLimitDays: 3660, contestDays: 28 }),
  });
  const clerk = await buildPerson(seller, ["accounts"], { locale: "en" });
  const second = await buildPerson(seller, ["assessor"]);
  const managers = [
    await buildPerson(shops[0].workshop, ["workshopManager"], { locale: "de" }),
    await buildPerson(shops[1].workshop, ["workshopManager"], { locale: "de" }),
  ] as const;
  return {
    ...world,
    clerk: actorAt(seller, clerk, ["accounts"]),
    assessor: actorAt(seller, world.assessor, ["assessor"]),
    second: actorAt(seller, second, ["assessor"]),
    managers: [
      actorAt(shops[0].workshop, managers[0], ["workshopManager"]),
      actorAt(shops[1].workshop, managers[1], ["workshopManager"]),
    ] as const,
  };
}

const SHARES: Readonly<Record<VerdictOutcome, Readonly<Record<string, string>>>> = {
  upheld: { maker: "1" },
  upheldInPart: { maker: "1/2", wear: "1/2" },
  declined: { user: "1" },
};
const REASON = {
  upheld: "faultOfThePart",
  upheldInPart: "sharedCause",
  declined: "useOutsideLimits",
} as const;

/** Gives every line of a claim that is being judged one verdict. */
export async function judge(assessor: Actor, claim: { id: string; number: string }, outcome: VerdictOutcome) {
  const lines = await adminQuery<{ id: string }>(
    "select id from claim_lines where claim_id = $1 order by 1",
    [claim.id],
  );
  const [row] = await adminQuery<{ revision: number }>("select revision from claims where id = $1", [
    claim.id,
  ]);
  const shares = { maker: "", carrier: "", fitter: "", user: "", wear: "", ...SHARES[outcome] };
  const decided = await decideClaim(assessor, {
    number: claim.number,
    revision: row?.revision ?? 1,
    letter: "We looked at it.",
    returnWaivedReason: "The photographs show it.",
    lines: lines.map(({ id }) => ({
      lineId: id,
      outcome,
      shares,
      reasonCode: REASON[outcome],
      reason: "The coil lost its release.",
    })),
  });
  expect(decided).toMatchObject({ ok: true });
}

/** A claim filed by a workshop and decided by the first assessor, all by the services. */
export async function decidedClaim(
  world: CreditWorld,
  {
    outcome = "upheld",
    at = 0,
    over = {},
  }: { outcome?: VerdictOutcome; at?: 0 | 1; over?: Partial<ClaimDraft> } = {},
): Promise<DecidedClaim> {
  const shop = world.shops[at];
  const unit = await world.sell(shop);
  const claim = await draftReady(shop, { unitId: unit.id, serial: unit.serial }, over);
  expect(await fileClaim(workerOf(shop), claim)).toMatchObject({ ok: true });
  expect(await takeClaim(world.assessor, claim)).toMatchObject({ ok: true });
  await judge(world.assessor, claim, outcome);
  return { ...claim, shop };
}

/** The number of the first note of a claim, issued now. */
export async function issued(world: CreditWorld, claim: { number: string }): Promise<string> {
  const outcome = await issueCredit(world.clerk, { number: claim.number, issuedBefore: 0 });
  if (!outcome.ok) throw new Error(`not issued: ${outcome.code}`);
  return outcome.value.noteNumber;
}

export const statesOf = async (claimId: string): Promise<string[]> =>
  (
    await adminQuery<{ state: string }>(
      "select credit_state as state from claim_lines where claim_id = $1 order by line_number",
      [claimId],
    )
  ).map(({ state }) => state);
