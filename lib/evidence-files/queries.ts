import "server-only";
import { z } from "zod";
import type { Actor } from "@/lib/access/actor";
import { seesClaim } from "@/lib/claims/seeing";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";
import { serve } from "@/lib/storage/serve";
import { presentEvidence, type EvidenceRow, type EvidenceView } from "./present";

export const EVIDENCE = `select id, claim_id as "claimId", workshop_id as "workshopId", row_id as "rowId", kind, media_type as "mediaType",
  original_name as "originalName", size_bytes as "sizeBytes", sha256, object_key as "objectKey", view_key as "viewKey",
  view_state as "viewState", received_at as "receivedAt" from evidence_files where withdrawn_at is null`;

/** The files of a claim, oldest first, as far as the asking organisation may see them. */
export const listEvidence = (actor: Actor, claimId: string): Promise<EvidenceView[]> =>
  unitOfWork(actor, async (work) => {
    const files = await rows<EvidenceRow>(work, `${EVIDENCE} and claim_id = $1 order by received_at, id`, [
      claimId,
    ]);
    return files.map(presentEvidence);
  });

/** The same by the claim's number; null where this organisation has no such claim. */
export const listEvidenceOfClaim = (actor: Actor, number: string): Promise<EvidenceView[] | null> =>
  unitOfWork(actor, async (work) => {
    const [claim] = await rows<{ id: string; workshopId: string }>(
      work,
      `select id, workshop_id as "workshopId" from claims where number = $1`,
      [number],
    );
    if (!claim || !seesClaim(actor, claim)) return null;
    const files = await rows<EvidenceRow>(work, `${EVIDENCE} and claim_id = $1 order by received_at, id`, [
      claim.id,
    ]);
    return files.map(presentEvidence);
  });

/** Whether a text can be the id of a file at all; what cannot is answered like an id nobody has. */
export const isEvidenceId = (id: string): boolean => z.uuid().safeParse(id).success;

/** A file to be sent out; null for one that is not this organisation's, like one that does not exist. */
const findEvidence = (actor: Actor, id: string): Promise<EvidenceRow | null> =>
  unitOfWork(actor, async (work) => {
    if (!isEvidenceId(id)) return null;
    const [file] = await rows<EvidenceRow>(work, `${EVIDENCE} and id = $1`, [id]);
    return file && seesClaim(actor, file) ? file : null;
  });

/** The original, byte for byte, to be kept and never shown by a browser; null where there is none for this reader. */
export async function openOriginal(actor: Actor, id: string, range: string | null): Promise<Response | null> {
  const file = await findEvidence(actor, id);
  if (!file) return null;
  const { objectKey: key, mediaType: contentType, originalName: name } = file;
  const part = { range, ofBytes: Number(file.sizeBytes) };
  return serve({ key, contentType, name, kind: "attachment", part });
}

/** The copy people look at: made by us from the picture, without anything else the file held. Null until it is ready. */
export async function openViewCopy(actor: Actor, id: string): Promise<Response | null> {
  const file = await findEvidence(actor, id);
  if (!file?.viewKey || file.viewState !== "ready") return null;
  return serve({
    key: file.viewKey,
    contentType: "image/jpeg",
    name: `${file.id}.jpg`,
    kind: "inline",
  });
}
