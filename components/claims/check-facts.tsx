import { useTranslations } from "next-intl";
import type { ReactNode } from "react";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { TextLink } from "@/components/ui/link-button";
import { Serial } from "@/components/ui/serial";
import type { ClaimDraft } from "@/lib/claims/draft";
import { draftStepPath, type DraftStep } from "@/lib/claims/paths";
import type { PartFamily } from "@/lib/parts/family";
import type { EvidenceRow } from "@/lib/rule-book/evidence-list-shape";

type CheckFactsProps = {
  number: string;
  draft: ClaimDraft;
  family: PartFamily;
  lines: readonly ({ part: { name: string; number: string } } | null)[];
  evidence: readonly { rowId: string; originalName: string }[];
  rows: readonly EvidenceRow[];
};

/** Everything that goes out, read once more; each card leads back to its page in one press. */
export function CheckFacts({ number, draft, family, lines, evidence, rows }: CheckFactsProps) {
  const t = useTranslations("draft");
  const words = useTranslations("families");
  const evidenceWords = useTranslations("evidence.rows");
  const given = (text: ReactNode) => text || <span className="text-ink-3">{t("check.notGiven")}</span>;
  const sheet = (step: DraftStep, children: ReactNode) => (
    <Card
      title={t(`steps.${step}`)}
      actions={
        <TextLink href={draftStepPath({ number }, step)}>
          {t("check.change", { step: t(`steps.${step}`) })}
        </TextLink>
      }
    >
      <Facts>{children}</Facts>
    </Card>
  );
  const symptom = family.symptoms.find(({ code }) => code === draft.symptom);
  return (
    <>
      {sheet(
        "part",
        <>
          {draft.lines.map((line, place) => (
            <Fact key={line.unitId ?? place} term={lines[place]?.part.name ?? t("line.unknownPart")}>
              {line.serial ? (
                <Serial value={line.serial} />
              ) : (
                t("check.quantity", { quantity: line.quantity })
              )}
              <span className="block text-small text-ink-2">
                {t("check.fitting", {
                  day: line.fittedOn || t("check.notGiven"),
                  by: line.installer || t("check.notGiven"),
                })}
              </span>
              {line.replacementSerial ? (
                <span className="block text-small text-ink-2">
                  {t("check.replacement", {
                    serial: line.replacementSerial,
                    day: line.replacementFittedOn || t("check.notGiven"),
                  })}
                </span>
              ) : null}
            </Fact>
          ))}
          <Fact term={t("vehicle.frameSerial")}>
            {given(draft.frameSerial && <Serial value={draft.frameSerial} />)}
          </Fact>
          <Fact term={t("vehicle.repairedOn")}>{given(draft.repairedOn)}</Fact>
        </>,
      )}
      {sheet(
        "fault",
        <>
          <Fact term={t("fault.symptom")}>
            {given(symptom && words(`${family.code}.symptoms.${symptom.code}`))}
          </Fact>
          <Fact term={t("fault.failedOn")}>{given(draft.failedOn)}</Fact>
          <Fact term={t("fault.note")}>{given(draft.note)}</Fact>
          <Fact term={t("exclusion.ruledOutTitle")}>
            {given(
              Object.keys(draft.ruledOut)
                .filter((item) => family.ruledOut.includes(item))
                .map((item) => words(`${family.code}.ruledOut.${item}`))
                .join("; "),
            )}
          </Fact>
          <Fact term={t("exclusion.earlierWork")}>{given(draft.earlierWork)}</Fact>
          <Fact term={t("fault.incident")}>{given(draft.incident && t(`fault.${draft.incident}`))}</Fact>
        </>,
      )}
      {sheet(
        "evidence",
        rows
          .filter((row) => row.need !== "notNeeded")
          .map((row) => (
            <Fact key={row.id} term={evidenceWords(`${row.id}.name`)}>
              {given(
                draft.readings[row.id]?.raw ||
                  draft.answers[row.id] ||
                  evidence
                    .filter((file) => file.rowId === row.id)
                    .map((file) => file.originalName)
                    .join(", ") ||
                  (draft.cannotGet[row.id] &&
                    t("check.cannotGet", { reason: draft.cannotGet[row.id] ?? "" })),
              )}
            </Fact>
          )),
      )}
    </>
  );
}
