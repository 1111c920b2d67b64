import type { Route } from "next";
import { useTranslations } from "next-intl";
import { formatNumber, formatPercent } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { MONTH_DAYS } from "@/lib/reliability/months";
import {
  lifePlot,
  type CurveLabel,
  type LifeFigure,
  type LifePlot,
  type PlottedCurve,
} from "./life-curve-plot";
import { cutTo } from "./run-log-labels";
import { SeriesMark } from "./run-log-marker";
import { ChartSvg } from "./chart-svg";
import { CHART_INK, SERIES } from "./series-style";

/** The address of the claims behind a point: whose curve (null: the others), from one age in days to another. */
export type Opens = (key: string | null, fromDays: number, toDays: number) => Route;

type DrawingProps = { figure: LifeFigure; title: string; description: string; opens: Opens; locale: Locale };

// Three drawings, of which one is shown: scaling a wide one down would leave its words too small to read on a phone.
const SIZES = [
  {
    frame: { width: 1200, height: 380, left: 60, right: 180, top: 16, lineHeight: 18 },
    signs: 20,
    className: "hidden @6xl:block",
  },
  {
    frame: { width: 760, height: 300, left: 60, right: 172, top: 16, lineHeight: 18 },
    signs: 20,
    className: "hidden @2xl:block @6xl:hidden max-w-4xl",
  },
  {
    frame: { width: 360, height: 240, left: 52, right: 104, top: 16, lineHeight: 18 },
    signs: 12,
    className: "@2xl:hidden max-w-lg",
  },
] as const;

/** Life curves drawn on the server: steps, bands, names at the line ends; each fall is a link to its claims. */
export function LifeCurveDrawing(props: DrawingProps) {
  return (
    <div className="@container">
      {SIZES.map((size) => (
        <Drawing
          key={size.frame.width}
          {...props}
          plot={lifePlot(props.figure, size.frame)}
          width={size.frame.width}
          signs={size.signs}
          className={size.className}
        />
      ))}
    </div>
  );
}

type Sized = DrawingProps & { plot: LifePlot; width: number; signs: number; className: string };

function Drawing({ plot, title, description, opens, locale, width, signs, className }: Sized) {
  const t = useTranslations("lifeCurves.curve");
  return (
    <ChartSvg {...{ title, description, width, className }} height={plot.bottom + 52}>
      <Axes plot={plot} locale={locale} />
      {plot.curves.map((curve) => (
        <Curve key={curve.key ?? ""} curve={curve} />
      ))}
      {plot.labels.map((label) => (
        <EndLabel key={label.key ?? ""} label={label} right={plot.right} signs={signs} />
      ))}
      {plot.curves.flatMap((curve) =>
        curve.points.map((point) => (
          <a
            key={`${curve.key ?? ""}${point.fromAge}`}
            href={opens(curve.key, point.fromAge, point.toAge)}
            aria-label={t("point", {
              name: curve.key ?? t("others"),
              months: formatNumber(point.toAge / MONTH_DAYS, locale, { least: 1, most: 1 }),
              days: point.toAge,
              failed: point.failed,
              atRisk: point.atRisk,
              survival: formatPercent(point.survival, locale, { least: 1 }),
            })}
          >
            <circle cx={point.x} cy={point.y} r={12} fill="transparent" />
            {curve.style === null ? (
              <circle cx={point.x} cy={point.y} r={2.5} fill={CHART_INK.context} />
            ) : (
              <SeriesMark x={point.x} y={point.y} style={curve.style} />
            )}
          </a>
        )),
      )}
    </ChartSvg>
  );
}

function Axes({ plot, locale }: { plot: LifePlot; locale: Locale }) {
  const t = useTranslations("lifeCurves.curve");
  const { left, right, top, bottom } = plot;
  return (
    <g aria-hidden="true" fill={CHART_INK.context}>
      {plot.shareTicks.map(({ y, share }) => (
        <g key={share}>
          <line x1={left} x2={right} y1={y} y2={y} stroke="var(--rule)" />
          <text x={left - 8} y={y} dy="0.35em" textAnchor="end">
            {formatPercent(share, locale, { most: 1 })}
          </text>
        </g>
      ))}
      <line x1={left} x2={left} y1={top} y2={bottom} stroke={CHART_INK.context} />
      <line x1={left} x2={right} y1={bottom} y2={bottom} stroke={CHART_INK.context} />
      {plot.isBroken ? (
        <path
          d={`M${left - 7} ${bottom - 8}l14 -6M${left - 7} ${bottom - 14}l14 -6`}
          stroke={CHART_INK.limit}
          strokeWidth={1.75}
          fill="none"
        />
      ) : null}
      {plot.monthTicks.map(({ x, months }) => (
        <g key={months}>
          <line x1={x} x2={x} y1={bottom} y2={bottom + 5} stroke={CHART_INK.context} />
          <text x={x} y={bottom + 21} textAnchor="middle">
            {formatNumber(months, locale)}
          </text>
        </g>
      ))}
      <text x={left} y={bottom + 43}>
        {t("axis")}
      </text>
    </g>
  );
}

/** The band, the curve, and, faded, the part with fewer than ten at risk. */
function Curve({ curve }: { curve: PlottedCurve }) {
  const series = curve.style === null ? null : SERIES[curve.style];
  const stroke = series?.stroke ?? CHART_INK.context;
  const line = {
    fill: "none",
    stroke,
    strokeDasharray: series?.dash,
    strokeWidth: series ? 2.25 : 1.25,
  } as const;
  return (
    <g aria-hidden="true">
      <path d={curve.band} fill={stroke} fillOpacity={0.16} stroke={stroke} strokeOpacity={0.5} />
      <path d={curve.atMost} fill="none" stroke={stroke} strokeWidth={1} strokeDasharray="1 3" />
      <path d={curve.path} {...line} />
      <path d={curve.thinPath} {...line} strokeOpacity={0.45} />
    </g>
  );
}

function EndLabel({ label, right, signs }: { label: CurveLabel; right: number; signs: number }) {
  const t = useTranslations("lifeCurves.curve");
  const series = label.style === null ? null : SERIES[label.style];
  return (
    <g aria-hidden="true">
      <path
        d={`M${label.x + 2} ${label.wantedY}L${right + 8} ${label.y}`}
        fill="none"
        stroke={series?.stroke ?? CHART_INK.context}
        strokeWidth={0.75}
      />
      <text
        x={right + 12}
        y={label.y}
        dy="-0.1em"
        fill={CHART_INK.label}
        fontWeight={series ? 600 : undefined}
      >
        {cutTo(label.key ?? t("othersShort"), signs)}
      </text>
      <text x={right + 12} y={label.y} dy="1.05em" fill={CHART_INK.context} fontSize={14}>
        {t("units", { count: label.units })}
      </text>
    </g>
  );
}
