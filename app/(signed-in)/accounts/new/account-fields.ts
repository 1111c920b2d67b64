import { getTranslations } from "next-intl/server";
import type { FormField } from "@/components/record-form/fields";
import { WORKSHOP_LANGUAGES } from "@/lib/accounts/schema";
import { CURRENCIES } from "@/lib/kernel/currency";

/** Zones offered while typing; any other that the runtime knows is taken too. */
const ZONES = [
  "Europe/London",
  "Europe/Dublin",
  "Europe/Berlin",
  "Europe/Vienna",
  "Europe/Zurich",
  "Europe/Amsterdam",
  "Europe/Paris",
];

type Given = {
  readonly number: string;
  readonly buyers: readonly { readonly id: string; readonly name: string }[];
  readonly currency: string;
};

/** The fields of the account itself. */
export async function accountFields({ number, buyers, currency }: Given): Promise<FormField[]> {
  const t = await getTranslations("accounts.form");
  return [
    {
      kind: "line",
      name: "number",
      label: t("number"),
      hint: t("numberHint"),
      isSerial: true,
      maxLength: 40,
      value: number,
    },
    {
      kind: "choice",
      name: "buyerId",
      label: t("buyer"),
      hint: t("buyerHint"),
      blank: t("newWorkshop"),
      options: buyers.map(({ id, name }) => ({ value: id, label: name })),
    },
    {
      kind: "choice",
      name: "currency",
      label: t("currency"),
      hint: t("currencyHint"),
      value: currency.trim(),
      options: CURRENCIES.map((code) => ({ value: code, label: code })),
    },
  ];
}

type Reader = { readonly locale: string; readonly timeZone: string };

/** The fields of a workshop that is new here; zone and language begin as those of who enters it. */
export async function workshopFields({ locale, timeZone }: Reader): Promise<FormField[]> {
  const t = await getTranslations("accounts.form");
  return [
    { kind: "line", name: "name", label: t("name"), hint: t("nameHint"), maxLength: 120 },
    { kind: "line", name: "legalName", label: t("legalName"), maxLength: 160 },
    { kind: "lines", name: "address", label: t("address"), rows: 3, maxLength: 400 },
    { kind: "line", name: "country", label: t("country"), hint: t("countryHint"), maxLength: 2 },
    {
      kind: "line",
      name: "taxNumber",
      label: t("taxNumber"),
      hint: t("taxNumberHint"),
      isOptional: true,
      maxLength: 40,
    },
    {
      kind: "line",
      name: "timeZone",
      label: t("timeZone"),
      hint: t("timeZoneHint"),
      value: timeZone,
      maxLength: 60,
      suggestions: ZONES,
    },
    {
      kind: "oneOf",
      name: "language",
      label: t("language"),
      value: WORKSHOP_LANGUAGES.find((code) => code === locale) ?? "en",
      choices: WORKSHOP_LANGUAGES.map((code) => ({ value: code, label: t(`languages.${code}`) })),
    },
    { kind: "line", name: "siteName", label: t("siteName"), hint: t("siteNameHint"), maxLength: 120 },
    {
      kind: "lines",
      name: "siteAddress",
      label: t("siteAddress"),
      hint: t("siteAddressHint"),
      isOptional: true,
      rows: 3,
      maxLength: 400,
    },
  ];
}
