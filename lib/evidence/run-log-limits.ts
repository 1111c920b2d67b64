/** What a run log may hold. The file size is the one every upload of a run log is held to. */
export const RUN_LOG_LIMITS = {
  bytes: 25 * 1024 * 1024,
  columns: 64,
  rows: 200_000,
  cells: 2_000_000,
  lineCharacters: 8_192,
} as const;
