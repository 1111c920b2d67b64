import type { AlertKind } from "./kinds";

/** One alert as its list shows it. `values` are the placeholders of its sentence, days in the reader's language. */
export type AlertView = {
  readonly id: string;
  readonly kind: AlertKind;
  /** As it is written: `4107-3826`. */
  readonly number: string;
  readonly values: Readonly<Record<string, string | number>>;
  /** ISO 8601, UTC. */
  readonly at: string;
  readonly isUnread: boolean;
};

/** A page of alerts, newest first; `total` counts the list to its end, at most `LISTED_TO`. */
export type AlertPage = {
  readonly alerts: readonly AlertView[];
  readonly total: number;
  readonly pages: number;
};
