import { z } from "zod";
import { isTimeZone } from "@/lib/kernel/calendar-day";
import { isCurrency } from "@/lib/kernel/currency";

/** What the list of accounts may say was just done. */
const NOTES = ["accountOpened", "accountOpenedKnown"] as const;

export const accountsQuery = z.object({ note: z.enum(NOTES).optional().catch(undefined) });

/** Languages a workshop's mails and pages can be in. */
export const WORKSHOP_LANGUAGES = ["en", "de"] as const;

const trimmed = (most: number) =>
  z.string().max(2000, "tooLong").trim().pipe(z.string().max(most, "tooLong"));
const oneLine = (most: number) =>
  z
    .string()
    .max(2000, "tooLong")
    .transform((text) => text.replace(/\s+/gu, " ").trim())
    .pipe(z.string().max(most, "tooLong"));

const fields = z.strictObject({
  number: oneLine(40).pipe(z.string().min(1, "missing")),
  buyerId: z.union([z.uuid(), z.literal("")]).default(""),
  currency: z.string().refine(isCurrency, "missing"),
  name: oneLine(120).default(""),
  legalName: oneLine(160).default(""),
  address: trimmed(400).default(""),
  country: oneLine(2)
    .transform((text) => text.toUpperCase())
    .default(""),
  taxNumber: oneLine(40).default(""),
  timeZone: oneLine(60).default(""),
  language: z.enum(WORKSHOP_LANGUAGES, "missing"),
  siteName: oneLine(120).default(""),
  siteAddress: trimmed(400).default(""),
  back: z.string().max(500).default(""),
});

type Fields = z.infer<typeof fields>;

/** What a new workshop cannot do without. */
const NEEDED = ["name", "legalName", "address", "siteName"] as const satisfies readonly (keyof Fields)[];

const missingOf = (given: Fields): (keyof Fields)[] => {
  if (given.buyerId !== "") return [];
  const missing: (keyof Fields)[] = NEEDED.filter((name) => given[name] === "");
  if (!/^[A-Z]{2}$/u.test(given.country)) missing.push("country");
  if (!isTimeZone(given.timeZone)) missing.push("timeZone");
  return missing;
};

/** An account with an organisation that is chosen, or with a workshop that is new here and then complete. */
export const newAccountInput = fields.superRefine((given, context) => {
  for (const path of missingOf(given)) context.addIssue({ code: "custom", path: [path], message: "missing" });
});
export type NewAccount = z.infer<typeof newAccountInput>;
