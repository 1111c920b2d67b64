/** A file of a claim as the live list answers it (`GET /api/v1/claims/{number}/evidence`). */
export type EvidenceFileItem = {
  readonly id: string;
  readonly rowId: string;
  readonly kind: "photo" | "runLog" | "document";
  readonly originalName: string;
  readonly sizeBytes: number;
  readonly viewState: "waiting" | "ready" | "unreadable" | "notNeeded";
};
