import { getTranslations } from "next-intl/server";
import type { FormField } from "@/components/record-form/fields";
import { PARCEL_CONDITIONS } from "@/lib/returns/kinds";

/** How a parcel looked when it was opened. */
export async function conditionField(label: string): Promise<FormField> {
  const t = await getTranslations("goodsIn.conditions");
  return {
    kind: "oneOf",
    name: "condition",
    label,
    value: "sound",
    choices: PARCEL_CONDITIONS.map((value) => ({ value, label: t(value) })),
  };
}
