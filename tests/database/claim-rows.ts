import type { ClaimState } from "@/lib/claims/lifecycle";
import { DECIDED, FILED } from "../support/build";

/** What a row in this state must carry. */
export const rowIn = (state: ClaimState) => {
  const afterVerdict: readonly ClaimState[] = ["decided", "contested", "settled"];
  if (state === "draft" || state === "discarded") return { state };
  return { ...(afterVerdict.includes(state) ? DECIDED : FILED), state };
};
