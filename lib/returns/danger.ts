import type { PartFamily } from "@/lib/parts/family";
import type { DangerSign, ParcelCondition } from "./kinds";

/** Families whose part can be dangerous in a parcel: before anything else somebody looks for the signs. */
export const asksForDanger = (family: Pick<PartFamily, "cautions"> | null): boolean =>
  family?.cautions.includes("swollenLithium") ?? false;

/** What a parcel with such signs is written down as; sound only where there are none. */
export function conditionFrom(signs: readonly DangerSign[], seen: ParcelCondition): ParcelCondition {
  if (signs.includes("leaking")) return "leaking";
  if (signs.includes("wet")) return "wet";
  return signs.length > 0 && seen === "sound" ? "damaged" : seen;
}

/** True where the part waits apart from the others: it can be dangerous, and its parcel was not sound. */
export const isQuarantined = (
  family: Pick<PartFamily, "cautions"> | null,
  condition: ParcelCondition | null,
): boolean => asksForDanger(family) && condition !== null && condition !== "sound";
