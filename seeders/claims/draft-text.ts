import { emptyDraft, emptyLine, type ClaimDraft, type DraftLine } from "@/lib/claims/draft";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { formatDay } from "@/lib/kernel/format";
import { FAMILIES } from "@/lib/parts/families";
import { symptomOf } from "@/lib/parts/family";
import { workingDayAgo } from "../days";
import { ORGANISATIONS } from "../story/organisations";
import type { Chance } from "../random";
import type { World } from "../story/world";
import type { Case, CaseLine } from "./case";
import { isUnsent } from "./plots";
import { typedReading } from "./readings";
import type { RowAnswer, RowsAsked } from "./rows-asked";
import { filled, type StoryTexts } from "./texts/texts";
import { textsFor } from "./texts/texts-for";

type Writing = {
  readonly one: Case;
  readonly world: World;
  readonly texts: StoryTexts;
  readonly draw: Chance;
};

/** What the workshop had typed when it sent the claim for the first or the second time; for a draft, so far. */
export function draftText(
  one: Case,
  { asked, world, chance }: { asked: RowsAsked; world: World; chance: Chance },
  sending: 1 | 2,
): ClaimDraft {
  const writing: Writing = {
    one,
    world,
    texts: textsFor(one.workshop),
    draw: chance.fork(`draft ${one.key}`),
  };
  const common: ClaimDraft = {
    ...emptyDraft(),
    lines: one.lines.map((line) => typedLine(line, one, world)),
    frameSerial: one.vehicle.frameSerial,
    vehicleModel: one.vehicle.model,
    symptom: one.symptom,
    note: noteOf(writing),
    failedOn: typedDay(workingDayAgo(world.today, one.failedDaysAgo), one),
    ...rowsTyped(asked.answers, writing, sending),
  };
  return isUnsent(one.plot) ? common : { ...common, ...checksTyped(writing), ...askedTyped(writing) };
}

type Asked = Pick<ClaimDraft, "labourMinutes" | "diagnosisAsked" | "consumablesAsked" | "carriageAsked">;

const SHARE_ASKING_LABOUR = 0.55;
const SHARE_ASKING_CARRIAGE = 0.25;

/** What is asked besides the part: labour by most, the carriage of the part by some, diagnosis and grease by few. */
function askedTyped({ one, draw: drawn }: Writing): Asked {
  const draw = drawn.fork("asked");
  const decimals = ORGANISATIONS[one.workshop].language === "de" ? "," : ".";
  const amount = (share: number, from: number, to: number): string => {
    const minor = draw.whole(from, to) * 10;
    return draw.happens(share) ? (minor / 100).toFixed(2).replace(".", decimals) : "";
  };
  const minutes = draw.pick([30, 45, 45, 60, 75, 90]);
  return {
    labourMinutes: draw.happens(SHARE_ASKING_LABOUR) ? String(minutes) : "",
    diagnosisAsked: amount(SHARE_ASKING_CARRIAGE / 2, 120, 380),
    consumablesAsked: amount(SHARE_ASKING_CARRIAGE / 2, 20, 60),
    carriageAsked: amount(SHARE_ASKING_CARRIAGE, 60, 140),
  };
}

/** A day as the people of the workshop write it. */
const typedDay = (day: CalendarDay, one: Case): string =>
  formatDay(day, ORGANISATIONS[one.workshop].language);

function typedLine(line: CaseLine, one: Case, { today }: World): DraftLine {
  const replacedOn = line.replacement ? typedDay(workingDayAgo(today, one.repairedDaysAgo), one) : "";
  return {
    ...emptyLine(),
    serial: line.serialTyped,
    unitId: line.unit?.id ?? null,
    partId: line.part.id,
    invoiceLineId: line.sale?.id ?? null,
    quantity: String(line.quantity),
    position: line.position,
    fittedOn: line.fittedDaysAgo === null ? "" : typedDay(workingDayAgo(today, line.fittedDaysAgo), one),
    installer: line.installer?.name ?? "",
    replacementSerial: line.replacement?.serial ?? "",
    replacementFittedOn: replacedOn,
  };
}

const noteOf = ({ one, texts, draw }: Writing): string =>
  filled(draw.pick(texts.notes[one.family][one.symptom] ?? [""]), { minutes: String(one.faultAfterMinutes) });

type RowTexts = Pick<ClaimDraft, "readings" | "answers" | "cannotGet">;

function rowsTyped(answers: readonly RowAnswer[], writing: Writing, sending: 1 | 2): RowTexts {
  const { one, texts, draw } = writing;
  const out: RowTexts = { readings: {}, answers: {}, cannotGet: {} };
  for (const { row, how } of answers) {
    const isLeftOut = how === "never" || (how === "second" && sending === 1);
    if (isLeftOut || how === "excused")
      out.cannotGet[row.id] = isLeftOut ? texts.leftOut : draw.pick(texts.cannotGet);
    else if (row.readingKind) out.readings[row.id] = typedReading(row.readingKind, one, draw);
    else if (row.accepts === "answer") out.answers[row.id] = answerOf(row.id, writing);
  }
  return out;
}

function answerOf(rowId: string, { one, texts, draw }: Writing): string {
  if (one.twist === "fittingFault" && rowId === "wheelFixing") return texts.looseNut;
  return draw.pick(texts.answers[rowId] ?? [texts.otherAnswer]);
}

type Checks = Pick<
  ClaimDraft,
  | "repairedOn"
  | "ruledOut"
  | "condition"
  | "conditionNote"
  | "swapMinutes"
  | "swapHeat"
  | "testDrive"
  | "incident"
  | "incidentNote"
>;

const RULED_OUT_AT_LEAST = 3;

/** What a person fills in before sending: what was ruled out, the condition as found, the swap, an incident. */
function checksTyped({ one, world, texts, draw }: Writing): Checks {
  const family = FAMILIES[one.family];
  const isFitting = one.twist === "fittingFault";
  const ruledOut = draw.shuffled(family.ruledOut).slice(0, RULED_OUT_AT_LEAST + draw.whole(0, 1));
  const isSwapped = one.lines.some((line) => line.replacement !== null);
  const isReportable = symptomOf(family, one.symptom)?.mayBeReportable ?? false;
  return {
    repairedOn: typedDay(workingDayAgo(world.today, one.repairedDaysAgo), one),
    ruledOut: Object.fromEntries(ruledOut.map((item) => [item, draw.pick(texts.ruledOut)])),
    condition: Object.fromEntries(
      family.conditionAsFound.map(
        (item) => [item, isFitting && item === "keyOutOfSeat" ? "yes" : "no"] as const,
      ),
    ),
    conditionNote: isFitting ? texts.keyOutOfSeat : "",
    swapMinutes: isSwapped ? String(draw.whole(6, 20)) : "",
    swapHeat: isSwapped ? "no" : "",
    testDrive: isSwapped ? "yes" : "",
    incident: isReportable ? "yes" : "no",
    incidentNote: isReportable ? texts.incident : "",
  };
}
