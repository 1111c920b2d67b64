import "server-only";
import { randomInt } from "node:crypto";
import { z } from "zod";
import type { Actor } from "@/lib/access/actor";
import { hasRight } from "@/lib/access/rights";
import { rows, undoing, type Work } from "@/lib/db/unit-of-work";
import { formatDay } from "@/lib/kernel/format";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { claimNumberFrom } from "@/lib/labels/check-digit";
import { findSoldLine, findSoldUnit } from "@/lib/parts/queries";
import { Claim } from "@/models/claim";
import { ClaimDraft as DraftRow } from "@/models/claim-draft";
import { ClaimLine } from "@/models/claim-line";
import { changedDraft, emptyDraft, emptyLine, type ClaimDraft, type DraftLine } from "../draft";
import { storedDraft, type DraftChange } from "../draft-shape";
import { moveClaim, type Moved } from "../moves/service";
import { claimDigits } from "../number";
import type { DraftStart } from "../schema";

/** The room claim numbers are drawn from: seven random digits, so that a number tells nobody how many claims there are. */
const SEVEN_DIGITS = [1_000_000, 10_000_000] as const;
const DRAWS = 20;

type Start = {
  sellerId: string;
  accountId: string;
  currency: string;
  family: string;
  line: DraftLine;
  draft: Partial<ClaimDraft>;
};

async function startFromUnit(work: Work, unitId: string): Promise<Start | null> {
  // A form may send any text as an id; what is none is answered like a unit of somebody else.
  const unit = z.uuid().safeParse(unitId).success ? await findSoldUnit(work, unitId) : null;
  if (!unit) return null;
  const line = {
    ...emptyLine(),
    serial: unit.serial,
    unitId: unit.unitId,
    partId: unit.partId,
    invoiceLineId: unit.invoiceLineId,
    position: unit.position ?? ("" as const),
    // Filled in as a person would write it; it is read like anything typed.
    fittedOn: unit.fittedOn ? formatDay(unit.fittedOn, work.actor.locale) : "",
    installer: unit.installerName ?? "",
  };
  const draft = { frameSerial: unit.frameSerial ?? "", vehicleModel: unit.vehicleModel ?? "" };
  return {
    sellerId: unit.sellerId,
    accountId: unit.accountId,
    currency: unit.currency.trim(),
    family: unit.family,
    line,
    draft,
  };
}

async function startFromLine(work: Work, invoiceLineId: string): Promise<Start | null> {
  const sold = await findSoldLine(work, invoiceLineId);
  if (!sold) return null;
  const line = { ...emptyLine(), partId: sold.partId, invoiceLineId };
  return {
    sellerId: sold.sellerId,
    accountId: sold.accountId,
    currency: sold.currency.trim(),
    family: sold.family,
    line,
    draft: {},
  };
}

type PartByHand = { accountId: string; partId: string; serial: string };

async function startFromPart(work: Work, { accountId, partId, serial }: PartByHand): Promise<Start | null> {
  const [found] = await rows<{ sellerId: string; currency: string; family: string }>(
    work,
    `select t.seller_id as "sellerId", t.currency, p.family from trading_accounts t
       join parts p on p.seller_id = t.seller_id and p.id = $2
     where t.id = $1 and t.buyer_id = $3 and t.closed_on is null`,
    [accountId, partId, work.actor.organisationId],
  );
  if (!found) return null;
  return {
    ...found,
    currency: found.currency.trim(),
    accountId,
    line: { ...emptyLine(), serial, partId },
    draft: {},
  };
}

const startFrom = (work: Work, from: DraftStart): Promise<Start | null> => {
  if (from.unitId) return startFromUnit(work, from.unitId);
  if (from.invoiceLineId) return startFromLine(work, from.invoiceLineId);
  return from.accountId && from.partId ? startFromPart(work, from) : Promise.resolve(null);
};

/** Inserts the claim under a number nobody has yet; a clash is drawn again inside the same transaction. */
async function insertNumbered(work: Work, start: Start): Promise<string> {
  for (let draw = 0; draw < DRAWS; draw += 1) {
    const number = claimDigits(claimNumberFrom(randomInt(...SEVEN_DIGITS)));
    const made = await rows<{ number: string }>(
      work,
      `insert into claims (number, seller_id, workshop_id, account_id, family, currency, created_by_id)
       values ($1, $2, $3, $4, $5, $6, $7) on conflict (number) do nothing returning number`,
      [
        number,
        start.sellerId,
        work.actor.organisationId,
        start.accountId,
        start.family,
        start.currency,
        work.actor.userId,
      ],
    );
    if (made[0]) return made[0].number;
  }
  throw new Error("no free claim number in twenty draws");
}

/**
 * Starts a draft for a unit, for a purchase without serial, or for a part chosen by hand. What the serial answers is
 * filled in. Refuses `notFound` where the thing is not this organisation's.
 */
export const startClaim = (
  actor: Actor,
  from: DraftStart,
): Promise<Outcome<Moved, "notFound" | "notAllowed">> =>
  undoing(actor, async (work) => {
    if (!hasRight(actor.roles, "startClaim", { sells: false, buys: true })) return refuse("notAllowed");
    const start = await startFrom(work, from);
    if (!start) return refuse("notFound");
    const number = await insertNumbered(work, start);
    const claim = await Claim.findOne({
      where: { number },
      transaction: work.transaction,
      rejectOnEmpty: true,
    });
    const body = { ...emptyDraft(), ...start.draft, lines: [start.line] };
    await DraftRow.create(
      {
        claimId: claim.id,
        sellerId: claim.sellerId,
        workshopId: claim.workshopId,
        body,
        savedAt: new Date(),
      },
      { transaction: work.transaction },
    );
    return ok({ number });
  });

export type Saved = { readonly number: string; readonly savedAt: string };

type DraftRefusal = "notFound" | "moveNotOpen" | "notAllowed";

/** Loads a draft under its claim's lock, lets it be changed, and keeps it. */
const changeDraft = <Code extends string>(
  actor: Actor,
  number: string,
  change: (claim: Claim, draft: ClaimDraft, work: Work) => Promise<Outcome<ClaimDraft, Code>>,
): Promise<Outcome<Saved, Code | DraftRefusal>> =>
  undoing<Saved, Code | DraftRefusal>(actor, async (work) => {
    const { transaction } = work;
    if (!hasRight(actor.roles, "startClaim", { sells: false, buys: true })) return refuse("notAllowed");
    const claim = await Claim.findOne({
      where: { number, workshopId: actor.organisationId },
      transaction,
      lock: transaction.LOCK.UPDATE,
    });
    if (!claim) return refuse("notFound");
    if (claim.state !== "draft" && claim.state !== "answerNeeded") return refuse("moveNotOpen");
    const kept = await DraftRow.findOne({ where: { claimId: claim.id }, transaction });
    const changed = await change(claim, storedDraft(kept?.body), work);
    if (!changed.ok) return changed;
    const savedAt = new Date();
    const { id: claimId, sellerId, workshopId } = claim;
    await DraftRow.upsert({ claimId, sellerId, workshopId, body: changed.value, savedAt }, { transaction });
    return ok({ number, savedAt: savedAt.toISOString() });
  });

/** Keeps what was typed exactly as typed. Refuses `notFound`, and `moveNotOpen` once the claim is out of the workshop's hands. */
export const saveDraft = (actor: Actor, number: string, change: DraftChange) =>
  changeDraft<never>(actor, number, (_claim, draft) => Promise.resolve(ok(changedDraft(draft, change))));

const MOST_LINES = 8;

const changeLines = <Code extends string>(
  actor: Actor,
  number: string,
  change: (claim: Claim, draft: ClaimDraft, work: Work) => Promise<Outcome<DraftLine[], Code>>,
) =>
  changeDraft<Code>(actor, number, async (claim, draft, work) => {
    const lines = await change(claim, draft, work);
    return lines.ok ? ok({ ...draft, lines: lines.value }) : lines;
  });

export const discardDraft = (actor: Actor, { number }: { number: string }) =>
  moveClaim<never>(actor, { number, move: "discard" }, () => ok({}));

export const withdrawClaim = (actor: Actor, { number, reason }: { number: string; reason: string }) =>
  moveClaim<never>(actor, { number, move: "withdraw" }, async (claim, work) => {
    await releaseUnits(work, claim.id);
    return ok({ changes: { holderId: null, heldUntil: null }, detail: { reason } });
  });

/** A claim that ended without a verdict lets go of its units, so that they can be claimed again. */
const releaseUnits = (work: Work, claimId: string): Promise<unknown> =>
  ClaimLine.update(
    { holdsUnit: false },
    { where: { claimId, holdsUnit: true }, transaction: work.transaction },
  );

/**
 * Adds the other part of a pair to a draft ("add the other one"): a second line for a unit of the same distributor.
 * Refuses `notFound`, `unitOfOtherSeller`, `lineTwice`.
 */
export const addLine = (
  actor: Actor,
  number: string,
  unitId: string,
): Promise<Outcome<Saved, DraftRefusal | "unitOfOtherSeller" | "lineTwice" | "linesFull">> =>
  changeLines<"notFound" | "unitOfOtherSeller" | "lineTwice" | "linesFull">(
    actor,
    number,
    async (claim, draft, work) => {
      const start = await startFromUnit(work, unitId);
      if (!start) return refuse("notFound");
      if (start.sellerId !== claim.sellerId || start.family !== claim.family)
        return refuse("unitOfOtherSeller");
      if (draft.lines.some((line) => line.unitId === unitId)) return refuse("lineTwice");
      if (draft.lines.length >= MOST_LINES) return refuse("linesFull", { most: MOST_LINES });
      return ok([...draft.lines, start.line]);
    },
  );

/** Takes the last added line off a draft again; the first one stays, it is what the claim is about. */
export const removeLine = (actor: Actor, number: string, place: number) =>
  changeLines<never>(actor, number, (_claim, draft) =>
    Promise.resolve(ok(draft.lines.filter((_line, index) => index === 0 || index !== place))),
  );
