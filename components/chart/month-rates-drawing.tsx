import type { Route } from "next";
import { useTranslations } from "next-intl";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { MonthLine } from "@/lib/reports/life-curves/view";
import { monthPlot, type MonthBar, type MonthPlot } from "./month-rates-plot";
import { ChartSvg } from "./chart-svg";
import { CHART_INK, SERIES } from "./series-style";

type DrawingProps = {
  months: readonly MonthLine[];
  title: string;
  description: string;
  opens: (month: MonthLine) => Route;
  locale: Locale;
};

const SIZES = [
  {
    frame: { width: 760, height: 220, left: 60, right: 24, top: 30, lineHeight: 18 },
    className: "hidden @2xl:block max-w-4xl",
  },
  {
    frame: { width: 600, height: 210, left: 60, right: 20, top: 30, lineHeight: 18 },
    className: "hidden @lg:block @2xl:hidden",
  },
  {
    frame: { width: 360, height: 190, left: 58, right: 12, top: 30, lineHeight: 18 },
    className: "@lg:hidden max-w-lg",
  },
] as const;

/** Failures per 1,000 months in service, by the month in service they happened in; each bar opens its claims. */
export function MonthRatesDrawing(props: DrawingProps) {
  return (
    <div className="@container">
      {SIZES.map(({ frame, className }) => (
        <Drawing
          key={frame.width}
          {...props}
          plot={monthPlot(props.months, frame)}
          width={frame.width}
          className={className}
        />
      ))}
    </div>
  );
}

type Sized = DrawingProps & { plot: MonthPlot; width: number; className: string };

function Drawing({ plot, months, title, description, opens, locale, width, className }: Sized) {
  const t = useTranslations("lifeCurves.months");
  const byMonth = new Map(months.map((line) => [line.month, line]));
  return (
    <ChartSvg {...{ title, description, width, className }} height={plot.bottom + 52}>
      <Axes plot={plot} locale={locale} />
      {plot.bars.map((bar) => {
        const line = byMonth.get(bar.month);
        return line && line.failed > 0 ? (
          <a
            key={bar.month}
            href={opens(line)}
            aria-label={t("bar", {
              from: bar.month,
              to: bar.month + 1,
              failed: line.failed,
              rate: formatNumber(line.rate?.value ?? 0, locale, { least: 1, most: 1 }),
            })}
          >
            <Bar bar={bar} plot={plot} />
          </a>
        ) : (
          <Bar key={bar.month} bar={bar} plot={plot} />
        );
      })}
    </ChartSvg>
  );
}

function Bar({ bar, plot }: { bar: MonthBar; plot: MonthPlot }) {
  const { x, width, y } = bar;
  const middle = x + width / 2;
  return (
    <g>
      <rect x={x} y={plot.top} width={width} height={plot.bottom - plot.top} fill="transparent" />
      <rect x={x} y={y} width={width} height={plot.bottom - y} fill={SERIES[0].stroke} fillOpacity={0.35} />
      {bar.isEmpty ? null : (
        <path
          d={`M${middle} ${bar.lowerY}V${bar.upperY}${bar.isCut ? "" : `M${middle - 4} ${bar.upperY}h8`}M${middle - 4} ${bar.lowerY}h8`}
          stroke={SERIES[0].stroke}
          strokeWidth={1.5}
          fill="none"
        />
      )}
      {bar.othersY === null ? null : (
        <line
          x1={x - width * 0.2}
          x2={x + width * 1.2}
          y1={bar.othersY}
          y2={bar.othersY}
          stroke={CHART_INK.limit}
          strokeWidth={1.75}
        />
      )}
    </g>
  );
}

function Axes({ plot, locale }: { plot: MonthPlot; locale: Locale }) {
  const t = useTranslations("lifeCurves.months");
  return (
    <g aria-hidden="true" fill={CHART_INK.context}>
      <text x={4} y={16}>
        {t("axisRate")}
      </text>
      {plot.rateTicks.map(({ y, rate }) => (
        <g key={rate}>
          <line x1={plot.left} x2={plot.right} y1={y} y2={y} stroke="var(--rule)" />
          <text x={plot.left - 8} y={y} dy="0.35em" textAnchor="end">
            {formatNumber(rate, locale)}
          </text>
        </g>
      ))}
      <line x1={plot.left} x2={plot.right} y1={plot.bottom} y2={plot.bottom} stroke={CHART_INK.context} />
      {plot.monthTicks.map(({ x, month }) => (
        <text key={month} x={x} y={plot.bottom + 21} textAnchor="middle">
          {formatNumber(month, locale)}
        </text>
      ))}
      <text x={plot.left} y={plot.bottom + 43}>
        {t("axis")}
      </text>
    </g>
  );
}
