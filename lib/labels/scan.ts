import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { Outcome } from "@/lib/kernel/outcome";
import {
  fixedLength,
  GROUP_SEPARATOR,
  gs1Day,
  type Element,
  type LabelFault,
} from "./application-identifiers";
import { hasGs1CheckDigit } from "./check-digit";
import { isEnvelope, openEnvelope, parseFields, type Field } from "./data-identifiers";
import { parseDigitalLink } from "./digital-link";
import { parseBracketed, parseElementString } from "./element-string";

/** Things to ask the person about, never a reason to refuse; each has a sentence under `labels.warnings`. */
export const SCAN_WARNINGS = [
  "labelUnreadable",
  "identifierUnknown",
  "valueWrong",
  "checkDigitWrong",
  "dayWrong",
  "separatorMayBeMissing",
  "articleNumberMissing",
  "looksLikeArticleNumber",
  "noSerial",
] as const;

export type ScanWarning = {
  readonly code: (typeof SCAN_WARNINGS)[number];
  readonly detail: Readonly<Record<string, string | number>>;
};

/** What a label says about a unit, in the label's own spelling. `raw` is what was scanned or typed, to the character. */
export type Scan = {
  readonly raw: string;
  readonly form: "gs1" | "bracketed" | "digitalLink" | "envelope" | "plain" | "unreadable";
  readonly serial: string | null;
  readonly batch: string | null;
  readonly gtin: string | null;
  readonly partNumber: string | null;
  readonly producedOn: CalendarDay | null;
  readonly elements: readonly Element[];
  readonly fields: readonly Field[];
  readonly warnings: readonly ScanWarning[];
};

type Label = { readonly raw: string; readonly form: Scan["form"]; readonly data: string };
type Reading = {
  form: Scan["form"];
  elements?: Outcome<readonly Element[], LabelFault>;
  fields?: Outcome<readonly Field[], LabelFault>;
};

const LONGEST_LABEL = 4000;
const LONGEST_SERIAL = 60;
// Symbology identifiers that announce GS1 data: Code 128 and DataBar, QR, Data Matrix, DotCode.
const GS1_SYMBOLS = ["C1", "e0", "Q3", "d2", "J1"];

const NOTHING_SAID = {
  serial: null,
  batch: null,
  gtin: null,
  partNumber: null,
  producedOn: null,
  elements: [],
  fields: [],
} as const;

const warning = (code: ScanWarning["code"], detail: ScanWarning["detail"] = {}): ScanWarning => ({
  code,
  detail,
});

/**
 * Reads a scanned or typed label: GS1 element string or its bracketed form, GS1 Digital Link, ISO/IEC 15434 message,
 * or a plain serial. Never refuses: what cannot be read comes back `unreadable` with its raw text and a warning.
 * `today` decides the century of two-digit years.
 */
export function readScan(raw: string, today: CalendarDay): Scan {
  const text = withSeparators(raw.trim());
  const [, symbol, data = text] = /^\]([A-Za-z]\d)\s*(.*)$/s.exec(text) ?? [];
  if (data === "" || data.length > LONGEST_LABEL) return unreadable(raw, warning("labelUnreadable"));

  const { form, elements, fields } = formOf(data, symbol);
  if (elements) {
    return elements.ok ? fromElements({ raw, form, data }, elements.value, today) : unreadable(raw, elements);
  }
  if (fields) return fields.ok ? fromFields(raw, fields.value) : unreadable(raw, fields);
  return plain(raw, data, symbol);
}

/** Which kind of label a text is; symbology identifiers decide first, then the way it begins. */
function formOf(data: string, symbol: string | undefined): Reading {
  if (isEnvelope(data)) {
    const opened = openEnvelope(data);
    if (!opened.ok) return { form: "envelope", fields: opened };
    const { format, body } = opened.value;
    return format === "05"
      ? { form: "gs1", elements: parseElementString(body) }
      : { form: "envelope", fields: parseFields(body) };
  }
  if (/^https?:\/\//i.test(data)) return { form: "digitalLink", elements: parseDigitalLink(data) };
  if (symbol !== undefined && GS1_SYMBOLS.includes(symbol))
    return { form: "gs1", elements: parseElementString(data) };
  if (/^\(\d/.test(data)) return { form: "bracketed", elements: parseBracketed(data) };
  if (symbol === undefined && looksLikeElementString(data))
    return { form: "gs1", elements: parseElementString(data) };
  return { form: "plain" };
}

/** Without a symbology identifier only a GS, or a GTIN with a right check digit in front, makes a text a GS1 label. */
const looksLikeElementString = (data: string): boolean =>
  data.includes(GROUP_SEPARATOR) || (/^01\d{14}/.test(data) && hasGs1CheckDigit(data.slice(2, 16)));

function fromElements(label: Label, elements: readonly Element[], today: CalendarDay): Scan {
  const valueOf = (...identifiers: string[]) =>
    elements.find(({ ai }) => identifiers.includes(ai))?.value ?? null;
  const [serial, batch, produced] = [valueOf("21"), valueOf("10"), valueOf("11")];
  const gtin = valueOf("01", "02", "03");
  const producedOn = produced === null ? null : gs1Day(produced, today);
  const warnings = [
    ...elements
      .filter(({ ai, value }) => hasCheckDigit(ai) && !hasGs1CheckDigit(value))
      .map(({ ai, value }) => warning("checkDigitWrong", { identifier: ai, value })),
    ...(produced !== null && producedOn === null ? [warning("dayWrong", { value: produced })] : []),
    ...((serial ?? batch) !== null && gtin === null && valueOf("8006") === null
      ? [warning("articleNumberMissing")]
      : []),
    ...(serial === null ? [...lostSeparator(label, batch), warning("noSerial")] : []),
  ];
  return {
    ...NOTHING_SAID,
    raw: label.raw,
    form: label.form,
    serial,
    batch,
    // A number that fails its own check names no article.
    gtin: gtin !== null && hasGs1CheckDigit(gtin) ? gtin : null,
    partNumber: valueOf("240", "241"),
    producedOn,
    elements,
    warnings,
  };
}

/** A batch that ends in "21" and digits may have swallowed a serial: keyboard scanners lose the separator. */
function lostSeparator({ form, data }: Label, batch: string | null): ScanWarning[] {
  if (form !== "gs1" || data.includes(GROUP_SEPARATOR)) return [];
  const [, shorter, swallowed] = /^(.+?)21(\d+)$/.exec(batch ?? "") ?? [];
  if (shorter === undefined || swallowed === undefined) return [];
  return [warning("separatorMayBeMissing", { batch: shorter, serial: swallowed })];
}

function fromFields(raw: string, fields: readonly Field[]): Scan {
  const valueOf = (...identifiers: string[]) =>
    identifiers.flatMap((di) => fields.filter((field) => field.di === di))[0]?.value ?? null;
  const serial = valueOf("S");
  return {
    ...NOTHING_SAID,
    raw,
    form: "envelope",
    serial,
    batch: valueOf("1T", "T"),
    partNumber: valueOf("1P", "P"),
    fields,
    warnings: serial === null ? [warning("noSerial")] : [],
  };
}

/** A label that is nothing but a number: a serial, unless the symbol says that it is an article number. */
function plain(raw: string, data: string, symbol: string | undefined): Scan {
  const base = { ...NOTHING_SAID, raw, form: "plain" } as const;
  if (symbol?.startsWith("E") && /^\d{8,14}$/.test(data) && hasGs1CheckDigit(data)) {
    return { ...base, gtin: data.padStart(14, "0"), warnings: [warning("noSerial")] };
  }
  if (data.length > LONGEST_SERIAL || /[\u0000-\u001f\u007f]/.test(data))
    return unreadable(raw, warning("labelUnreadable"));
  const article = /^(\d{8}|\d{12,14})$/.test(data) && hasGs1CheckDigit(data);
  return {
    ...base,
    serial: data,
    warnings: article ? [warning("looksLikeArticleNumber", { value: data })] : [],
  };
}

const unreadable = (raw: string, why: ScanWarning): Scan => ({
  ...NOTHING_SAID,
  raw,
  form: "unreadable",
  warnings: [warning(why.code, why.detail)],
});

/** Identifiers whose fixed digits end in a check digit: logistic unit, GTINs, locations. */
const hasCheckDigit = (ai: string): boolean =>
  ["00", "01", "02", "03"].includes(ai) || fixedLength(ai) === 13;

/** Scanners that type instead of sending show the invisible separators as words or as control pictures. */
const withSeparators = (text: string): string =>
  text
    .replace(/<GS>|\u241d/g, GROUP_SEPARATOR)
    .replace(/<RS>|\u241e/g, "\u001e")
    .replace(/<EOT>|\u2404/g, "\u0004");
