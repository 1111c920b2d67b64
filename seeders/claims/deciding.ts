import { outcomeOfLines } from "@/lib/claims/verdict";
import { addDays } from "@/lib/kernel/calendar-day";
import { idOf } from "../identity";
import { ASSESSORS, PEOPLE, type PersonKey } from "../story/people";
import type { CaseLine } from "./case";
import { coverOf, type Covered } from "./cover";
import { isContested } from "./plots";
import { addRow, lineId, type Scene } from "./scene";
import { filled } from "./texts/texts";
import { verdictOn, type LineVerdict } from "./verdicts";

/** Who judges now: what one assessor decided and was contested is heard by the other. */
export const judgeOf = ({ one, verdicts }: Scene): PersonKey =>
  ASSESSORS[one.seller][verdicts > 0 ? "second" : "first"];

const SHARE_WAIVED = 0.6;
const MINUTES_OF_A_COLD_RUN = 10;

/** Decides every line by the story's facts and the product's own cover, and writes verdict, lines and letter. */
export function decide(scene: Scene): void {
  const { one, life, world } = scene;
  const round = scene.verdicts + 1;
  const judge = judgeOf(scene);
  const seen = scene.sent.at(-1);
  if (!seen) throw new RangeError(`${one.number} is decided unseen`);
  const decided = one.lines.map((line) => decideLine(scene, line, round));
  const outcome = outcomeOfLines(decided.map(({ verdict }) => verdict.outcome));
  const verdictId = idOf("verdict", life.claimId, round);
  addRow(scene, "verdicts", {
    id: verdictId,
    claimId: life.claimId,
    ...life.parties,
    revision: life.revision,
    revisionSha256: seen.sha256,
    outcome,
    letter: letterOf(scene, outcome, round),
    decidedById: PEOPLE[judge].id,
    decidedAt: life.lastAt,
    reversesId: round === 1 ? null : idOf("verdict", life.claimId, round - 1),
  });
  decided.forEach((line, place) => writeLine(scene, { ...line, verdictId, place }));
  const contestDays = Math.max(
    ...decided.map(({ covered }) => covered.terms?.body.contestDays ?? DAYS_TO_CONTEST),
  );
  const contestUntil = addDays(life.lastOn, contestDays);
  scene.verdicts = round;
  scene.dueOn = contestUntil;
  life.outcome = outcome;
  Object.assign(scene.fields, {
    decidedAt: life.lastAt,
    decidedById: PEOPLE[judge].id,
    contestUntil,
    ...NOBODY,
  });
  life.move("decide", judge, { outcome, revision: life.revision, contestUntil });

  function decideLine(within: Scene, line: CaseLine, nth: number): Decided {
    const covered = coverOf(one, line, { world, on: within.life.lastOn });
    return { covered, verdict: verdictOn(one, covered.coverage, nth) };
  }
}

const DAYS_TO_CONTEST = 14;

/** A claim nobody holds and nobody was asked about. */
export const NOBODY = { holderId: null, heldUntil: null, parkedWithId: null, parkedQuestion: null };

type Decided = { readonly covered: Covered; readonly verdict: LineVerdict };

function letterOf({ one, seller }: Scene, outcome: keyof Scene["seller"]["letters"], round: number): string {
  const [line] = one.lines;
  const serial = one.lines.map(({ serialTyped }) => serialTyped).join(", ");
  return filled(seller.letters[round > 1 ? "reversed" : outcome], { part: line.part.number, serial });
}

function writeLine(
  scene: Scene,
  { covered, verdict, verdictId, place }: Decided & { verdictId: string; place: number },
): void {
  const { outcome, attribution, reasonCode } = verdict;
  const state = scene.lines[place];
  if (!state) throw new RangeError("A verdict on a line that is not there");
  const isRun =
    reasonCode === "noFaultShown" || isContested(scene.one.plot) || !scene.draw.happens(SHARE_WAIVED);
  Object.assign(state, {
    verdict: outcome,
    attribution,
    returnState: isRun ? "examined" : "notNeeded",
    finding: isRun ? findingOf(scene, reasonCode === "noFaultShown") : null,
    returnWaivedReason: isRun ? null : scene.seller.waived,
    creditState: outcome === "declined" ? "none" : "due",
  });
  addRow(scene, "verdictLines", {
    verdictId,
    lineId: lineId(scene, place),
    ...scene.life.parties,
    outcome,
    attribution,
    reasonCode,
    reason: scene.seller.reasons[reasonCode] ?? reasonCode,
    ruleVersionId: covered.terms?.id ?? null,
    coverage: covered.coverage,
    returnWaivedReason: state.returnWaivedReason,
  });
}

const findingOf = ({ one, seller }: Scene, wasCold: boolean) =>
  wasCold
    ? { faultShown: false, ranMinutes: MINUTES_OF_A_COLD_RUN, note: seller.reasons.noFaultShown ?? "" }
    : { faultShown: true, ranMinutes: one.faultAfterMinutes + 2, note: seller.finding };
