import { nestedFields } from "@/lib/kernel/nested-fields";
import type { DraftBody, DraftChange } from "./draft-shape";

/**
 * What the workshop has typed so far, kept exactly as typed: a draft is never refused, so nothing can be lost. The
 * day, number and reading it means is read when the claim is checked and sent (`filing/read-draft.ts`).
 */
export type ClaimDraft = DraftBody;
export type DraftLine = ClaimDraft["lines"][number];

/** A line before anything is typed. */
export const emptyLine = (): DraftLine => ({
  serial: "",
  unitId: null,
  partId: null,
  invoiceLineId: null,
  quantity: "1",
  position: "",
  fittedOn: "",
  installer: "",
  replacementSerial: "",
  replacementFittedOn: "",
});

/** A draft before anything is typed. */
export const emptyDraft = (): ClaimDraft => ({
  lines: [],
  frameSerial: "",
  vehicleModel: "",
  symptom: "",
  note: "",
  failedOn: "",
  repairedOn: "",
  readings: {},
  answers: {},
  cannotGet: {},
  ruledOut: {},
  condition: {},
  conditionNote: "",
  earlierWork: "",
  swapMinutes: "",
  swapHeat: "",
  testDrive: "",
  incident: "",
  incidentNote: "",
  labourMinutes: "",
  diagnosisAsked: "",
  consumablesAsked: "",
  carriageAsked: "",
});

/** Far above the rows of any list: what is sent beyond them is not kept, so that a draft cannot grow without end. */
const MOST_NAMES = 100;

const joined = <Value>(
  kept: Readonly<Record<string, Value>>,
  sent: Readonly<Record<string, Value>> = {},
): Record<string, Value> => Object.fromEntries(Object.entries({ ...kept, ...sent }).slice(0, MOST_NAMES));

/** The draft with a change applied. Pure: the same change twice is the same draft. */
export function changedDraft(draft: ClaimDraft, change: DraftChange): ClaimDraft {
  const { lines, replaces = [], readings, answers, cannotGet, ruledOut, condition, ...texts } = change;
  const base = <Map extends object>(name: "ruledOut" | "condition", map: Map) =>
    replaces.includes(name) ? {} : map;
  return {
    ...draft,
    ...texts,
    lines: draft.lines.map((line, place) => ({ ...line, ...lines?.[String(place)] })),
    readings: joined(draft.readings, readings),
    answers: joined(draft.answers, answers),
    cannotGet: joined(draft.cannotGet, cannotGet),
    ruledOut: joined(base("ruledOut", draft.ruledOut), ruledOut),
    condition: joined(base("condition", draft.condition), condition),
  };
}

/** Fields of a draft's form that are not the draft: which claim, which page, where to go next. */
const ABOUT_THE_FORM = new Set(["number", "step", "go"]);

/** What a page of a draft sent, as a change still to be checked with `draftChange`. */
export const changeFromFields = (fields: Readonly<Record<string, string | readonly string[]>>): unknown =>
  nestedFields(Object.fromEntries(Object.entries(fields).filter(([name]) => !ABOUT_THE_FORM.has(name))));
