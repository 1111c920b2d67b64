import "server-only";
import { createHash, randomBytes } from "node:crypto";
import { QueryTypes } from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import { beforeSignIn } from "@/lib/db/unit-of-work";
import { log } from "@/lib/web/log";
import { hashPassword, passwordFits } from "@/lib/web/password";
import { publicUrl } from "@/lib/web/settings";
import { readAddress } from "./address";

const sha256 = (text: string) => createHash("sha256").update(text).digest("hex");

const accountKey = (email: string) => sha256(`account:${email}`);

type Candidate = { user_id: string; password_hash: string | null; organisation_id: string; roles: string[] };

/** How long a session lasts at most, and unused: a week at the bench, a working day where money is decided. */
const lifeOf = (roles: readonly string[]) =>
  roles.length > 0 && roles.every((role) => role === "technician")
    ? { hours: 168, idleHours: 168 }
    : { hours: 12, idleHours: 8 };

/**
 * Checks a password and starts a session. Returns its id, or null for every reason alike: unknown, wrong, disabled or
 * too many tries (10 an account and 50 an address in 15 minutes, counted in the database).
 */
export async function signIn(given: {
  email: string;
  password: string;
  address: string;
  device: string;
}): Promise<string | null> {
  const email = readAddress(given.email);
  const account = accountKey(email ?? given.email.slice(0, 300));
  const [attempt] = await beforeSignIn<{ allowed: boolean }>(
    "select guarded.begin_attempt($1, $2) as allowed",
    [account, sha256(`address:${given.address}`)],
  );
  const [candidate] = email
    ? await beforeSignIn<Candidate>("select * from guarded.sign_in_candidate($1)", [email])
    : [];
  // Behind the limit no password is looked at: hashing costs, and a flood must not get it for nothing.
  const fits =
    attempt?.allowed && (await passwordFits(candidate?.password_hash ?? null, given.password.slice(0, 1000)));
  if (!attempt?.allowed || !fits || !candidate) {
    log.warn({ event: "signInRefused", account: account.slice(0, 12), throttled: !attempt?.allowed });
    return null;
  }
  const { hours, idleHours } = lifeOf(candidate.roles);
  await beforeSignIn("select guarded.clear_attempts($1)", [account]);
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
  const token = randomBytes(32).toString("base64url");
  await sequelize.transaction(async (transaction) => {
    const run = (sql: string, bind: unknown[]) =>
      sequelize.query(sql, { bind, transaction, type: QueryTypes.SELECT });
    await run("select * from guarded.make_link($1, 'reset', $2, $3)", [
      email ?? "",
      sha256(token),
      RESET_MINUTES,
    ]);
    await run("select guarded.mail_link_owner($1, 'passwordReset', $2, $3)", [
      sha256(token),
      JSON.stringify({ link: publicUrl(`/reset/${token}`), minutes: RESET_MINUTES }),
      requestId,
    ]);
  });
}

export type LinkOwner = { email: string; name: string; purpose: string };

/** Whose single-use link this is, while it can still be used. */
export async function findLinkOwner(token: string): Promise<LinkOwner | null> {
  const [owner] = await beforeSignIn<LinkOwner>("select * from guarded.link_owner($1)", [sha256(token)]);
  return owner ?? null;
}

/** Sets the password once; every session of the account ends. Returns the address, or null for a spent link. */
export async function setPasswordByLink(token: string, password: string): Promise<string | null> {
  const hashed = await hashPassword(password);
  const [used] = await beforeSignIn<{ email: string | null }>("select guarded.use_link($1, $2) as email", [
    sha256(token),
    hashed,
  ]);
  // Whoever can read the account's mail is its owner: tries of somebody else no longer keep them out.
  if (used?.email) await beforeSignIn("select guarded.clear_attempts($1)", [accountKey(used.email)]);
  return used?.email ?? null;
}
