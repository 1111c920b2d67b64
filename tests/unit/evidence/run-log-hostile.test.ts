import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { seriesOf } from "@/lib/evidence/run-log";
import { RUN_LOG_LIMITS } from "@/lib/evidence/run-log-limits";
import { parseRunLog } from "@/lib/evidence/run-log-parser";
import { given } from "./outcome-value";

const head = "t_s;T_C\n0;20\n10;21\n";

/** The refusal code of a file, and that it came within the time a person waits. */
function refusalOf(source: Uint8Array | string, seconds = 5): string {
  const start = performance.now();
  const outcome = parseRunLog(source);
  expect(performance.now() - start).toBeLessThan(seconds * 1000);
  return outcome.ok ? "read" : outcome.code;
}

describe("a hostile file is refused by name, in bounded time", () => {
  it.each([
    ["a quote that never closes", `${head}20;"22\n30;23\n40;24`, "runLogQuoteOpen"],
    [
      "a quote that never closes, then 5 MB",
      `${head}20;"22\n${"30;23\n".repeat(900_000)}`,
      "runLogLineTooLong",
    ],
    ["a NUL", `${head}20;2\0`, "runLogBinary"],
    [
      "1000 columns",
      `${Array.from({ length: 1000 }, (_, n) => `T${n}`).join(";")}\n${head}`,
      "runLogTooManyColumns",
    ],
    ["1000 cells under a good heading", `${head}${"1;".repeat(999)}1\n`, "runLogTooManyColumns"],
    ["one cell of 1 MB", `${head}20;${"9".repeat(1_000_000)}\n`, "runLogLineTooLong"],
    ["a heading of 1 MB", `t_s;${"T".repeat(1_000_000)}\n0;20`, "runLogLineTooLong"],
    ["20 MB of commas on one line", ",".repeat(20_000_000), "runLogLineTooLong"],
    ["20 MB of line ends", "\n".repeat(20_000_000), "runLogEmpty"],
    ["20 MB of quotes", '"'.repeat(20_000_000), "runLogLineTooLong"],
    ["too many bytes", "x".repeat(RUN_LOG_LIMITS.bytes + 1), "runLogTooBig"],
  ])("%s", (_name, text, code) => {
    expect(refusalOf(text)).toBe(code);
  });

  it("more rows than the limit, and cells enough to fill the file", () => {
    expect(refusalOf(`t_s;T_C\n${"1;2\n".repeat(RUN_LOG_LIMITS.rows + 100)}`)).toBe("runLogTooManyRows");
    expect(refusalOf(`t_s;${"T1;".repeat(60)}\n${`${"1;".repeat(62)}\n`.repeat(190_000)}`)).toBe(
      "runLogTooManyCells",
    );
  });

  it("as many rows as the limit allows are read", () => {
    const rows = Array.from(
      { length: RUN_LOG_LIMITS.rows },
      (_, index) => `${index},${20 + (index % 50) / 10},0.4`,
    );
    const start = performance.now();
    const log = given(parseRunLog(["t_s,T_C,I_A", ...rows].join("\n")));
    expect(performance.now() - start).toBeLessThan(5_000);
    expect(log.timeS).toHaveLength(RUN_LOG_LIMITS.rows);
  });

  it("times that run away do not become figures", () => {
    expect(refusalOf("t_s;T_C\n1e99;20\n1e308;21")).toBe("runLogNoRows");
    expect(refusalOf(`t_s;T_C\n${"9".repeat(30)};20\n${"9".repeat(31)};21`)).toBe("runLogNoRows");
  });
});

describe("anything at all", () => {
  const finite = (outcome: ReturnType<typeof parseRunLog>) => {
    if (!outcome.ok) return;
    const { timeS, series } = outcome.value;
    expect(timeS.every((time, index) => Number.isFinite(time) && time >= (timeS[index - 1] ?? 0))).toBe(true);
    for (const { values } of series) {
      expect(values).toHaveLength(timeS.length);
      expect(values.every((value) => value === null || Number.isFinite(value))).toBe(true);
    }
  };

  it("as bytes is read or refused, never thrown", () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 400 }), (bytes) => finite(parseRunLog(bytes))),
      { numRuns: 500 },
    );
  });

  it("as cells under a good heading is read or refused, never thrown, and never yields a figure without end", () => {
    const cell = fc.oneof(
      fc.string({ unit: "binary", maxLength: 12 }),
      fc.constantFrom(
        "",
        "1e99",
        "-1E-99",
        "1.234,5",
        "12:03",
        "99:99:99",
        '"',
        "∞",
        "NaN",
        "2027-13-45 25:61",
        "1.234",
      ),
      fc.double().map(String),
    );
    const row = fc.array(cell, { maxLength: 6 }).map((cells) => cells.join(";"));
    fc.assert(
      fc.property(fc.array(row, { maxLength: 12 }), (rows) =>
        finite(parseRunLog(["t_s;T_C;I_mA;U;event", "0;20;1;24;", "10;21;1;24;", ...rows].join("\n"))),
      ),
      { numRuns: 1000 },
    );
  });
});

it("gives back what was written, in any mix of delimiter, decimal mark, unit of time and line end", () => {
  const rows = fc.array(fc.tuple(fc.integer({ min: 1, max: 600 }), fc.integer({ min: -400, max: 3000 })), {
    minLength: 3,
    maxLength: 30,
  });
  const manner = fc.record({
    delimiter: fc.constantFrom(";", "\t", "|"),
    decimal: fc.constantFrom(".", ","),
    newline: fc.constantFrom("\n", "\r\n"),
    time: fc.constantFrom(
      { heading: "t_s", divisor: 1 },
      { heading: "Zeit (min)", divisor: 60 },
      { heading: "Time [ms]", divisor: 0.001 },
    ),
  });
  fc.assert(
    fc.property(rows, manner, (steps, { delimiter, decimal, newline, time }) => {
      let clock = 0;
      const written = steps.map(([step, tenths]) => ({ timeS: (clock += step), celsius: tenths / 10 }));
      const text = [`${time.heading}${delimiter}T [°C]`]
        .concat(
          written.map((row) =>
            [(row.timeS / time.divisor).toFixed(4), row.celsius.toFixed(1)]
              .join(delimiter)
              .replaceAll(".", decimal),
          ),
        )
        .join(newline);
      const log = given(parseRunLog(text));
      const zero = (log.timeS[0] ?? 0) - (written[0]?.timeS ?? 0);
      for (const [index, row] of written.entries())
        expect((log.timeS[index] ?? 0) - zero).toBeCloseTo(row.timeS, 1);
      expect(seriesOf(log, "temperature")[0]?.values).toEqual(written.map((row) => row.celsius));
    }),
  );
});
