import "server-only";
import { beforeSignIn } from "@/lib/db/unit-of-work";
import { sha256Of } from "@/lib/web/sha256";

/** Whose tries are counted: ten for the account and fifty for where they come from, in 15 minutes. */
type AttemptKeys = { readonly account: string; readonly address: string };

/** What tries to open the account of this address are counted under. */
export const signInKeys = (email: string, address: string): AttemptKeys => ({
  account: sha256Of(`account:${email}`),
  address: sha256Of(`address:${address}`),
});

/** The same for anything else that must not be tried without end. */
export const attemptKeys = (account: string, address: string): AttemptKeys => ({
  account: sha256Of(account),
  address: sha256Of(address),
});

/** Counts a try and says whether it is allowed. It counts before anything is looked at, so many at once gain nothing. */
export async function beginAttempt({ account, address }: AttemptKeys): Promise<boolean> {
  const [attempt] = await beforeSignIn<{ allowed: boolean }>(
    "select guarded.begin_attempt($1, $2) as allowed",
    [account, address],
  );
  return attempt?.allowed ?? false;
}

/** A try that succeeded: the account's count begins anew, and the address gets this one back. */
export const clearAttempts = ({ account, address }: AttemptKeys): Promise<unknown> =>
  beforeSignIn("select guarded.clear_attempts($1, $2)", [account, address]);

/** The owner of an account has shown themselves another way: tries of somebody else no longer keep them out. */
export const forgetAttempts = (email: string): Promise<unknown> =>
  beforeSignIn("select guarded.clear_attempts($1, null)", [signInKeys(email, "").account]);
