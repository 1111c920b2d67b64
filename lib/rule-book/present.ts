import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { RULE_KINDS, type RuleHead, type RuleView } from "./rule-view";
import { ruleBody, type RuleKind } from "./shapes";
import { versionOn } from "./versions";

export type StoredRule = Omit<RuleHead, "replacedOn"> & { readonly kind: RuleKind; readonly body: unknown };

type Presenters = { readonly [Kind in RuleKind]: (head: RuleHead, body: unknown) => RuleView };

const PRESENT: Presenters = {
  terms: (head, body) => ({ ...head, kind: "terms", body: ruleBody("terms", body) }),
  evidenceList: (head, body) => ({ ...head, kind: "evidenceList", body: ruleBody("evidenceList", body) }),
  limits: (head, body) => ({ ...head, kind: "limits", body: ruleBody("limits", body) }),
  serviceLevels: (head, body) => ({ ...head, kind: "serviceLevels", body: ruleBody("serviceLevels", body) }),
  credit: (head, body) => ({ ...head, kind: "credit", body: ruleBody("credit", body) }),
};

const subjectOf = ({ kind, family, partNumber }: StoredRule): string =>
  [kind, family ?? "", partNumber ?? ""].join("|");

/** Of every rule the version in force on a day, with the day the next one takes over; those still to come are left out. */
export function presentBook(stored: readonly StoredRule[], day: CalendarDay): RuleView[] {
  const bySubject = new Map<string, StoredRule[]>();
  for (const version of stored)
    bySubject.set(subjectOf(version), [...(bySubject.get(subjectOf(version)) ?? []), version]);
  const views = [...bySubject.values()].flatMap((versions) => {
    const found = versionOn(versions, day);
    if (found === null) return [];
    const { kind, body, ...head } = found;
    const coming = versions.map(({ validFrom }) => validFrom).filter((from) => from > day);
    return [PRESENT[kind]({ ...head, replacedOn: coming.toSorted()[0] ?? null }, body)];
  });
  return views.toSorted(inBookOrder);
}

const inBookOrder = (a: RuleView, b: RuleView): number =>
  RULE_KINDS.indexOf(a.kind) - RULE_KINDS.indexOf(b.kind) ||
  a.ruleNumber.localeCompare(b.ruleNumber, "en", { numeric: true });
