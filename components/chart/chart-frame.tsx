import { useTranslations } from "next-intl";
import type { ReactNode } from "react";
import { Glyph } from "@/components/ui/glyph";

type ChartFrameProps = {
  /** What the chart says, as a sentence. */
  headline: ReactNode;
  headingLevel?: 2 | 3 | 4;
  /** What was counted, and how the switches stood; also what an export says. */
  counted: ReactNode;
  /** The drawing, with its own `role="img"` and name. */
  children: ReactNode;
  /** The same numbers as a table. */
  table: ReactNode;
  /** Links that take it along: picture, figures. */
  download?: ReactNode;
};

/** Round every chart: the sentence, the table before the drawing, the drawing, what was counted, the way to take it along. */
export function ChartFrame({
  headline,
  headingLevel = 2,
  counted,
  children,
  table,
  download,
}: ChartFrameProps) {
  const t = useTranslations("ui.chart");
  const Heading = `h${headingLevel}` as const;
  return (
    <figure className="grid min-w-0 gap-3 print:break-inside-avoid">
      <figcaption>
        <Heading className="text-20">{headline}</Heading>
      </figcaption>
      <details className="group">
        <summary className="flex min-h-target w-fit list-none items-center gap-1.5 text-small font-semibold text-petrol hover:text-petrol-deep [&::-webkit-details-marker]:hidden">
          <Glyph name="down" className="-rotate-90 group-open:rotate-0" />
          {t("showAsTable")}
        </summary>
        <div className="mt-2 mb-3">{table}</div>
      </details>
      <div className="min-w-0 overflow-x-auto">{children}</div>
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-2 border-t border-rule pt-2 text-small text-ink-2">
        <p className="max-w-measure">
          <span className="font-semibold">{t("counted")}</span> {counted}
        </p>
        {download ? <div className="flex flex-wrap gap-4 print:hidden">{download}</div> : null}
      </div>
    </figure>
  );
}
