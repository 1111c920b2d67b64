/** Every table the story writes, in an order in which no row points at one that is not there yet. */
export const TABLES = [
  "organisations",
  "sites",
  "tradingAccounts",
  "users",
  "memberships",
  "membershipRoles",
  "makers",
  "parts",
  "batches",
  "invoiceLines",
  "units",
  "installers",
  "vehicles",
  "fittings",
  "ruleBookVersions",
  "claims",
  "claimDrafts",
  "claimLines",
  "claimRevisions",
  "claimQueries",
  "evidenceFiles",
  "revisionEvidence",
  "partReturns",
  "parcels",
  "returnLines",
  "findings",
  "readings",
  "verdicts",
  "verdictLines",
  "claimMessages",
  "claimFlags",
  "creditNoteSeries",
  "creditNotes",
  "creditNoteLines",
  "creditAllocations",
  "ledgerHeads",
  "ledgerEntries",
  "ledgerPostings",
  "timelineEntries",
] as const;

export type TableName = (typeof TABLES)[number];
export type Row = Readonly<Record<string, unknown>>;

/** Rows by table; a key of a row is its column in camel case. */
export type Tables = Readonly<Partial<Record<TableName, readonly Row[]>>>;

/** The rows of several chapters as one. */
export const together = (chapters: readonly Tables[]): Tables =>
  Object.fromEntries(TABLES.map((table) => [table, chapters.flatMap((chapter) => chapter[table] ?? [])]));
