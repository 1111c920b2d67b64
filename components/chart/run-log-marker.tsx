import type { PlotPoint } from "./run-log-course";
import { CHART_INK, SERIES, type SeriesMarker } from "./series-style";

const OUTLINES: Readonly<Record<SeriesMarker, string>> = {
  disc: "M4.5 0A4.5 4.5 0 1 1 -4.5 0A4.5 4.5 0 1 1 4.5 0Z",
  square: "M-4 -4H4V4H-4Z",
  triangle: "M0 -5L5 4H-5Z",
  diamond: "M0 -5.5L5.5 0L0 5.5L-5.5 0Z",
  cross: "M-4 -4L4 4M4 -4L-4 4",
};

/** The sign of one of the five series at a point; only the first is filled. */
export function SeriesMark({ x, y, style }: PlotPoint & { style: number }) {
  const series = SERIES[style] ?? SERIES[0];
  return (
    <path
      d={OUTLINES[series.marker]}
      transform={`translate(${x.toFixed(1)} ${y.toFixed(1)})`}
      stroke={series.stroke}
      strokeWidth={1.75}
      fill={series.marker === "disc" ? series.stroke : CHART_INK.ground}
    />
  );
}
