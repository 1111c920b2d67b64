import { addDays } from "@/lib/kernel/calendar-day";
import { idOf } from "../identity";
import { CLAIMANTS, PEOPLE } from "../story/people";
import { ruleOn } from "../story/rule-book";
import { judgeOf, NOBODY } from "./deciding";
import { addRow, type Scene } from "./scene";
import { sendRevision } from "./sending";

const MINUTE_MS = 60_000;

const rowsLeftOut = ({ asked }: Scene): string[] =>
  asked.answers.filter(({ how }) => how === "second" || how === "never").map(({ row }) => row.id);

/** Asks the workshop once for all that was left out: its clock starts, the distributor's stops. */
export function ask(scene: Scene): void {
  const { one, life, world, seller, draw } = scene;
  const judge = judgeOf(scene);
  const terms = ruleOn(world.ruleBook, { seller: one.seller, kind: "terms", on: life.lastOn });
  const answerBy = addDays(life.lastOn, terms.body.queryLapseDays);
  const [question, rowIds] = [draw.pick(seller.question), rowsLeftOut(scene)];
  addRow(scene, "claimQueries", {
    id: idOf("query", life.claimId, 1),
    claimId: life.claimId,
    ...life.parties,
    round: 1,
    items: rowIds,
    question,
    askedById: PEOPLE[judge].id,
    askedAt: life.lastAt,
    answeredAt: null,
    answeredRevision: null,
  });
  scene.dueOn = answerBy;
  Object.assign(scene.fields, { clockStoppedAt: life.lastAt, queryLapsesOn: answerBy });
  life.move("ask", judge, { round: 1, question, rowIds, answerBy });
}

/** Sends what was asked for; the distributor's clock runs again, later by as long as it stood. */
export function answer(scene: Scene): void {
  const { life, one, fields } = scene;
  sendRevision(scene);
  const { clockStoppedAt, answerDueAt } = fields;
  const pausedMs = clockStoppedAt instanceof Date ? life.lastAt.getTime() - clockStoppedAt.getTime() : 0;
  const clockStoppedMinutes = Math.round(pausedMs / MINUTE_MS);
  scene.rows.claimQueries = (scene.rows.claimQueries ?? []).map((query) => ({
    ...query,
    answeredAt: life.lastAt,
    answeredRevision: life.revision,
  }));
  Object.assign(fields, NOBODY, {
    clockStoppedAt: null,
    clockStoppedMinutes,
    queryLapsesOn: null,
    answerDueAt:
      answerDueAt instanceof Date ? new Date(answerDueAt.getTime() + clockStoppedMinutes * MINUTE_MS) : null,
  });
  scene.dueOn = null;
  life.move("answer", CLAIMANTS[one.workshop].starts, { revision: life.revision });
}
