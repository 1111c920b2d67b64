/**
 * A text as the database can keep it: without the NUL no person types, and with a half of a character pair (a cut
 * emoji) shown as the replacement sign. Everything else stays as it was typed.
 */
export const storableText = (text: string): string =>
  text.replaceAll("\u0000", "").replace(/\p{Surrogate}/gu, "\ufffd");
