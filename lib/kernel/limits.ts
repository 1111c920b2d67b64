/** Every limit of what can be sent, in one place; each refusal names the file, the limit and the way out. */
export const LIMITS = {
  photoBytes: 15_000_000,
  photoPixels: 50_000_000,
  runLogBytes: 25_000_000,
  documentBytes: 15_000_000,
  filesPerClaim: 40,
  bytesPerClaim: 200_000_000,
  noteCharacters: 4000,
  importLines: 250_000,
  importBytes: 25_000_000,
} as const;

export const FILE_KINDS = ["photo", "runLog", "document"] as const;
export type FileKind = (typeof FILE_KINDS)[number];

/** Most bytes of one file of a kind. */
export const mostBytes = (kind: FileKind): number =>
  ({ photo: LIMITS.photoBytes, runLog: LIMITS.runLogBytes, document: LIMITS.documentBytes })[kind];
