import { useTranslations } from "next-intl";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { cutTo, withoutUnit } from "./run-log-labels";
import { SeriesMark } from "./run-log-marker";
import type { PlotLabel, PlotPanel } from "./run-log-panel-plot";
import { CHART_INK, SERIES } from "./series-style";

type PanelProps = { panel: PlotPanel; left: number; right: number; signs: number; locale: Locale };

/** One panel of the drawing: its scale, what it is measured against, and its series with their names at the end. */
export function RunLogPanel({ panel, left, right, signs, locale }: PanelProps) {
  const t = useTranslations("evidence.runLog.axis");
  return (
    <g>
      <text x={left - 8} y={panel.top - 14} textAnchor="end" fill={CHART_INK.context}>
        {t(panel.quantity)}
      </text>
      {panel.ticks.map(({ y, value }) => (
        <g key={value}>
          <line x1={left} x2={right} y1={y} y2={y} stroke="var(--rule)" />
          <text x={left - 8} y={y} dy="0.35em" textAnchor="end" fill={CHART_INK.context}>
            {formatNumber(value, locale)}
          </text>
        </g>
      ))}
      {panel.ambient ? <path d={panel.ambient} fill="none" stroke={CHART_INK.context} /> : null}
      {panel.limits.map(({ key, y }) => (
        <line
          key={key}
          x1={left}
          x2={right}
          y1={y}
          y2={y}
          stroke={CHART_INK.limit}
          strokeWidth={1.5}
          strokeDasharray="8 5"
        />
      ))}
      {panel.fit ? <path d={panel.fit} fill="none" stroke={CHART_INK.label} strokeWidth={1} /> : null}
      {panel.series.map(({ path, style, markers }) => (
        <g key={style}>
          <path
            d={path}
            fill="none"
            stroke={SERIES[style]?.stroke}
            strokeDasharray={SERIES[style]?.dash}
            strokeWidth={2.25}
            strokeLinejoin="round"
          />
          {markers.map(({ x, y }) => (
            <SeriesMark key={x} x={x} y={y} style={style} />
          ))}
        </g>
      ))}
      {panel.labels.map((label) => (
        <Label
          key={`${label.is}${label.style}${label.name}`}
          label={label}
          right={right}
          signs={signs}
          locale={locale}
        />
      ))}
    </g>
  );
}

/** A name at the right end, with a thin lead to its line where it had to move away from it. */
function Label({
  label,
  right,
  signs,
  locale,
}: {
  label: PlotLabel;
  right: number;
  signs: number;
  locale: Locale;
}) {
  const t = useTranslations("evidence.runLog.marks");
  const celsius = label.celsius === null ? "" : formatNumber(label.celsius, locale, { most: 1 });
  const words = {
    series: withoutUnit(label.name),
    coil: t("coil"),
    limit: t("limit", { name: label.name, celsius }),
    ambient: t("ambient", { celsius }),
    fit: t("fit"),
  }[label.is];
  const isSeries = label.is === "series" || label.is === "coil";
  const ink = label.is === "ambient" ? CHART_INK.context : CHART_INK.label;
  return (
    <g>
      <path
        d={`M${right + 2} ${label.wantedY}L${right + 14} ${label.y}`}
        fill="none"
        stroke={isSeries ? SERIES[label.style]?.stroke : ink}
      />
      <text x={right + 18} y={label.y} dy="0.35em" fill={ink} fontWeight={isSeries ? 600 : undefined}>
        {cutTo(words, signs)}
      </text>
    </g>
  );
}
