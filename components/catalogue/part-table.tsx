import { useTranslations } from "next-intl";
import { TextLink } from "@/components/ui/link-button";
import { SheetTable } from "@/components/ui/sheet-table";
import { Row, RowHead, Td } from "@/components/ui/table";

type PartItem = {
  readonly partNumber: string;
  readonly name: string;
  readonly family: string;
  readonly maker: string;
  readonly supersededBy: string | null;
  readonly serialTracked: boolean;
};

const COLUMNS = ["number", "name", "family", "maker", "supersededBy", "tracking", "change"] as const;

/** The parts of one page; on a phone each is a list of labelled lines. */
export function PartTable({ parts }: { parts: readonly PartItem[] }) {
  const t = useTranslations("catalogue");
  return (
    <SheetTable caption={t("caption")} heads={COLUMNS.map((column) => t(`columns.${column}`))}>
      {parts.map((part) => (
        <PartRow key={part.partNumber} part={part} />
      ))}
    </SheetTable>
  );
}

function PartRow({ part }: { part: PartItem }) {
  const t = useTranslations("catalogue");
  const families = useTranslations("families");
  return (
    <Row>
      <RowHead>
        <span translate="no" className="font-mono">
          {part.partNumber}
        </span>
      </RowHead>
      <Td label={t("columns.name")}>{part.name}</Td>
      <Td label={t("columns.family")}>{families(`${part.family}.name`)}</Td>
      <Td label={t("columns.maker")}>{part.maker}</Td>
      <Td label={t("columns.supersededBy")}>
        {part.supersededBy ? (
          <span translate="no" className="font-mono">
            {part.supersededBy}
          </span>
        ) : (
          <span className="text-ink-3">{t("noSuccessor")}</span>
        )}
      </Td>
      <Td label={t("columns.tracking")}>{t(part.serialTracked ? "serial" : "counted")}</Td>
      <Td label={t("columns.change")}>
        <TextLink
          href={`/catalogue/${encodeURIComponent(part.partNumber)}/edit`}
          aria-label={t("changeOne", { number: part.partNumber })}
        >
          {t("columns.change")}
        </TextLink>
      </Td>
    </Row>
  );
}
