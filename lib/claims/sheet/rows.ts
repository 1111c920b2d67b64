import { completeness } from "@/lib/evidence/completeness";
import type { EvidenceRow } from "@/lib/rule-book/evidence-list-shape";
import type { ClaimFacts } from "../facts-shape";
import { givenByRow } from "../given";
import type { EvidenceFileView, EvidenceRowView, ReadingView } from "./view";

type Shown = {
  readonly facts: ClaimFacts;
  readonly files: readonly EvidenceFileView[];
  readonly readings: readonly ReadingView[];
};

/** The Evidence list of a claim as sent: each row Done, To do or Cannot get, with what was given for it. */
export const evidenceRows = (
  list: readonly EvidenceRow[],
  { facts, files, readings }: Shown,
): EvidenceRowView[] =>
  completeness(list, givenByRow(facts)).rows.map((row) => ({
    id: row.id,
    need: row.need,
    accepts: row.accepts,
    state: row.state,
    reason: row.state === "cannotGet" ? row.reason : null,
    answer: facts.answers.find((one) => one.rowId === row.id)?.text ?? null,
    why: row.why,
    files: files.filter((file) => file.rowId === row.id),
    reading: readings.find((one) => one.rowId === row.id) ?? null,
  }));

/** How many required rows are neither done nor excused. */
export const missingRows = (rows: readonly EvidenceRowView[]): number =>
  rows.filter((row) => row.need === "required" && row.state === "toDo").length;
