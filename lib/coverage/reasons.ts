/**
 * Every reason a coverage answer can give: what it does to the answer, and the values its sentence speaks of
 * (`coverage.reasons` in the message files). One that blocks makes it `outside`, one that opens leaves it `open`.
 */
export const REASONS = {
  notShipped: { effect: "blocks", detail: ["serial"] },
  shippedToAnother: { effect: "blocks", detail: [] },
  creditedInFull: { effect: "blocks", detail: ["claimNumber"] },
  heldByAnotherClaim: { effect: "blocks", detail: ["claimNumber"] },
  failureBeforeFitting: { effect: "blocks", detail: ["failedOn", "fittedOn"] },
  failureBeforeShipment: { effect: "blocks", detail: ["failedOn", "shippedOn"] },
  failureInFuture: { effect: "blocks", detail: ["failedOn"] },
  fittingInFuture: { effect: "blocks", detail: ["fittedOn"] },
  termOver: { effect: "blocks", detail: ["lastCoveredOn", "daysOver"] },
  termOverAtLatest: { effect: "blocks", detail: ["lastCoveredOn", "daysOver"] },
  filedLate: { effect: "blocks", detail: ["daysToFiling", "filingLimitDays"] },
  shipmentUnknown: { effect: "opens", detail: [] },
  termsMissing: { effect: "opens", detail: ["shippedOn"] },
  fittingMissing: { effect: "opens", detail: [] },
  fittingBeforeShipment: { effect: "opens", detail: ["fittedOn", "shippedOn"] },
  failureBeforeChain: { effect: "opens", detail: ["failedOn", "startOn"] },
  lateReasonMissing: { effect: "opens", detail: ["daysToFiling", "filingLimitDays"] },
  priceUnknown: { effect: "opens", detail: [] },
  evidenceMissing: { effect: "opens", detail: ["missing"] },
  inTerm: { effect: "notes", detail: ["lastCoveredOn", "daysLeft"] },
  withinGrace: { effect: "notes", detail: ["graceLastOn"] },
  coverOfReplacement: { effect: "notes", detail: [] },
  shippedToOtherSite: { effect: "notes", detail: [] },
  transferred: { effect: "notes", detail: [] },
  filedLateReduced: { effect: "notes", detail: ["daysToFiling", "filingLimitDays", "fraction"] },
  filedLateAccepted: { effect: "notes", detail: ["daysToFiling", "filingLimitDays"] },
  priceFromList: { effect: "notes", detail: [] },
  priceTyped: { effect: "notes", detail: [] },
} as const satisfies Record<string, { effect: "blocks" | "opens" | "notes"; detail: readonly string[] }>;

export type ReasonCode = keyof typeof REASONS;
type DetailOf<Code extends ReasonCode> = Readonly<
  Record<(typeof REASONS)[Code]["detail"][number], string | number>
>;

export type CoverageReason = {
  readonly code: ReasonCode;
  readonly effect: "blocks" | "opens" | "notes";
  readonly detail: Readonly<Record<string, string | number>>;
};

/** A reason with exactly the values its sentence needs. */
export const reason = <Code extends ReasonCode>(code: Code, detail: DetailOf<Code>): CoverageReason => ({
  code,
  effect: REASONS[code].effect,
  detail,
});
