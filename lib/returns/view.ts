import type { ReturnState } from "@/lib/claims/lifecycle";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { BenchStep } from "./bench-plan";
import type { PartMove } from "./lifecycle";
import type { Disposal, FindingKind, ParcelCondition } from "./kinds";
import type { MatchReason } from "./match";

export type FindingReading = {
  readonly kind: string;
  readonly rawText: string;
  readonly unit: string;
  readonly value: number | null;
  readonly temperatureCelsius: number | null;
  readonly instrument: string;
};

/** What the bench found, as both parties read it. */
export type FindingView = {
  readonly kind: FindingKind;
  readonly note: string;
  readonly runMinutes: number | null;
  readonly foundAt: string;
  readonly foundBy: string;
  readonly looks: readonly { readonly step: string; readonly text: string }[];
  readonly readings: readonly FindingReading[];
  readonly log: { readonly id: string; readonly summary: unknown } | null;
};

export type ReturnLineView = {
  readonly lineId: string;
  readonly lineNumber: number;
  readonly partName: string;
  readonly partNumber: string;
  readonly family: string;
  readonly serial: string | null;
  readonly state: ReturnState;
  readonly moves: readonly PartMove[];
  readonly serialSeen: string | null;
  readonly isOtherSerial: boolean;
  /** Looked at for signs of danger before anything else. */
  readonly asksForDanger: boolean;
  readonly isQuarantined: boolean;
  /** The distributor's own: where the part is kept, how its parcel looked. */
  readonly place: string | null;
  readonly condition: ParcelCondition | null;
  readonly parcelId: string | null;
  readonly receivedAt: string | null;
  readonly disposedAs: Disposal | null;
  readonly finding: FindingView | null;
};

/** A part called in, as one party may see it. Instants are ISO texts in UTC. */
export type ReturnView = {
  readonly number: string;
  readonly printed: string;
  readonly claimId: string;
  readonly claimNumber: string;
  readonly side: "workshop" | "distributor";
  readonly sellerName: string;
  readonly workshopName: string;
  readonly siteName: string | null;
  readonly sendTo: string;
  readonly instructions: string;
  readonly dueOn: CalendarDay;
  readonly calledInAt: string;
  readonly sentAt: string | null;
  readonly carrier: string | null;
  readonly trackingNumber: string | null;
  readonly lines: readonly ReturnLineView[];
};

/** One line of the lists of goods-in. */
export type ExpectedItem = {
  readonly number: string;
  readonly printed: string;
  readonly claimNumber: string;
  readonly workshopName: string;
  readonly partName: string;
  readonly lineNumber: number;
  readonly lineCount: number;
  readonly serial: string | null;
  readonly state: ReturnState;
  readonly dueOn: CalendarDay;
  readonly daysOver: number;
  readonly place: string | null;
  readonly isQuarantined: boolean;
};

export type ParcelItem = {
  readonly id: string;
  readonly arrivedAt: string;
  readonly sender: string;
  readonly part: string;
  readonly serial: string;
  readonly numberWritten: string;
  readonly condition: ParcelCondition;
  readonly note: string;
};

/** The day of goods-in: what is due, what came unannounced, what waits for the bench; and how much of each there is. */
export type GoodsInLists = {
  readonly due: readonly ExpectedItem[];
  readonly unmatched: readonly ParcelItem[];
  readonly toExamine: readonly ExpectedItem[];
  readonly counts: {
    readonly due: number;
    readonly overdue: number;
    readonly unmatched: number;
    readonly toExamine: number;
  };
};

export type MatchView = {
  readonly number: string;
  readonly printed: string;
  readonly claimNumber: string;
  readonly workshopName: string;
  readonly parts: readonly {
    readonly number: string;
    readonly name: string;
    readonly serial: string | null;
  }[];
  readonly reasons: readonly MatchReason[];
};

/** A step of the bench plan with what the workshop said about the same thing. */
export type BenchStepView = BenchStep & {
  readonly theirs: readonly FindingReading[];
};

export type BenchView = {
  readonly returned: ReturnView;
  readonly line: ReturnLineView;
  readonly steps: readonly BenchStepView[];
  readonly symptom: string | null;
  readonly workshopNote: string;
  /** Seconds to the fault as the claim states it, and seconds the bench must run before "no fault found". */
  readonly claimSeconds: number | null;
  readonly neededSeconds: number;
  readonly log: { readonly id: string; readonly summary: unknown } | null;
  readonly loggedSeconds: number | null;
};
