import type { Currency } from "@/lib/kernel/currency";
import type { ClaimState, VerdictOutcome } from "../lifecycle";
import type { ListView } from "./schema";

/** The mark of a claim: a decided one shows its verdict. */
export type ClaimMark = Exclude<ClaimState, "decided"> | VerdictOutcome;

/** A row of a list as it travels to the page and through the API: plain text, money in minor units as digits. */
export type ClaimItem = {
  readonly number: string;
  readonly mark: ClaimMark;
  readonly partName: string | null;
  readonly partNumber: string | null;
  readonly serial: string | null;
  readonly family: string | null;
  readonly symptom: string | null;
  readonly otherParty: string;
  readonly lineCount: number;
  readonly askedMinor: string;
  readonly currency: Currency;
  readonly filedAt: string | null;
  readonly updatedAt: string;
  readonly answerDueAt: string | null;
  readonly isClockStopped: boolean;
  readonly safetyReported: boolean;
  readonly holderName: string | null;
  readonly flagCount: number;
};

export type ClaimItems = {
  readonly items: readonly ClaimItem[];
  readonly total: number;
  readonly page: number;
  readonly pages: number;
  readonly counts: Readonly<Partial<Record<ListView, number>>>;
};
