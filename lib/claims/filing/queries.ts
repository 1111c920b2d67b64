import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { dayInZone } from "@/lib/kernel/calendar-day";
import { currencyFrom } from "@/lib/kernel/currency";
import { normaliseSerial } from "@/lib/labels/serial";
import { familyOf } from "@/lib/parts/families";
import { findSoldLine, findSoldUnit, type SoldUnit } from "@/lib/parts/queries";
import { evidenceListOn } from "@/lib/rule-book/queries";
import { Claim } from "@/models/claim";
import { ClaimDraft as DraftRow } from "@/models/claim-draft";
import { type ClaimDraft, type DraftLine } from "../draft";
import { zoneOf } from "../parties/queries";
import { seesClaim } from "../seeing";
import { storedDraft } from "../draft-shape";
import type { ClaimFacts } from "../facts-shape";
import { readDraft, type DraftContext, type DraftProblem, type FoundLine } from "./read-draft";

type Installer = { id: string; code: string };

/** The installer of that name, if the workshop has one: the code is what the other side sees. */
async function findInstaller(work: Work, name: string): Promise<Installer | null> {
  const [found] = await rows<Installer>(
    work,
    "select id, code from installers where workshop_id = $1 and lower(name) = lower($2)",
    [work.actor.organisationId, name.trim()],
  );
  return found ?? null;
}

type Typed = { serial: string; sellerId: string; partId?: string | null };

/** The unit this workshop bought whose serial somebody typed, of that part where it is known. */
async function findOwnUnit(work: Work, { serial, sellerId, partId = null }: Typed): Promise<string | null> {
  const normal = normaliseSerial(serial);
  if (normal === "") return null;
  const [found] = await rows<{ id: string }>(
    work,
    `select id from units where buyer_id = $1 and seller_id = $2 and serial_normal = $3
       and ($4::uuid is null or part_id = $4) order by id limit 1`,
    [work.actor.organisationId, sellerId, normal, partId],
  );
  return found?.id ?? null;
}

/** A part chosen by hand may still carry a serial that answers; then it is that unit, as if it had been looked up. */
async function findUnit(work: Work, line: DraftLine, sellerId: string): Promise<SoldUnit | null> {
  const { serial, partId } = line;
  const unitId = line.unitId ?? (await findOwnUnit(work, { serial, sellerId, partId }));
  return unitId === null ? null : findSoldUnit(work, unitId);
}

const invoiceLineOf = (
  sold: Omit<SoldUnit, "unitId"> | Awaited<ReturnType<typeof findSoldLine>>,
): FoundLine["invoiceLine"] =>
  sold && {
    id: sold.invoiceLineId,
    invoiceNumber: sold.invoiceNumber,
    lineNumber: sold.lineNumber,
    invoicedOn: sold.invoicedOn,
    shippedOn: sold.shippedOn,
    unitPriceMinor: sold.unitPriceMinor,
    currency: sold.currency.trim(),
  };

async function findPart(work: Work, partId: string, sellerId: string): Promise<FoundLine["part"] | null> {
  const [part] = await rows<FoundLine["part"]>(
    work,
    "select id, part_number as number, name from parts where id = $1 and seller_id = $2",
    [partId, sellerId],
  );
  return part ?? null;
}

/** What a line's ids really stand for; ids of somebody else's things find nothing. */
async function findLine(work: Work, line: DraftLine, sellerId: string): Promise<FoundLine | null> {
  const [unit, sold, installer, replacementUnitId] = [
    await findUnit(work, line, sellerId),
    line.invoiceLineId ? await findSoldLine(work, line.invoiceLineId) : null,
    await findInstaller(work, line.installer),
    await findOwnUnit(work, { serial: line.replacementSerial, sellerId }),
  ];
  const partId = unit?.partId ?? sold?.partId ?? line.partId;
  const part = partId ? await findPart(work, partId, sellerId) : null;
  if (!part) return null;
  return {
    part,
    unit:
      unit && unit.sellerId === sellerId
        ? { id: unit.unitId, serial: unit.serial, batch: unit.batchCode }
        : null,
    invoiceLine: invoiceLineOf(unit ?? sold),
    installer,
    replacementUnitId,
  };
}

const listEvidence = (work: Work, claimId: string) =>
  rows<ClaimFacts["evidence"][number]>(
    work,
    `select id, row_id as "rowId", kind, sha256, original_name as "originalName" from evidence_files
     where claim_id = $1 and withdrawn_at is null order by received_at, id`,
    [claimId],
  );

/** Everything a draft is read against, as it stands now. */
export async function draftContext(
  work: Work,
  claim: Claim,
  { draft, now }: { draft: ClaimDraft; now: Date },
): Promise<DraftContext> {
  const family = familyOf(claim.family ?? "");
  if (!family) throw new Error(`claim ${claim.number} has no known family`);
  const filedOn = dayInZone(now, await zoneOf(work, claim.sellerId));
  const list = await evidenceListOn(work, {
    sellerId: claim.sellerId,
    family: family.code,
    symptom: draft.symptom,
    on: filedOn,
  });
  const lines: (FoundLine | null)[] = [];
  for (const line of draft.lines) lines.push(await findLine(work, line, claim.sellerId));
  return {
    today: dayInZone(now, work.actor.timeZone),
    filedOn,
    locale: work.actor.locale,
    currency: currencyFrom(claim.currency),
    family,
    rows: list.rows,
    evidenceListId: list.id,
    lines,
    evidence: await listEvidence(work, claim.id),
  };
}

export type CheckedDraft = {
  claim: Claim;
  draft: ClaimDraft;
  savedAt: Date;
  context: DraftContext;
  facts: ClaimFacts | null;
  problems: DraftProblem[];
};

/** A draft with everything known about it and all that still stops it from being sent. Null where it is nobody's here. */
export const checkDraft = (actor: Actor, number: string): Promise<CheckedDraft | null> =>
  unitOfWork(actor, async (work) => {
    const { transaction } = work;
    const claim = await Claim.findOne({ where: { number, workshopId: actor.organisationId }, transaction });
    const kept = claim && (await DraftRow.findOne({ where: { claimId: claim.id }, transaction }));
    if (!claim || !kept || !seesClaim(actor, claim)) return null;
    const draft = storedDraft(kept.body);
    const context = await draftContext(work, claim, { draft, now: new Date() });
    return { claim, draft, savedAt: kept.savedAt, context, ...readDraft(draft, context) };
  });

/** The units behind the lines of a draft, as the workshop bought them: for the first page of the flow. */
export const listUnitsOfDraft = (actor: Actor, draft: ClaimDraft): Promise<(SoldUnit | null)[]> =>
  unitOfWork(actor, async (work) => {
    const units: (SoldUnit | null)[] = [];
    for (const line of draft.lines) units.push(line.unitId ? await findSoldUnit(work, line.unitId) : null);
    return units;
  });

/** Names to offer where an installer is asked for. */
export const listInstallers = (actor: Actor): Promise<string[]> =>
  unitOfWork(actor, async (work) => {
    const found = await rows<{ name: string }>(
      work,
      "select name from installers where workshop_id = $1 and left_on is null order by name",
      [actor.organisationId],
    );
    return found.map((installer) => installer.name);
  });

export type OpenQuery = { round: number; question: string; rowIds: string[] };

/** The query the workshop still owes an answer to, if there is one. */
export const findOpenQuery = (actor: Actor, claimId: string): Promise<OpenQuery | null> =>
  unitOfWork(actor, async (work) => {
    const [open] = await rows<OpenQuery>(
      work,
      `select round, question, items as "rowIds" from claim_queries where claim_id = $1 and answered_at is null
       order by round desc limit 1`,
      [claimId],
    );
    return open ?? null;
  });
