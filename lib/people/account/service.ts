import "server-only";
import { setTimeout } from "node:timers/promises";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { log } from "@/lib/web/log";
import { hashPassword, passwordFits } from "@/lib/web/password";
import { User } from "@/models/user";
import { readAddress } from "../address";
import { attemptKeys, beginAttempt, clearAttempts } from "../attempt-service";
import { passwordFault, type PasswordChangeInput, type PasswordFault, type Preferences } from "../schema";
import { requestReset } from "../service";

type LinkRequest = { readonly email: string; readonly address: string; readonly requestId: string };

// Far more than writing the mail takes: with an account or without, the answer comes at the same time.
const ANSWER_AFTER_MS = 300;

/** Mails a link for a new password, and no more than ten to one account in 15 minutes. Never says which it was. */
export async function askForReset({ email, address, requestId }: LinkRequest): Promise<void> {
  const answerAt = setTimeout(ANSWER_AFTER_MS);
  // Said before it is known whether there is an account, so that the log does not tell either.
  log.info({ event: "resetAsked", requestId });
  if (await beginAttempt(attemptKeys(`reset:${readAddress(email)}`, `resetFrom:${address}`)))
    await requestReset(email, requestId);
  await answerAt;
}

/** Keeps how a person likes to see the product. */
export const savePreferences = (
  actor: Actor,
  { locale, theme, density }: Preferences,
): Promise<Outcome<null, never>> =>
  unitOfWork(actor, async (work) => {
    await User.update(
      { locale, theme, density: density === "byDevice" ? null : density },
      { where: { id: actor.userId }, transaction: work.transaction },
    );
    return ok(null);
  });

export type PasswordChange =
  | { readonly fault: PasswordFault | "wrong" | "tooMany" }
  | { readonly fault: null; readonly sessionId: string | null };

/**
 * Sets a new password for who knows the old one. Every session ends, and one takes the place of the session this was
 * asked in, with the same limits. Hashing takes its time and stays outside of the transaction.
 */
export async function changePassword(
  actor: Actor,
  given: PasswordChangeInput & { readonly sessionId: string },
): Promise<Outcome<PasswordChange, never>> {
  const fault = passwordFault(given.password);
  if (fault) return ok({ fault });
  const keys = attemptKeys(`password:${actor.userId}`, `passwordOf:${actor.userId}`);
  if (!(await beginAttempt(keys))) return ok({ fault: "tooMany" });
  const [own] = await unitOfWork(actor, (work) =>
    rows<{ hash: string | null }>(work, "select guarded.own_password_hash() as hash"),
  );
  if (!(await passwordFits(own?.hash ?? null, given.current.slice(0, 1000)))) return ok({ fault: "wrong" });

  const hashed = await hashPassword(given.password);
  const sessionId = await unitOfWork(actor, async (work) => {
    await rows(work, "select guarded.set_password($1, $2)", [actor.userId, hashed]);
    await rows(work, "select guarded.append_audit('passwordChanged', '{}')");
    const [started] = await rows<{ id: string | null }>(
      work,
      `select guarded.start_session(s.user_id, s.organisation_id,
         greatest(1, round(extract(epoch from s.expires_at - s.started_at) / 3600))::integer, s.idle_hours, s.device) as id
       from sessions s where s.id = $1`,
      [given.sessionId],
    );
    return started?.id ?? null;
  });
  await clearAttempts(keys);
  return ok({ fault: null, sessionId });
}

/** Ends one of a person's own sessions; somebody else's is not there. */
export const endOwnSession = (
  actor: Actor,
  { session }: { session: string },
): Promise<Outcome<null, "notFound">> =>
  unitOfWork(actor, async (work) => {
    const [own] = await rows(work, "select id from sessions where id = $1 and user_id = $2", [
      session,
      actor.userId,
    ]);
    if (!own) return refuse("notFound");
    await rows(work, "select guarded.end_session($1)", [session]);
    await rows(work, "select guarded.append_audit('sessionEnded', $1)", [
      JSON.stringify({ sessionId: session }),
    ]);
    return ok(null);
  });

/** Ends every session of a person but the one this is asked in. */
export const endOtherSessions = (actor: Actor, keptSessionId: string): Promise<Outcome<null, never>> =>
  unitOfWork(actor, async (work) => {
    await rows(
      work,
      "select guarded.end_session(s.id) from sessions s where s.user_id = $1 and s.id <> $2 and s.ended_at is null",
      [actor.userId, keptSessionId],
    );
    await rows(work, "select guarded.append_audit('otherSessionsEnded', '{}')");
    return ok(null);
  });
