import { clopperPearson } from "@/lib/reliability/rates";

/** A failure counts as early within so many days of the fitting (computation of installers' early failures). */
export const EARLY_DAYS = 90;

/** Fewer fittings than these say nothing about a person: no share is printed. */
const LEAST_WATCHED = 10;

/** What is known of one installer: parts fitted, those whose first days are over or cut short by a failure, and those. */
export type InstallerCounts = {
  readonly fitted: number;
  readonly watched: number;
  readonly early: number;
  /** Fittings a verdict gave a share to. */
  readonly foundFitting: number;
};

/** Early failures per fitting with exact 95 % limits; `tooFew` where no share can fairly be printed. */
export type InstallerRecord =
  | { readonly kind: "tooFew"; readonly least: number }
  | {
      readonly kind: "share";
      readonly share: number;
      readonly limits: readonly [lower: number, upper: number];
    };

/**
 * The record of an installer, made so that nobody is blamed from three cases: a share only with its exact binomial
 * limits (Clopper and Pearson, 1934), and none at all below ten fittings watched.
 */
export function installerRecord({ watched, early }: InstallerCounts): InstallerRecord {
  if (watched < LEAST_WATCHED) return { kind: "tooFew", least: LEAST_WATCHED };
  return { kind: "share", share: early / watched, limits: clopperPearson(early, watched, 0.95) };
}

/** Whether the limits of one lie wholly above the share of all others at the workshop: worth a look together, no more. */
export function standsApart(one: InstallerCounts, all: InstallerCounts): boolean {
  const record = installerRecord(one);
  const [watched, early] = [all.watched - one.watched, all.early - one.early];
  if (record.kind === "tooFew" || watched < LEAST_WATCHED) return false;
  return record.limits[0] > early / watched;
}
