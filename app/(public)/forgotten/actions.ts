"use server";

import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { getTranslations } from "next-intl/server";
import type { ActionResult } from "@/lib/kernel/action-result";
import { askForReset } from "@/lib/people/account/service";
import { readAddress } from "@/lib/people/address";
import { addressOf } from "@/lib/web/address";
import { formValues } from "@/lib/web/form-values";
import { isFromOurPages } from "@/lib/web/origin";
import { requestIdOf } from "@/lib/web/request-id";

/** Asks for a link. What is no address is said; whether an address has an account never is. */
export async function askForResetAction(_previous: unknown, form: FormData): Promise<ActionResult> {
  const [t, incoming] = await Promise.all([getTranslations("links"), headers()]);
  const email = String(formValues(form).email ?? "").slice(0, 300);
  const typed = { email };
  if (!isFromOurPages(incoming)) return { ok: false, message: t("crossSite"), fields: {}, typed };
  if (readAddress(email) === null) return { ok: false, fields: { email: t("forgotten.noAddress") }, typed };
  await askForReset({ email, address: addressOf(incoming), requestId: requestIdOf(incoming) });
  return redirect("/forgotten?sent=1");
}
