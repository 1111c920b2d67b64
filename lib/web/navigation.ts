import type { Route } from "next";
import type { Right } from "@/lib/access/rights";
import type { Role } from "@/lib/access/roles";
import type navigation from "@/messages/en/navigation.json";

export type Place = { readonly key: keyof typeof navigation; readonly href: Route; readonly right: Right };

/** The places of the product in the order of the bar; who lacks the right does not see the place. */
export const PLACES: readonly Place[] = [
  { key: "startClaim", href: "/claims/new", right: "startClaim" },
  { key: "workshopToday", href: "/workshop-today", right: "seeOwnClaims" },
  { key: "goodsIn", href: "/goods-in", right: "receiveParts" },
  { key: "toJudge", href: "/judging", right: "seeReceivedClaims" },
  { key: "lifeCurves", href: "/life-curves", right: "seeLifeCurves" },
  { key: "credits", href: "/credits", right: "issueCredits" },
  { key: "creditNotes", href: "/credit-notes", right: "seeCreditNotes" },
  { key: "dayBook", href: "/day-book", right: "seeDayBook" },
  { key: "invoiceLines", href: "/invoice-lines", right: "importInvoiceLines" },
  { key: "catalogue", href: "/catalogue", right: "keepCatalogue" },
  { key: "accounts", href: "/accounts", right: "keepCatalogue" },
  { key: "installers", href: "/installers", right: "keepInstallers" },
  { key: "ruleBook", href: "/rule-book", right: "seeRuleBook" },
  { key: "people", href: "/people", right: "keepPeople" },
];

/** Where each role's own work waits; who has several roles starts at the first of these that is open to them. */
const HOMES: readonly (readonly [role: Role, key: Place["key"]])[] = [
  ["technician", "workshopToday"],
  ["workshopManager", "workshopToday"],
  ["assessor", "toJudge"],
  ["goodsIn", "goodsIn"],
  ["accounts", "credits"],
  ["accounts", "creditNotes"],
  ["analyst", "lifeCurves"],
  ["administrator", "invoiceLines"],
  ["administrator", "people"],
];

/** The first page of a person: where their work is, else the first place that is open to them; null where none is. */
export function homeOf(roles: ReadonlySet<Role>, isOpen: (right: Right) => boolean): Route | null {
  const open = PLACES.filter(({ key, right }) => key !== "startClaim" && isOpen(right));
  const own = HOMES.filter(([role]) => roles.has(role)).flatMap(([, home]) =>
    open.filter(({ key }) => key === home),
  );
  return (own[0] ?? open[0])?.href ?? null;
}
