import type { ReactNode } from "react";
import type { Locale } from "@/lib/kernel/locale";
import type { RuleView } from "@/lib/rule-book/rule-view";
import { CreditTable } from "./credit-table";
import { EvidenceListTable } from "./evidence-list-table";
import { LimitsTable } from "./limits-table";
import { ServiceLevelsTable } from "./service-levels-table";
import { TermsTable } from "./terms-table";

type Kind = RuleView["kind"];
export type RuleOf<K extends Kind> = Extract<RuleView, { kind: K }>;
type Drawing = { readonly [K in Kind]: (rule: RuleOf<K>, locale: Locale) => ReactNode };

const DRAWING: Drawing = {
  terms: ({ body }, locale) => <TermsTable terms={body} locale={locale} />,
  evidenceList: ({ body, family }) => <EvidenceListTable list={body} family={family} />,
  limits: ({ body }, locale) => <LimitsTable limits={body} locale={locale} />,
  serviceLevels: ({ body }, locale) => <ServiceLevelsTable levels={body} locale={locale} />,
  credit: ({ body }, locale) => <CreditTable rules={body} locale={locale} />,
};

const isOfKind = <K extends Kind>(kind: K, rule: RuleView): rule is RuleOf<K> => rule.kind === kind;

function draw<K extends Kind>(kind: K, rule: RuleView, locale: Locale): ReactNode {
  return isOfKind(kind, rule) ? DRAWING[kind](rule, locale) : null;
}

/** What a rule says, drawn by its kind. */
export function RuleBodyByKind({ rule, locale }: { rule: RuleView; locale: Locale }) {
  return draw(rule.kind, rule, locale);
}
