"use server";

import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { getTranslations } from "next-intl/server";
import type { ActionResult } from "@/lib/kernel/action-result";
import { signIn } from "@/lib/people/service";
import { addressOf } from "@/lib/web/address";
import { formValues } from "@/lib/web/form-values";
import { isFromOurPages } from "@/lib/web/origin";
import { keepSession } from "@/lib/web/session-cookie";

const textOf = (value: string | readonly string[] | undefined): string =>
  typeof value === "string" ? value : "";

/** Signs in with the same cookie the session route reads; works as a plain form before any script has loaded. */
export async function signInAction(_previous: unknown, form: FormData): Promise<ActionResult> {
  const [t, incoming] = await Promise.all([getTranslations("signIn"), headers()]);
  const { email, password } = formValues(form);
  const typed = { email: textOf(email) };
  if (!isFromOurPages(incoming)) return { ok: false, message: t("refused"), fields: {}, typed };
  const sid = await signIn({
    email: textOf(email),
    password: textOf(password),
    address: addressOf(incoming),
    device: incoming.get("user-agent") ?? "",
  });
  if (!sid) return { ok: false, message: t("refused"), fields: {}, typed };

  await keepSession(sid);
  return redirect("/");
}
