import { plainText } from "./plain-text";

/**
 * What a typed number may mean. `ambiguous` where one separator with exactly three digits behind it can be a
 * decimal mark or a thousands mark: the caller decides or asks, it is never guessed here.
 */
export type DecimalReading =
  | { readonly kind: "number"; readonly value: number }
  | { readonly kind: "ambiguous"; readonly asDecimal: number; readonly asThousands: number }
  | { readonly kind: "notANumber" };

const NOT_A_NUMBER: DecimalReading = { kind: "notANumber" };
const number = (text: string): DecimalReading => ({ kind: "number", value: Number(text) });

// Spaces and apostrophes group digits in several countries; between digits they are accepted only in threes.
const GROUPED_BY_SPACE = /^\d{1,3}(?:[ '’]\d{3})+(?=$|[.,])/u;
const GROUPED_THEN_DECIMAL = /^(\d{1,3}([.,])\d{3}(?:\2\d{3})*)([.,])(\d+)$/u;
const GROUPED_MORE_THAN_ONCE = /^\d{1,3}(?:([.,])\d{3})(?:\1\d{3})+$/u;

/** Reads a number written with decimal comma or point. The text holds the number alone, without unit. */
export function decimalFrom(text: string): DecimalReading {
  const trimmed = plainText(text).replace(/^[−–]/u, "-");
  const sign = trimmed.startsWith("-") ? "-" : "";
  const spaced = trimmed.replace(/^[+-] ?/u, "");
  const body = GROUPED_BY_SPACE.test(spaced) ? spaced.replace(/[ '’]/gu, "") : spaced;
  if (spaced !== body && /[.,]/u.test(body)) return plainDecimal(sign, body);

  const mixed = GROUPED_THEN_DECIMAL.exec(body);
  if (mixed && mixed[2] !== mixed[3]) return number(`${sign}${digitsOf(mixed[1] ?? "")}.${mixed[4] ?? ""}`);
  if (GROUPED_MORE_THAN_ONCE.test(body)) return number(`${sign}${digitsOf(body)}`);
  if (/^[1-9]\d{0,2}[.,]\d{3}$/u.test(body)) {
    const asDecimal = Number(`${sign}${body.replace(",", ".")}`);
    return { kind: "ambiguous", asDecimal, asThousands: Number(`${sign}${digitsOf(body)}`) };
  }
  return plainDecimal(sign, body);
}

const plainDecimal = (sign: string, body: string): DecimalReading =>
  /^(?:\d+(?:[.,]\d+)?|[.,]\d+)$/u.test(body) ? number(`${sign}${body.replace(",", ".")}`) : NOT_A_NUMBER;

const digitsOf = (text: string): string => text.replace(/\D/gu, "");
