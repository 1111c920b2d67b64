import { useTranslations } from "next-intl";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { Limits } from "@/lib/rule-book/limits-shape";

type LimitsProps = { limits: Limits; locale: Locale };
type Line = { readonly name: string; readonly usual: string; readonly source: string };

/** What is usual for each reading, both ends included, and where each figure comes from. */
export function LimitsTable({ limits, locale }: LimitsProps) {
  const t = useTranslations("ruleBook.limits");
  return (
    <div className="grid gap-4">
      <Table caption={t("caption")}>
        <TableHead>
          <Th>{t("reading")}</Th>
          <Th>{t("usual")}</Th>
          <Th>{t("source")}</Th>
        </TableHead>
        <TableBody>
          {useLines({ limits, locale }).map((line) => (
            <Row key={line.name}>
              <RowHead>{line.name}</RowHead>
              <Td label={t("usual")}>{line.usual}</Td>
              <Td label={t("source")}>{line.source}</Td>
            </Row>
          ))}
        </TableBody>
      </Table>
      {limits.insulationClass ? <p>{t("insulation", { value: limits.insulationClass })}</p> : null}
    </div>
  );
}

function useLines({ limits, locale }: LimitsProps): Line[] {
  const t = useTranslations("ruleBook.limits");
  const readings = useTranslations("ruleBook.readings");
  const figure = (value: number) => formatNumber(value, locale);
  const usual = ({ low, high, unit }: Limits["readings"][number]): string => {
    if (low !== null && high !== null) return t("between", { low: figure(low), high: figure(high), unit });
    if (low !== null) return t("atLeast", { low: figure(low), unit });
    return high === null ? t("open") : t("atMost", { high: figure(high), unit });
  };
  const { coil } = limits;
  return [
    ...limits.readings.map((one) => ({
      name: readings(one.readingKind),
      usual: usual(one),
      source: one.source,
    })),
    ...(coil
      ? [
          {
            name: t("coil"),
            usual: t("coilUsual", { rated: figure(coil.ratedOhm), share: coil.toleranceFraction }),
            source: coil.source,
          },
        ]
      : []),
    ...limits.surfaceCautions.map((caution) => ({
      name: t(`caution.${caution.grade}`),
      usual: t("fromCelsius", { value: figure(caution.fromCelsius) }),
      source: caution.source,
    })),
  ];
}
