import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { calendarDay } from "@/lib/kernel/calendar-day";
import {
  fixedLength,
  gs1Day,
  identifierLength,
  isIdentifier,
  nearYear,
  type Element,
} from "@/lib/labels/application-identifiers";
import { parseDigitalLink } from "@/lib/labels/digital-link";
import { parseBracketed, parseElementString, printElementString } from "@/lib/labels/element-string";

const GS = "\u001d";
const today = calendarDay("2026-12-01");

/** Elements as `01=12312312312333 10=ABC`, or the code of the refusal. */
const shown = (read: ReturnType<typeof parseBracketed>) =>
  read.ok ? read.value.map(({ ai, value }) => `${ai}=${value}`).join(" ") : read.code;
/** The element string with `^` for FNC1, or the code of the refusal. */
const printed = (read: ReturnType<typeof parseBracketed>) =>
  read.ok ? printElementString(read.value) : read.code;

// GS1 Barcode Syntax Dictionary, 2026-01-27, and the test vectors published with its syntax engine (ai.c, dl.c, scandata.c).
describe("application identifiers", () => {
  it.each([
    ["00", 2],
    ["01", 2],
    ["17", 2],
    ["21", 2],
    ["99", 2],
    ["235", 3],
    ["240", 3],
    ["414", 3],
    ["710", 3],
    ["3100", 4],
    ["3950", 4],
    ["4300", 4],
    ["7003", 4],
    ["8011", 4],
  ])("%s has its length by its first two digits", (ai, length) => {
    expect(identifierLength(ai)).toBe(length);
    expect(isIdentifier(ai)).toBe(true);
  });

  it.each(["05", "1A", "12345", "999", "60", ""])("%j is none", (text) => {
    expect(isIdentifier(text)).toBe(false);
  });

  it("end without a separator where their length is predefined, and only there", () => {
    const predefined = [
      "00",
      "01",
      "02",
      "03",
      "11",
      "12",
      "13",
      "15",
      "16",
      "17",
      "20",
      "3100",
      "3695",
      "410",
      "417",
    ];
    expect(predefined.map(fixedLength)).toEqual([18, 14, 14, 14, 6, 6, 6, 6, 6, 6, 2, 6, 6, 13, 13]);
    expect(["10", "21", "22", "235", "240", "37", "400", "8004", "90", "99"].map(fixedLength)).toEqual(
      Array(10).fill(null),
    );
  });
});

describe("a label in readable form", () => {
  it.each([
    ["(10)12345(11)991225", "^1012345^11991225"],
    ["(01)12345678901231(10)12345", "^01123456789012311012345"],
    ["(3100)123456(10)12345", "^31001234561012345"],
    ["(10)12345\\(11)991225", "^1012345(11)991225"],
  ])("%s is the element string %s", (text, elementString) => {
    expect(printed(parseBracketed(text))).toBe(elementString);
  });

  it.each([
    "(10)(11)98765",
    "(1A)12345",
    "12345",
    "(12345)12345",
    "(01)123456789012312(10)12345",
    "(10)12345^",
    "",
    "()1",
    "(10",
    "x(10)1",
  ])("%j is none", (text) => {
    expect(parseBracketed(text).ok).toBe(false);
  });

  it("refuses characters outside set 82, and letters where digits belong", () => {
    expect(shown(parseBracketed("(10)AB C"))).toBe("valueWrong");
    expect(shown(parseBracketed("(10)AB~C"))).toBe("valueWrong");
    expect(shown(parseBracketed("(37)12A"))).toBe("valueWrong");
    expect(shown(parseBracketed(`(21)${"X".repeat(21)}`))).toBe("valueWrong");
    expect(shown(parseBracketed(`(21)${"X".repeat(20)}`))).toBe(`21=${"X".repeat(20)}`);
  });
});

describe("an element string", () => {
  it.each([
    [`011231231231233310ABC123${GS}99TESTING`, "01=12312312312333 10=ABC123 99=TESTING"],
    [`010541234500001310ABC123${GS}17290331`, "01=05412345000013 10=ABC123 17=290331"],
    ["010950600013435210ABC12112345", "01=09506000134352 10=ABC12112345"],
  ])("%j is %s", (text, elements) => {
    expect(shown(parseElementString(text))).toBe(elements);
  });

  it("tolerates a separator too many: in front, after predefined lengths, twice, at the end", () => {
    expect(shown(parseElementString(`${GS}0112312312312333${GS}11991225${GS}${GS}10A${GS}`))).toBe(
      "01=12312312312333 11=991225 10=A",
    );
  });

  it.each(["", GS, "0112345", "05123", `10${GS}11991225`])("%j is none", (text) => {
    expect(parseElementString(text).ok).toBe(false);
  });

  it("reads back every label it prints", () => {
    const set82 = "!\"%&'()*+,-./0123456789:;<=>?ABCXYZ_abcxyz";
    const anyValue = fc.string({ unit: fc.constantFrom(...set82), minLength: 1, maxLength: 20 });
    const anyElement = fc.oneof(
      fc.record({ ai: fc.constantFrom("10", "21", "240", "99"), value: anyValue }),
      fc.record({
        ai: fc.constant("01"),
        value: fc.string({ unit: fc.constantFrom(..."0123456789"), minLength: 14, maxLength: 14 }),
      }),
    );
    fc.assert(
      fc.property(fc.array(anyElement, { minLength: 1, maxLength: 6 }), (elements: Element[]) => {
        const bracketed = elements.map(({ ai, value }) => `(${ai})${value.replaceAll("(", "\\(")}`).join("");
        expect(parseElementString(printElementString(elements).replaceAll("^", GS))).toEqual({
          ok: true,
          value: elements,
        });
        expect(parseBracketed(bracketed)).toEqual({ ok: true, value: elements });
      }),
    );
  });
});

describe("a day on a label", () => {
  // Valid and invalid dates: published vectors of the date linter. Day 00 as the end of the month: from memory.
  it.each([
    ["200229", "2020-02-29"],
    ["000229", "2000-02-29"],
    ["240229", "2024-02-29"],
    ["200600", "2020-06-30"],
    ["991225", "1999-12-25"],
    ["210229", null],
    ["200230", null],
    ["201310", null],
    ["200010", null],
    ["131313", null],
    ["131300", null],
    ["2013", null],
  ])("%s is %s", (yymmdd, day) => {
    expect(gs1Day(yymmdd, today)).toBe(day);
  });

  // GS1 General Specifications 7.12, rule from memory.
  it.each([
    [77, 1977],
    [76, 2076],
    [75, 2075],
    [99, 1999],
    [50, 2050],
    [26, 2026],
  ])("with the year %i is in %i as seen from 2026", (twoDigits, year) => {
    expect(nearYear(twoDigits, 2026)).toBe(year);
  });

  it("goes on to the next century near its end", () => {
    expect([nearYear(0, 2099), nearYear(49, 2099), nearYear(50, 2099)]).toEqual([2100, 2149, 2050]);
  });
});

describe("a Digital Link", () => {
  it.each([
    ["https://a/01/12312312312333/22/TEST/10/ABC/21/XYZ", "^011231231231233322TEST^10ABC^21XYZ"],
    ["HTTPS://a/01/12312312312333", "^0112312312312333"],
  ])("%s is the element string %s", (uri, elementString) => {
    expect(printed(parseDigitalLink(uri))).toBe(elementString);
  });

  it.each([
    [
      "https://a/01/12312312312333/22/ABC%2d123?99=ABC&98=XYZ%2f987",
      "01=12312312312333 22=ABC-123 99=ABC 98=XYZ/987",
    ],
    ["https://a/01/12312312312333?99=ABC&unknown=666&98=XYZ", "01=12312312312333 99=ABC 98=XYZ"],
    ["https://a/01/12312312312333?flag&99=A", "01=12312312312333 99=A"],
    ["https://a/some/01/stem/01/12312312312333/21/01#part", "01=12312312312333 21=01"],
    ["https://a/01/12312312312333/10/A+B", "01=12312312312333 10=A+B"],
    // The standard's own example, from memory.
    [
      "https://id.gs1.org/01/09506000134352/10/ABC1/21/12345?17=180426",
      "01=09506000134352 10=ABC1 21=12345 17=180426",
    ],
  ])("%s holds %s", (uri, elements) => {
    expect(shown(parseDigitalLink(uri))).toBe(elements);
  });

  it.each([
    ["unknown number in the query", "https://a/01/12312312312333?99=ABC&999=faux"],
    ["empty value in the query", "https://a/01/12312312312333?99="],
    ["8 digits", "https://a/01/12345670"],
    ["12 digits", "https://a/01/416000336108"],
    ["13 digits", "https://a/01/1234567890128"],
    ["slash at the end", "https://a/01/12312312312333/"],
    ["qualifiers out of order", "https://a/01/12312312312333/21/XYZ/10/ABC"],
    ["a qualifier twice", "https://a/01/12312312312333/10/A/10/B"],
    ["a convenience word", "https://a/gtin/12312312312333"],
    ["a plus in the query, which is a space", "https://a/01/12312312312333?99=A+B"],
    ["mixed capitals of the scheme", "Https://a/01/12312312312333"],
    ["a broken escape", "https://a/01/12312312312333/10/%zz"],
    ["any other page", "https://example.org/parts?id=7"],
    ["no address", "0112312312312333"],
  ])("is refused for %s", (_why, uri) => {
    expect(parseDigitalLink(uri).ok).toBe(false);
  });
});
