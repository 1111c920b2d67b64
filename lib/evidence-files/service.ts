import "server-only";
import { z } from "zod";
import type { Actor } from "@/lib/access/actor";
import { hasRight } from "@/lib/access/rights";
import { rows, undoing, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { FILE_KINDS, LIMITS, type FileKind } from "@/lib/kernel/limits";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { originalKey } from "@/lib/storage/keys";
import { copyOnce, remove } from "@/lib/storage/objects";
import { receiveFile, type Received, type ReceiveRefusal } from "@/lib/storage/receive";
import { presentEvidence, type EvidenceRow } from "./present";
import { EVIDENCE, isEvidenceId } from "./queries";

const target = z.object({
  claimId: z.uuid(),
  rowId: z.string().regex(/^[a-z][A-Za-z0-9]{0,59}$/u),
  kind: z.enum(FILE_KINDS),
});
const captured = z.object({ takenAt: z.iso.datetime().optional(), by: z.literal("phone").optional() });

type Target = z.infer<typeof target>;
type ClaimRow = {
  id: string;
  sellerId: string;
  workshopId: string;
  state: string;
};
export type EvidenceRefusal =
  ReceiveRefusal | "notFound" | "notAllowed" | "moveNotOpen" | "filesTooMany" | "bytesTooMany";

/** The claim an upload is for, locked, if it is this workshop's and still takes files. */
async function openClaim(
  work: Work,
  claimId: string,
): Promise<Outcome<ClaimRow, "notFound" | "moveNotOpen">> {
  const [claim] = await rows<ClaimRow>(
    work,
    `select id, seller_id as "sellerId", workshop_id as "workshopId", state from claims
     where id = $1 and workshop_id = $2 for update`,
    [claimId, work.actor.organisationId],
  );
  if (!claim) return refuse("notFound");
  return claim.state === "draft" || claim.state === "answerNeeded" ? ok(claim) : refuse("moveNotOpen");
}

/** Counted by a statement of its own, which begins under the claim's lock and so sees what the one before it kept. */
async function room(
  work: Work,
  claim: ClaimRow,
  moreBytes: number,
): Promise<Outcome<true, "filesTooMany" | "bytesTooMany">> {
  const [held] = await rows<{ files: number; bytes: string }>(
    work,
    `select count(*)::int as files, coalesce(sum(size_bytes), 0) as bytes from evidence_files
     where claim_id = $1 and withdrawn_at is null`,
    [claim.id],
  );
  if (held && held.files >= LIMITS.filesPerClaim)
    return refuse("filesTooMany", { most: LIMITS.filesPerClaim });
  const isOver = Number(held?.bytes) + moreBytes > LIMITS.bytesPerClaim;
  return isOver ? refuse("bytesTooMany", { mostMb: LIMITS.bytesPerClaim / 1e6 }) : ok(true);
}

const writesClaims = ({ roles }: Actor): boolean =>
  hasRight(roles, "startClaim", { sells: false, buys: true });

/** Before a byte is kept: is there such a claim, does it take files, is there room. */
const decideFor =
  (actor: Actor) =>
  async (fields: Readonly<Record<string, string>>): Promise<Outcome<FileKind, EvidenceRefusal>> => {
    const given = target.safeParse(fields);
    if (!given.success) return refuse("notFound");
    if (!writesClaims(actor)) return refuse("notAllowed");
    return unitOfWork(actor, async (work) => {
      const claim = await openClaim(work, given.data.claimId);
      if (!claim.ok) return claim;
      const space = await room(work, claim.value, 0);
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

async function insertRow(work: Work, claim: ClaimRow, { to, file, capturedText }: Arrived) {
  const isPhoto = to.kind === "photo";
  const [made] = await rows<{ id: string }>(
    work,
    `insert into evidence_files (claim_id, seller_id, workshop_id, row_id, kind, media_type, original_name, size_bytes, sha256,
       object_key, view_state, captured, uploaded_by_id)
     values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13)
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
    const claim = await openClaim(work, arrived.to.claimId);
    if (!claim.ok) return claim;
    const space = await room(work, claim.value, arrived.file.sizeBytes);
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

/** Takes back a file that no sent revision holds. Its bytes stay until retention ends; nobody is shown them any more. */
export const withdrawEvidence = (actor: Actor, id: string) =>
  undoing<{ id: string }, "notFound" | "notAllowed" | "evidenceSent">(actor, async (work) => {
    if (!isEvidenceId(id)) return refuse("notFound");
    if (!writesClaims(actor)) return refuse("notAllowed");
    // Under the claim's lock, in a statement of its own: a revision that is being sent just now keeps its files.
    await rows(
      work,
      `select c.id from claims c join evidence_files e on e.claim_id = c.id
       where e.id = $1 and c.workshop_id = $2 for update of c`,
      [id, actor.organisationId],
    );
    const [file] = await rows<{ id: string; isSent: boolean }>(
      work,
      `select e.id, exists (select 1 from revision_evidence r where r.evidence_id = e.id) as "isSent"
       from evidence_files e where e.id = $1 and e.workshop_id = $2 and e.withdrawn_at is null for update of e`,
      [id, actor.organisationId],
    );
    if (!file) return refuse("notFound");
    if (file.isSent) return refuse("evidenceSent");
    await rows(work, "update evidence_files set withdrawn_at = now() where id = $1 returning id", [id]);
    return ok({ id });
  });
