import type { CreditState } from "@/lib/claims/lifecycle";
import { calendarDay, daysBetween, dayInZone } from "@/lib/kernel/calendar-day";
import { addWorkingDays, endOfWorkingDay } from "@/lib/kernel/working-time";
import { instantOn } from "../days";
import { idOf } from "../identity";
import { ASSESSORS, CLAIMANTS, PEOPLE } from "../story/people";
import { ruleOn } from "../story/rule-book";
import { answer, ask } from "./asking";
import { allocate, allocatePart, counter, issueNote, payOut, replace, waiveContest } from "./crediting";
import { decide, judgeOf, NOBODY } from "./deciding";
import { examine } from "./examining";
import { isUnsent, PLOTS, type Step } from "./plots";
import { callIn, dispatch, dispose, loseParcel, missDeadline, receive, scrapOnSite } from "./returning";
import { addRow, sceneOf, type Prepared, type Scene } from "./scene";
import { sendRevision, uploadFiles } from "./sending";
import { filled } from "./texts/texts";

const HOLD_MS = 10 * 60_000;

/** Plays a claim from its first day to where its plot leaves it. */
export function playClaim(prepared: Prepared): Scene {
  const scene = sceneOf(prepared);
  for (const step of PLOTS[scene.one.plot]) {
    scene.life.next(daysAgoOf(scene, step));
    STEPS[step.what](scene);
  }
  settleIfDue(scene);
  return scene;
}

/** As the product's clock would have done: where nothing is owed and nobody may contest any more. */
function settleIfDue(scene: Scene): void {
  const { life, lines, dueOn, world } = scene;
  const isOver = dueOn !== null && daysBetween(calendarDay(dueOn), world.today) > 1;
  const isClosed = lines.every(({ creditState }) => CLOSED.includes(creditState));
  if (life.state !== "decided" || !isOver || !isClosed) return;
  life.next(daysAgoOf(scene, { what: "settle", after: "whenDue" }));
  settle(scene);
}

const CLOSED: readonly CreditState[] = ["none", "allocated", "paidOut", "replaced"];

function daysAgoOf({ one, dueOn, world }: Scene, { after }: Step): number {
  if (after === "yesterday") return 1;
  if (after !== "whenDue") return Math.max(1, one.filedDaysAgo - after);
  if (dueOn === null) throw new RangeError(`${one.number} waits for a day no rule has set`);
  const daysAgo = daysBetween(calendarDay(dueOn), world.today) - 1;
  if (daysAgo < 1) throw new RangeError(`${one.number} is not due before today`);
  return daysAgo;
}

const claimant = ({ one }: Scene) => CLAIMANTS[one.workshop];

const STEPS: Readonly<Record<Step["what"], (scene: Scene) => void>> = {
  start,
  file,
  take,
  park,
  ask,
  answer,
  decide,
  settle,
  callIn,
  scrapOnSite,
  dispatch,
  receive,
  examine,
  missDeadline,
  loseParcel,
  dispose,
  issueNote,
  allocate,
  allocatePart,
  payOut,
  replace,
  counter,
  waiveContest,
  discard: (scene) => scene.life.move("discard", claimant(scene).starts, {}),
  putBack: (scene) => {
    Object.assign(scene.fields, NOBODY);
    scene.life.move("putBack", judgeOf(scene), { reason: scene.seller.putBack });
  },
  contest: (scene) => {
    const reason = filled(scene.workshop.contest, { minutes: String(scene.one.faultAfterMinutes) });
    scene.life.move("contest", claimant(scene).contests, { reason });
    scene.fields["answerDueAt"] = answerDueAt(scene);
  },
  withdraw: (scene) => {
    Object.assign(scene.fields, NOBODY);
    scene.life.move("withdraw", claimant(scene).starts, { reason: scene.workshop.withdraw });
  },
  lapse: (scene) => {
    Object.assign(scene.fields, NOBODY);
    scene.life.move("lapse", null, { answerBy: scene.dueOn });
  },
};

function start(scene: Scene): void {
  const { life, one, fields } = scene;
  Object.assign(fields, { createdAt: life.lastAt, createdById: PEOPLE[claimant(scene).starts].id });
  if (!isUnsent(one.plot)) return;
  life.next(one.filedDaysAgo);
  uploadFiles(scene, "first");
}

function file(scene: Scene): void {
  const { life, fields } = scene;
  sendRevision(scene);
  Object.assign(fields, { filedAt: life.lastAt, filedOn: life.lastOn, answerDueAt: answerDueAt(scene) });
  const incident = scene.sent.some(({ facts }) => facts.incident !== null);
  life.move("file", claimant(scene).starts, { revision: 1, incident });
  for (const flag of scene.flags) {
    const id = idOf("flag", life.claimId, flag.kind);
    addRow(scene, "claimFlags", { id, claimId: life.claimId, ...life.parties, ...flag, at: life.lastAt });
  }
}

function answerDueAt({ one, life, world }: Scene): Date {
  const on = dayInZone(life.lastAt, "UTC");
  const { calendar, answerWorkingDays } = ruleOn(world.ruleBook, {
    seller: one.seller,
    kind: "serviceLevels",
    on,
  }).body;
  const dueOn = addWorkingDays(calendar, dayInZone(life.lastAt, calendar.timeZone), answerWorkingDays);
  return endOfWorkingDay(calendar, dueOn);
}

/** Held for ten minutes; where the story shows a claim in somebody's hands, until the evening of its day. */
function take(scene: Scene): void {
  const { one, life, world, fields } = scene;
  const judge = judgeOf(scene);
  const evening = instantOn(world.today, "18:00", life.sellerZone);
  const heldUntil = one.plot === "held" ? evening : new Date(life.lastAt.getTime() + HOLD_MS);
  Object.assign(fields, { holderId: PEOPLE[judge].id, heldUntil });
  life.move("take", judge, {});
}

function park(scene: Scene): void {
  const { one, seller, life, fields } = scene;
  const colleague = PEOPLE[ASSESSORS[one.seller].second];
  const question = one.twist === "chainSecond" ? seller.parkChain : seller.park;
  Object.assign(fields, { parkedWithId: colleague.id, parkedQuestion: question });
  life.write({
    kind: "parked",
    by: judgeOf(scene),
    detail: { colleague: colleague.name, question },
    onlyFor: one.seller,
  });
}

/** The credit of every line is closed, and the days to contest are over or given up. */
function settle({ life }: Scene): void {
  life.move("settle", null, {});
}
