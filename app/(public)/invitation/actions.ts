"use server";

import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { getTranslations } from "next-intl/server";
import type { ActionResult } from "@/lib/kernel/action-result";
import { acceptInvitation } from "@/lib/people/accept-service";
import { findOpenLink } from "@/lib/people/account/queries";
import { endSession } from "@/lib/people/service";
import { addressOf } from "@/lib/web/address";
import { formValues } from "@/lib/web/form-values";
import { isFromOurPages } from "@/lib/web/origin";
import { currentSession } from "@/lib/web/session";
import { keepSession } from "@/lib/web/session-cookie";

/** Accepts an invitation with the password the account has. What was open in this browser ends; its place is taken. */
export async function acceptInvitationAction(_previous: unknown, form: FormData): Promise<ActionResult> {
  const [t, incoming] = await Promise.all([getTranslations("links"), headers()]);
  const values = formValues(form);
  const token = String(values.token ?? "").slice(0, 100);
  if (!isFromOurPages(incoming)) return { ok: false, message: t("crossSite"), fields: {}, typed: {} };
  const sid = await acceptInvitation({
    token,
    password: String(values.password ?? ""),
    address: addressOf(incoming),
    device: incoming.get("user-agent") ?? "",
  });
  if (sid) {
    const earlier = await currentSession();
    if (earlier) await endSession(earlier.id);
    await keepSession(sid);
    return redirect("/account?note=joined");
  }
  const owner = await findOpenLink(token, "invitation");
  if (!owner?.hasAccount) return redirect(`/invitation/${encodeURIComponent(token || "-")}`);
  return { ok: false, message: t("invitation.accept.refused"), fields: {}, typed: {} };
}
