import clsx from "clsx";
import { useTranslations } from "next-intl";
import { FileRow } from "@/components/evidence/file-row";
import { Card } from "@/components/ui/card";
import { ReadingField } from "@/components/ui/reading-field";
import { EvidenceMark, Mark } from "@/components/ui/status-mark";
import { TextArea } from "@/components/ui/text-area";
import { TextField } from "@/components/ui/text-field";
import type { ClaimDraft } from "@/lib/claims/draft";
import { readingKindOf, type PartFamily } from "@/lib/parts/family";
import type { EvidenceRow } from "@/lib/rule-book/evidence-list-shape";
import type { EvidenceFileItem } from "@/components/evidence/file-item";

type Sentence = { fieldId: string; text: string };
type EvidenceFieldsProps = {
  claimId: string;
  number: string;
  draft: ClaimDraft;
  family: PartFamily;
  rows: readonly EvidenceRow[];
  files: readonly EvidenceFileItem[];
  askedRows: readonly string[];
  problems: readonly Sentence[];
};

type RowProps = Omit<EvidenceFieldsProps, "rows" | "askedRows"> & { row: EvidenceRow; isAsked: boolean };

/** Rows that the page before has already answered with questions of its own. */
const isAnsweredBefore = (row: EvidenceRow, draft: ClaimDraft): boolean =>
  (row.id === "ruledOut" && Object.keys(draft.ruledOut).length > 0) ||
  (row.id === "swapProof" &&
    [draft.swapMinutes, draft.swapHeat, draft.testDrive].some((text) => text !== ""));

const stateOf = (
  row: EvidenceRow,
  draft: ClaimDraft,
  files: readonly EvidenceFileItem[],
): "done" | "toDo" | "cannotGet" => {
  const isGiven =
    isAnsweredBefore(row, draft) ||
    files.some((file) => file.rowId === row.id) ||
    (draft.readings[row.id]?.raw ?? "").trim() !== "" ||
    (draft.answers[row.id] ?? "").trim() !== "";
  if (isGiven) return "done";
  return (draft.cannotGet[row.id] ?? "").trim() === "" ? "toDo" : "cannotGet";
};

/** The Evidence list: each row says what, why, and takes it, or the reason why it cannot be had. */
export function EvidenceFields({ rows, askedRows, ...props }: EvidenceFieldsProps) {
  const t = useTranslations("draft.evidence");
  const wanted = rows.filter((row) => row.need !== "notNeeded");
  const done = wanted.filter((row) => stateOf(row, props.draft, props.files) !== "toDo").length;
  return (
    <Card isInCharge title={t("title")} note={t("count", { done, all: wanted.length })}>
      <ol className="grid">
        {wanted.map((row) => (
          <Row key={row.id} row={row} isAsked={askedRows.includes(row.id)} {...props} />
        ))}
      </ol>
    </Card>
  );
}

function Row({ row, isAsked, ...props }: RowProps) {
  const { draft, files, problems } = props;
  const t = useTranslations("draft.evidence");
  const words = useTranslations("evidence.rows");
  const problem = problems.find((one) => one.fieldId === `rows.${row.id}`);
  return (
    <li
      id={`rows.${row.id}`}
      className={clsx(
        "grid scroll-mt-6 gap-3 border-b border-rule py-5 first:pt-0 last:border-b-0",
        isAsked && "border-l-4 border-l-wanting pl-4",
      )}
    >
      <div className="flex items-baseline justify-between gap-3">
        <h3 className="min-w-0 text-18 wrap-break-word hyphens-auto">{words(`${row.id}.name`)}</h3>
        <span className="shrink-0">
          <EvidenceMark state={stateOf(row, draft, files)} />
        </span>
      </div>
      {row.need === "useful" || isAsked ? (
        <p className="-mt-2 flex flex-wrap items-center gap-x-3 text-small text-ink-2">
          {isAsked ? (
            <Mark shape="openDiamond" tone="wanting" plain>
              {t("asked")}
            </Mark>
          ) : null}
          {row.need === "useful" ? t("useful") : null}
        </p>
      ) : null}
      <p className="max-w-measure text-small text-ink-2">{words(`${row.why}.why`)}</p>
      {problem ? <p className="font-semibold text-refused">{problem.text}</p> : null}
      <RowInput row={row} {...props} />
      <details className="text-small" open={(draft.cannotGet[row.id] ?? "") !== ""}>
        <summary className="min-h-target cursor-pointer py-2 text-petrol underline underline-offset-4">
          {t("cannotGet")}
        </summary>
        <TextField
          name={`cannotGet.${row.id}`}
          label={t("cannotGetReason")}
          defaultValue={draft.cannotGet[row.id] ?? ""}
          maxLength={1000}
        />
      </details>
    </li>
  );
}

function RowInput({ row, ...props }: Omit<RowProps, "isAsked">) {
  const t = useTranslations("draft.evidence");
  const { draft, family, claimId, number, files } = props;
  if (row.accepts === "reading") return <ReadingInput row={row} {...props} />;
  if (row.accepts === "answer")
    return (
      <TextArea
        name={`answers.${row.id}`}
        label={t("answer")}
        rows={2}
        limit={1000}
        defaultValue={draft.answers[row.id] ?? ""}
      />
    );
  return (
    <FileRow
      claimId={claimId}
      number={number}
      rowId={row.id}
      kind={row.accepts}
      files={files.filter((file) => file.rowId === row.id)}
      key={`${family.code}.${row.id}`}
    />
  );
}

function ReadingInput({ row, draft, family, problems }: Omit<RowProps, "isAsked">) {
  const t = useTranslations("draft.evidence");
  const kind = row.readingKind === null ? null : readingKindOf(family, row.readingKind);
  const typed = draft.readings[row.id];
  const errorOf = (field: string) => problems.find((problem) => problem.fieldId === field)?.text;
  if (!kind) return null;
  return (
    <div className="grid gap-4 sm:grid-cols-2">
      <ReadingField
        id={`readings.${row.id}`}
        name={`readings.${row.id}.raw`}
        label={t("reading")}
        unit={kind.unit}
        defaultValue={typed?.raw ?? ""}
        error={errorOf(`readings.${row.id}`)}
        maxLength={60}
      />
      {kind.temperature === "notNeeded" ? (
        <input type="hidden" name={`readings.${row.id}.temperature`} value={typed?.temperature ?? ""} />
      ) : (
        <ReadingField
          id={`readings.${row.id}.temperature`}
          name={`readings.${row.id}.temperature`}
          label={t(kind.temperature === "copperTo20" ? "coilTemperature" : "roomTemperature")}
          unit="°C"
          defaultValue={typed?.temperature ?? ""}
          error={errorOf(`readings.${row.id}.temperature`)}
          maxLength={20}
        />
      )}
      <TextField
        name={`readings.${row.id}.instrument`}
        label={t("instrument")}
        isOptional
        defaultValue={typed?.instrument ?? ""}
        maxLength={120}
      />
    </div>
  );
}
