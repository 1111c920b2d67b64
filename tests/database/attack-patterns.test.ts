import { describe, expect, it } from "vitest";
import { pathBack } from "@/lib/accounts/path-back";
import { claimNumberInput } from "@/lib/claims/schema";
import { readReading } from "@/lib/evidence/reading";
import { readHeading } from "@/lib/evidence/run-log-heading";
import { summariseRunLog } from "@/lib/evidence/run-log-summary";
import { readDay, readQuantity, readTaxRate } from "@/lib/imports/cell-values";
import { columnNamed } from "@/lib/imports/heading";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { readTypedDay } from "@/lib/kernel/typed-day";
import { readScan } from "@/lib/labels/scan";
import { normaliseSerial } from "@/lib/labels/serial";
import { readAddress } from "@/lib/people/address";
import { chosenLocale } from "@/lib/web/chosen-locale";

// A pattern that goes back over its text takes minutes for this length; one that does not, milliseconds on an idle machine.
const MOST_MS = 5000;
const LENGTH = 100_000;
const today = calendarDay("2026-05-04");
const ohm = { code: "coil", dimension: "resistance", unit: "Ω", temperature: "copperTo20" } as const;
const bytes = (text: string) => new TextEncoder().encode(text);

/** Everything that meets a text of somebody else with a pattern. */
const READERS: Readonly<Record<string, (text: string) => unknown>> = {
  "an address": readAddress,
  "a way back": pathBack,
  "a claim number": (text) => claimNumberInput.safeParse(text),
  "a reading": (text) => readReading(text, ohm),
  "a heading of a log": readHeading,
  "a log": (text) => summariseRunLog(bytes(text)),
  "a log with this heading": (text) => summariseRunLog(bytes(`time_s,${text}\n1,2\n2,3\n3,4\n`)),
  "a log with this cell": (text) => summariseRunLog(bytes(`time_s,temp_C\n1,${text}\n2,3\n3,4\n`)),
  "a day of an invoice": (text) => readDay(text, today),
  "a quantity": readQuantity,
  "a tax rate": (text) => readTaxRate(text, "S"),
  "a heading of an invoice file": columnNamed,
  "a typed day": (text) => readTypedDay(text, "en", today),
  "a label": (text) => readScan(text, today),
  "a serial": normaliseSerial,
  "languages of a browser": (text) =>
    chosenLocale({ chosen: [], acceptLanguage: text, hasTestLocales: false }),
};

const repeated = (piece: string, end = "!") => piece.repeat(Math.ceil(LENGTH / piece.length)) + end;
const HOSTILE = [
  " ",
  "\t",
  "a",
  "0",
  "1,",
  "1.",
  "1.000,",
  "-",
  "a.",
  "a-",
  "a@",
  "@",
  "(",
  "(01)",
  "(01",
  "[",
  "{",
  "\\(",
  "°",
  "1:",
  "00:00:00",
  "/",
  "\\",
  "%",
  '"',
  '"a,',
  "\u00a0",
  "\u200b",
  "\ufdfa",
  "e\u0301",
  "ß",
  "in ",
  " / ",
  ";q=",
  "]A",
  "<GS>",
  "\u001d",
  "=",
  "x ",
  "Temp ",
  "+",
  "Z ",
  "T1 ",
  ",",
  "; ",
].map((piece) => [piece, repeated(piece)] as const);

describe("a text of 100 kB made to hurt", () => {
  it.each(Object.entries(READERS))("is read or refused as %s without going back over it", (_name, read) => {
    const slow: unknown[] = [];
    for (const [piece, text] of HOSTILE)
      for (const whole of [text, `a${text}b`, `1${text}1`]) {
        const started = performance.now();
        read(whole);
        const ms = performance.now() - started;
        if (ms > MOST_MS) slow.push([piece, whole.slice(0, 12), Math.round(ms)]);
      }
    expect(slow).toEqual([]);
  });
});
