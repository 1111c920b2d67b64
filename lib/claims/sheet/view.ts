import type { Coverage } from "@/lib/coverage/coverage";
import type { Credit } from "@/lib/credits/credit";
import type { Money } from "@/lib/kernel/money";
import type { ClaimFacts } from "../facts-shape";
import type { ClaimMove, ClaimState, CreditState, ReturnState, VerdictOutcome } from "../lifecycle";
import type { Attribution } from "../verdict";
import type { Limits } from "@/lib/rule-book/limits-shape";

/** Which of the two parties is looking. */
export type Side = "workshop" | "distributor";

/** How a reading stands to the limits of the Rule book version of the fitting day. */
export type Judgement = "within" | "below" | "above" | "openCircuit" | "noTemperature" | "noLimit";

export type ReadingView = {
  readonly rowId: string;
  readonly kind: string;
  readonly rawText: string;
  readonly unit: string;
  readonly value: number | null;
  readonly temperatureCelsius: number | null;
  readonly instrument: string;
  /** A copper winding brought to 20 °C, or the value itself where temperature does not matter; null where it cannot be said. */
  readonly judgedValue: number | null;
  readonly isCorrectedTo20: boolean;
  readonly judgement: Judgement;
  readonly limit: {
    readonly low: number | null;
    readonly high: number | null;
    readonly source: string;
    readonly rule: string;
  } | null;
};

export type EvidenceFileView = {
  readonly id: string;
  readonly rowId: string;
  readonly kind: "photo" | "runLog" | "document";
  readonly originalName: string;
  readonly sizeBytes: number;
  readonly sha256: string;
  readonly viewState: "waiting" | "ready" | "unreadable" | "notNeeded";
  readonly widthPx: number | null;
  readonly heightPx: number | null;
  readonly capturedAt: string | null;
  readonly receivedAt: string;
  /** The read log as the worker stored it; parsed by its own shape. Null until it is read. */
  readonly summary: unknown;
  readonly isInRevision: boolean;
};

export type EvidenceRowView = {
  readonly id: string;
  readonly need: "required" | "useful" | "notNeeded";
  readonly accepts: "photo" | "runLog" | "reading" | "answer" | "document";
  readonly state: "done" | "toDo" | "cannotGet";
  readonly reason: string | null;
  readonly answer: string | null;
  readonly why: string;
  readonly files: readonly EvidenceFileView[];
  readonly reading: ReadingView | null;
};

export type LineView = {
  readonly lineId: string;
  readonly lineNumber: number;
  readonly partNumber: string;
  readonly partName: string;
  readonly serial: string | null;
  readonly isKnownUnit: boolean;
  readonly batch: string | null;
  readonly quantity: number;
  readonly position: "left" | "right" | "single";
  readonly invoice: {
    readonly number: string;
    readonly line: number;
    readonly invoicedOn: string;
    readonly shippedOn: string;
  } | null;
  readonly fittedOn: string | null;
  /** The name for the workshop, the code for the distributor. */
  readonly installer: string | null;
  readonly replacement: { readonly serial: string; readonly fittedOn: string | null } | null;
  readonly asked: Money;
  readonly coverage: Coverage | null;
  readonly verdict: VerdictOutcome | null;
  readonly returnState: ReturnState;
  readonly returnWaivedReason: string | null;
  readonly creditState: CreditState;
};

export type VerdictLineView = {
  readonly lineNumber: number;
  readonly outcome: VerdictOutcome;
  readonly attribution: Attribution;
  readonly reasonCode: string;
  readonly reason: string;
  readonly rule: { readonly number: string; readonly title: string; readonly validFrom: string } | null;
  readonly coverage: Coverage;
  readonly returnWaivedReason: string | null;
};

export type VerdictView = {
  readonly id: string;
  readonly revision: number;
  readonly outcome: VerdictOutcome;
  readonly letter: string;
  readonly decidedAt: string;
  /** What it gives in money, with its steps; null for a verdict from before credits were reckoned. */
  readonly credit: Credit | null;
  readonly lines: readonly VerdictLineView[];
};

export type QueryView = {
  readonly round: number;
  readonly rowIds: readonly string[];
  readonly question: string;
  readonly askedAt: string;
  readonly answeredAt: string | null;
  readonly answeredRevision: number | null;
};

export type MessageView = {
  readonly id: string;
  readonly authorName: string;
  readonly authorOrganisation: string;
  readonly isOwnOnly: boolean;
  readonly body: string;
  readonly at: string;
};

export type EntryView = {
  readonly seq: number;
  readonly kind: string;
  readonly actorName: string;
  readonly actorOrganisation: string | null;
  readonly isOwnOnly: boolean;
  readonly detail: Readonly<Record<string, unknown>>;
  readonly at: string;
};

export type FlagView = {
  readonly kind: string;
  readonly lineNumber: number | null;
  readonly detail: Readonly<Record<string, string>>;
};

/** The case in one line, each fragment a reason to look. Distributor only. */
export type CaseLine = {
  readonly monthsUsed: number | null;
  readonly daysLeft: number | null;
  readonly evidenceDone: number;
  readonly evidenceAll: number;
  readonly sameBatch: number;
  readonly sameWorkshopThisMonth: number;
  readonly sameVehicle: number;
};

/** The one page of a claim, as one party sees it. Instants are ISO texts in UTC, days `YYYY-MM-DD`. */
export type SheetView = {
  readonly number: string;
  readonly state: ClaimState;
  readonly outcome: VerdictOutcome | null;
  readonly side: Side;
  readonly moves: readonly ClaimMove[];
  /** Whether the workshop may still object to the verdict, whoever looks. */
  readonly isContestOpen: boolean;
  /** Whether this person may give up the days that are left to object. */
  readonly canAccept: boolean;
  readonly canTakeOver: boolean;
  readonly sellerName: string;
  readonly workshopName: string;
  readonly siteName: string | null;
  readonly accountNumber: string;
  readonly family: string;
  readonly symptom: string | null;
  readonly revision: number;
  readonly asked: Money;
  readonly safetyReported: boolean;
  readonly incidentKnownAt: string | null;
  readonly holderName: string | null;
  readonly isHeldByMe: boolean;
  readonly heldUntil: string | null;
  readonly parked: { readonly withName: string; readonly isMe: boolean; readonly question: string } | null;
  readonly filedAt: string | null;
  readonly answerDueAt: string | null;
  readonly isClockStopped: boolean;
  readonly queryLapsesOn: string | null;
  readonly contestUntil: string | null;
  readonly facts: ClaimFacts | null;
  readonly lines: readonly LineView[];
  readonly rows: readonly EvidenceRowView[];
  readonly otherFiles: readonly EvidenceFileView[];
  /** What the part is rated at, by the Rule book version in force on the fitting day. */
  readonly limits: Limits | null;
  readonly caseLine: CaseLine | null;
  readonly revisions: readonly {
    readonly revision: number;
    readonly sentAt: string;
    readonly sentBy: string | null;
    readonly sha256: string;
  }[];
  readonly queries: readonly QueryView[];
  readonly verdicts: readonly VerdictView[];
  /** Credit notes issued for the claim, newest first. */
  readonly notes: readonly {
    readonly number: string;
    readonly sellerId: string;
    readonly verdictId: string;
    readonly isStanding: boolean;
  }[];
  readonly flags: readonly FlagView[];
  readonly messages: readonly MessageView[];
  readonly timeline: readonly EntryView[];
};
