import { useTranslations } from "next-intl";
import { Fact } from "@/components/ui/facts";
import { Serial } from "@/components/ui/serial";
import type { ClaimDraft } from "@/lib/claims/draft";
import type { Currency } from "@/lib/kernel/currency";
import type { PartFamily } from "@/lib/parts/family";
import type { EvidenceRow } from "@/lib/rule-book/evidence-list-shape";
import { CheckCard, Given } from "./check-card";
import { CheckLine } from "./check-line";

type CheckFactsProps = {
  number: string;
  draft: ClaimDraft;
  family: PartFamily;
  lines: readonly ({ part: { name: string; number: string } } | null)[];
  evidence: readonly { rowId: string; originalName: string }[];
  rows: readonly EvidenceRow[];
  currency: Currency;
};

/** Everything that goes out, read once more; each card leads back to its page in one press. */
export function CheckFacts(props: CheckFactsProps) {
  return (
    <>
      <PartFacts {...props} />
      <FaultFacts {...props} />
      <EvidenceFacts {...props} />
    </>
  );
}

function PartFacts({ number, draft, lines }: CheckFactsProps) {
  const t = useTranslations("draft");
  return (
    <CheckCard number={number} step="part">
      {draft.lines.map((line, place) => (
        <Fact key={line.unitId ?? place} term={lines[place]?.part.name ?? t("line.unknownPart")}>
          <CheckLine line={line} />
        </Fact>
      ))}
      <Fact term={t("vehicle.frameSerial")}>
        <Given>{draft.frameSerial && <Serial value={draft.frameSerial} />}</Given>
      </Fact>
      <Fact term={t("vehicle.repairedOn")}>
        <Given>{draft.repairedOn}</Given>
      </Fact>
    </CheckCard>
  );
}

function FaultFacts({ number, draft, family, currency }: CheckFactsProps) {
  const t = useTranslations("draft");
  const words = useTranslations("families");
  const symptom = family.symptoms.find(({ code }) => code === draft.symptom);
  const ruledOut = Object.keys(draft.ruledOut)
    .filter((item) => family.ruledOut.includes(item))
    .map((item) => words(`${family.code}.ruledOut.${item}`))
    .join("; ");
  return (
    <CheckCard number={number} step="fault">
      <Fact term={t("fault.symptom")}>
        <Given>{symptom && words(`${family.code}.symptoms.${symptom.code}`)}</Given>
      </Fact>
      <Fact term={t("fault.failedOn")}>
        <Given>{draft.failedOn}</Given>
      </Fact>
      <Fact term={t("fault.note")}>
        <Given>{draft.note}</Given>
      </Fact>
      <Fact term={t("exclusion.ruledOutTitle")}>
        <Given>{ruledOut}</Given>
      </Fact>
      <Fact term={t("exclusion.earlierWork")}>
        <Given>{draft.earlierWork}</Given>
      </Fact>
      <Fact term={t("asked.title")}>
        <Given>{hasAsked(draft) && <AskedInShort draft={draft} currency={currency} />}</Given>
      </Fact>
      <Fact term={t("fault.incident")}>
        <Given>{draft.incident && t(`fault.${draft.incident}`)}</Given>
      </Fact>
    </CheckCard>
  );
}

const ASKED = ["diagnosisAsked", "consumablesAsked", "carriageAsked"] as const;

const hasAsked = (draft: ClaimDraft): boolean =>
  Boolean(draft.labourMinutes) || ASKED.some((field) => Boolean(draft[field]));

/** What is asked for besides the part, as it was typed, one cost a line. */
function AskedInShort({ draft, currency }: Pick<CheckFactsProps, "draft" | "currency">) {
  const t = useTranslations("draft.asked");
  return (
    <ul>
      {draft.labourMinutes ? <li>{t("labourShort", { minutes: draft.labourMinutes })}</li> : null}
      {ASKED.filter((field) => draft[field]).map((field) => (
        <li key={field}>{t("amountShort", { what: t(field), currency, amount: draft[field] })}</li>
      ))}
    </ul>
  );
}

function EvidenceFacts({ number, draft, evidence, rows }: CheckFactsProps) {
  const t = useTranslations("draft.check");
  const words = useTranslations("evidence.rows");
  const namesOf = (rowId: string) =>
    evidence
      .filter((file) => file.rowId === rowId)
      .map((file) => file.originalName)
      .join(", ");
  return (
    <CheckCard number={number} step="evidence">
      {rows
        .filter((row) => row.need !== "notNeeded")
        .map(({ id }) => (
          <Fact key={id} term={words(`${id}.name`)}>
            <Given>
              {draft.readings[id]?.raw ||
                draft.answers[id] ||
                namesOf(id) ||
                (draft.cannotGet[id] && t("cannotGet", { reason: draft.cannotGet[id] ?? "" }))}
            </Given>
          </Fact>
        ))}
    </CheckCard>
  );
}
