"use server";

import { redirect } from "next/navigation";
import { installerInput, newInstallerInput } from "@/lib/claims/installers/schema";
import { addInstaller, changeInstaller } from "@/lib/claims/installers/service";
import type { ActionResult } from "@/lib/kernel/action-result";
import { action } from "@/lib/web/action";

const add = action(newInstallerInput, addInstaller);
const change = action(installerInput, changeInstaller);

/** Adds an installer and shows the list with them on it. */
export async function addInstallerAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await add(previous, form);
  return result.ok ? redirect("/installers?note=added") : result;
}

/** Keeps what was changed and goes back to the list. */
export async function changeInstallerAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await change(previous, form);
  return result.ok ? redirect("/installers?note=kept") : result;
}
