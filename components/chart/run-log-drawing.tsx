import clsx from "clsx";
import { useTranslations } from "next-intl";
import { minutesAndSeconds } from "@/lib/evidence/duration";
import type { RunFault } from "@/lib/evidence/run-fault";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { RunLogPanel } from "./run-log-panel";
import { runLogPlot, type PlotFrame, type RunLogPlot } from "./run-log-plot";
import { CHART_INK } from "./series-style";

type DrawingProps = { run: Parameters<typeof runLogPlot>[0]; locale: Locale };
type Size = {
  readonly frame: PlotFrame;
  readonly signs: number;
  readonly text: number;
  readonly className: string;
};

// Two drawings, of which one is shown: scaling a wide one down would leave its words too small to read on a phone.
const SIZES = [
  {
    frame: {
      width: 760,
      left: 52,
      right: 196,
      top: 28,
      faultWords: 42,
      main: 270,
      strip: 64,
      gap: 40,
      lineHeight: 19,
    },
    signs: 23,
    text: 15,
    className: "hidden @2xl:block max-w-4xl",
  },
  {
    frame: {
      width: 360,
      left: 52,
      right: 132,
      top: 30,
      faultWords: 42,
      main: 230,
      strip: 56,
      gap: 42,
      lineHeight: 19,
    },
    signs: 15,
    text: 15,
    className: "@2xl:hidden max-w-lg",
  },
] as const satisfies readonly Size[];

/** A run log drawn: temperatures above, current, voltage and speed in strips below, one axis of time for all. */
export function RunLogDrawing({ run, locale }: DrawingProps) {
  const t = useTranslations("evidence.runLog");
  const plots = SIZES.map((size) => ({ size, plot: runLogPlot(run, size.frame) }));
  const leftOut = plots[0]?.plot.leftOut ?? 0;
  return (
    <div className="@container">
      {plots.map(({ size, plot }) => (
        <Drawing key={size.frame.width} run={run} plot={plot} size={size} locale={locale} />
      ))}
      {leftOut > 0 ? <p className="text-small text-ink-2">{t("moreSeries", { count: leftOut })}</p> : null}
    </div>
  );
}

function Drawing({ run, plot, size, locale }: DrawingProps & { plot: RunLogPlot; size: Size }) {
  const t = useTranslations("evidence.runLog");
  const { left, right, bottom } = plot;
  const names = run.log.series.map(({ heading }) => heading).join(", ");
  const minutes = formatNumber((run.log.timeS.at(-1) ?? 0) / 60, locale, { most: 0 });
  return (
    <svg
      role="img"
      aria-label={t("picture", { minutes, series: names })}
      viewBox={`0 0 ${size.frame.width} ${bottom + 56}`}
      className={clsx("h-auto w-full font-text tabular-nums", size.className)}
      fontSize={size.text}
    >
      {plot.panels.map((panel) => (
        <RunLogPanel
          key={panel.quantity}
          panel={panel}
          left={left}
          right={right}
          signs={size.signs}
          locale={locale}
        />
      ))}
      <line x1={left} x2={right} y1={bottom} y2={bottom} stroke={CHART_INK.context} />
      {plot.timeTicks.map(({ x, minutes: tick }) => (
        <g key={tick}>
          <line x1={x} x2={x} y1={bottom} y2={bottom + 5} stroke={CHART_INK.context} />
          <text x={x} y={bottom + 22} textAnchor="middle" fill={CHART_INK.context}>
            {formatNumber(tick, locale)}
          </text>
        </g>
      ))}
      <text x={left} y={bottom + 45} fill={CHART_INK.context}>
        {t("axis.time")}
      </text>
      <FaultMark plot={plot} fault={run.analysis.fault} width={size.frame.width} />
    </svg>
  );
}

/** The moment of the fault through all panels, with the time to it and where it was read from. */
function FaultMark({ plot, fault, width }: { plot: RunLogPlot; fault: RunFault | null; width: number }) {
  const t = useTranslations("evidence.runLog");
  if (!fault || !plot.fault) return null;
  const { x } = plot.fault;
  const isLate = x > width / 2;
  const time = t("time", minutesAndSeconds(fault.afterS));
  const words = {
    textAnchor: isLate ? "end" : "start",
    x: isLate ? x + 5 : x - 5,
    fill: CHART_INK.label,
  } as const;
  return (
    <g>
      <line x1={x} x2={x} y1={46} y2={plot.bottom} stroke={CHART_INK.limit} strokeWidth={1.5} />
      <path d={`M${x - 5} 42H${x + 5}L${x} 50Z`} fill={CHART_INK.limit} />
      <text {...words} y={17} fontWeight={600}>
        {t(fault.certain ? "marks.fault" : "marks.doubtfulFault", { time })}
      </text>
      <text {...words} y={36}>
        {t(`marks.from.${fault.method}`)}
      </text>
    </g>
  );
}
