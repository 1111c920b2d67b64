import { currencyFrom } from "@/lib/kernel/currency";
import type { ClaimState, VerdictOutcome } from "../lifecycle";
import { printClaimNumber } from "../number";
import type { ClaimList, ListedClaim } from "./queries";
import { PAGE_SIZE } from "./schema";
import type { ClaimItem, ClaimItems, ClaimMark } from "./view";

// Claims decided line by line always have an outcome; one read between two writes shows as partly upheld.
const markOf = (state: ClaimState, outcome: VerdictOutcome | null): ClaimMark =>
  state === "decided" ? (outcome ?? "upheldInPart") : state;

const presentItem = (claim: ListedClaim): ClaimItem => ({
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
  currency: currencyFrom(claim.currency),
  filedAt: claim.filedAt?.toISOString() ?? null,
  updatedAt: claim.updatedAt.toISOString(),
  answerDueAt: claim.answerDueAt?.toISOString() ?? null,
  isClockStopped: claim.clockStoppedAt !== null,
  safetyReported: claim.safetyReported,
  holderName: claim.holderName,
  flagCount: claim.flagCount,
});

/** One page of a list, as it travels. */
export const presentList = ({ claims, total, counts }: ClaimList, page: number): ClaimItems => ({
  items: claims.map(presentItem),
  total,
  page,
  pages: Math.max(1, Math.ceil(total / PAGE_SIZE)),
  counts,
});
