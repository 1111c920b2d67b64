import { printClaimNumber } from "./number";

/** Where a claim is read. Paths live here because a server action may only be given references, never functions of its own. */
export const claimPath = (claim: { number: string }): `/claims/${string}` =>
  `/claims/${printClaimNumber(claim.number)}`;
export const draftStepPath = (claim: { number: string }, step: DraftStep): `/claims/${string}` =>
  `${claimPath(claim)}/${step}`;

export const DRAFT_STEPS = ["part", "fault", "evidence", "check"] as const;
export type DraftStep = (typeof DRAFT_STEPS)[number];
export const isDraftStep = (text: string): text is DraftStep => DRAFT_STEPS.some((step) => step === text);
