import { describe, expect, it } from "vitest";
import { COLUMN_KEYS } from "@/lib/imports/columns";
import { exampleFile } from "@/lib/imports/example";
import { cellOf, cellsOutside } from "@/lib/imports/csv-file";
import { readCsv } from "@/lib/imports/csv-service";
import { HEAD, lineWith } from "./invoice-file";

const utf8 = (text: string) => new TextEncoder().encode(text);
const latin1 = (text: string) => Uint8Array.from(Buffer.from(text, "latin1"));
const fileFrom = async (bytes: Uint8Array, most = 100) => {
  const read = await readCsv(bytes, most);
  if (!read.ok) throw new Error(read.code);
  return read.value;
};
const codeOf = async (text: string, most = 100) => {
  const read = await readCsv(utf8(text), most);
  return read.ok ? "read" : read.code;
};

const GERMAN = "Kd.-Nr;Rechnungsnummer;Pos.;Rechnungsdatum;Artikelnummer;Stückpreis;USt-Kategorie;MwSt-Satz";

describe("an invoice file", () => {
  it.each([
    ["comma", HEAD, ","],
    ["semicolon", HEAD.replaceAll(",", ";"), ";"],
    ["tab", HEAD.replaceAll(",", "\t"), "\t"],
  ])("is read with a %s between its cells", async (_name, head, delimiter) => {
    const file = await fileFrom(utf8(`${head}\r\n${lineWith().replaceAll(",", delimiter)}\r\n`));
    expect(file.delimiter).toBe(delimiter);
    expect(file.rows.map((row) => cellOf(file.heading, row, "serial"))).toEqual(["AA-1"]);
  });

  it("is read with German headings, decimal comma and semicolons", async () => {
    const file = await fileFrom(utf8(`${GERMAN}\nK-1;R-1;1;2.3.2026;BR-1;184,50;S;19`));
    const [row] = file.rows;
    expect(row && cellOf(file.heading, row, "netPrice")).toBe("184,50");
    expect(row && cellOf(file.heading, row, "site")).toBe("");
  });

  it("is read with and without the mark of UTF-8, and in Windows-1252 with a notice", async () => {
    const text = `${GERMAN}\nKöhler;R-1;1;2.3.2026;BR-1;1;S;19`;
    for (const [bytes, encoding] of [
      [utf8(text), "utf-8"],
      [utf8(`\ufeff${text}`), "utf-8"],
      [latin1(text), "windows-1252"],
    ] as const) {
      const file = await fileFrom(bytes);
      const [row] = file.rows;
      expect(file.encoding).toBe(encoding);
      expect(row && cellOf(file.heading, row, "account")).toBe("Köhler");
    }
  });

  it("knows on which line of the file a row begins, past blank lines and cells with breaks in them", async () => {
    const file = await fileFrom(utf8(`${HEAD}\n\n${lineWith({ batch: '"L\n1"' })}\n,,,\n${lineWith()}\n`));
    expect(file.rows.map(({ line }) => line)).toEqual([3, 6]);
  });

  it("takes off the quote that keeps a spreadsheet from running a cell", async () => {
    const file = await fileFrom(utf8(`${HEAD}\n${lineWith({ serial: "'-77", batch: "'A" })}`));
    const [row] = file.rows;
    expect(row && cellOf(file.heading, row, "serial")).toBe("-77");
    expect(row && cellOf(file.heading, row, "batch")).toBe("'A");
  });

  it("names headings that mean nothing, and leaves their cells out", async () => {
    expect((await fileFrom(utf8(`${HEAD},Sales rep,\n${lineWith()},Vale,`))).heading.unread).toEqual([
      "Sales rep",
    ]);
  });

  it.each([
    ["no column it needs", "a,b\n1,2", "importColumnsMissing"],
    ["two headings for one column", `${HEAD},Kunde\n${lineWith()},K-2`, "importColumnTwice"],
    ["no line", `${HEAD}\n\n`, "importWithoutLines"],
    ["nothing", "", "importWithoutLines"],
    ["a quotation mark that never closes", `${HEAD}\n"${lineWith()}\n${lineWith()}`, "importQuoteOpen"],
    ["a cell without end", `${HEAD}\n${"x".repeat(30_000)}`, "importLineTooLong"],
    ["a NUL", `${HEAD}\n\0`, "importNotText"],
    ["a thousand columns", `${HEAD}${",x".repeat(1000)}\n${lineWith()}`, "importTooManyColumns"],
  ])("is refused with %s", async (_name, text, code) => {
    expect(await codeOf(text)).toBe(code);
  });

  it("is refused above the most lines, and taken at it", async () => {
    const text = [HEAD, lineWith(), lineWith()].join("\n");
    expect(await codeOf(text, 2)).toBe("read");
    expect(await codeOf(text, 1)).toBe("importTooManyLines");
  });

  it.each([
    ["utf-8", utf8, "\n"],
    ["utf-8", utf8, "\r\n"],
    ["utf-8", utf8, "\r"],
    ["windows-1252", latin1, "\r\n"],
  ] as const)(
    "in %s is the same wherever it is cut into pieces while it is read",
    async (encoding, of, end) => {
      const text = [GERMAN, ...Array.from({ length: 3_000 }, (_line, at) => `Köhler${at};"ä\u00a0;";${at}`)];
      const file = await fileFrom(of(text.join(end)), 3_000);
      expect(file.encoding).toBe(encoding);
      expect(file.rows.map(({ cells }) => cells.join("|"))).toEqual(
        Array.from({ length: 3_000 }, (_line, at) => `Köhler${at}|ä\u00a0;|${at}`),
      );
      expect(file.rows.at(-1)?.line).toBe(3_001);
    },
  );

  it("reads the letters that Windows-1252 has and Latin-1 has not", async () => {
    const bytes = Buffer.concat([utf8(`${HEAD}\n`), Buffer.from([0x80, 0x84, 0xe4]), utf8(`,${lineWith()}`)]);
    expect((await fileFrom(bytes)).rows[0]?.cells[0]).toBe("€„ä");
  });

  it("counts the cells that lie outside, and keeps only some of them", async () => {
    const { heading, rows } = await fileFrom(utf8(`${HEAD}\n${lineWith()}${",".repeat(5_000)}x`));
    const [row] = rows;
    expect(row && cellsOutside(heading, row)).toBe(5_000);
    expect(row?.cells.length).toBeLessThan(200);
  });

  it.each(["en", "de"] as const)("reads its own example in %s, every column found", async (locale) => {
    const file = await fileFrom(utf8(exampleFile(locale)));
    expect([...file.heading.places.keys()]).toEqual(COLUMN_KEYS);
    expect(file.heading.unread).toEqual([]);
    expect(file.rows).toHaveLength(3);
  });
});
