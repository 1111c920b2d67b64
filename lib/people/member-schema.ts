import { z } from "zod";
import { ROLES } from "@/lib/access/roles";

/** What the list of people may say was just done. */
const NOTES = ["invited", "invitedAgain", "rolesChanged", "switchedOff", "switchedOn"] as const;

export const peopleQuery = z.object({ note: z.enum(NOTES).optional().catch(undefined) });

/** Languages an invitation can be written in. */
export const INVITATION_LANGUAGES = ["en", "de"] as const;

const roles = z.array(z.enum(ROLES)).max(ROLES.length).default([]);
const personId = z.uuid();

export const invitationInput = z.strictObject({
  name: z
    .string()
    .max(500, "tooLong")
    .transform((text) => text.replace(/\s+/gu, " ").trim())
    .pipe(z.string().min(1, "missing").max(120, "tooLong")),
  email: z.string().trim().min(1, "missing").max(300, "tooLong"),
  language: z.enum(INVITATION_LANGUAGES, "missing"),
  roles,
});
export type Invitation = z.infer<typeof invitationInput>;

export const memberInput = z.strictObject({ personId });
export type MemberChange = z.infer<typeof memberInput>;

export const memberRolesInput = z.strictObject({ personId, roles });
export type RolesChange = z.infer<typeof memberRolesInput>;
