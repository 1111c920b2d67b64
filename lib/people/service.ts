import "server-only";
import { QueryTypes } from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import { beforeSignIn } from "@/lib/db/unit-of-work";
import { log } from "@/lib/web/log";
import { hashPassword, passwordFits } from "@/lib/web/password";
import { publicUrl } from "@/lib/web/settings";
import { newToken, sha256Of } from "@/lib/web/sha256";
import { readAddress } from "./address";
import { beginAttempt, clearAttempts, forgetAttempts, signInKeys } from "./attempt-service";
import { lifeOf } from "./session-life";

type Candidate = { user_id: string; password_hash: string | null; organisation_id: string; roles: string[] };

/**
 * Checks a password and starts a session. Returns its id, or null for every reason alike: unknown, wrong, disabled or
 * too many failed tries (10 an account and 50 an address in 15 minutes, counted in the database).
 */
export async function signIn(given: {
  email: string;
  password: string;
  address: string;
  device: string;
}): Promise<string | null> {
  const email = readAddress(given.email);
  const keys = signInKeys(email ?? given.email.slice(0, 300), given.address);
  const isAllowed = await beginAttempt(keys);
  const [candidate] = email
    ? await beforeSignIn<Candidate>("select * from guarded.sign_in_candidate($1)", [email])
    : [];
  // Behind the limit no password is looked at: hashing costs, and a flood must not get it for nothing.
  const fits =
    isAllowed && (await passwordFits(candidate?.password_hash ?? null, given.password.slice(0, 1000)));
  if (!fits || !candidate) {
    log.warn({ event: "signInRefused", account: keys.account.slice(0, 12), throttled: !isAllowed });
    return null;
  }
  const { hours, idleHours } = lifeOf(candidate.roles);
  await clearAttempts(keys);
  const [session] = await beforeSignIn<{ id: string | null }>(
    "select guarded.start_session($1, $2, $3, $4, $5) as id",
    [candidate.user_id, candidate.organisation_id, hours, idleHours, given.device.slice(0, 200)],
  );
  return session?.id ?? null;
}

/** Ends a session row; the cookie that names it is worthless from then on. */
export const endSession = (sessionId: string) => beforeSignIn("select guarded.end_session($1)", [sessionId]);

export const RESET_MINUTES = 30;

/** Mails a link to set a new password, if the account exists. Takes the same steps and says the same either way. */
export async function requestReset(typedAddress: string, requestId: string): Promise<void> {
  const email = readAddress(typedAddress);
  const token = newToken();
  await sequelize.transaction(async (transaction) => {
    const run = (sql: string, bind: unknown[]) =>
      sequelize.query(sql, { bind, transaction, type: QueryTypes.SELECT });
    await run("select guarded.make_link($1, 'reset', $2, $3)", [email ?? "", sha256Of(token), RESET_MINUTES]);
    await run("select guarded.mail_link_owner($1, 'passwordReset', $2, $3)", [
      sha256Of(token),
      JSON.stringify({ link: publicUrl(`/reset/${token}`), minutes: RESET_MINUTES }),
      requestId,
    ]);
  });
}

/** Whose link it is; an invitation names the organisation that invites, and whether its reader has an account already. */
export type LinkOwner = {
  email: string;
  name: string;
  purpose: string;
  organisation: string;
  has_password: boolean;
};

/** Whose single-use link this is, while it can still be used. */
export async function findLinkOwner(token: string): Promise<LinkOwner | null> {
  const [owner] = await beforeSignIn<LinkOwner>("select * from guarded.link_owner($1)", [sha256Of(token)]);
  return owner ?? null;
}

/** Sets the password once, and accepts the invitation if it was one; every session of the account ends. Returns the address, or null for a spent link. */
export async function setPasswordByLink(token: string, password: string): Promise<string | null> {
  const hashed = await hashPassword(password);
  const [used] = await beforeSignIn<{ email: string | null }>("select guarded.use_link($1, $2) as email", [
    sha256Of(token),
    hashed,
  ]);
  if (used?.email) await forgetAttempts(used.email);
  return used?.email ?? null;
}
