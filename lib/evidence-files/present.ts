export type EvidenceRow = {
  id: string;
  claimId: string;
  workshopId: string;
  rowId: string;
  kind: "photo" | "runLog" | "document";
  mediaType: string;
  originalName: string;
  sizeBytes: string;
  sha256: string;
  objectKey: string;
  viewKey: string | null;
  viewState: "waiting" | "ready" | "unreadable" | "notNeeded";
  receivedAt: Date;
};

/** A file as a page or the API may show it: nothing of where it lies or where it was taken. */
export type EvidenceView = {
  readonly id: string;
  readonly rowId: string;
  readonly kind: EvidenceRow["kind"];
  readonly originalName: string;
  readonly sizeBytes: number;
  readonly sha256: string;
  readonly viewState: EvidenceRow["viewState"];
  readonly receivedAt: string;
};

export const presentEvidence = ({
  id,
  rowId,
  kind,
  originalName,
  sizeBytes,
  sha256,
  viewState,
  receivedAt,
}: EvidenceRow): EvidenceView => ({
  id,
  rowId,
  kind,
  originalName,
  sizeBytes: Number(sizeBytes),
  sha256,
  viewState,
  receivedAt: receivedAt.toISOString(),
});
