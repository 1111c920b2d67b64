"use server";

import { redirect } from "next/navigation";
import type { ActionResult } from "@/lib/kernel/action-result";
import { inviteAgain, invitePerson } from "@/lib/people/invite-service";
import { invitationInput, memberInput, memberRolesInput } from "@/lib/people/member-schema";
import { changeRoles, switchOff, switchOn } from "@/lib/people/member-service";
import { action } from "@/lib/web/action";

const invite = action(invitationInput, invitePerson);
const again = action(memberInput, inviteAgain);
const roles = action(memberRolesInput, changeRoles);
const off = action(memberInput, switchOff);
const on = action(memberInput, switchOn);

const toList = (result: ActionResult, note: string): ActionResult =>
  result.ok ? redirect(`/people?note=${note}`) : result;

/** Invites a person and goes back to the list. */
export async function inviteAction(previous: unknown, form: FormData): Promise<ActionResult> {
  return toList(await invite(previous, form), "invited");
}

/** Sends a fresh invitation. */
export async function inviteAgainAction(previous: unknown, form: FormData): Promise<ActionResult> {
  return toList(await again(previous, form), "invitedAgain");
}

/** Keeps the roles that are ticked. */
export async function changeRolesAction(previous: unknown, form: FormData): Promise<ActionResult> {
  return toList(await roles(previous, form), "rolesChanged");
}

/** Ends a person's access. */
export async function switchOffAction(previous: unknown, form: FormData): Promise<ActionResult> {
  return toList(await off(previous, form), "switchedOff");
}

/** Gives access back. */
export async function switchOnAction(previous: unknown, form: FormData): Promise<ActionResult> {
  return toList(await on(previous, form), "switchedOn");
}
