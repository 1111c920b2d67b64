import { useTranslations } from "next-intl";
import { TextLink } from "@/components/ui/link-button";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import type { ProblemView } from "@/lib/imports/view";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";

type ProblemTableProps = { problems: readonly ProblemView[]; locale: Locale };

function Way({ create, given }: Pick<ProblemView, "create" | "given">) {
  const t = useTranslations("imports.preview");
  if (!create) return null;
  const { pathname, query, what } = create;
  return (
    <span className="block">
      <TextLink href={{ pathname, query }}>
        {t(what === "account" ? "createAccount" : "createPart", { given })}
      </TextLink>
    </span>
  );
}

/** Every problem at its place: the line, the column, what stands there, what is wrong, and the way out. */
export function ProblemTable({ problems, locale }: ProblemTableProps) {
  const t = useTranslations("imports.preview");
  const sentence = useTranslations("imports.problems");
  return (
    <Table caption={t("problemsCaption")} isHeadSticky>
      <TableHead>
        <Th>{t("line")}</Th>
        <Th>{t("column")}</Th>
        <Th>{t("given")}</Th>
        <Th>{t("problem")}</Th>
      </TableHead>
      <TableBody>
        {problems.map((problem) => (
          <Row key={`${problem.line} ${problem.heading} ${problem.code}`}>
            <RowHead label={t("line")}>{formatNumber(problem.line, locale)}</RowHead>
            <Td label={t("column")}>{problem.heading ?? t("wholeLine")}</Td>
            <Td label={t("given")}>
              {problem.given ? (
                <span translate="no" className="font-mono break-all">
                  {problem.given}
                </span>
              ) : (
                <span className="text-ink-3">{t("nothing")}</span>
              )}
            </Td>
            <Td label={t("problem")}>
              {sentence(problem.code, { ...problem.detail })}
              <Way create={problem.create} given={problem.given} />
            </Td>
          </Row>
        ))}
      </TableBody>
    </Table>
  );
}
