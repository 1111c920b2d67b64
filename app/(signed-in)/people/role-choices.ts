import { getTranslations } from "next-intl/server";
import type { Organisation } from "@/lib/access/rights";
import { rolesOffered } from "@/lib/people/offered-roles";

/** The roles an organisation of this kind offers, in words. */
export async function roleChoices(organisation: Organisation) {
  const t = await getTranslations("people");
  return rolesOffered(organisation).map((role) => ({
    value: role,
    label: t(`roles.${role}`),
    hint: t(`roleHints.${role}`),
  }));
}
