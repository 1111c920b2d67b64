import { getTranslations } from "next-intl/server";
import { FindingView } from "@/components/returns/finding-view";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { waitsForFinding } from "@/lib/claims/deciding/finding-waits";
import { claimPath } from "@/lib/claims/paths";
import type { LineView, SheetView } from "@/lib/claims/sheet/view";
import type { Locale } from "@/lib/kernel/locale";
import type { FindingView as Finding } from "@/lib/returns/view";

/** Said before anything is typed: which lines still wait for the bench, and the way out. */
export async function WaitsForBench({ sheet }: { sheet: SheetView }) {
  const waiting = sheet.lines.filter(({ returnState }) => waitsForFinding(returnState));
  if (waiting.length === 0) return null;
  const t = await getTranslations("returns.waits");
  return (
    <Banner
      kind="wanting"
      title={t("title")}
      actions={<TextLink href={claimPath({ number: sheet.number })}>{t("openClaim")}</TextLink>}
    >
      <ul className="grid gap-1">
        {waiting.map(({ lineNumber }) => (
          <li key={lineNumber}>{t("line", { line: lineNumber })}</li>
        ))}
      </ul>
    </Banner>
  );
}

type BenchFoundProps = {
  line: LineView;
  finding: Finding | null | undefined;
  sheet: SheetView;
  locale: Locale;
  timeZone: string;
};

/** What the bench found on a line, beside the question it answers. */
export async function BenchFound({ line, finding, sheet, locale, timeZone }: BenchFoundProps) {
  if (!finding) return null;
  const t = await getTranslations("returns.finding");
  return (
    <Card title={t("title")} note={line.partName}>
      <FindingView finding={finding} limits={sheet.limits} locale={locale} timeZone={timeZone} />
    </Card>
  );
}
