"use server";

import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { getTranslations } from "next-intl/server";
import type { ActionResult } from "@/lib/kernel/action-result";
import { findOpenLink } from "@/lib/people/account/queries";
import { PASSWORD_CHARACTERS, passwordFault } from "@/lib/people/schema";
import { setPasswordByLink } from "@/lib/people/service";
import { formValues } from "@/lib/web/form-values";
import { isFromOurPages } from "@/lib/web/origin";

/** Sets the password of whoever holds the link. A password is never sent back to the page, right or wrong. */
export async function setPasswordAction(_previous: unknown, form: FormData): Promise<ActionResult> {
  const [t, incoming] = await Promise.all([getTranslations("links"), headers()]);
  const values = formValues(form);
  const token = String(values.token ?? "").slice(0, 100);
  const purpose = values.purpose === "invitation" ? "invitation" : "reset";
  const password = String(values.password ?? "");
  if (!isFromOurPages(incoming)) return { ok: false, message: t("crossSite"), fields: {}, typed: {} };
  const fault = passwordFault(password);
  if (fault) return { ok: false, fields: { password: t(`faults.${fault}`, PASSWORD_CHARACTERS) }, typed: {} };

  // Looked at first: hashing costs, and somebody who guesses links must not get it for nothing. An invitation never
  // touches the password of an account that has one.
  const owner = await findOpenLink(token, purpose);
  const isOpen = owner && (purpose === "reset" || !owner.hasAccount);
  const email = isOpen ? await setPasswordByLink(token, password) : null;
  return redirect(email ? "/sign-in?note=passwordSet" : `/${purpose}/${encodeURIComponent(token || "-")}`);
}
