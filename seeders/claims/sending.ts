import type { ClaimFacts } from "@/lib/claims/facts-shape";
import { originalKey, viewKey } from "@/lib/storage/keys";
import { FAMILIES } from "@/lib/parts/families";
import { symptomOf } from "@/lib/parts/family";
import { idOf } from "../identity";
import { ASSESSORS, CLAIMANTS, PEOPLE } from "../story/people";
import type { FilePlan } from "./evidence-plan";
import { factsSent } from "./facts-sent";
import { addRow, type Scene } from "./scene";

const MINUTE_MS = 60_000;
const MINUTES_OF_UPLOAD = 9;

/** Uploads the files of a sending, a little before it, and freezes what is sent as the next revision. */
export function sendRevision(scene: Scene): void {
  const { one, life, asked } = scene;
  const sending = life.revision === 0 ? "first" : "second";
  uploadFiles(scene, sending);
  life.revision += 1;
  const draft = scene.draftOf(sending === "first" ? 1 : 2);
  const sent = factsSent(one, { draft, asked, sentOn: life.lastOn, evidence: evidenceOf(scene) });
  scene.sent.push(sent);
  writeRevision(scene, sent.facts, sent.sha256);
  const isReported =
    sent.facts.incident !== null || (symptomOf(FAMILIES[one.family], one.symptom)?.mayBeReportable ?? false);
  scene.fields["askedMinor"] = sent.facts.lines
    .reduce((sum, line) => sum + BigInt(line.askedMinor), 0n)
    .toString();
  scene.fields["safetyReported"] = isReported;
  if (isReported) scene.fields["incidentKnownAt"] ??= life.lastAt;
}

/** Files of a draft that was never sent are uploaded all the same, and those of the bench beside its finding. */
export const uploadFiles = (scene: Scene, sending: FilePlan["sending"]): void =>
  scene.plans
    .filter((plan) => plan.sending === sending)
    .forEach((plan, place) => uploadFile(scene, plan, place));

function uploadFile(scene: Scene, plan: FilePlan, place: number): void {
  const { life, one, made } = scene;
  const file = made.get(plan.key);
  if (!file) throw new RangeError(`Nothing was made for ${plan.name}`);
  addRow(scene, "evidenceFiles", {
    id: plan.id,
    claimId: life.claimId,
    ...life.parties,
    rowId: plan.rowId,
    takenBy: plan.sending === "bench" ? "goodsIn" : "workshop",
    kind: file.kind,
    mediaType: file.mediaType,
    originalName: plan.name,
    sizeBytes: file.bytes.length,
    sha256: file.sha256,
    objectKey: originalKey(file.sha256),
    viewKey: file.view ? viewKey(file.sha256) : null,
    viewState: file.view ? "ready" : "notNeeded",
    widthPx: file.widthPx,
    heightPx: file.heightPx,
    captured: file.takenAt ? { takenAt: file.takenAt.toISOString() } : {},
    summary: file.summary,
    uploadedById:
      PEOPLE[plan.sending === "bench" ? ASSESSORS[one.seller].bench : CLAIMANTS[one.workshop].starts].id,
    receivedAt: new Date(life.lastAt.getTime() - MINUTES_OF_UPLOAD * MINUTE_MS + place * 1000 * 20),
  });
}

const evidenceOf = ({ rows }: Scene): ClaimFacts["evidence"] =>
  (rows.evidenceFiles ?? [])
    .filter((row) => row["takenBy"] === "workshop")
    .map((row) => ({
      id: String(row["id"]),
      rowId: String(row["rowId"]),
      kind: row["kind"] === "photo" ? "photo" : row["kind"] === "runLog" ? "runLog" : "document",
      sha256: String(row["sha256"]),
      originalName: String(row["originalName"]),
    }));

function writeRevision(scene: Scene, facts: ClaimFacts, sha256: string): void {
  const { life, one } = scene;
  const parties = { claimId: life.claimId, ...life.parties };
  const revision = life.revision;
  const id = idOf("revision", life.claimId, revision);
  const sentById = PEOPLE[CLAIMANTS[one.workshop].starts].id;
  addRow(scene, "claimRevisions", { id, ...parties, revision, facts, sha256, sentById, sentAt: life.lastAt });
  for (const file of facts.evidence)
    addRow(scene, "revisionEvidence", { revisionId: id, evidenceId: file.id, ...life.parties });
  for (const {
    kind,
    rawText,
    unit,
    canonicalValue,
    temperatureCelsius,
    instrument,
    rowId,
  } of facts.readings) {
    addRow(scene, "readings", {
      id: idOf("reading", id, rowId),
      ...parties,
      revision,
      lineNumber: 1,
      kind,
      rawText,
      unit,
      canonicalValue,
      temperatureCelsius,
      instrument,
      takenBy: "workshop",
      findingId: null,
    });
  }
}
