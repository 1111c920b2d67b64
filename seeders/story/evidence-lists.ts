import { DEFAULT_EVIDENCE_LISTS } from "@/lib/evidence/default-lists";
import type { FamilyCode } from "@/lib/parts/families";
import type { EvidenceList, EvidenceRow } from "@/lib/rule-book/evidence-list-shape";

/** The list of today: what the product offers a new Rule book. */
export const fullList = (family: FamilyCode): EvidenceList => DEFAULT_EVIDENCE_LISTS[family];

/** The list before it: the label and the readings, all else welcome. Older claims were filed under it. */
export function earlierList(family: FamilyCode): EvidenceList {
  const { rows, bySymptom } = fullList(family);
  return {
    rows: rows.map(lessWanted),
    bySymptom: bySymptom.map((list) => ({ ...list, rows: list.rows.map(lessWanted) })),
  };
}

const lessWanted = (row: EvidenceRow, place: number): EvidenceRow =>
  place === 0 || row.accepts === "reading" || row.need === "notNeeded" ? row : { ...row, need: "useful" };
