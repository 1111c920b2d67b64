import { type Role } from "./roles";

/** What a person may do besides the moves of a claim. The same table draws the navigation and guards the services. */
export const RIGHTS = {
  startClaim: ["technician", "workshopManager"],
  seeOwnClaims: ["technician", "workshopManager", "accounts", "administrator"],
  judgeClaims: ["assessor"],
  seeReceivedClaims: ["assessor", "goodsIn", "accounts", "analyst", "administrator"],
  receiveParts: ["goodsIn"],
  issueCredits: ["accounts"],
  seeDayBook: ["accounts", "administrator"],
  seeCreditNotes: ["accounts", "workshopManager", "administrator"],
  seeLifeCurves: ["analyst", "assessor", "administrator"],
  keepInstallers: ["workshopManager"],
  importInvoiceLines: ["administrator"],
  keepCatalogue: ["administrator"],
  keepPeople: ["administrator"],
  seeRuleBook: [
    "assessor",
    "administrator",
    "workshopManager",
    "technician",
    "analyst",
    "accounts",
    "goodsIn",
  ],
} as const satisfies Record<string, readonly Role[]>;

export type Right = keyof typeof RIGHTS;

/** Rights that only mean something to an organisation that sells, or to one that buys. */
const SIDE: Partial<Record<Right, "sells" | "buys">> = {
  startClaim: "buys",
  seeOwnClaims: "buys",
  judgeClaims: "sells",
  seeReceivedClaims: "sells",
  receiveParts: "sells",
  issueCredits: "sells",
  seeDayBook: "sells",
  seeLifeCurves: "sells",
  keepInstallers: "buys",
  importInvoiceLines: "sells",
  keepCatalogue: "sells",
};

export type Organisation = { readonly sells: boolean; readonly buys: boolean };

/** Whether one of these roles carries the right, in an organisation of this kind. */
export function hasRight(roles: ReadonlySet<Role>, right: Right, organisation: Organisation): boolean {
  const side = SIDE[right];
  if (side && !organisation[side]) return false;
  return RIGHTS[right].some((role) => roles.has(role));
}
