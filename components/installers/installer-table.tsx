import { useTranslations } from "next-intl";
import { TextLink } from "@/components/ui/link-button";
import { Card } from "@/components/ui/card";
import { Mark } from "@/components/ui/status-mark";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { installerRecord, standsApart, type InstallerCounts } from "@/lib/claims/installers/record";
import { formatNumber, formatPercent } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";

type InstallerItem = InstallerCounts & {
  readonly id: string;
  readonly name: string;
  readonly code: string;
  readonly leftOn: string | null;
};

const COLUMNS = ["name", "code", "early", "fitted", "found", "change"] as const;
const COUNTS = ["fitted", "found"] as const;

const allOf = (installers: readonly InstallerItem[]): InstallerCounts => ({
  fitted: installers.reduce((sum, one) => sum + one.fitted, 0),
  watched: installers.reduce((sum, one) => sum + one.watched, 0),
  early: installers.reduce((sum, one) => sum + one.early, 0),
  foundFitting: installers.reduce((sum, one) => sum + one.foundFitting, 0),
});

/** Who fits, in the order of their names: never a ranking. */
export function InstallerTable({
  installers,
  locale,
}: {
  installers: readonly InstallerItem[];
  locale: Locale;
}) {
  const t = useTranslations("installers");
  const all = allOf(installers);
  return (
    <Card isInCharge>
      <Table caption={t("caption")} isHeadSticky>
        <TableHead>
          {COLUMNS.map((column) => (
            <Th key={column} isNumeric={COUNTS.some((count) => count === column)}>
              {t(`columns.${column}`)}
            </Th>
          ))}
        </TableHead>
        <TableBody>
          {installers.map((installer) => (
            <InstallerRow key={installer.id} installer={installer} all={all} locale={locale} />
          ))}
        </TableBody>
      </Table>
    </Card>
  );
}

type RowProps = { installer: InstallerItem; all: InstallerCounts; locale: Locale };

function InstallerRow({ installer, all, locale }: RowProps) {
  const t = useTranslations("installers");
  const record = installerRecord(installer);
  const percent = (share: number) => formatPercent(share, locale, { least: 1 });
  return (
    <Row>
      <RowHead>
        {installer.name}
        {installer.leftOn ? (
          <span className="block">
            <Mark shape="slashedRing" tone="quiet" plain>
              {t("hasLeft")}
            </Mark>
          </span>
        ) : null}
      </RowHead>
      <Td label={t("columns.code")}>
        <span translate="no" className="font-mono">
          {installer.code}
        </span>
      </Td>
      <Td label={t("columns.early")}>
        {t("earlyOf", { early: installer.early, watched: installer.watched })}
        <span className="block text-small text-ink-2">
          {record.kind === "tooFew"
            ? t("tooFew", { least: record.least })
            : t("limits", {
                share: percent(record.share),
                low: percent(record.limits[0]),
                high: percent(record.limits[1]),
              })}
        </span>
        {standsApart(installer, all) ? (
          <span className="block">
            <Mark shape="openDiamond" tone="wanting">
              {t("apart")}
            </Mark>
          </span>
        ) : null}
      </Td>
      <Td label={t("columns.fitted")} isNumeric>
        {formatNumber(installer.fitted, locale)}
      </Td>
      <Td label={t("columns.found")} isNumeric>
        {installer.foundFitting}
      </Td>
      <Td>
        <TextLink href={`/installers/${installer.id}`} aria-label={t("changeOne", { name: installer.name })}>
          {t("columns.change")}
        </TextLink>
      </Td>
    </Row>
  );
}
