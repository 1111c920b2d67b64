/** Order, dash and marker of the five series: told apart by line and marker as well as by colour. */
export const SERIES = [
  { stroke: "var(--series-1)", dash: undefined, marker: "disc" },
  { stroke: "var(--series-2)", dash: "7 3", marker: "square" },
  { stroke: "var(--series-3)", dash: "2 3", marker: "triangle" },
  { stroke: "var(--series-4)", dash: "10 3 2 3", marker: "diamond" },
  { stroke: "var(--series-5)", dash: "1 4", marker: "cross" },
] as const;

export type SeriesMarker = (typeof SERIES)[number]["marker"];

/** Colours of what is not a series: axes and context, limits, and the ground of labels. */
export const CHART_INK = {
  context: "var(--ink-3)",
  limit: "var(--ink)",
  label: "var(--ink)",
  ground: "var(--card)",
} as const;
