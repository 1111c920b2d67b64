/** Problems of something not given yet; every other problem is about something typed that cannot be. */
const MISSING: readonly string[] = [
  "failedOnMissing",
  "symptomMissing",
  "frameSerialMissing",
  "lineMissing",
  "partMissing",
  "rowToDo",
];

/** Whether a problem is about text that was typed: it is shown at once, a gap only when the claim is to be sent. */
export const isUnread = (code: string): boolean => !MISSING.includes(code);
