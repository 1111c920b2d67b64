import { holdsItsUnit } from "@/lib/claims/lifecycle";
import { workingDayAgo } from "../days";
import { accountBetween } from "../story/organisations";
import type { Row, Tables } from "../tables";
import type { CaseLine } from "./case";
import { addMessages } from "./messages";
import { isUnsent } from "./plots";
import { lineId, type Scene } from "./scene";

/** The rows of a claim that has been played, its own row and lines as they stand at the end. */
export function claimRows(scene: Scene): Tables {
  const { one, life, rows } = scene;
  addMessages(scene);
  const draft = scene.draftOf(life.revision > 1 ? 2 : 1);
  return {
    ...rows,
    claims: [claimRow(scene)],
    claimDrafts: [{ claimId: life.claimId, ...life.parties, body: draft, savedAt: life.lastAt }],
    claimLines: isUnsent(one.plot) ? [] : one.lines.map((line, place) => lineRow(scene, line, place)),
    timelineEntries: life.entries,
  };
}

function claimRow({ one, life, world, fields }: Scene): Row {
  const account = accountBetween(one.seller, one.workshop);
  return {
    clockStoppedMinutes: 0,
    askedMinor: "0",
    safetyReported: false,
    incidentKnownAt: null,
    holderId: null,
    heldUntil: null,
    parkedWithId: null,
    parkedQuestion: null,
    filedAt: null,
    filedOn: null,
    answerDueAt: null,
    clockStoppedAt: null,
    queryLapsesOn: null,
    decidedAt: null,
    decidedById: null,
    contestUntil: null,
    contestWaivedAt: null,
    ...fields,
    id: life.claimId,
    number: one.number,
    ...life.parties,
    accountId: account.id,
    siteId: one.lines[0].sale?.siteId ?? null,
    state: life.state,
    outcome: life.outcome,
    family: one.family,
    symptom: isUnsent(one.plot) ? null : one.symptom,
    vehicleId: isUnsent(one.plot) ? null : one.vehicle.id,
    failedOn: isUnsent(one.plot) ? null : workingDayAgo(world.today, one.failedDaysAgo),
    currency: account.currency,
    revision: life.revision,
    lockVersion: life.updates,
    updatedAt: life.lastAt,
  };
}

function lineRow(scene: Scene, line: CaseLine, place: number): Row {
  const { life } = scene;
  const state = scene.lines[place];
  const asked = scene.sent.at(-1)?.facts.lines[place]?.askedMinor ?? "0";
  return {
    ...state,
    id: lineId(scene, place),
    claimId: life.claimId,
    ...life.parties,
    lineNumber: place + 1,
    partId: line.part.id,
    unitId: line.unit?.id ?? null,
    invoiceLineId: line.sale?.id ?? null,
    quantity: line.quantity,
    serialTyped: line.serialTyped === "" ? null : line.serialTyped,
    fittingId: line.fittingId,
    holdsUnit: line.unit !== null && holdsItsUnit(life.state, state?.verdict ?? null),
    askedMinor: asked,
  };
}
