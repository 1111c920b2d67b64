import { describe, expect, it } from "vitest";
import { seriesOf } from "@/lib/evidence/run-log";
import { inShort, noteCodes, read, refusalOf } from "./log-in-short";

describe("values", () => {
  it("that are missing are gaps; unreadable and impossible ones are gaps with a note", () => {
    const log = read("t_s;T_C\n0;20,5\n10;\n20;---\n30;OL\n40;warm\n50;-999\n60;21,5");
    expect(inShort(log).celsius).toEqual([20.5, null, null, null, null, null, 21.5]);
    expect(log.notes).toEqual([
      { code: "valuesUnreadable", detail: { heading: "T_C", cells: 1, lines: "6" } },
      { code: "valuesImpossible", detail: { heading: "T_C", cells: 1, lines: "7" } },
    ]);
  });

  it("take the mark between thousands from the mark of the decimals", () => {
    expect(seriesOf(read("t_s;T_C;n_rpm\n0;20,5;1.480\n10;20,6;998,5"), "speed")[0]?.values).toEqual([
      1480, 998.5,
    ]);
    expect(seriesOf(read('t_s,T_C,n_rpm\n0,20.5,"1,480"\n10,20.6,998.5'), "speed")[0]?.values).toEqual([
      1480, 998.5,
    ]);
    expect(seriesOf(read("t_s;I_A\n0.0;0.417\n0.5;1.2E-1"), "current")[0]?.values).toEqual([0.417, 0.12]);
  });

  it("with nothing but three digits behind the mark are decimals, and a note says so", () => {
    const log = read("t_s;I_A\n1;1.234\n2;1.231");
    expect(seriesOf(log, "current")[0]?.values).toEqual([1.234, 1.231]);
    expect(log.notes).toEqual([{ code: "decimalAssumed", detail: { mark: "." } }]);
  });

  it("of two minds about the decimal mark are refused; a stray one among many is a gap", () => {
    expect(refusalOf("t_s;T_C;I_A\n0;20,5;0.41\n10;20,6;0.42")).toBe("runLogDecimalsMixed");
    const rows = Array.from({ length: 60 }, (_, index) => `${index};20.${index % 10}`);
    const log = read(["t_s;T_C", ...rows, "60;21,5"].join("\n"));
    expect(inShort(log).celsius?.at(-1)).toBeNull();
    expect(noteCodes(log)).toEqual(["valuesUnreadable"]);
  });
});

describe("events", () => {
  const eventsOf = (cells: readonly string[], heading = "Event") =>
    read([`t_s;T_C;${heading}`, ...cells.map((cell, index) => `${index * 10};20;${cell}`)].join("\n")).events;

  it.each(["fault", "FAULT: brake grabs", "Störung", "Bremse blockiert", "tripped", "Ausfall"])(
    "%s marks a fault",
    (text) => {
      expect(eventsOf(["", text, ""])).toEqual([{ index: 1, text, isFault: true }]);
    },
  );

  it.each(["start", "no fault", "kein Fehler", "ohne Störung", "load 5 Nm"])("%s does not", (text) => {
    expect(eventsOf(["", text, ""])).toEqual([{ index: 1, text, isFault: false }]);
  });

  it("a flag column is read by its heading, and a repeated remark is one event", () => {
    expect(eventsOf(["0", "0", "1", "1", "0"], "Fehler")).toEqual([
      { index: 2, text: "Fehler", isFault: true },
    ]);
    expect(eventsOf(["run", "run", "run"], "Status")).toEqual([{ index: 0, text: "run", isFault: false }]);
  });
});

describe("a file that is no run log", () => {
  it.each([
    ["empty", ""],
    ["blank", " \r\n\r\n"],
  ])("%s", (_name, text) => {
    expect(refusalOf(text)).toBe("runLogEmpty");
  });

  it("a picture or an archive", () => {
    expect(refusalOf(new Uint8Array([0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10, 0, 0, 0, 13, 1, 2, 3, 0]))).toBe(
      "runLogBinary",
    );
    expect(refusalOf("t_s;T_C\n0;20\n10;\0\n")).toBe("runLogBinary");
  });

  it("without a heading that names a time and something measured", () => {
    expect(refusalOf("0;20\n10;21")).toBe("runLogNoHeader");
    expect(refusalOf("t_s;weight\n0;20\n10;21")).toBe("runLogNoHeader");
    expect(refusalOf("T_C;I_A\n0;20\n10;21")).toBe("runLogNoHeader");
    expect(refusalOf("just a letter about a brake, with a comma")).toBe("runLogNoHeader");
  });

  it("with a heading and nothing under it", () => {
    expect(refusalOf("t_s;T_C")).toBe("runLogNoRows");
    expect(refusalOf("t_s;T_C\n0;20")).toBe("runLogNoRows");
  });

  it("with the comma both between columns and in numbers", () => {
    expect(refusalOf("t_s,T_C,I_A\n0,0,22,5,0,417\n0,5,23,1,0,415")).toBe("runLogCommaTwice");
  });
});
