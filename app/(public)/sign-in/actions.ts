"use server";

import { cookies, headers } from "next/headers";
import { redirect } from "next/navigation";
import { encode } from "next-auth/jwt";
import { getTranslations } from "next-intl/server";
import type { ActionResult } from "@/lib/kernel/action-result";
import { signIn } from "@/lib/people/service";
import { SESSION_COOKIE, SESSION_SECONDS } from "@/lib/web/cookie";
import { addressOf } from "@/lib/web/address";
import { formValues } from "@/lib/web/form-values";
import { isFromOurPages } from "@/lib/web/origin";
import { isSecure, setting } from "@/lib/web/settings";

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

  const token = await encode({ token: { sid }, secret: setting("NEXTAUTH_SECRET"), maxAge: SESSION_SECONDS });
  const jar = await cookies();
  jar.set(SESSION_COOKIE(), token, {
    httpOnly: true,
    sameSite: "lax",
    path: "/",
    secure: isSecure(),
    maxAge: SESSION_SECONDS,
  });
  return redirect("/");
}
