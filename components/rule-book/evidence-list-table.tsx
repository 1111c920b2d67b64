import { useTranslations } from "next-intl";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import type { EvidenceList, EvidenceRow } from "@/lib/rule-book/evidence-list-shape";

type ListProps = { list: EvidenceList; family: string | null };

/** What claims must show: the list of the family, and the lists that take its place for some symptoms. */
export function EvidenceListTable({ list, family }: ListProps) {
  const t = useTranslations("ruleBook.evidence");
  const families = useTranslations("families");
  return (
    <div className="grid gap-4">
      <RowTable caption={t("general")} rows={list.rows} />
      {list.bySymptom.map(({ symptom, rows }) => {
        const title = t("forSymptom", {
          symptom: family ? families(`${family}.symptoms.${symptom}`) : symptom,
        });
        return (
          <details key={symptom}>
            <summary className="min-h-target cursor-pointer py-2 font-semibold">{title}</summary>
            <RowTable caption={title} rows={rows} />
          </details>
        );
      })}
    </div>
  );
}

function RowTable({ caption, rows }: { caption: string; rows: readonly EvidenceRow[] }) {
  const t = useTranslations("ruleBook.evidence");
  const words = useTranslations("evidence.rows");
  return (
    <Table caption={caption}>
      <TableHead>
        <Th>{t("row")}</Th>
        <Th>{t("need")}</Th>
        <Th>{t("accepts")}</Th>
        <Th>{t("why")}</Th>
      </TableHead>
      <TableBody>
        {rows.map((row) => (
          <Row key={row.id}>
            <RowHead>{words(`${row.id}.name`)}</RowHead>
            <Td label={t("need")}>{t(`needOf.${row.need}`)}</Td>
            <Td label={t("accepts")}>{t(`acceptsOf.${row.accepts}`)}</Td>
            <Td label={t("why")}>{words(`${row.why}.why`)}</Td>
          </Row>
        ))}
      </TableBody>
    </Table>
  );
}
