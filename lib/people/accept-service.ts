import "server-only";
import { beforeSignIn } from "@/lib/db/unit-of-work";
import { log } from "@/lib/web/log";
import { passwordFits } from "@/lib/web/password";
import { sha256Of } from "@/lib/web/sha256";
import { beginAttempt, clearAttempts, signInKeys } from "./attempt-service";
import { lifeOf } from "./session-life";

type Candidate = { user_id: string; email: string; password_hash: string; roles: string[] };
type Acceptance = {
  readonly token: string;
  readonly password: string;
  readonly address: string;
  readonly device: string;
};

/**
 * Accepts an invitation for somebody who has an account already: they sign in with their own password, which stays as
 * it is, and start at the organisation that invited. Returns the session's id, or null for every reason alike.
 */
export async function acceptInvitation(given: Acceptance): Promise<string | null> {
  const hashed = sha256Of(given.token);
  const [candidate] = await beforeSignIn<Candidate>("select * from guarded.invitation_candidate($1)", [
    hashed,
  ]);
  if (!candidate) return null;
  const keys = signInKeys(candidate.email, given.address);
  const isAllowed = await beginAttempt(keys);
  const fits = isAllowed && (await passwordFits(candidate.password_hash, given.password.slice(0, 1000)));
  if (!fits) {
    log.warn({ event: "acceptRefused", account: keys.account.slice(0, 12), throttled: !isAllowed });
    return null;
  }
  await clearAttempts(keys);
  const [joined] = await beforeSignIn<{ id: string | null }>(
    "select guarded.accept_invitation($1, $2) as id",
    [hashed, candidate.user_id],
  );
  if (!joined?.id) return null;
  const { hours, idleHours } = lifeOf(candidate.roles);
  const [session] = await beforeSignIn<{ id: string | null }>(
    "select guarded.start_session($1, $2, $3, $4, $5) as id",
    [candidate.user_id, joined.id, hours, idleHours, given.device.slice(0, 200)],
  );
  return session?.id ?? null;
}
