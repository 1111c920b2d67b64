import { FAMILIES } from "@/lib/parts/families";
import { symptomOf } from "@/lib/parts/family";
import type { FindingKind } from "@/lib/returns/kinds";
import type { Case } from "./case";
import { isContested } from "./plots";

/** What the bench finds on a claim, and how many minutes it ran the part; null where it did not run. */
type Found = { readonly kind: FindingKind; readonly runMinutes: number | null };

/** The first brakes of the bad batch were on the bench for ten minutes, which proves nothing of a fault that shows hot. */
const MINUTES_OF_A_COLD_RUN = 10;
const LEAST_MINUTES_WITHOUT_FAULT = 48;
const LOGS_KEPT_DAYS = 75;

const isHeatFault = ({ family, symptom }: Pick<Case, "family" | "symptom">): boolean =>
  symptomOf(FAMILIES[family], symptom)?.heatFault ?? false;

/** What the story lets the bench find the first or the second time. */
export function foundOn(one: Case, round: number): Found {
  if (one.twist === "otherUnitSent") return { kind: "notTheUnit", runMinutes: null };
  if (one.twist === "parcelWet") return { kind: "damagedOnTheWay", runMinutes: null };
  if (one.twist === "fittingFault") return { kind: "otherFault", runMinutes: null };
  const isCold = (isContested(one.plot) && round === 1) || isUnproven(one);
  if (isCold && one.twist === "badCoil") return { kind: "notTestable", runMinutes: MINUTES_OF_A_COLD_RUN };
  if (isCold)
    return {
      kind: "noFaultFound",
      runMinutes: Math.max(LEAST_MINUTES_WITHOUT_FAULT, one.faultAfterMinutes + 5),
    };
  return { kind: "faultConfirmed", runMinutes: isHeatFault(one) ? one.faultAfterMinutes + 2 : null };
}

const isUnproven = ({ plot }: Case): boolean => plot === "refused" || plot === "settledUnproven";

/** Whether the bench leaves a run log of its own. */
export const hasBenchLog = (one: Case, rounds: number): boolean => {
  const { kind, runMinutes } = foundOn(one, rounds);
  const isKept = !one.isMinor || one.filedDaysAgo < LOGS_KEPT_DAYS;
  return isKept && rounds > 0 && runMinutes !== null && kind !== "notTestable";
};
