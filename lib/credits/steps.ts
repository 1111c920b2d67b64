import { citing, step, type Step } from "@/lib/kernel/explanation";

/**
 * The rules a credit walks through, with the values their sentences speak of (`creditSteps` in the message files).
 * `amount` is always the figure printed by the step before; an amount is text such as "145.55 GBP".
 */
export const CREDIT_STEPS = {
  partPriceInvoiced: ["unitAmount", "quantity", "invoiceNumber", "invoiceLine"],
  partPriceTyped: ["unitAmount", "quantity", "reason"],
  priceUnknown: [],
  goodwillMonths: ["monthsUsed", "coverMonths"],
  coverFull: [],
  coverStraightLine: ["monthsUsed", "coverMonths"],
  coverStep: ["monthsUsed"],
  termOver: ["monthsUsed", "coverMonths"],
  monthsUnknown: [],
  coverAmount: ["amount", "fraction"],
  labourMinutes: ["claimedMinutes", "standardMinutes"],
  labourAmount: ["minutes", "hourlyAmount"],
  labourNotPaid: ["claimedMinutes"],
  labourTermOver: ["monthsUsed", "labourMonths"],
  asked: [],
  kindCap: ["amount", "capAmount"],
  currencyDiffers: ["termsCurrency", "currency"],
  declined: ["amount"],
  lateFiling: ["amount", "fraction"],
  creditedShare: ["makerShare", "carrierShare", "fitterShare", "userShare", "wearShare"],
  attribution: ["amount", "fraction"],
  claimCap: ["amount", "claimAmount", "capAmount"],
  invoiceLimit: ["amount", "lineAmount", "creditedAmount"],
  noteLines: ["lines"],
  handlingShare: ["handlingAmount", "groupAmount", "noteAmount", "taxCategory", "taxRate"],
  handlingSeparate: ["handlingAmount", "noteAmount"],
  netAfterHandling: ["amount", "handlingAmount"],
  taxGroup: ["taxCategory", "taxRate", "baseAmount"],
  total: ["netAmount", "taxAmount"],
} as const satisfies Record<string, readonly string[]>;

export type CreditRule = keyof typeof CREDIT_STEPS;

/** Why something that was claimed is not given; each has words under `creditSteps.notGiven`. */
export const NOT_GIVEN_REASONS = [
  "declined",
  "priceUnknown",
  "monthsUnknown",
  "monthsUsed",
  "termOver",
  "labourNotPaid",
  "labourTermOver",
  "standardMinutes",
  "kindCap",
  "currencyDiffers",
  "filedLate",
  "sharedCause",
  "claimCap",
  "invoiceLimit",
] as const;
export type NotGivenReason = (typeof NOT_GIVEN_REASONS)[number];

type InputOf<Rule extends CreditRule> = Readonly<
  Record<(typeof CREDIT_STEPS)[Rule][number], string | number>
>;

/** A step with exactly the values its sentence needs. */
export const creditStep = <Rule extends CreditRule>(rule: Rule, result: string, input: InputOf<Rule>): Step =>
  step(rule, result, input);

/** A step that rests on a version of the Rule book, which it names. */
export const citedStep = (version: string, uncited: Step): Step => citing(version, uncited);
