"use server";

import { revalidatePath } from "next/cache";
import { cookies } from "next/headers";
import { redirect } from "next/navigation";
import { getTranslations } from "next-intl/server";
import type { ActionResult } from "@/lib/kernel/action-result";
import {
  changePassword,
  endOtherSessions,
  endOwnSession,
  savePreferences,
} from "@/lib/people/account/service";
import { switchWorkplace } from "@/lib/people/account/workplace-service";
import {
  nothingInput,
  ownSessionInput,
  PASSWORD_CHARACTERS,
  passwordChangeInput,
  preferencesInput,
  workplaceInput,
} from "@/lib/people/schema";
import { endSession } from "@/lib/people/service";
import { action, guardOrigin } from "@/lib/web/action";
import { LOCALE_COOKIE } from "@/lib/web/chosen-locale";
import { currentSession, requireSession } from "@/lib/web/session";
import { forgetSession, keepSession } from "@/lib/web/session-cookie";

const save = action(preferencesInput, savePreferences);
const end = action(ownSessionInput, endOwnSession);
const endOthers = action(nothingInput, async (actor) => endOtherSessions(actor, (await requireSession()).id));
const change = action(passwordChangeInput, async (actor, typed) =>
  changePassword(actor, { ...typed, sessionId: (await requireSession()).id }),
);
const toWorkplace = action(workplaceInput, async (_actor, { organisation }) =>
  switchWorkplace({ organisation, sessionId: (await requireSession()).id }),
);

/** Every act of this page ends on it again, with a line that says what came of it; script or not. */
const backWith = (note: string): never => redirect(`/account?note=${note}`);

/** Keeps language, theme and density with the person. */
export async function savePreferencesAction(form: FormData): Promise<void> {
  const result = await save(null, form);
  if (!result.ok) return backWith("notDone");
  // A language this browser remembers would outrank the one just chosen.
  (await cookies()).delete(LOCALE_COOKIE);
  revalidatePath("/", "layout");
  return backWith("saved");
}

export async function endSessionAction(form: FormData): Promise<void> {
  const result = await end(null, form);
  return backWith(result.ok ? "ended" : "notDone");
}

export async function endOtherSessionsAction(form: FormData): Promise<void> {
  const result = await endOthers(null, form);
  return backWith(result.ok ? "othersEnded" : "notDone");
}

/** Changes the password. Neither password goes back to the page with a refusal. */
export async function changePasswordAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await change(previous, form);
  if (!result.ok) return { ...result, typed: {} };
  const { fault } = result.value;
  if (fault) {
    const t = await getTranslations("account.password.faults");
    const field = fault === "tooShort" || fault === "tooLong" ? "password" : "current";
    return { ok: false, fields: { [field]: t(fault, PASSWORD_CHARACTERS) }, typed: {} };
  }
  if (!result.value.sessionId) return redirect("/sign-in?note=passwordSet");
  await keepSession(result.value.sessionId);
  return backWith("passwordChanged");
}

/** Goes on at another organisation of the same person. */
export async function switchWorkplaceAction(form: FormData): Promise<void> {
  const result = await toWorkplace(null, form);
  if (!result.ok) return backWith("notDone");
  const { value } = result;
  if (value.fault) return backWith(value.fault === "tooOld" ? "signInAnew" : "notDone");
  await keepSession(value.sessionId);
  revalidatePath("/", "layout");
  return backWith("switched");
}

/** Ends the session row, takes the cookie away and says so on the sign-in page. */
export async function signOutAction(): Promise<void> {
  await guardOrigin();
  const session = await currentSession();
  if (session) await endSession(session.id);
  await forgetSession();
  return redirect("/sign-in?note=signedOut");
}
