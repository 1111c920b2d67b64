// Raised and lowered digits and fractions would silently become ordinary digits ("10²" is not 102): they stay as they are.
const FOLDABLE = /[^\u00B2\u00B3\u00B9\u00BC-\u00BE\u2070-\u209F\u2150-\u218F]+/gu;

/**
 * A typed or logged text in the characters the readers of this folder expect: full-width digits, the ohm sign, the
 * single-character degree units and unusual spaces folded, the two look-alikes of the degree sign put right.
 */
export const plainText = (text: string): string =>
  text
    .replace(/[º˚]/gu, "°")
    .replace(FOLDABLE, (part) => part.normalize("NFKC"))
    .replace(/\s+/gu, " ")
    .replace(/° /gu, "°")
    .trim();
