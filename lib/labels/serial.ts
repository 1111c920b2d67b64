const THIN_SPACE = "\u2009";
// Separators, dashes, control characters, and everything made to be invisible: zero-width and bidirectional marks.
const NOT_PART_OF_A_SERIAL = /[\p{Z}\p{Pd}\p{Cc}\p{Cf}\p{Default_Ignorable_Code_Point}\u2212\u2043\u02d7]/gu;
const LOOKALIKES: ReadonlyMap<string, string> = new Map([
  ["O", "0"],
  ["I", "1"],
  ["L", "1"],
  ["S", "5"],
  ["B", "8"],
]);

/**
 * The normal form by which serials are compared: full-width and other compatibility letters as plain ones, capitals,
 * no spaces, dashes or invisible characters. It never merges O and 0: two units may differ in just that.
 * The raw text is kept beside it. Empty where nothing is left.
 */
export function normaliseSerial(raw: string): string {
  const once = raw.normalize("NFKC").toUpperCase().normalize("NFKC").replace(NOT_PART_OF_A_SERIAL, "");
  // Taking characters out can bring letters and accents together, so it is done until nothing changes.
  return once === raw ? once : normaliseSerial(once);
}

/** A normal form with look-alikes merged (O 0, I L 1, S 5, B 8): only for "did you mean", never to take two as one. */
export const foldLookalikes = (normal: string): string =>
  Array.from(normal, (letter) => LOOKALIKES.get(letter) ?? letter).join("");

/** A normal form for display, in fours: "B0O8 1LI7 QG96", with thin spaces that are not part of the serial. */
export const groupSerial = (normal: string): string => normal.replace(/(.{4})(?=.)/gu, `$1${THIN_SPACE}`);
