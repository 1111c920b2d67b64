import { createHash, randomBytes } from "node:crypto";
import { beforeSignIn } from "@/lib/db/unit-of-work";
import { insertRow } from "../support/build";
import { adminQuery } from "../support/database";

type Id = { readonly id: string };

export const hash = (text: string): string => createHash("sha256").update(text).digest("hex");
export const token = (): string => randomBytes(32).toString("base64url");

/** A session of a person in an organisation; empty where none may start. */
export async function startSession(person: Id, organisation: Id): Promise<string> {
  const [row] = await beforeSignIn<{ id: string | null }>(
    "select guarded.start_session($1, $2, 12, 8, 'browser') as id",
    [person.id, organisation.id],
  );
  return row?.id ?? "";
}

/** What a request with that session's cookie is told; nothing once it has ended. */
export const contextOf = (session: string) =>
  beforeSignIn<{ user_id: string; organisation_id: string; roles: string[] }>(
    "select * from guarded.session_context($1)",
    [session],
  );

/** An open link to set a password, for a minute. */
export async function linkFor(person: Id, over: Record<string, unknown> = {}): Promise<string> {
  const secret = token();
  await insertRow("single_use_links", {
    user_id: person.id,
    purpose: "reset",
    token_hash: hash(secret),
    expires_at: new Date(Date.now() + 60_000),
    ...over,
  });
  return secret;
}

/** An open invitation to an organisation the person has not accepted yet. */
export async function invitationFor(person: Id, organisation: Id): Promise<string> {
  await adminQuery(
    `insert into memberships (user_id, organisation_id, invited_name, invited_email)
     values ($1, $2, 'As invited', 'invited@example.test')`,
    [person.id, organisation.id],
  );
  return linkFor(person, { purpose: "invitation", organisation_id: organisation.id });
}
