import { expect, it } from "vitest";
import { summariseRunLog, withLimits } from "@/lib/evidence/run-log-summary";
import { runLimitsOf } from "@/lib/rule-book/run-limits";

// Straight from 20 °C to 80 °C in ten minutes, one row every ten seconds, 24 V through 48 ohm at 20 °C.
const rows = Array.from({ length: 61 }, (_row, place) => `${place * 10};${20 + place};24;0.5`);
const summary = summariseRunLog(Buffer.from(["time_s;brake_C;supply_V;current_A", ...rows].join("\n")));

const read = () => {
  if (!summary.isRead) throw new Error(summary.code);
  return summary;
};

it("a log is held against the limits of its part only when it is shown", () => {
  expect(read().analysis.hottest?.above).toEqual([]);
  const limits = runLimitsOf({
    readings: [],
    surfaceCautions: [{ grade: "warn", fromCelsius: 48, source: "from memory" }],
    insulationClass: "130 (B)",
    coil: null,
  });
  const against = withLimits(read(), { limits });
  // 48 °C is crossed after 280 s; the run ends at 600 s.
  expect(against.analysis.hottest?.above).toEqual([
    { limit: { key: "insulation", name: "130 (B)", celsius: 130 }, seconds: 0, firstAtS: null },
    { limit: { key: "warn", name: "", celsius: 48 }, seconds: 320, firstAtS: 280 },
  ]);
});

it("a coil's course is reckoned from what the part is rated at, not from the first row", () => {
  const against = withLimits(read(), { coil: { ohmAt20: 48 } });
  expect(against.analysis.coil?.basis).toMatchObject({ method: "ratedResistance", ohm: 48 });
  expect(against.analysis.coil?.values.at(-1)).toBeCloseTo(20, 9);
});

it("a file that is no log is kept with the reason", () => {
  expect(summariseRunLog(Buffer.from("<html>"))).toMatchObject({ isRead: false });
});
