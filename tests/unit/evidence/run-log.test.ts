import { describe, expect, it } from "vitest";
import { seriesOf } from "@/lib/evidence/run-log";
import { inShort, noteCodes, read, refusalOf } from "./log-in-short";

const ROWS = [
  ["0", "22.5", "0.417"],
  ["10", "23.1", "0.415"],
  ["20", "24.0", "0.412"],
];
const EXPECTED = { timeS: [0, 10, 20], celsius: [22.5, 23.1, 24], ampere: [0.417, 0.415, 0.412] };

const asFile = (heading: readonly string[], delimiter: string, decimal: string, newline = "\n") =>
  [heading, ...ROWS.map((row) => row.map((cell) => cell.replace(".", decimal)))]
    .map((row) => row.join(delimiter))
    .join(newline);

describe("the same run, however it was written down", () => {
  const headings = [
    ["t_s", "T_case_C", "I_A"],
    ["Time [s]", "Temp (°C)", "Current (A)"],
    ["Zeit in s", "Temperatur in °C", "Strom in A"],
    ["Laufzeit/s", "T Gehäuse/°C", "Spulenstrom/A"],
  ];
  const files = headings.flatMap((heading) =>
    [";", "\t", ",", "|"].flatMap((delimiter) =>
      (delimiter === "," ? ["."] : [".", ","]).flatMap((decimal) =>
        ["\n", "\r\n", "\r"].map((newline) => ({ heading, delimiter, decimal, newline })),
      ),
    ),
  );

  it.each(files)("%j", ({ heading, delimiter, decimal, newline }) => {
    const log = read(asFile(heading, delimiter, decimal, newline));
    expect(inShort(log)).toEqual(EXPECTED);
    expect(log.notes).toEqual([]);
    expect(log.lines).toEqual([2, 3, 4]);
    expect(log.stepS).toBe(10);
  });

  const text = asFile(["t_s", "T_case [°C]", "I_A"], ";", ",", "\r\n");
  it.each([
    ["UTF-8", new TextEncoder().encode(text)],
    ["UTF-8 with its mark", new TextEncoder().encode(`\uFEFF${text}`)],
    ["UTF-16 little endian with its mark", new Uint8Array(Buffer.from(`\uFEFF${text}`, "utf16le"))],
    ["UTF-16 little endian without", new Uint8Array(Buffer.from(text, "utf16le"))],
    ["UTF-16 big endian with its mark", new Uint8Array(Buffer.from(`\uFEFF${text}`, "utf16le").swap16())],
    ["UTF-16 big endian without", new Uint8Array(Buffer.from(text, "utf16le").swap16())],
  ])("in %s", (_name, bytes) => {
    const log = read(bytes);
    expect(inShort(log)).toEqual(EXPECTED);
    expect(log.notes).toEqual([]);
  });

  it("in Windows text, with a note", () => {
    const log = read(new Uint8Array(Buffer.from(text, "latin1")));
    expect(inShort(log)).toEqual(EXPECTED);
    expect(noteCodes(log)).toEqual(["encodingAssumed"]);
  });

  it("quoted, and with sep= above it", () => {
    expect(
      inShort(
        read('sep=,\n"t, s","Temp, °C","I, A"\n"0","22,5","0,417"\n"10","23,1","0,415"\n"20","24,0","0,412"'),
      ),
    ).toEqual(EXPECTED);
    const log = read(`sep=;\r\n${text}`);
    expect(inShort(log)).toEqual(EXPECTED);
    expect(log.lines).toEqual([3, 4, 5]);
  });

  it("in minutes, °F and mA", () => {
    const log = read("t_min;T_coil_F;I_mA\n0;72,5;417\n0,5;212;415\n1;213,8;412");
    expect(log.timeS).toEqual([0, 30, 60]);
    expect(inShort(log).celsius).toEqual([22.5, 100, 101]);
    expect(inShort(log).ampere).toEqual([0.417, 0.415, 0.412]);
  });

  it("with units in a row of their own", () => {
    const log = read("Zeit;Temperatur;Strom;Drehzahl\nmin;°F;mA;1/min\n0;212;500;1500\n1;213,8;490;1480");
    expect(log.timeS).toEqual([0, 60]);
    expect(inShort(log).celsius).toEqual([100, 101]);
    expect(inShort(log).ampere).toEqual([0.5, 0.49]);
    expect(seriesOf(log, "speed")[0]?.values).toEqual([1500, 1480]);
    expect(noteCodes(log)).toEqual([]);
  });

  it("with lines about the rig above the heading, and a unit behind each value", () => {
    const log = read("Rig: bench 2\nOperator;M.\n\nTime;Temp\n0 s;22.5 °C\n10 s;73.58 °F");
    expect(log.timeS).toEqual([0, 10]);
    expect(inShort(log).celsius).toEqual([22.5, 23.1]);
    expect(log.notes).toEqual([
      { code: "linesBeforeHeader", detail: { lines: 2 } },
      { code: "unitAssumed", detail: { heading: "Temp", unit: "°C" } },
    ]);
  });
});

describe("headings", () => {
  it.each([
    ["T_amb", "ambient"],
    ["T_a", "ambient"],
    ["Ambient [°C]", "ambient"],
    ["Umgebungstemperatur °C", "ambient"],
    ["Room temp (C)", "ambient"],
    ["T", "temperature"],
    ["T1", "temperature"],
    ["TC2 (°C)", "temperature"],
    ["Spulentemperatur", "temperature"],
    ["coil", "temperature"],
    ["case_C", "temperature"],
    ["temp_min", "temperature"],
    ["Temp A", "temperature"],
    ["Probe 3 in °F", "temperature"],
    ["I", "current"],
    ["Strom", "current"],
    ["Brake current mA", "current"],
    ["A", "current"],
    ["U", "voltage"],
    ["Spannung [V]", "voltage"],
    ["V_brake", "voltage"],
    ["rpm", "speed"],
    ["Drehzahl (1/min)", "speed"],
    ["n [U/min]", "speed"],
    ["Bemerkung", "event"],
    ["Fault", "event"],
    ["Status", "event"],
    ["air gap (mm)", "notUsed"],
    ["Speed (km/h)", "notUsed"],
    ["Pressure [bar]", "notUsed"],
    ["No.", "notUsed"],
    ["n", "notUsed"],
  ])("%s is taken as %s", (heading, takenAs) => {
    const log = read(`t_s;${heading};T_x_C\n0;1;20\n10;1;21`);
    expect(log.columns[1]).toMatchObject({ heading, takenAs });
  });

  it.each([
    "t",
    "Time",
    "Zeit",
    "Uhrzeit",
    "Elapsed",
    "time (s)",
    "T [s]",
    "T_s",
    "Timestamp",
    "Date/Time",
    "s",
    "Run time",
    "Current time",
  ])("%s is the time", (heading) => {
    const log = read(`${heading};Temp (°C)\n00:00:10;20\n00:00:20;21`);
    expect(log.columns[0]?.takenAs).toBe("time");
    expect(log.timeS).toEqual([0, 10]);
  });

  it("names what it left out", () => {
    const log = read("t_s,T_C,Torque\n0,20,1\n10,21,1");
    expect(log.notes).toEqual([{ code: "columnNotUsed", detail: { heading: "Torque" } }]);
  });
});

describe("times", () => {
  const timesOf = (cells: readonly string[], heading = "Time") =>
    read([`${heading};T_C`, ...cells.map((cell, index) => `${cell};${20 + index}`)].join("\n"));

  it.each([
    [
      ["14:03:05", "14:03:15", "14:04:05"],
      [0, 10, 60],
    ],
    [
      ["2:03:05 PM", "2:03:15 PM", "2:04:05 pm"],
      [0, 10, 60],
    ],
    [
      ["11:59:55 AM", "12:00:05 PM", "12:00:55 PM"],
      [0, 10, 60],
    ],
    [
      ["14:03:05.250", "14:03:05.750", "14:03:06.250"],
      [0, 0.5, 1],
    ],
    [
      ["14:03:05,250", "14:03:05,750", "14:03:06,250"],
      [0, 0.5, 1],
    ],
    [
      ["14:03", "14:04", "14:06"],
      [0, 60, 180],
    ],
    [
      ["23:59:50", "00:00:00", "00:00:50"],
      [0, 10, 60],
    ],
    [
      ["2027-05-03T14:03:05Z", "2027-05-03T14:03:15Z", "2027-05-03T14:04:05Z"],
      [0, 10, 60],
    ],
    [
      ["2027-05-03 23:59:50", "2027-05-04 00:00:00", "2027-05-04 00:00:50"],
      [0, 10, 60],
    ],
    [
      ["2027-05-03T14:03:05+02:00", "2027-05-03T12:03:15Z", "2027-05-03T14:04:05+02:00"],
      [0, 10, 60],
    ],
    [
      ["03.05.2027 14:03:05", "03.05.2027 14:03:15", "03.05.2027 14:04:05"],
      [0, 10, 60],
    ],
    [
      ["31.12.27 23:59:50", "01.01.28 00:00:00", "01.01.28 00:00:50"],
      [0, 10, 60],
    ],
    [
      ["05/03/2027 23:59:50", "05/04/2027 00:00:00", "05/04/2027 00:00:50"],
      [0, 10, 60],
    ],
    [
      ["1809784985000", "1809784995000", "1809785045000"],
      [0, 10, 60],
    ],
    [
      ["1809784985", "1809784995", "1809785045"],
      [0, 10, 60],
    ],
    [
      ["05:20.5", "05:30.5", "06:20.5"],
      [0, 10, 60],
    ],
  ])("%j", (cells, seconds) => {
    expect(timesOf(cells).timeS).toEqual(seconds);
  });

  it("of two parts are minutes and seconds where the heading or the figures say so, and refused where nothing does", () => {
    expect(timesOf(["00:00", "00:10", "01:00"], "Time (mm:ss)").timeS).toEqual([0, 10, 60]);
    expect(timesOf(["00:00", "00:10", "01:00"], "Zeit (hh:mm)").timeS).toEqual([0, 600, 3600]);
    expect(timesOf(["23:50", "24:10", "25:00"]).timeS).toEqual([0, 20, 70]);
    expect(refusalOf("Time;T_C\n00:00;20\n00:10;21")).toBe("runLogTimeUnclear");
  });

  it("with the day in a column of its own", () => {
    const log = read("Datum;Uhrzeit;T_C\n31.12.2027;23:59:50;20\n01.01.2028;00:00:10;21");
    expect(log.timeS).toEqual([0, 20]);
    expect(log.columns.map((column) => column.takenAs)).toEqual(["date", "time", "temperature"]);
  });

  it("with the day and the clock in one column called date", () => {
    expect(read("Date;T_C\n2027-05-03 14:03:05;20\n2027-05-03 14:03:15;21").timeS).toEqual([0, 10]);
  });

  it("take elapsed seconds before the clock where both stand there", () => {
    expect(read("Clock time;t_s;T_C\n14:00:00;5;20\n14:00:10;15;21").timeS).toEqual([5, 15]);
  });

  it("keep the log's own zero, unless the first row lies far from it", () => {
    expect(timesOf(["10", "20", "30"], "t_s").timeS).toEqual([10, 20, 30]);
    const late = timesOf(["7210", "7220", "7230"], "t_s");
    expect(late.timeS).toEqual([0, 10, 20]);
    expect(late.notes).toEqual([{ code: "timeRebased", detail: { seconds: 7210 } }]);
  });

  it("without a unit are seconds, and a note says so", () => {
    expect(timesOf(["0", "10", "20"]).notes).toEqual([{ code: "timeUnitAssumed", detail: { unit: "s" } }]);
  });

  it("that step back are two files glued together: the longer stretch is kept and the line named", () => {
    const log = timesOf(["0", "10", "0", "10", "20", "30"], "t_s");
    expect(log.timeS).toEqual([0, 10, 20, 30]);
    expect(log.lines).toEqual([4, 5, 6, 7]);
    expect(log.notes).toEqual([{ code: "clockStep", detail: { line: 4, rows: 2 } }]);
  });

  it("that cannot be read cost their row, and the lines are named", () => {
    const log = timesOf(["0", "soon", "20", "", "40"], "t_s");
    expect(log.timeS).toEqual([0, 20, 40]);
    expect(log.notes).toEqual([{ code: "timeUnreadable", detail: { rows: 2, lines: "3, 5" } }]);
  });
});
