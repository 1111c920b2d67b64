import { FAMILIES } from "@/lib/parts/families";
import { symptomOf } from "@/lib/parts/family";
import { evidenceRowsFor, type EvidenceRow } from "@/lib/rule-book/evidence-list-shape";
import { workingDayAgo } from "../days";
import type { Chance } from "../random";
import { ruleOn } from "../story/rule-book";
import type { World } from "../story/world";
import type { Case, Twist } from "./case";
import { isQueried, isUnsent, PLOTS } from "./plots";

/** What the workshop does about a row: gives it with the first sending or with the second, or says why it cannot. */
export type RowAnswer = { readonly row: EvidenceRow; readonly how: "first" | "second" | "never" | "excused" };

export type RowsAsked = {
  readonly listId: string;
  readonly rows: readonly EvidenceRow[];
  readonly answers: readonly RowAnswer[];
};

/** Rows answered by questions of their own, on another page than the list. */
const ASKED_ELSEWHERE: readonly string[] = ["ruledOut", "swapProof"];
const SHARE_EXCUSED = 0.12;
const SHARE_EXCUSED_OF_MINOR = 0.4;
const LOGS_KEPT_DAYS = 75;
const SHARE_OF_OLD_LOGS = 0.35;
const ROWS_LEFT_OUT = 2;
const ROWS_IN_A_DRAFT = 4;

/** The Evidence list a claim was filed under, and what the workshop did about each of its rows. */
export function rowsAsked(one: Case, { today, ruleBook }: World, chance: Chance): RowsAsked {
  const draw = chance.fork(`rows ${one.key}`);
  const on = workingDayAgo(today, one.filedDaysAgo);
  const rule = ruleOn(ruleBook, { seller: one.seller, kind: "evidenceList", family: one.family, on });
  const rows = evidenceRowsFor(rule.body, one.symptom);
  const wanted = rows.filter((row) => !ASKED_ELSEWHERE.includes(row.id) && isGiven(row, one, draw));
  return { listId: rule.id, rows, answers: isUnsent(one.plot) ? begun(wanted) : answered(wanted, one, draw) };
}

function isGiven(row: EvidenceRow, one: Case, draw: Chance): boolean {
  if (row.need === "required") return true;
  if (row.need === "notNeeded" || row.accepts === "document") return false;
  if (row.accepts === "photo") return one.twist === "fittingFault" && row.id === "conditionAsFound";
  if (row.accepts === "runLog") return hasLog(one, draw);
  return draw.happens(0.5);
}

/** A fault that shows only hot is logged; of the logs from before the list asked for them not all were kept. */
const hasLog = (one: Case, draw: Chance): boolean => {
  const isHeatFault = symptomOf(FAMILIES[one.family], one.symptom)?.heatFault ?? false;
  return (
    isHeatFault && (!one.isMinor || one.filedDaysAgo < LOGS_KEPT_DAYS || draw.happens(SHARE_OF_OLD_LOGS))
  );
};

const begun = (wanted: readonly EvidenceRow[]): RowAnswer[] =>
  wanted.slice(0, ROWS_IN_A_DRAFT).map((row) => ({ row, how: "first" }));

function answered(wanted: readonly EvidenceRow[], one: Case, draw: Chance): RowAnswer[] {
  const isAnswered = PLOTS[one.plot].some(({ what }) => what === "answer");
  // The label comes first in every list, and nobody leaves it out.
  const open = wanted.slice(1).filter((row) => row.accepts === "photo" || row.accepts === "reading");
  const leftOut = isQueried(one.plot) ? draw.shuffled(open).slice(0, ROWS_LEFT_OUT) : [];
  const share = one.isMinor ? SHARE_EXCUSED_OF_MINOR : SHARE_EXCUSED;
  return wanted.map((row, place): RowAnswer => {
    if (leftOut.includes(row)) return { row, how: isAnswered ? "second" : "never" };
    const isExcused = place > 0 && row.accepts === "photo" && isExcusable(one.twist) && draw.happens(share);
    return { row, how: isExcused ? "excused" : "first" };
  });
}

/** Claims that turn on a photo keep theirs. */
const isExcusable = (twist: Twist | null): boolean => twist === null || twist === "badCoil";
