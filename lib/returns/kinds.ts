/** What the bench may find. Each has a sentence under `returns.findings`. */
export const FINDING_KINDS = [
  "faultConfirmed",
  "otherFault",
  "noFaultFound",
  "notTheUnit",
  "damagedOnTheWay",
  "notTestable",
] as const;
export type FindingKind = (typeof FINDING_KINDS)[number];

/** Where a part ends after the bench. */
export const DISPOSALS = ["kept", "scrapped", "sentToMaker", "sentBack"] as const;
export type Disposal = (typeof DISPOSALS)[number];

/** How a parcel looked when it was opened. */
export const PARCEL_CONDITIONS = ["sound", "damaged", "wet", "leaking"] as const;
export type ParcelCondition = (typeof PARCEL_CONDITIONS)[number];

/** What a battery may show; one of them keeps it out of the ordinary way. */
export const DANGER_SIGNS = ["swollen", "wet", "leaking", "hot"] as const;
export type DangerSign = (typeof DANGER_SIGNS)[number];
