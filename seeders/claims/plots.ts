import type { ClaimMove } from "@/lib/claims/lifecycle";

/** What happens to a part that is called in, and to one that need not come. */
type ReturnStep =
  "callIn" | "scrapOnSite" | "dispatch" | "receive" | "examine" | "missDeadline" | "loseParcel" | "dispose";
/** What happens to the credit of a verdict that gives something. */
type CreditStep =
  "issueNote" | "allocate" | "allocatePart" | "payOut" | "replace" | "counter" | "waiveContest";

/** A step of a claim's life, and on which day: so many days after it was sent, or by a clock of the rules. */
export type Step = {
  readonly what: Exclude<ClaimMove, "reopen"> | "start" | "park" | ReturnStep | CreditStep;
  /** `yesterday`: the day before the story is told. `whenDue`: the day after the date the rules set has passed. */
  readonly after: number | "yesterday" | "whenDue";
};

const step = (what: Step["what"], after: Step["after"]): Step => ({ what, after });

const FILED = [step("start", 0), step("file", 0)] as const;
const TAKEN = [...FILED, step("take", 2)] as const;
const ASKED = [...TAKEN, step("ask", 2)] as const;
const CALLED_IN = [...TAKEN, step("callIn", 2)] as const;
const SENT = [...CALLED_IN, step("dispatch", 3)] as const;
const RECEIVED = [...SENT, step("receive", 5)] as const;
const EXAMINED = [...RECEIVED, step("examine", 6)] as const;
const DECIDED = [...TAKEN, step("decide", 5)] as const;
const TESTED = [...EXAMINED, step("decide", 7)] as const;
const ON_SITE = [...TAKEN, step("scrapOnSite", 4), step("decide", 5)] as const;
const QUERIED = [...ASKED, step("answer", 5), step("take", 6), step("decide", 8)] as const;
const CONTESTED = [...TESTED, step("contest", 9)] as const;
const REVERSED = [...CONTESTED, step("take", 14), step("examine", 15), step("decide", 16)] as const;

const NOTED = step("issueNote", 10);
const ALLOCATED = [NOTED, step("allocate", 17)] as const;
const PAID_OUT = [NOTED, step("payOut", 17)] as const;
const SETTLED = step("settle", "whenDue");

/** What becomes of claims: every way through the life of a claim that the story tells. */
export const PLOTS = {
  draft: [step("start", 0)],
  discarded: [step("start", 0), step("discard", 1)],
  filed: FILED,
  putBack: [...FILED, step("take", 1), step("putBack", 1)],
  answered: [...ASKED, step("answer", 5)],
  held: [...FILED, step("take", "yesterday")],
  parked: [...TAKEN, step("park", 2)],
  asked: ASKED,
  lapsed: [...ASKED, step("lapse", "whenDue")],
  withdrawn: [...FILED, step("withdraw", 3)],
  withdrawnWhenAsked: [...ASKED, step("withdraw", 7)],
  awaited: CALLED_IN,
  notSentInTime: [...CALLED_IN, step("missDeadline", "whenDue")],
  sent: SENT,
  lost: [...SENT, step("loseParcel", 14)],
  received: RECEIVED,
  examined: EXAMINED,
  decided: DECIDED,
  tested: TESTED,
  onSite: ON_SITE,
  refused: [...EXAMINED, step("decide", 12)],
  contested: CONTESTED,
  contestTaken: [...CONTESTED, step("take", "yesterday")],
  reversed: REVERSED,
  noted: [...DECIDED, NOTED],
  testedNoted: [...TESTED, NOTED, step("dispose", 12)],
  allocated: [...DECIDED, ...ALLOCATED],
  partAllocated: [...DECIDED, NOTED, step("allocatePart", 17)],
  paidOut: [...DECIDED, ...PAID_OUT],
  countered: [...DECIDED, NOTED, step("counter", 13)],
  settled: [...DECIDED, ...ALLOCATED, SETTLED],
  settledPaidOut: [...DECIDED, ...PAID_OUT, SETTLED],
  settledWaived: [...DECIDED, ...ALLOCATED, step("waiveContest", 18), step("settle", 19)],
  settledOnSite: [...ON_SITE, ...ALLOCATED, SETTLED],
  settledTested: [...TESTED, ...ALLOCATED, step("dispose", 18), SETTLED],
  settledReplaced: [...TESTED, step("replace", 9), step("dispose", 18), SETTLED],
  settledUnproven: [...TESTED, step("dispose", 18), SETTLED],
  settledQueried: [...QUERIED, ...ALLOCATED, SETTLED],
  settledReversed: [...REVERSED, step("issueNote", 19), step("allocate", 24), step("dispose", 25), SETTLED],
} as const satisfies Record<string, readonly Step[]>;

export type PlotName = keyof typeof PLOTS;

/** How often a step occurs in a plot. */
export function timesIn(plot: PlotName, what: Step["what"]): number {
  const steps: readonly Step[] = PLOTS[plot];
  return steps.filter((one) => one.what === what).length;
}

/** Plots in which the first sending leaves something out that is asked for later. */
export const isQueried = (plot: PlotName): boolean => timesIn(plot, "ask") > 0;

/** Plots whose first verdict is the one that is contested. */
export const isContested = (plot: PlotName): boolean => timesIn(plot, "contest") > 0;

/** Plots in which the workshop never sent anything. */
export const isUnsent = (plot: PlotName): boolean => plot === "draft" || plot === "discarded";
