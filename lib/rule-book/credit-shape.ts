import { z } from "zod";
import { isCurrency, type Currency } from "@/lib/kernel/currency";
import { amountMinor } from "./shape-parts";

/** By which document an amount of a kind is settled; only the first puts it on the distributor's credit note. */
const settledBy = z.enum(["creditNote", "workshopInvoice", "selfBilling", "outsideTax"]);

/** How a distributor credits: how it rounds, numbers its notes, settles each kind of line and deducts for handling. */
export const creditShape = z
  .strictObject({
    rounding: z.enum(["halfUp", "halfEven"]),
    /** Stands before the year in the numbers of credit notes: "CN-" gives CN-2026-00042. No stroke: it is an address too. */
    notePrefix: z.string().regex(/^[A-Z0-9][A-Z0-9-]{0,7}$/, "notePrefixNeeded"),
    settledBy: z.strictObject({
      part: settledBy,
      labour: settledBy,
      diagnosis: settledBy,
      consumables: settledBy,
      carriage: settledBy,
    }),
    /** Taken off each credit, in `currency`; not where the invoice is in another one. */
    handling: z
      .strictObject({
        amountMinor: amountMinor.min(1),
        reason: z.string().trim().min(1, "missing").max(100, "tooLong"),
      })
      .nullable(),
    currency: z.custom<Currency>(
      (value) => typeof value === "string" && isCurrency(value),
      "currencyUnknown",
    ),
  })
  .refine((rules) => rules.settledBy.part === "creditNote", "partNeedsNote");

export type CreditRules = z.infer<typeof creditShape>;

/** What holds where a distributor has written nothing: half up, no deduction, labour by the workshop's own invoice. */
export const defaultCreditRules = (currency: Currency): CreditRules => ({
  rounding: "halfUp",
  notePrefix: "CN-",
  settledBy: {
    part: "creditNote",
    labour: "workshopInvoice",
    diagnosis: "workshopInvoice",
    consumables: "creditNote",
    carriage: "creditNote",
  },
  handling: null,
  currency,
});
