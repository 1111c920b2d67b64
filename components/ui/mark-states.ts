import type { MarkShapeName } from "./mark-shape";
import type { Tone } from "./tone";

export type MarkStyle = { readonly shape: MarkShapeName; readonly tone: Tone };

const ended = { shape: "slashedRing", tone: "quiet" } as const;

/** Who holds the ball in a claim. The three ways to end without a verdict share one mark; their words differ. */
export const CLAIM_MARKS = {
  draft: { shape: "dashedRing", tone: "quiet" },
  filed: { shape: "arrowPlate", tone: "moving" },
  beingJudged: { shape: "halfFilledSquare", tone: "moving" },
  answerNeeded: { shape: "openDiamond", tone: "wanting" },
  upheld: { shape: "tickSquare", tone: "proven" },
  upheldInPart: { shape: "uprightHalfSquare", tone: "proven" },
  declined: { shape: "barOctagon", tone: "refused" },
  contested: { shape: "linedDiamond", tone: "wanting" },
  settled: { shape: "doubleRule", tone: "settled" },
  withdrawn: ended,
  lapsed: ended,
  discarded: ended,
} as const satisfies Record<string, MarkStyle>;

/** A row of the evidence list. */
export const EVIDENCE_MARKS = {
  done: { shape: "tickSquare", tone: "proven" },
  toDo: { shape: "dashedRing", tone: "quiet" },
  cannotGet: { shape: "barredRing", tone: "quiet" },
} as const satisfies Record<string, MarkStyle>;

/** Where the part is. Drawn plain, without wash: the claim's own mark stays the loudest on the page. */
export const PART_MARKS = {
  notNeeded: { shape: "shortBar", tone: "quiet" },
  awaited: { shape: "dashedSquare", tone: "wanting" },
  sent: { shape: "arrow", tone: "moving" },
  received: { shape: "tray", tone: "moving" },
  examined: { shape: "lens", tone: "moving" },
  disposed: { shape: "filledSquare", tone: "settled" },
  scrapOnSite: { shape: "crossedSquare", tone: "quiet" },
  notSent: { shape: "slashedSquare", tone: "refused" },
  missing: { shape: "corners", tone: "refused" },
} as const satisfies Record<string, MarkStyle>;

/** Where the money is. */
export const CREDIT_MARKS = {
  none: { shape: "dot", tone: "quiet" },
  due: { shape: "ring", tone: "wanting" },
  noteIssued: { shape: "foldedSheet", tone: "moving" },
  allocated: { shape: "halfFilledRing", tone: "proven" },
  paidOut: { shape: "tickDisc", tone: "proven" },
  replaced: { shape: "swap", tone: "settled" },
  countered: { shape: "turnedArrow", tone: "refused" },
} as const satisfies Record<string, MarkStyle>;

/** How loudly a batch speaks. */
export const SIGNAL_MARKS = {
  quiet: { shape: "baseline", tone: "quiet" },
  lookInto: { shape: "openTriangle", tone: "wanting" },
  act: { shape: "triangle", tone: "refused" },
  notYetKnown: { shape: "dashedRing", tone: "quiet" },
} as const satisfies Record<string, MarkStyle>;

/** How sure a suggested match between our line and theirs is. */
export const MATCH_MARKS = {
  sure: { shape: "tickDisc", tone: "proven" },
  likely: { shape: "halfFilledRing", tone: "moving" },
  check: { shape: "openDiamond", tone: "wanting" },
} as const satisfies Record<string, MarkStyle>;
