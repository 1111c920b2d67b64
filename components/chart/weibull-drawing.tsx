import { useTranslations } from "next-intl";
import { useId } from "react";
import { formatNumber, formatPercent } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { Series } from "@/lib/reports/life-curves/view";
import type { Opens } from "./life-curve-drawing";
import { cutTo } from "./run-log-labels";
import { SeriesMark } from "./run-log-marker";
import { ChartSvg } from "./chart-svg";
import { CHART_INK, SERIES } from "./series-style";
import { weibullPlot, type ProbabilityLine, type ProbabilityPoint, type WeibullPlot } from "./weibull-plot";

type DrawingProps = {
  series: readonly Series[];
  rest: Series | null;
  title: string;
  description: string;
  opens: Opens;
  locale: Locale;
};

const SIZES = [
  {
    frame: { width: 760, height: 280, left: 64, right: 150, top: 16, lineHeight: 19 },
    signs: 18,
    className: "hidden @2xl:block max-w-4xl",
  },
  {
    frame: { width: 600, height: 260, left: 64, right: 130, top: 16, lineHeight: 19 },
    signs: 15,
    className: "hidden @lg:block @2xl:hidden",
  },
  {
    frame: { width: 360, height: 230, left: 58, right: 92, top: 16, lineHeight: 19 },
    signs: 10,
    className: "@lg:hidden max-w-lg",
  },
] as const;

/** Weibull paper: what failed, and the fits as straight lines. Nothing is drawn where no fit exists. */
export function WeibullDrawing(props: DrawingProps) {
  return (
    <div className="@container">
      {SIZES.map(({ frame, signs, className }) => {
        const plot = weibullPlot(props.series, props.rest, frame);
        return plot ? (
          <Drawing key={frame.width} {...props} plot={plot} {...{ signs, className }} width={frame.width} />
        ) : null;
      })}
    </div>
  );
}

type Sized = DrawingProps & { plot: WeibullPlot; width: number; signs: number; className: string };

function Drawing({ plot, title, description, opens, locale, width, signs, className }: Sized) {
  const id = useId();
  const { left, right, top, bottom } = plot;
  return (
    <ChartSvg {...{ title, description, width, className }} height={bottom + 52}>
      <clipPath id={id}>
        <rect x={left} y={top - 6} width={right - left} height={bottom - top + 12} />
      </clipPath>
      <Axes plot={plot} locale={locale} />
      {plot.lines.map((line) => (
        <g key={line.key ?? ""}>
          <path
            d={line.path}
            clipPath={`url(#${id})`}
            fill="none"
            stroke={inkOf(line.style)}
            strokeWidth={line.style === null ? 1.25 : 1.75}
            strokeDasharray={line.style === null ? undefined : SERIES[line.style]?.dash}
          />
          <Points line={line} opens={opens} locale={locale} />
        </g>
      ))}
      <EndLabels plot={plot} signs={signs} />
    </ChartSvg>
  );
}

const inkOf = (style: number | null): string =>
  style === null ? CHART_INK.context : (SERIES[style]?.stroke ?? CHART_INK.context);

function Points({ line, opens, locale }: { line: ProbabilityLine; opens: Opens; locale: Locale }) {
  const t = useTranslations("lifeCurves");
  return line.points.map((point) =>
    point.opensFrom === null ? (
      <PointMark key={point.ageDays} point={point} style={line.style} />
    ) : (
      <a
        key={point.ageDays}
        href={opens(line.key, point.opensFrom, point.ageDays)}
        aria-label={t("weibull.point", {
          name: line.key ?? t("curve.others"),
          days: point.ageDays,
          share: formatPercent(point.failedShare, locale, { least: 1 }),
        })}
      >
        <circle cx={point.x} cy={point.y} r={12} fill="transparent" />
        <PointMark point={point} style={line.style} />
      </a>
    ),
  );
}

const PointMark = ({ point, style }: { point: ProbabilityPoint; style: number | null }) =>
  style === null ? (
    <circle cx={point.x} cy={point.y} r={2.5} fill={CHART_INK.context} />
  ) : (
    <SeriesMark x={point.x} y={point.y} style={style} />
  );

function EndLabels({ plot, signs }: { plot: WeibullPlot; signs: number }) {
  const t = useTranslations("lifeCurves.curve");
  return plot.labels.map(({ key, style, wantedY, y }) => (
    <g key={key ?? ""} aria-hidden="true">
      <path
        d={`M${plot.right + 2} ${wantedY}L${plot.right + 12} ${y}`}
        fill="none"
        stroke={inkOf(style)}
        strokeWidth={0.75}
      />
      <text
        x={plot.right + 16}
        y={y}
        dy="0.35em"
        fill={CHART_INK.label}
        fontWeight={style === null ? undefined : 600}
      >
        {cutTo(key ?? t("othersShort"), signs)}
      </text>
    </g>
  ));
}

function Axes({ plot, locale }: { plot: WeibullPlot; locale: Locale }) {
  const t = useTranslations("lifeCurves.weibull");
  const { left, right, top, bottom } = plot;
  return (
    <g aria-hidden="true" fill={CHART_INK.context}>
      {plot.shareTicks.map(({ y, share }) => (
        <g key={share}>
          <line x1={left} x2={right} y1={y} y2={y} stroke="var(--rule)" />
          <text x={left - 8} y={y} dy="0.35em" textAnchor="end">
            {formatPercent(share, locale, { most: 2 })}
          </text>
        </g>
      ))}
      {plot.monthTicks.map(({ x, months }) => (
        <g key={months}>
          <line x1={x} x2={x} y1={top} y2={bottom} stroke="var(--rule)" />
          <text x={x} y={bottom + 21} textAnchor="middle">
            {formatNumber(months, locale)}
          </text>
        </g>
      ))}
      <line x1={left} x2={left} y1={top} y2={bottom} stroke={CHART_INK.context} />
      <line x1={left} x2={right} y1={bottom} y2={bottom} stroke={CHART_INK.context} />
      <text x={left} y={bottom + 43}>
        {t("axis")}
      </text>
    </g>
  );
}
