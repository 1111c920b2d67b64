import type { ClaimMove } from "@/lib/claims/lifecycle";

/** A step of a claim's life, and on which day: so many days after it was sent, or by a clock of the rules. */
export type Step = {
  readonly what: Exclude<ClaimMove, "reopen"> | "start" | "park";
  /** `yesterday`: the day before the story is told. `whenDue`: the day after the date the rules set has passed. */
  readonly after: number | "yesterday" | "whenDue";
};

const step = (what: Step["what"], after: Step["after"]): Step => ({ what, after });

const FILED = [step("start", 0), step("file", 0)] as const;
const TAKEN = [...FILED, step("take", 2)] as const;
const ASKED = [...TAKEN, step("ask", 2)] as const;
const DECIDED = [...TAKEN, step("decide", 5)] as const;
const QUERIED = [...ASKED, step("answer", 5), step("take", 6), step("decide", 8)] as const;
const CONTESTED = [...DECIDED, step("contest", 9)] as const;

/** What becomes of claims: every way through the life of a claim that the story tells. */
export const PLOTS = {
  draft: [step("start", 0)],
  discarded: [step("start", 0), step("discard", 1)],
  filed: FILED,
  putBack: [...FILED, step("take", 1), step("putBack", 1)],
  answered: [...ASKED, step("answer", 5)],
  held: [...FILED, step("take", "yesterday")],
  parked: [...TAKEN, step("park", 2)],
  judging: TAKEN,
  asked: ASKED,
  lapsed: [...ASKED, step("lapse", "whenDue")],
  withdrawn: [...FILED, step("withdraw", 3)],
  withdrawnWhenAsked: [...ASKED, step("withdraw", 7)],
  decided: DECIDED,
  refused: [...TAKEN, step("decide", 12)],
  contested: CONTESTED,
  contestTaken: [...CONTESTED, step("take", "yesterday")],
  reversed: [...CONTESTED, step("take", 14), step("decide", 15)],
  settled: [...DECIDED, step("settle", "whenDue")],
  settledQueried: [...QUERIED, step("settle", "whenDue")],
  settledReversed: [...CONTESTED, step("take", 14), step("decide", 15), step("settle", "whenDue")],
} as const satisfies Record<string, readonly Step[]>;

export type PlotName = keyof typeof PLOTS;

/** Plots in which the first sending leaves something out that is asked for later. */
export const isQueried = (plot: PlotName): boolean => PLOTS[plot].some(({ what }) => what === "ask");

/** Plots whose first verdict is the one that is contested. */
export const isContested = (plot: PlotName): boolean => PLOTS[plot].some(({ what }) => what === "contest");

/** Plots in which the workshop never sent anything. */
export const isUnsent = (plot: PlotName): boolean => plot === "draft" || plot === "discarded";
