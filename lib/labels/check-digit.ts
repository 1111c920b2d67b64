const CLAIM_NUMBER_DIGITS = 7;

/**
 * Check digit of a row of digits by ISO/IEC 7064, hybrid system MOD 11,10 (method and the value 0794 -> 5 from
 * memory). It finds every single wrong digit. Throws RangeError for anything but digits.
 */
export function mod11And10CheckDigit(digits: string): string {
  if (!/^\d+$/.test(digits)) throw new RangeError(`Not a row of digits: ${digits}`);
  let product = 10;
  for (const digit of digits) {
    const sum = (product + Number(digit)) % 10 || 10;
    product = (sum * 2) % 11;
  }
  return String((11 - product) % 10);
}

/**
 * A claim number from a random whole number of up to seven digits: `4107-3820`, the last digit being the check
 * digit. Throws RangeError outside 0 to 9,999,999. The randomness is the caller's, so numbers tell no count.
 */
export function claimNumberFrom(random7: number): string {
  if (!Number.isInteger(random7) || random7 < 0 || random7 >= 10 ** CLAIM_NUMBER_DIGITS) {
    throw new RangeError(`A claim number is made from seven digits, not from ${random7}`);
  }
  const digits = String(random7).padStart(CLAIM_NUMBER_DIGITS, "0");
  return grouped(digits + mod11And10CheckDigit(digits));
}

/** True for a claim number exactly as it is printed, with its dash and a check digit that is right. */
export const isClaimNumber = (text: string): boolean => text === normaliseClaimNumber(text);

/** The claim number a person typed, with or without dash or spaces, as it is printed; null where the check fails. */
export function normaliseClaimNumber(text: string): string | null {
  const digits = text.normalize("NFKC").replace(/[\s\p{Pd}]/gu, "");
  if (!/^\d{8}$/.test(digits)) return null;
  return mod11And10CheckDigit(digits.slice(0, -1)) === digits.slice(-1) ? grouped(digits) : null;
}

/**
 * GS1 check digit of a number without it: weights 3, 1, 3, ... from the right, up to the next ten (GS1 General
 * Specifications, from memory). Throws RangeError for anything but digits.
 */
export function gs1CheckDigit(body: string): string {
  if (!/^\d+$/.test(body)) throw new RangeError(`Not a row of digits: ${body}`);
  const sum = [...body]
    .reverse()
    .reduce((so, digit, place) => so + Number(digit) * (place % 2 === 0 ? 3 : 1), 0);
  return String((10 - (sum % 10)) % 10);
}

/** True where the last digit of a GS1 number (GTIN, location, logistic unit) is its check digit. */
export const hasGs1CheckDigit = (number: string): boolean =>
  /^\d{2,}$/.test(number) && gs1CheckDigit(number.slice(0, -1)) === number.slice(-1);

const grouped = (digits: string): string => `${digits.slice(0, 4)}-${digits.slice(4)}`;
