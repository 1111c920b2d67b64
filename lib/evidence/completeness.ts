import type { EvidenceRow } from "@/lib/rule-book/evidence-list-shape";

/** What a claim holds for a row of its evidence list. "Cannot get it" counts only with a reason. */
export type EvidenceGiven = Readonly<
  Record<string, { readonly state: "done" } | { readonly state: "cannotGet"; readonly reason: string }>
>;

export type CheckedRow = EvidenceRow &
  ({ readonly state: "done" | "toDo" } | { readonly state: "cannotGet"; readonly reason: string });

/** A row still wanted, with the sentence that says so and the one that says why an assessor needs it. */
export type MissingRow = { readonly id: string; readonly sentenceKey: string; readonly whyKey: string };

export type Completeness = {
  /** The rows of the list in its order, those not needed left out. */
  readonly rows: readonly CheckedRow[];
  /** Every required row is done, or cannot be got for a stated reason. */
  readonly complete: boolean;
  readonly missing: readonly MissingRow[];
  /** Useful rows not given: worth a word, never a block. */
  readonly worthAdding: readonly MissingRow[];
  readonly done: number;
  readonly of: number;
};

/** Sets what a claim holds against what it must show. What is given for rows the list does not have is ignored. */
export function completeness(rows: readonly EvidenceRow[], given: EvidenceGiven): Completeness {
  const checked = rows.filter((row) => row.need !== "notNeeded").map((row) => checkedRow(row, given));
  const open = checked.filter((row) => row.state === "toDo");
  const missing = open.filter((row) => row.need === "required").map(missingRow);
  return {
    rows: checked,
    complete: missing.length === 0,
    missing,
    worthAdding: open.filter((row) => row.need === "useful").map(missingRow),
    done: checked.filter((row) => row.state === "done").length,
    of: checked.length,
  };
}

function checkedRow(row: EvidenceRow, given: EvidenceGiven): CheckedRow {
  const held = Object.hasOwn(given, row.id) ? given[row.id] : undefined;
  if (held?.state === "done") return { ...row, state: "done" };
  const reason = held?.reason.trim() ?? "";
  return reason === "" ? { ...row, state: "toDo" } : { ...row, state: "cannotGet", reason };
}

const missingRow = (row: EvidenceRow): MissingRow => ({
  id: row.id,
  sentenceKey: `evidence.missing.${row.accepts}`,
  whyKey: `evidence.rows.${row.why}.why`,
});
