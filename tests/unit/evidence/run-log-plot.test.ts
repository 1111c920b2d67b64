import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { spreadLabels } from "@/components/chart/run-log-labels";
import { runLogPlot, type PlotFrame } from "@/components/chart/run-log-plot";
import { analyseRun, type RunOptions } from "@/lib/evidence/run-analysis";
import type { RunLog } from "@/lib/evidence/run-log";
import { thinnedLog } from "@/lib/evidence/run-log-summary";
import { madeRun, warmingCoil } from "./made-run";

const FRAME: PlotFrame = {
  width: 700,
  left: 50,
  right: 150,
  top: 20,
  faultWords: 40,
  main: 200,
  strip: 50,
  gap: 30,
  lineHeight: 18,
};

const plotOf = (log: RunLog, options: RunOptions = {}) =>
  runLogPlot({ log, analysis: analyseRun(log, options) }, FRAME);

const panelOf = (log: RunLog, options: RunOptions = {}, quantity = "temperature") => {
  const panel = plotOf(log, options).panels.find((one) => one.quantity === quantity);
  if (!panel) throw new Error(`no panel of ${quantity}`);
  return panel;
};

/** Where a value lies by two ticks of its panel. */
function heightOf(value: number, ticks: readonly { y: number; value: number }[]): number {
  const [first, last] = [ticks[0], ticks.at(-1)];
  if (!first || !last) throw new Error("a scale without ticks");
  return first.y + ((value - first.value) / (last.value - first.value)) * (last.y - first.y);
}

const columns = warmingCoil();
const coilRun = madeRun({ lastS: 1800, columns });

describe("the drawing of a run log", () => {
  it("keeps every point of every series inside its panel", () => {
    const celsius = fc.double({ min: -50, max: 900, noNaN: true });
    const ampere = fc.double({ min: -300, max: 300, noNaN: true });
    const rows = fc.array(fc.tuple(fc.option(celsius), fc.option(ampere)), { minLength: 2, maxLength: 60 });
    fc.assert(
      fc.property(rows, (values) => {
        const log = madeRun({
          lastS: (values.length - 1) * 10,
          columns: {
            temperature: (_, index) => values[index]?.[0] ?? null,
            current: (_, index) => values[index]?.[1] ?? null,
          },
        });
        const plot = plotOf(log);
        for (const panel of plot.panels)
          for (const { x, y } of panel.series.flatMap(({ points }) => points)) {
            expect(x).toBeGreaterThanOrEqual(plot.left - 1e-6);
            expect(x).toBeLessThanOrEqual(plot.right + 1e-6);
            expect(y).toBeGreaterThanOrEqual(panel.top - 1e-6);
            expect(y).toBeLessThanOrEqual(panel.bottom + 1e-6);
          }
      }),
    );
  });

  it("stands the panels one under another, with room above for the words of a fault only", () => {
    const calm = plotOf(coilRun);
    expect(calm.panels.map(({ quantity, top, bottom }) => ({ quantity, top, bottom }))).toEqual([
      { quantity: "temperature", top: 20, bottom: 220 },
      { quantity: "current", top: 250, bottom: 300 },
      { quantity: "voltage", top: 330, bottom: 380 },
    ]);
    expect(calm.fault).toBeNull();
    const faulty = plotOf(
      madeRun({ lastS: 1800, columns, events: [{ atS: 900, text: "drags", isFault: true }] }),
    );
    expect(faulty.panels[0]?.top).toBe(60);
  });

  it("marks the fault at its minute on the axis of time", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 180 }), (tens) => {
        const atS = tens * 10;
        const log = madeRun({ lastS: 1800, columns, events: [{ atS, text: "drags", isFault: true }] });
        expect(plotOf(log).fault?.x).toBeCloseTo(50 + (500 * atS) / 1800, 6);
      }),
    );
    const half = plotOf(coilRun).timeTicks.find(({ minutes }) => minutes === 15);
    expect(half?.x).toBeCloseTo(300, 6);
  });

  it("draws each limit at its height, inside the panel even where the run stays far below it", () => {
    const limits = [
      { key: "touch", name: "Touch", celsius: 48 },
      { key: "coil", name: "Coil", celsius: 155 },
    ];
    const panel = panelOf(coilRun, { limits });
    expect(panel.limits.map(({ key }) => key)).toEqual(["touch", "coil"]);
    for (const [place, { celsius }] of limits.entries())
      expect(panel.limits[place]?.y).toBeCloseTo(heightOf(celsius, panel.ticks), 6);
    expect(panel.limits[1]?.y).toBeGreaterThanOrEqual(panel.top);
  });

  it("draws the coil's own temperature over the probe that measures it", () => {
    const panel = panelOf(coilRun, { coil: { ohmAt20: 57.6 } });
    const [probe, coil] = panel.series;
    expect(coil?.heading).toBeNull();
    for (const [place, point] of (probe?.points ?? []).entries())
      expect(coil?.points[place]?.y).toBeCloseTo(point.y, 3);
  });

  it("draws the fit only where the run was long enough for it", () => {
    expect(panelOf(coilRun).fit).not.toBeNull();
    expect(panelOf(madeRun({ lastS: 300, columns })).fit).toBeNull();
  });

  it("breaks a line at a pause, and not where rows were thinned out", () => {
    const pieces = (path: string | undefined) => (path ?? "").split("M").length - 1;
    const paused = madeRun({ lastS: 1800, columns, without: (timeS) => timeS > 600 && timeS < 900 });
    expect(pieces(panelOf(paused).series[0]?.path)).toBe(2);
    const long = madeRun({ lastS: 200_000, columns });
    const thin = { log: thinnedLog(long), analysis: analyseRun(long) };
    expect(thin.log.timeS.length).toBeLessThan(1_300);
    expect(pieces(runLogPlot(thin, FRAME).panels[0]?.series[0]?.path)).toBe(1);
  });

  it("draws five series of a kind and counts what it leaves out", () => {
    const one = madeRun({ lastS: 600, columns: { temperature: columns.temperature } });
    const log = {
      ...one,
      series: Array.from({ length: 7 }, (_, place) =>
        one.series.map((series) => ({ ...series, heading: `T${place}` })),
      ).flat(),
    };
    const plot = plotOf(log);
    expect(plot.panels[0]?.series).toHaveLength(5);
    expect(plot.leftOut).toBe(2);
  });
});

describe("labels at line ends", () => {
  it("stand a line apart, in the order of their lines, between top and bottom as long as they fit", () => {
    const ys = fc.array(fc.double({ min: 0, max: 200, noNaN: true }), { minLength: 1, maxLength: 10 });
    fc.assert(
      fc.property(ys, (wanted) => {
        const place = { top: 0, bottom: 200, lineHeight: 18 };
        const labels = spreadLabels(
          wanted.map((wantedY) => ({ wantedY })),
          place,
        );
        expect(labels.map(({ wantedY }) => wantedY)).toEqual(wanted.toSorted((a, b) => a - b));
        for (const [index, { y }] of labels.entries()) {
          expect(y).toBeGreaterThanOrEqual(-1e-6);
          expect(y).toBeLessThanOrEqual(200 + 1e-6);
          const next = labels[index + 1];
          if (next) expect(next.y - y).toBeGreaterThanOrEqual(18 - 1e-6);
        }
      }),
    );
  });
});
