import { completeness } from "@/lib/evidence/completeness";
import { readReading } from "@/lib/evidence/reading";
import type { Currency } from "@/lib/kernel/currency";
import { isAfter, isBefore, type CalendarDay } from "@/lib/kernel/calendar-day";
import type { Locale } from "@/lib/kernel/locale";
import { readTypedDay } from "@/lib/kernel/typed-day";
import { readingKindOf, symptomOf, type PartFamily } from "@/lib/parts/family";
import type { EvidenceRow } from "@/lib/rule-book/evidence-list-shape";
import type { ClaimDraft, DraftLine } from "../draft";
import type { AskedBesides, ClaimFacts, FactLine } from "../facts-shape";
import { givenByRow, type Given } from "../given";
import type { DraftStep } from "../paths";
import { readAsked } from "./read-asked";

/** What the database knows about a line: found by the ids in the draft, never by what was typed. */
export type FoundLine = Pick<FactLine, "part" | "unit" | "invoiceLine" | "installer"> & {
  readonly replacementUnitId: string | null;
};

export type DraftContext = {
  /** Today at the workshop, and the filing day in the distributor's zone. */
  readonly today: CalendarDay;
  readonly filedOn: CalendarDay;
  readonly locale: Locale;
  readonly currency: Currency;
  readonly family: PartFamily;
  readonly rows: readonly EvidenceRow[];
  readonly evidenceListId: string | null;
  /** One for each line of the draft; null where no part was found. */
  readonly lines: readonly (FoundLine | null)[];
  readonly evidence: ClaimFacts["evidence"];
};

/** One thing that stops a claim from being sent: its field, the page it stands on, and the sentence's code. */
export type DraftProblem = {
  readonly step: DraftStep;
  readonly field: string;
  readonly code: string;
  readonly detail: Readonly<Record<string, string | number>>;
};

type Reading = ClaimFacts["readings"][number];

const QUANTITY = /^[1-9]\d{0,4}$/u;
const NUMBER = /^\d{1,4}([.,]\d{1,2})?$/u;

type Place = Pick<DraftProblem, "step" | "field">;

/** Collects every problem, not only the first, so that a person sees at once all there is to do. */
class Problems {
  readonly list: DraftProblem[] = [];

  add(at: Place, code: string, detail: DraftProblem["detail"] = {}): null {
    this.list.push({ ...at, code, detail });
    return null;
  }
}

/** What a field is read against, and where its problem goes. */
type Reader = { readonly context: DraftContext; readonly problems: Problems };

/**
 * Reads a draft into the facts that are sent. Returns facts where nothing stops it, and in any case the whole list of
 * problems, each at its field. Soft doubts (an odd reading) are not problems: they never stop a claim.
 */
export function readDraft(
  draft: ClaimDraft,
  context: DraftContext,
): { facts: ClaimFacts | null; problems: DraftProblem[] } {
  const problems = new Problems();
  const reading = { context, problems };
  const failedOn =
    readPastDay(draft.failedOn, { step: "fault", field: "failedOn" }, reading) ??
    missingDay(draft.failedOn, problems);
  const repairedOn = readPastDay(draft.repairedOn, { step: "part", field: "repairedOn" }, reading);
  const lines = draft.lines.map((line, index) => readLine(line, index, { ...reading, failedOn }));
  const readings = readReadings(draft, context, problems);
  if (!symptomOf(context.family, draft.symptom))
    problems.add({ step: "fault", field: "symptom" }, "symptomMissing");
  if (draft.frameSerial.trim() === "")
    problems.add({ step: "part", field: "frameSerial" }, "frameSerialMissing");
  if (lines.length === 0) problems.add({ step: "part", field: "serial" }, "lineMissing");
  const given = givenIn(draft, readings, context);
  checkRows(given, context, problems);
  const asked = readBesides(draft, reading);

  const read = lines.filter((line) => line !== null);
  if (problems.list.length > 0 || failedOn === null) return { facts: null, problems: problems.list };
  return {
    facts: factsOf(draft, context, { failedOn, repairedOn, lines: read, given, asked }),
    problems: [],
  };
}

const missingDay = (typed: string, problems: Problems): null =>
  typed.trim() === "" ? problems.add({ step: "fault", field: "failedOn" }, "failedOnMissing") : null;

/** Null for an empty field and for a day that cannot be: the latter leaves a problem at the field. */
function readPastDay(typed: string, at: Place, { context, problems }: Reader): CalendarDay | null {
  if (typed.trim() === "") return null;
  const day = readTypedDay(typed, context.locale, context.today);
  if (day === null) return problems.add(at, "dayUnread", { typed: typed.slice(0, 40) });
  return isAfter(day, context.today) ? problems.add(at, "dayInFuture") : day;
}

function readLine(
  line: DraftLine,
  index: number,
  reading: Reader & { readonly failedOn: CalendarDay | null },
): FactLine | null {
  const { context, problems, failedOn } = reading;
  const at = (name: string): Place => ({ step: "part", field: `lines.${index}.${name}` });
  const found = context.lines[index] ?? null;
  if (!found) return problems.add(at("serial"), "partMissing");
  const fittedOn = readPastDay(line.fittedOn, at("fittedOn"), reading);
  const replacedOn = readPastDay(line.replacementFittedOn, at("replacementFittedOn"), reading);
  // A serial names one piece; the page asks how many only where there is none, and nobody else may answer it.
  const isOnePiece = found.unit !== null || line.serial.trim() !== "";
  if (!isOnePiece && !QUANTITY.test(line.quantity.trim())) problems.add(at("quantity"), "quantityUnread");
  if (fittedOn && failedOn && isBefore(failedOn, fittedOn))
    problems.add({ step: "fault", field: "failedOn" }, "failedBeforeFitting");
  const quantity = isOnePiece ? 1 : Number(line.quantity) || 1;
  return {
    lineNumber: index + 1,
    part: found.part,
    unit: found.unit,
    serialTyped: line.serial.trim() || null,
    invoiceLine: found.invoiceLine,
    quantity,
    position: line.position || "single",
    fittedOn,
    installer: found.installer,
    replacement: line.replacementSerial.trim()
      ? { serial: line.replacementSerial.trim(), unitId: found.replacementUnitId, fittedOn: replacedOn }
      : null,
    askedMinor: (BigInt(found.invoiceLine?.unitPriceMinor ?? "0") * BigInt(quantity)).toString(),
  };
}

function readReadings(draft: ClaimDraft, context: DraftContext, problems: Problems): Reading[] {
  const readings: Reading[] = [];
  for (const row of context.rows) {
    const typed = draft.readings[row.id];
    const kind = row.readingKind ? readingKindOf(context.family, row.readingKind) : null;
    if (!kind || !typed || typed.raw.trim() === "") continue;
    const value = readReading(typed.raw, kind);
    if (!value.ok) {
      problems.add({ step: "evidence", field: `readings.${row.id}` }, value.code, value.detail);
      continue;
    }
    readings.push({
      rowId: row.id,
      kind: kind.code,
      rawText: typed.raw,
      unit: value.value.canonicalUnit,
      canonicalValue: value.value.canonicalValue,
      temperatureCelsius: readTemperature(typed.temperature, `readings.${row.id}.temperature`, problems),
      instrument: typed.instrument.trim(),
    });
  }
  return readings;
}

const TEMPERATURE = {
  code: "temperature",
  dimension: "temperature",
  unit: "°C",
  temperature: "notNeeded",
} as const;

function readTemperature(typed: string, field: string, problems: Problems): number | null {
  if (typed.trim() === "") return null;
  const read = readReading(typed, TEMPERATURE);
  return read.ok
    ? read.value.canonicalValue
    : problems.add({ step: "evidence", field }, read.code, read.detail);
}

/** A row that is required is done, or says why it cannot be. A row whose reading cannot be read has its own sentence. */
function checkRows(given: Given, context: DraftContext, problems: Problems) {
  for (const { id } of completeness(context.rows, givenByRow(given)).missing) {
    const isTold = problems.list.some((problem) => problem.field.startsWith(`readings.${id}`));
    if (!isTold) problems.add({ step: "evidence", field: `rows.${id}` }, "rowToDo", { row: id });
  }
}

function readBesides(draft: ClaimDraft, { context, problems }: Reader): AskedBesides | null {
  const { asked, refused } = readAsked(draft, context.currency);
  for (const { field, code, detail } of refused) problems.add({ step: "fault", field }, code, detail);
  return asked;
}

/** The texts somebody really wrote, by the row they belong to. */
const written = (texts: Readonly<Record<string, string>>): [id: string, text: string][] =>
  Object.entries(texts).flatMap(([id, text]) => (text.trim() === "" ? [] : [[id, text.trim()]]));

const givenIn = (draft: ClaimDraft, readings: Reading[], context: DraftContext): Given => ({
  readings,
  answers: written(draft.answers).map(([rowId, text]) => ({ rowId, text })),
  cannotGet: written(draft.cannotGet).map(([rowId, reason]) => ({ rowId, reason })),
  ruledOut: Object.entries(draft.ruledOut).map(([itemId, note]) => ({ itemId, note: note.trim() })),
  swap: swapOf(draft),
  evidence: context.evidence,
});

type ReadParts = {
  failedOn: CalendarDay;
  repairedOn: CalendarDay | null;
  lines: FactLine[];
  given: Given;
  asked: AskedBesides | null;
};

function factsOf(draft: ClaimDraft, context: DraftContext, read: ReadParts): ClaimFacts {
  const { failedOn, repairedOn, lines, given, asked } = read;
  return {
    shape: 1,
    filedOn: context.filedOn,
    family: context.family.code,
    symptom: draft.symptom,
    note: draft.note.trim(),
    failedOn,
    repairedOn,
    vehicle: { frameSerial: draft.frameSerial.trim(), model: draft.vehicleModel.trim() },
    lines,
    ...given,
    condition: Object.entries(draft.condition)
      .filter(([, found]) => found !== "")
      .map(([itemId, found]) => ({ itemId, found: found === "yes" })),
    conditionNote: draft.conditionNote.trim(),
    earlierWork: draft.earlierWork.trim(),
    incident: draft.incident === "yes" ? { note: draft.incidentNote.trim() } : null,
    ...(asked ? { asked } : {}),
    evidenceListId: context.evidenceListId,
  };
}

const answerOf = (typed: "" | "yes" | "no"): boolean | null => (typed === "" ? null : typed === "yes");

function swapOf(draft: ClaimDraft): ClaimFacts["swap"] {
  const minutes = NUMBER.test(draft.swapMinutes.trim())
    ? Number(draft.swapMinutes.trim().replace(",", "."))
    : null;
  const [abnormalHeat, testDrive] = [answerOf(draft.swapHeat), answerOf(draft.testDrive)];
  return minutes === null && abnormalHeat === null && testDrive === null
    ? null
    : { minutes, abnormalHeat, testDrive };
}
