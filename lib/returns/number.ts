import { mod11And10CheckDigit, normaliseClaimNumber } from "@/lib/labels/check-digit";
import { claimDigits, printClaimNumber } from "@/lib/claims/number";

const RANDOM_DIGITS = 8;

/** One more than the greatest number `returnNumberFrom` takes. */
export const RETURN_NUMBERS = 10 ** RANDOM_DIGITS;

/**
 * The nine digits of a return from a random whole number below `RETURN_NUMBERS`, the last being the check digit of
 * ISO/IEC 7064 MOD 11,10. Throws RangeError outside. The randomness is the caller's, so numbers tell no count.
 */
export function returnNumberFrom(random: number): string {
  if (!Number.isInteger(random) || random < 0 || random >= RETURN_NUMBERS)
    throw new RangeError(`A return number is made from eight digits, not from ${random}`);
  const digits = String(random).padStart(RANDOM_DIGITS, "0");
  return digits + mod11And10CheckDigit(digits);
}

/** How a return number is written: `R512-408-337`. Stored as its nine digits. */
export const printReturnNumber = (digits: string): string => `R${digits.replace(/(\d{3})(?=\d)/g, "$1-")}`;

/** The nine digits of a return number however it was written, with or without R, dashes, spaces; null where the check fails. */
export function normaliseReturnNumber(text: string): string | null {
  const digits = text
    .normalize("NFKC")
    .replace(/[\s\p{Pd}]/gu, "")
    .replace(/^r/i, "");
  if (!/^\d{9}$/.test(digits)) return null;
  return mod11And10CheckDigit(digits.slice(0, -1)) === digits.slice(-1) ? digits : null;
}

/** What the code on a return label holds: both numbers, `R512408337/41073826`. */
export const labelCode = (returnNumber: string, claimNumber: string): string =>
  `R${returnNumber}/${claimDigits(claimNumber)}`;

/** The two numbers behind the code of a return label; null for any other text. */
export function readLabelCode(text: string): { returnNumber: string; claimNumber: string } | null {
  const [, first = "", second = ""] = /^R?(\d{9})\/(\d{8})$/i.exec(text.trim()) ?? [];
  const returnNumber = normaliseReturnNumber(first);
  const claim = normaliseClaimNumber(second);
  return returnNumber && claim === printClaimNumber(second) ? { returnNumber, claimNumber: second } : null;
}
