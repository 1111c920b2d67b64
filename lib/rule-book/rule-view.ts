import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { RuleBody, RuleKind } from "./shapes";

/** The kinds of rules in the order of the book. */
export const RULE_KINDS = [
  "terms",
  "evidenceList",
  "limits",
  "serviceLevels",
  "credit",
] as const satisfies readonly RuleKind[];

/** The sheets of the book: its kinds of rules, and the reasons a verdict may give. */
export const BOOK_SHEETS = [...RULE_KINDS, "reasons"] as const;
export type BookSheet = (typeof BOOK_SHEETS)[number];

export type RuleHead = {
  readonly id: string;
  readonly ruleNumber: string;
  readonly title: string;
  readonly family: string | null;
  readonly partNumber: string | null;
  readonly validFrom: CalendarDay;
  /** First day of the version that will take its place, where one is written already. */
  readonly replacedOn: CalendarDay | null;
};

/** A version in force, with its content by its kind. */
export type RuleView = {
  readonly [Kind in RuleKind]: RuleHead & { readonly kind: Kind; readonly body: RuleBody<Kind> };
}[RuleKind];

/** The rules of one sheet that are read together: those for every family, and those for the one that is looked at. */
export type Sheet = {
  readonly families: readonly string[];
  readonly family: string | null;
  readonly rules: readonly RuleView[];
};

/** One sheet of the book. A sheet with rules of several families shows one of them, the first where none is asked for. */
export function sheetOf(rules: readonly RuleView[], asked: { sheet: BookSheet; family: string }): Sheet {
  const ofKind = rules.filter(({ kind }) => kind === asked.sheet);
  const families = [...new Set(ofKind.flatMap(({ family }) => family ?? []))];
  const family = families.find((one) => one === asked.family) ?? families[0] ?? null;
  return { families, family, rules: ofKind.filter((rule) => rule.family === null || rule.family === family) };
}
