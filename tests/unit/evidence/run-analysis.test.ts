import { describe, expect, it } from "vitest";
import { analyseRun } from "@/lib/evidence/run-analysis";
import { parseRunLog } from "@/lib/evidence/run-log-parser";
import { madeRun, warmingCoil } from "./made-run";
import { given } from "./outcome-value";

const TOUCH = { key: "touch", name: "Touch", celsius: 60 };
const codes = (analysis: ReturnType<typeof analyseRun>) => analysis.findings.map((finding) => finding.code);
const brake = (input: Partial<Parameters<typeof madeRun>[0]> = {}) => {
  const coil = warmingCoil();
  return madeRun({ lastS: 2700, columns: coil, ...input });
};

describe("temperatures of a run", () => {
  it("crosses a limit where the straight line between the samples does: 640 s (computed)", () => {
    const log = madeRun({
      lastS: 660,
      stepS: 60,
      columns: { temperature: (timeS) => (timeS <= 600 ? 28 + timeS / 20 : 61) },
    });
    const above = analyseRun(log, { limits: [TOUCH] }).hottest?.above[0];
    expect(above?.firstAtS).toBeCloseTo(640, 9);
    expect(above?.seconds).toBeCloseTo(20, 9);
  });

  it("counts time above a limit over several crossings, and never a touch of it", () => {
    const levels = [50, 70, 50, 60, 60, 50, 61, 61];
    const log = madeRun({
      lastS: 420,
      stepS: 60,
      columns: { temperature: (_, index) => levels[index] ?? 0 },
    });
    const above = analyseRun(log, { limits: [TOUCH] }).hottest?.above[0];
    // 60 s around the first peak, nothing for standing at 60, then 60 s x 1/11 and a full minute.
    expect(above?.seconds).toBeCloseTo(60 + 60 / 11 + 60, 9);
    expect(above?.firstAtS).toBeCloseTo(30, 9);
  });

  it("knows nothing of a pause in the log and says so", () => {
    const log = brake({ without: (timeS) => timeS > 600 && timeS < 1800 });
    const analysis = analyseRun(log, { limits: [TOUCH] });
    expect(analysis.hottest?.unknownS).toBe(1200);
    expect(analysis.hottest?.above[0]?.firstAtS).toBe(1800);
    expect(analysis.hottest?.above[0]?.seconds).toBe(900);
    expect(analysis.findings).toContainEqual({
      code: "gapInLog",
      detail: { gaps: 1, line: 63, minutes: 20, seconds: 0 },
    });
  });

  it("finds ambient, peak, rise and the steepest minute", () => {
    const { ambient, hottest, steps } = analyseRun(brake());
    expect(ambient).toEqual({ celsius: 22, method: "column" });
    expect(hottest?.peakAtS).toBe(2700);
    expect(hottest?.peakCelsius).toBeCloseTo(86.61, 2);
    expect(hottest?.riseKelvin).toBeCloseTo(64.61, 2);
    // The slope at the start is 68 K in 15 min = 4.53 K/min; over its first minute the course bends a little.
    expect(hottest?.steepest?.kelvinPerMinute).toBeCloseTo(4.39, 1);
    expect(hottest?.steepest).toMatchObject({ fromS: 0, toS: 50 });
    expect(steps.map((one) => one.rule)).toEqual(["ranWithoutFault", "peak", "riseOverColumn", "steepest"]);
    expect(steps[2]).toEqual({
      rule: "riseOverColumn",
      result: "64.6",
      input: { peakCelsius: 86.6, ambientCelsius: 22 },
    });
  });

  it("takes the first reading as ambient where no column says", () => {
    const log = madeRun({ lastS: 600, columns: { temperature: (timeS) => 23 + timeS / 60 } });
    expect(analyseRun(log).ambient).toEqual({ celsius: 23, method: "firstReading" });
    expect(analyseRun(log).hottest?.riseKelvin).toBeCloseTo(10, 9);
  });

  it("fits the hottest course and says how long it would have to run", () => {
    const { fit } = analyseRun(brake());
    expect(fit?.of).toBe("temperature");
    expect(fit?.fit.longEnough).toBe(true);
    expect(fit?.fit.curve.finalCelsius).toBeCloseTo(90, 4);
    expect(fit?.fit.curve.tauS).toBeCloseTo(900, 3);
    expect(analyseRun(brake({ lastS: 600 })).fit?.fit.longEnough).toBe(false);
  });
});

describe("the fault", () => {
  it("of a run without one is null, and the run is censored at its length, never at zero", () => {
    expect(analyseRun(brake())).toMatchObject({ fault: null, ranSeconds: 2700 });
  });

  it("is the marked row before anything else", () => {
    const log = brake({
      columns: { ...warmingCoil(), speed: (timeS) => (timeS < 900 ? 1500 : 0) },
      events: [
        { atS: 0, text: "start", isFault: false },
        { atS: 560, text: "brake grabs", isFault: true },
      ],
    });
    expect(analyseRun(log)).toMatchObject({
      ranSeconds: 560,
      fault: { afterS: 560, method: "markedRow", certain: true, line: 58, text: "brake grabs" },
    });
  });

  it("counts from switching on, not from the first row", () => {
    const coil = warmingCoil();
    const late = (column: (timeS: number) => number) => (timeS: number) =>
      timeS < 300 ? 0 : column(timeS - 300);
    const log = brake({
      columns: { ...coil, current: late(coil.current), voltage: late(coil.voltage) },
      events: [{ atS: 860, text: "fault", isFault: true }],
    });
    expect(analyseRun(log)).toMatchObject({
      span: { fromS: 300, method: "current" },
      fault: { afterS: 560, atS: 860 },
    });
  });

  it("is an open circuit where the current goes and the voltage stays", () => {
    const coil = warmingCoil();
    const log = brake({ columns: { ...coil, current: (timeS) => (timeS < 1200 ? coil.current(timeS) : 0) } });
    expect(analyseRun(log).fault).toMatchObject({ afterS: 1200, method: "currentLost", certain: true });
  });

  it("is none where somebody switched off: the voltage goes with the current, and the run lasted until then", () => {
    const coil = warmingCoil();
    const off = (column: (timeS: number) => number) => (timeS: number) => (timeS < 1200 ? column(timeS) : 0);
    const log = brake({ columns: { ...coil, current: off(coil.current), voltage: off(coil.voltage) } });
    expect(analyseRun(log)).toMatchObject({ fault: null, ranSeconds: 1190 });
  });

  it("is doubtful where only the current is logged and goes", () => {
    const { temperature, current } = warmingCoil();
    const log = brake({ columns: { temperature, current: (timeS) => (timeS < 1200 ? current(timeS) : 0) } });
    expect(analyseRun(log).fault).toMatchObject({ afterS: 1200, method: "currentLost", certain: false });
  });

  it("is the motor standing still while it is fed", () => {
    const log = brake({
      columns: {
        temperature: warmingCoil().temperature,
        current: () => 8,
        speed: (timeS) => (timeS < 560 ? 1500 : 0),
      },
    });
    expect(analyseRun(log).fault).toMatchObject({ afterS: 560, method: "speedLost", certain: true });
  });

  it("is the current leaping up, surely so where the motor slows with it", () => {
    const current = (timeS: number) => (timeS < 560 ? 8 : 19);
    const columns = { temperature: warmingCoil().temperature, current };
    expect(analyseRun(brake({ columns })).fault).toMatchObject({
      afterS: 560,
      method: "currentJump",
      certain: false,
    });
    const slowing = { ...columns, speed: (timeS: number) => (timeS < 560 ? 1500 : 600) };
    expect(analyseRun(brake({ columns: slowing })).fault).toMatchObject({
      method: "currentJump",
      certain: true,
    });
  });

  it("is not a single bad sample, nor the strong current that pulls the brake in", () => {
    const coil = warmingCoil();
    const blip = (timeS: number) => (timeS === 600 ? 0 : coil.current(timeS));
    expect(analyseRun(brake({ columns: { ...coil, current: blip } })).fault).toBeNull();
    const pullIn = (timeS: number) => (timeS === 0 ? 1.6 : coil.current(timeS));
    expect(analyseRun(brake({ columns: { ...coil, current: pullIn } })).fault).toBeNull();
  });
});

describe("the coil's own temperature", () => {
  it("follows from U/I and the rated resistance", () => {
    const { coil } = analyseRun(brake(), { coil: { ohmAt20: 57.6 } });
    expect(coil?.basis.method).toBe("ratedResistance");
    expect(coil?.values.at(-1)).toBeCloseTo(warmingCoil().temperature(2700), 6);
  });

  it("or from the first row, where no rating is known", () => {
    const { coil } = analyseRun(brake());
    expect(coil?.basis).toMatchObject({ method: "firstRow", celsius: 22 });
    expect(coil?.values.at(-1)).toBeCloseTo(warmingCoil().temperature(2700), 6);
  });

  it("is not taken from a motor's current", () => {
    const columns = { ...warmingCoil(), speed: () => 1500 };
    expect(analyseRun(brake({ columns })).coil).toBeNull();
    expect(analyseRun(brake({ columns: { temperature: () => 20 } })).coil).toBeNull();
  });
});

describe("what a person should look at before believing a log", () => {
  const coil = warmingCoil();

  it("is nothing in an honest one", () => {
    expect(codes(analyseRun(brake()))).toEqual([]);
  });

  it("a temperature that falls while the current stays", () => {
    const loose = (timeS: number) => (timeS < 1200 ? coil.temperature(timeS) : 40);
    const { findings } = analyseRun(brake({ columns: { ...coil, temperature: loose } }));
    expect(findings).toContainEqual({
      code: "fallingWhileEnergised",
      detail: { heading: "temperature", kelvin: 31.4, minutes: 19, seconds: 25 },
    });
  });

  it("a current that does not fall as copper warms", () => {
    const { findings } = analyseRun(brake({ columns: { ...coil, current: () => 0.417 } }));
    expect(findings).toContainEqual({
      code: "currentNotFalling",
      detail: { kelvin: 63, fromAmpere: 0.417, toAmpere: 0.417, owedPercent: 19 },
    });
  });

  it("but not where the supply sank as much, nor with a motor", () => {
    const sinking = {
      ...coil,
      current: () => 0.35,
      voltage: (timeS: number) => (0.35 * 24) / coil.current(timeS),
    };
    expect(codes(analyseRun(brake({ columns: sinking })))).toEqual([]);
    expect(
      codes(analyseRun(brake({ columns: { ...coil, current: () => 8 } }), { currentThrough: "load" })),
    ).toEqual([]);
  });

  it("U/I that jumps: a joint that comes and goes", () => {
    const joint = (timeS: number, index: number) => coil.current(timeS) * (index % 40 === 20 ? 0.7 : 1);
    const { findings } = analyseRun(brake({ columns: { ...coil, current: joint } }));
    expect(findings[0]).toMatchObject({ code: "resistanceJumping", detail: { times: 14, line: 22 } });
    const coarse = (timeS: number) => Math.round(coil.current(timeS) * 10) / 10;
    expect(codes(analyseRun(brake({ columns: { ...coil, current: coarse } })))).not.toContain(
      "resistanceJumping",
    );
  });

  it("a temperature that never moves, or freezes in the middle of a rise; but not one that has settled", () => {
    const dead = analyseRun(brake({ columns: { ...coil, temperature: () => 22.1 } }));
    expect(codes(dead)).toContain("flatTemperature");
    const frozen = (timeS: number) => coil.temperature(Math.min(timeS, 600));
    expect(codes(analyseRun(brake({ columns: { ...coil, temperature: frozen } })))).toContain(
      "flatTemperature",
    );
    const settled = (timeS: number) => Math.round(coil.temperature(timeS) * 10) / 10;
    expect(codes(analyseRun(brake({ lastS: 9000, columns: { ...coil, temperature: settled } })))).toEqual([]);
  });

  it("a block of rows that stands there twice, and where", () => {
    const rough = (timeS: number) => coil.temperature(timeS) + 0.3 * Math.sin(timeS ** 1.5);
    const copied = (timeS: number) => rough(timeS >= 1500 && timeS < 1800 ? timeS - 600 : timeS);
    const log = brake({ columns: { temperature: copied } });
    expect(analyseRun(log).findings).toContainEqual({
      code: "identicalRows",
      detail: { rows: 30, firstLine: 92, secondLine: 152 },
    });
    expect(codes(analyseRun(brake({ columns: { temperature: rough } })))).toEqual([]);
  });

  it("but not the few figures a settled temperature has by nature", () => {
    const settled = (_: number, index: number) => 60 + ((index * index) % 6 > 2 ? 0.1 : 0.2);
    expect(codes(analyseRun(brake({ lastS: 20_000, columns: { temperature: settled } })))).toEqual([]);
  });

  it("files glued together, an ambient that drifts, a start that was not cold", () => {
    const notes = [{ code: "clockStep", detail: { line: 12, rows: 3 } }] as const;
    const columns = { ...coil, ambient: (timeS: number) => 18 + timeS / 400 };
    expect(codes(analyseRun(brake({ notes, columns })))).toEqual(["clockStep", "ambientDrift", "startsWarm"]);
  });
});

it("reads a whole file from its text to its fault", () => {
  const coil = warmingCoil(110);
  const rows = Array.from({ length: 57 }, (_, index) => {
    const timeS = index * 10;
    const cells = [timeS, coil.temperature(timeS).toFixed(1), "22,0", coil.current(timeS).toFixed(3), "24,0"];
    return [...cells, index === 56 ? "Bremse blockiert" : ""].join(";").replaceAll(".", ",");
  });
  const text = ["t_s;T_Spule_°C;T_amb_°C;I_A;U_V;Ereignis", ...rows].join("\r\n");
  const log = given(parseRunLog(text));
  const analysis = analyseRun(log, { limits: [TOUCH], coil: { ohmAt20: 57.6 } });
  expect(log.notes).toEqual([]);
  expect(analysis.fault).toMatchObject({ afterS: 560, method: "markedRow", text: "Bremse blockiert" });
  expect(analysis.hottest?.peakCelsius).toBe(62.8);
  expect(analysis.coil?.values.at(-1)).toBeCloseTo(62.8, 0);
  expect(analysis.findings).toEqual([]);
});

it("answers a log of a hundred thousand rows within seconds", () => {
  const coil = warmingCoil();
  const log = madeRun({ lastS: 10_000, stepS: 0.1, columns: coil });
  const start = performance.now();
  analyseRun(log, { limits: [TOUCH], coil: { ohmAt20: 57.6 } });
  expect(performance.now() - start).toBeLessThan(5_000);
});
