import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { readScan, SCAN_WARNINGS } from "@/lib/labels/scan";

const [GS, RS, EOT] = ["\u001d", "\u001e", "\u0004"];
const today = calendarDay("2026-12-01");
const scan = (raw: string) => readScan(raw, today);
const codes = (raw: string) => scan(raw).warnings.map(({ code }) => code);

describe("a scanned GS1 label", () => {
  // Vectors of GS1's syntax engine (scandata.c); symbology identifiers of ISO/IEC 15424.
  it.each(["]C1", "]Q3", "]d2", "]e0", "]J1"])("is read after %s", (symbol) => {
    expect(scan(`${symbol}011231231231233310ABC123${GS}99TESTING`)).toMatchObject({
      form: "gs1",
      gtin: "12312312312333",
      batch: "ABC123",
      serial: null,
    });
  });

  it.each(["]Q1", "]d1"])("is plain data after %s", (symbol) => {
    expect(scan(`${symbol}011231231231233310ABC123`)).toMatchObject({
      form: "plain",
      serial: "011231231231233310ABC123",
    });
  });

  it("is an article number after ]E0", () => {
    expect(scan("]E02112345678900")).toMatchObject({ form: "plain", gtin: "02112345678900", serial: null });
  });

  // The first line is a public test vector, the others were worked out by hand.
  it.each([
    [`010541234500001310ABC123${GS}17290331`, { gtin: "05412345000013", batch: "ABC123", serial: null }],
    [`010950600013435221S-1${GS}10L7${GS}11260300`, { serial: "S-1", batch: "L7", producedOn: "2026-03-31" }],
    ["(01)09506000134352(21)12345", { form: "bracketed", gtin: "09506000134352", serial: "12345" }],
    ["(21)12345(241)BR-24", { form: "bracketed", serial: "12345", partNumber: "BR-24" }],
    [
      "https://id.gs1.org/01/09506000134352/10/ABC1/21/12345?17=180426",
      { form: "digitalLink", serial: "12345", batch: "ABC1" },
    ],
    ["010950600013435221S-1<GS>10L7", { form: "gs1", serial: "S-1", batch: "L7" }],
  ])("%j without a symbology identifier is known by its beginning", (raw, said) => {
    expect(scan(raw)).toMatchObject({ raw, ...said });
  });

  it("asks about a serial that a lost separator may have put into the batch", () => {
    expect(scan("010950600013435210ABC12112345")).toMatchObject({ batch: "ABC12112345", serial: null });
    expect(scan("010950600013435210ABC12112345").warnings).toContainEqual({
      code: "separatorMayBeMissing",
      detail: { batch: "ABC1", serial: "12345" },
    });
  });

  it.each([
    `010950600013435210ABC12112345${GS}17290331`,
    "(01)09506000134352(10)ABC12112345",
    `010950600013435210A21121${GS}2177`,
  ])("does not ask where the separator did arrive or none was due: %j", (raw) => {
    expect(codes(raw)).not.toContain("separatorMayBeMissing");
  });

  it("warns where others would refuse: a serial alone, a wrong check digit, a day that does not exist", () => {
    expect(codes("(21)12345")).toEqual(["articleNumberMissing"]);
    expect(codes("(01)09506000134353(21)12345")).toEqual(["checkDigitWrong"]);
    expect(scan("(01)09506000134353(21)12345")).toMatchObject({ gtin: null, serial: "12345" });
    expect(codes("(01)09506000134352(11)210229(21)1")).toEqual(["dayWrong"]);
  });
});

describe("an ISO/IEC 15434 message", () => {
  // Both messages come from the tests of open-source readers; the meaning of the identifiers is from memory.
  const message = `[)>${RS}06${GS}9N111234567842${GS}1T1A234B5${GS}D151231${GS}S1234567890123456${RS}${EOT}`;
  const parts = `[)>${RS}06${GS}P595-LM358N${GS}1P296-1395-1-ND${GS}Q2500${GS}1TLOT4711${RS}${EOT}`;

  it("gives serial, batch and part number", () => {
    expect(scan(message)).toMatchObject({
      form: "envelope",
      serial: "1234567890123456",
      batch: "1A234B5",
      warnings: [],
    });
    expect(scan(parts)).toMatchObject({ serial: null, batch: "LOT4711", partNumber: "296-1395-1-ND" });
    expect(scan(parts).fields).toContainEqual({ di: "Q", value: "2500" });
    expect(scan(message).fields).toContainEqual({ di: "D", value: "151231" });
  });

  // Kinds of damage seen in public code.
  it.each([
    ["a > in front", ">" + message],
    ["no record separator in the header", message.replace(RS, "")],
    ["no record separator at the end", message.replace(RS + EOT, EOT)],
    ["EOT as letters", message.replace(EOT, "EOT")],
    ["no end at all", message.replace(RS + EOT, "")],
    ["question marks for separators", message.replaceAll(GS, "?").replaceAll(RS, "?")],
    ["separators as words", message.replaceAll(GS, "<GS>").replaceAll(RS, "<RS>").replace(EOT, "<EOT>")],
    ["a symbology identifier", "]d1" + message],
  ])("is read with %s", (_damage, raw) => {
    expect(scan(raw)).toMatchObject({ raw, form: "envelope", serial: "1234567890123456", batch: "1A234B5" });
  });

  it("holds GS1 elements in format 05", () => {
    expect(scan(`[)>${RS}05${GS}010950600013435221S-1${GS}10L7${RS}${EOT}`)).toMatchObject({
      form: "gs1",
      serial: "S-1",
      batch: "L7",
    });
  });

  it("is unreadable in a format we do not know", () => {
    expect(scan(`[)>${RS}12${GS}SER 1${RS}${EOT}`)).toMatchObject({ form: "unreadable", serial: null });
  });
});

describe("any other text", () => {
  it("is a serial, in its own spelling", () => {
    expect(scan("]A0 B0O8-1LI7")).toMatchObject({ form: "plain", serial: " B0O8-1LI7".trim() });
    expect(scan(" b0o8 1li7 ")).toMatchObject({
      raw: " b0o8 1li7 ",
      form: "plain",
      serial: "b0o8 1li7",
      warnings: [],
    });
    expect(scan("12345")).toMatchObject({ form: "plain", serial: "12345", warnings: [] });
  });

  it("may be the number of the article: then it asks", () => {
    expect(codes("5012345678900")).toEqual(["looksLikeArticleNumber"]);
    expect(codes("5012345678901")).toEqual([]);
  });

  it.each([
    "",
    "   ",
    "(10)(11)98765",
    "(1A)12345",
    "https://example.org/a",
    "https://a/01/12345670",
    "line one\nline two",
    "x".repeat(61),
  ])("is kept as raw text and named unreadable: %j", (raw) => {
    expect(scan(raw)).toMatchObject({ raw, form: "unreadable", serial: null, batch: null, gtin: null });
    expect(codes(raw)).toHaveLength(1);
  });

  it("never is a fault", () => {
    const pieces = fc.constantFrom(
      "01",
      "(21)",
      "[)>",
      RS,
      "06",
      GS,
      "]C1",
      "https://a/01/",
      "12312312312333",
      "S1",
      EOT,
      "%",
      "?",
    );
    fc.assert(
      fc.property(fc.array(fc.oneof(pieces, fc.string({ unit: "binary", maxLength: 8 }))), (texts) => {
        expect(scan(texts.join("")).raw).toBe(texts.join(""));
      }),
      { numRuns: 1000 },
    );
  });
});

describe("warnings", () => {
  it.each(["en", "de"])("each have a sentence in %s", (language) => {
    const file = new URL(`../../../messages/${language}/labels.json`, import.meta.url);
    const { warnings } = JSON.parse(readFileSync(file, "utf8"));
    expect(Object.keys(warnings).toSorted()).toEqual(SCAN_WARNINGS.toSorted());
  });
});
