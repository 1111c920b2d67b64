import { formatDetail } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { isCurrency } from "@/lib/kernel/currency";
import { money } from "@/lib/kernel/money";
import type { Check } from "./check";
import type { LineProblem, ProblemCode } from "./line-desk";
import { importPath } from "./paths";
import { headingIn, headingsIn } from "./heading";
import type { ImportRow } from "./queries";
import { storedMapping, type ImportResult } from "./schema";
import type { ImportView, PreviewView, ProblemView, ResultView } from "./view";

const resultView = (result: ImportResult): ResultView => ({
  ...result,
  sums: result.sums.flatMap(({ minor, currency }) =>
    isCurrency(currency) ? [money(BigInt(minor), currency)] : [],
  ),
});

/** A file that was sent, as the list and the head of its page show it. */
export function presentImport(row: ImportRow): ImportView {
  const mapping = storedMapping.safeParse(row.mapping);
  return {
    id: row.id,
    fileName: row.fileName,
    isImported: row.state === "imported",
    lineCount: row.lineCount,
    byName: row.byName,
    sentAt: row.createdAt,
    importedAt: row.importedAt,
    encoding: mapping.success ? mapping.data.encoding : null,
    unread: mapping.success ? mapping.data.unread : [],
    result: mapping.success && mapping.data.result ? resultView(mapping.data.result) : null,
  };
}

const CREATED_AT = {
  accountUnknown: { what: "account", pathname: "/accounts/new", parameter: "number" },
  partUnknown: { what: "part", pathname: "/catalogue/new", parameter: "partNumber" },
} as const;

const isCreatable = (code: ProblemCode): code is keyof typeof CREATED_AT => Object.hasOwn(CREATED_AT, code);

function createLink({ code, given }: LineProblem, back: string): ProblemView["create"] {
  if (!isCreatable(code)) return null;
  const { what, pathname, parameter } = CREATED_AT[code];
  return { what, pathname, query: { [parameter]: given, back } };
}

const LONGEST_GIVEN = 60;

const shortened = (text: string): string =>
  text.length > LONGEST_GIVEN ? `${text.slice(0, LONGEST_GIVEN)}…` : text;

function presentProblem(problem: LineProblem, importId: string, locale: Locale): ProblemView {
  const detail = formatDetail(problem.detail, locale);
  const { columns } = detail;
  return {
    line: problem.line,
    heading: problem.column && headingIn(problem.column, locale),
    given: shortened(problem.given),
    code: problem.code,
    detail: typeof columns === "string" ? { ...detail, columns: headingsIn(columns, locale) } : detail,
    create: createLink(problem, importPath({ importId })),
  };
}

/** What the check of a file found, as its preview shows it. */
export const presentPreview = (check: Check, importId: string, locale: Locale): PreviewView => ({
  problems: check.problems.map((problem) => presentProblem(problem, importId, locale)),
  shownLineCount: new Set(check.problems.map(({ line }) => line)).size,
  problemLineCount: check.problemLineCount,
  result: {
    invoiceLines: check.totals.invoiceLines,
    units: check.totals.units,
    batches: check.totals.batches,
    unchanged: check.unchangedCount,
    sums: check.totals.sums,
  },
});
