import "server-only";
import { fn } from "sequelize";
import { z } from "zod";
import type { Actor } from "@/lib/access/actor";
import { hasRight } from "@/lib/access/rights";
import { rows, undoing, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { isBenchRow, lineOfBenchRow } from "@/lib/evidence/bench-rows";
import { FILE_KINDS, LIMITS, type FileKind } from "@/lib/kernel/limits";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { originalKey } from "@/lib/storage/keys";
import { copyOnce, remove } from "@/lib/storage/objects";
import { receiveFile, type Received, type ReceiveRefusal } from "@/lib/storage/receive";
import { Claim } from "@/models/claim";
import { ClaimLine } from "@/models/claim-line";
import { EvidenceFile } from "@/models/evidence-file";
import { presentEvidence, type EvidenceRow } from "./present";
import { EVIDENCE, isEvidenceId } from "./queries";

const target = z.object({
  claimId: z.uuid(),
  rowId: z
    .string()
    .regex(/^[a-z][A-Za-z0-9]{0,59}$/u)
    .or(z.string().refine((text) => lineOfBenchRow(text) !== null)),
  kind: z.enum(FILE_KINDS),
});
const captured = z.object({ takenAt: z.iso.datetime().optional(), by: z.literal("phone").optional() });

type Target = z.infer<typeof target>;
export type EvidenceRefusal =
  ReceiveRefusal | "notFound" | "notAllowed" | "moveNotOpen" | "filesTooMany" | "bytesTooMany";

/** Whose file it is by its row: the bench has rows of its own, everything else is the workshop's. */
const takenBy = (rowId: string): "workshop" | "goodsIn" => (isBenchRow(rowId) ? "goodsIn" : "workshop");

/** A claim of the side that takes such files, locked until the transaction ends; null where it is none of theirs. */
const claimForFile = (
  { transaction, actor }: Work,
  claimId: string,
  rowId: string,
): Promise<Claim | null> => {
  const side = takenBy(rowId) === "goodsIn" ? "sellerId" : "workshopId";
  return Claim.findOne({
    where: { id: claimId, [side]: actor.organisationId },
    transaction,
    lock: transaction.LOCK.UPDATE,
  });
};

/** The claim an upload is for, locked, if it still takes files: a draft, or a part at the bench. */
async function openClaim(
  work: Work,
  { claimId, rowId }: Target,
): Promise<Outcome<Claim, "notFound" | "moveNotOpen">> {
  const claim = await claimForFile(work, claimId, rowId);
  if (!claim) return refuse("notFound");
  const isOpen = isBenchRow(rowId)
    ? await isAtBench(work, claim, lineOfBenchRow(rowId))
    : claim.state === "draft" || claim.state === "answerNeeded";
  return isOpen ? ok(claim) : refuse("moveNotOpen");
}

/** Whether the part of a line has arrived and is not disposed of. */
async function isAtBench(work: Work, claim: Claim, lineNumber: number | null): Promise<boolean> {
  if (lineNumber === null) return false;
  const line = await ClaimLine.findOne({
    where: { claimId: claim.id, lineNumber, returnState: ["received", "examined"] },
    transaction: work.transaction,
  });
  return line !== null;
}

/** Counted by a statement of its own, which begins under the claim's lock and so sees what the one before it kept. */
async function room(
  work: Work,
  claim: Claim,
  { rowId, moreBytes }: { rowId: string; moreBytes: number },
): Promise<Outcome<true, "filesTooMany" | "bytesTooMany">> {
  const [held] = await rows<{ files: number; bytes: string }>(
    work,
    `select count(*)::int as files, coalesce(sum(size_bytes), 0) as bytes from evidence_files
     where claim_id = $1 and withdrawn_at is null and taken_by = $2`,
    [claim.id, takenBy(rowId)],
  );
  if (held && held.files >= LIMITS.filesPerClaim)
    return refuse("filesTooMany", { most: LIMITS.filesPerClaim });
  const isOver = Number(held?.bytes) + moreBytes > LIMITS.bytesPerClaim;
  return isOver ? refuse("bytesTooMany", { mostMb: LIMITS.bytesPerClaim / 1e6 }) : ok(true);
}

const mayWrite = ({ roles }: Actor, rowId: string): boolean =>
  takenBy(rowId) === "goodsIn"
    ? hasRight(roles, "receiveParts", { sells: true, buys: false })
    : hasRight(roles, "startClaim", { sells: false, buys: true });

/** Before a byte is kept: is there such a claim, does it take files, is there room. */
const decideFor =
  (actor: Actor) =>
  async (fields: Readonly<Record<string, string>>): Promise<Outcome<FileKind, EvidenceRefusal>> => {
    const given = target.safeParse(fields);
    if (!given.success) return refuse("notFound");
    const { rowId } = given.data;
    if (!mayWrite(actor, rowId)) return refuse("notAllowed");
    return unitOfWork(actor, async (work) => {
      const claim = await openClaim(work, given.data);
      if (!claim.ok) return claim;
      const space = await room(work, claim.value, { rowId, moreBytes: 0 });
      return space.ok ? ok(given.data.kind) : space;
    });
  };

const readCaptured = (text: string | undefined): unknown => {
  try {
    const read = captured.safeParse(JSON.parse(text ?? "{}"));
    return read.success ? read.data : {};
  } catch {
    return {};
  }
};

type Arrived = { to: Target; file: Received; capturedText: string | undefined };

async function insertRow(work: Work, claim: Claim, { to, file, capturedText }: Arrived) {
  const isPhoto = to.kind === "photo";
  const [made] = await rows<{ id: string }>(
    work,
    `insert into evidence_files (claim_id, seller_id, workshop_id, row_id, kind, media_type, original_name, size_bytes, sha256,
       object_key, view_state, captured, uploaded_by_id, taken_by)
     values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13, $14)
     on conflict (claim_id, row_id, sha256) do nothing returning id`,
    [
      claim.id,
      claim.sellerId,
      claim.workshopId,
      to.rowId,
      to.kind,
      file.mediaType,
      file.name,
      file.sizeBytes,
      file.sha256,
      originalKey(file.sha256),
      isPhoto ? "waiting" : "notNeeded",
      JSON.stringify(readCaptured(capturedText)),
      work.actor.userId,
      takenBy(to.rowId),
    ],
  );
  if (made) {
    const task = isPhoto ? "viewCopy" : to.kind === "runLog" ? "readRunLog" : null;
    if (task)
      await rows(work, "select graphile_worker.enqueue($1, $2, $3)", [
        task,
        JSON.stringify({ evidenceId: made.id }),
        `${task}:${made.id}`,
      ]);
    await rows(work, "select guarded.flag_seen_before($1)", [made.id]);
  }
  const [row] = await rows<EvidenceRow>(
    work,
    `${EVIDENCE} and claim_id = $1 and row_id = $2 and sha256 = $3`,
    [claim.id, to.rowId, file.sha256],
  );
  return row;
}

/** Files the received bytes under their content and notes them on the claim, in one transaction under the claim's lock. */
const keep = (actor: Actor, arrived: Arrived) =>
  undoing<ReturnType<typeof presentEvidence>, EvidenceRefusal>(actor, async (work) => {
    const { rowId } = arrived.to;
    const claim = await openClaim(work, arrived.to);
    if (!claim.ok) return claim;
    const space = await room(work, claim.value, { rowId, moreBytes: arrived.file.sizeBytes });
    if (!space.ok) return space;
    const row = await insertRow(work, claim.value, arrived);
    return row ? ok(presentEvidence(row)) : refuse("uploadBroken", { name: arrived.file.name });
  });

/**
 * Receives one file for a row of a claim's Evidence list. The original is stored byte for byte under its hash and never
 * replaced; the same bytes sent twice are one file. Refuses with a sentence that names the file, the limit and the way out.
 */
export async function receiveEvidence(actor: Actor, request: Request) {
  const received = await receiveFile(request, decideFor(actor));
  if (!received.ok) return received;
  const file = received.value;
  try {
    const to = target.parse(file.fields);
    await copyOnce(file.quarantine, originalKey(file.sha256));
    return await keep(actor, { to, file, capturedText: file.fields.captured });
  } finally {
    await remove(file.quarantine).catch(() => undefined);
  }
}

/** Whether a sent revision or a finding holds the file. */
async function isHeld(work: Work, id: string): Promise<boolean> {
  const [held] = await rows(
    work,
    `select 1 from revision_evidence where evidence_id = $1 union all select 1 from findings where evidence_id = $1 limit 1`,
    [id],
  );
  return held !== undefined;
}

/**
 * Takes back a file that no sent revision and no finding holds. Each side takes back its own alone. The bytes stay until
 * retention ends; nobody is shown them any more.
 */
export const withdrawEvidence = (actor: Actor, id: string) =>
  undoing<{ id: string }, "notFound" | "notAllowed" | "evidenceSent">(actor, async (work) => {
    if (!isEvidenceId(id)) return refuse("notFound");
    const { transaction } = work;
    const known = await EvidenceFile.findByPk(id, { transaction });
    if (!known) return refuse("notFound");
    if (!mayWrite(actor, known.rowId)) return refuse("notAllowed");
    // What holds it is asked under the claim's lock: a revision that is being sent just now keeps its files.
    const claim = await claimForFile(work, known.claimId, known.rowId);
    const kept = { id, takenBy: takenBy(known.rowId), withdrawnAt: null };
    const file = claim && (await EvidenceFile.findOne({ where: kept, transaction }));
    if (!file) return refuse("notFound");
    if (await isHeld(work, id)) return refuse("evidenceSent");
    await file.update({ withdrawnAt: fn("now") }, { transaction });
    return ok({ id });
  });
