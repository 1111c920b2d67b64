import type { Credit } from "@/lib/credits/credit";
import { outcomeOfLines, type ReasonCode } from "@/lib/claims/verdict";
import { addDays } from "@/lib/kernel/calendar-day";
import { idOf } from "../identity";
import { ASSESSORS, PEOPLE, type PersonKey } from "../story/people";
import type { CaseLine } from "./case";
import { coverOf } from "./cover";
import { isContested, type PlotName } from "./plots";
import { addRow, lineId, type Scene } from "./scene";
import { filled } from "./texts/texts";
import { creditOf, isOwedOn, type Decided } from "./reckoning";
import { frozen } from "../frozen";
import { verdictOn } from "./verdicts";

/** Who judges: most goes to the first assessor; what she decided and was contested is heard by the other. */
export function judgeOf({ one, verdicts, draw }: Scene): PersonKey {
  const { first, second } = ASSESSORS[one.seller];
  if (verdicts > 0) return second;
  if (FOR_THE_FIRST.includes(one.plot) || isContested(one.plot) || one.twist === "chainSecond") return first;
  return draw.fork("judge").happens(SHARE_OF_THE_SECOND) ? second : first;
}

/** Claims that stay with the first assessor, because the story shows them in her hands. */
const FOR_THE_FIRST: readonly PlotName[] = ["held", "parked", "putBack"];
const SHARE_OF_THE_SECOND = 0.4;

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
  const credit = creditOf(one, decided, { world, decidedOn: life.lastOn, facts: seen.facts });
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
    credit: frozen(credit),
    creditNetMinor: String(credit.netMinor),
    creditTotalMinor: String(credit.totalMinor),
  });
  scene.given = { credit, decidedOn: life.lastOn, lines: decided.map(({ verdict }) => verdict) };
  decided.forEach((line, place) => writeLine(scene, { ...line, credit, verdictId, place }));
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

/** The assessor's words for a reason. */
export const reasonText = ({ seller }: Scene, code: ReasonCode): string => seller.reasons[code] ?? code;

/** A claim nobody holds and nobody was asked about. */
export const NOBODY = { holderId: null, heldUntil: null, parkedWithId: null, parkedQuestion: null };

function letterOf({ one, seller }: Scene, outcome: keyof Scene["seller"]["letters"], round: number): string {
  const [line] = one.lines;
  const serial = one.lines.map(({ serialTyped }) => serialTyped).join(", ");
  return filled(seller.letters[round > 1 ? "reversed" : outcome], { part: line.part.number, serial });
}

type LineToWrite = Decided & {
  readonly credit: Credit;
  readonly verdictId: string;
  readonly place: number;
};

function writeLine(scene: Scene, { covered, verdict, credit, verdictId, place }: LineToWrite): void {
  const { outcome, attribution, reasonCode } = verdict;
  const state = scene.lines[place];
  if (!state) throw new RangeError("A verdict on a line that is not there");
  const isExamined = state.returnState === "examined";
  Object.assign(state, {
    verdict: outcome,
    attribution,
    returnWaivedReason: isExamined ? null : scene.seller.waived,
    creditState: isOwedOn(credit, place + 1) ? "due" : "none",
  });
  addRow(scene, "verdictLines", {
    verdictId,
    lineId: lineId(scene, place),
    ...scene.life.parties,
    outcome,
    attribution,
    reasonCode,
    reason: reasonText(scene, reasonCode),
    ruleVersionId: covered.terms?.id ?? null,
    coverage: covered.coverage,
    returnWaivedReason: state.returnWaivedReason,
  });
}
