/** What a person can be told of on a claim. Each has a sentence in `messages/<locale>/alerts.json`, under `kinds`. */
export const ALERT_KINDS = [
  "claimFiled",
  "queryAsked",
  "queryReminder",
  "queryAnswered",
  "claimLapsed",
  "claimDecided",
  "partCalledIn",
  "partExamined",
] as const;

/** A kind this version has no sentence for is `other`: there is news, and the claim says which. */
export type AlertKind = (typeof ALERT_KINDS)[number] | "other";

/** The kind as far as there is a sentence for it. */
export const alertKind = (kind: string): AlertKind => ALERT_KINDS.find((one) => one === kind) ?? "other";
