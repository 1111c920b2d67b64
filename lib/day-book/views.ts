/** The views of a list of notes: with something open, used up, every one. */
export const NOTE_VIEWS = ["open", "used", "all"] as const;
export type NoteView = (typeof NOTE_VIEWS)[number];

/** What a claim may be refused for when its note is to be issued; each has a sentence among the refusals. */
export const ISSUE_REFUSALS = [
  "notFound",
  "notAllowed",
  "creditContested",
  "creditNotDecided",
  "creditIssuedAlready",
  "creditCounterFirst",
  "creditNothing",
  "creditOverInvoice",
  "noteDayBeforeLast",
] as const;
export type IssueRefusal = (typeof ISSUE_REFUSALS)[number];

/** The number of a note as it is printed: nothing else can be one, whatever an address says. */
export const isNoteNumber = (text: string): boolean => /^[A-Z0-9-]{1,24}$/u.test(text);
