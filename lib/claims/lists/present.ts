import { isCurrency } from "@/lib/kernel/currency";
import type { ClaimState, VerdictOutcome } from "../lifecycle";
import { printClaimNumber } from "../number";
import type { ClaimList, ListedClaim } from "./queries";
import { PAGE_SIZE, type ListView } from "./schema";

/** The mark of a claim: a decided one shows its verdict. */
type ClaimMark = Exclude<ClaimState, "decided"> | VerdictOutcome;

// Claims decided line by line always have an outcome; one read between two writes shows as partly upheld.
const markOf = (state: ClaimState, outcome: VerdictOutcome | null): ClaimMark =>
  state === "decided" ? (outcome ?? "upheldInPart") : state;

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
  readonly currency: string;
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

const presentItem = (claim: ListedClaim): ClaimItem => {
  const currency = claim.currency.trim();
  return {
    number: printClaimNumber(claim.number),
    mark: markOf(claim.state, claim.outcome),
    partName: claim.partName,
    partNumber: claim.partNumber,
    serial: claim.serial,
    family: claim.family,
    symptom: claim.symptom,
    otherParty: claim.otherParty,
    lineCount: claim.lineCount,
    askedMinor: claim.askedMinor,
    currency: isCurrency(currency) ? currency : "EUR",
    filedAt: claim.filedAt?.toISOString() ?? null,
    updatedAt: claim.updatedAt.toISOString(),
    answerDueAt: claim.answerDueAt?.toISOString() ?? null,
    isClockStopped: claim.clockStoppedAt !== null,
    safetyReported: claim.safetyReported,
    holderName: claim.holderName,
    flagCount: claim.flagCount,
  };
};

export const presentList = ({ claims, total, counts }: ClaimList, page: number): ClaimItems => ({
  items: claims.map(presentItem),
  total,
  page,
  pages: Math.max(1, Math.ceil(total / PAGE_SIZE)),
  counts,
});
