import { clopperPearson, compareRates } from "@/lib/reliability/rates";

/** A failure counts as early within so many days of the fitting (computation of installers' early failures). */
export const EARLY_DAYS = 90;

/** Fewer fittings than these say nothing about a person: no share is printed. */
const LEAST_WATCHED = 10;

/** Three cases blame nobody. */
const LEAST_EARLY = 4;

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

/**
 * Whether one has surely more early failures per fitting than all others at the workshop together: four or more, and exact
 * 95 % limits of the ratio wholly above one. Worth a look together, no more.
 */
export function standsApart(one: InstallerCounts, all: InstallerCounts): boolean {
  const others = { failures: all.early - one.early, exposure: all.watched - one.watched };
  if (one.watched < LEAST_WATCHED || others.exposure < LEAST_WATCHED || one.early < LEAST_EARLY) return false;
  return compareRates({ failures: one.early, exposure: one.watched }, others, 0.95).limits[0] > 1;
}
