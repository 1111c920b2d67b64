import "server-only";
import { beforeSignIn } from "@/lib/db/unit-of-work";
import { ok, type Outcome } from "@/lib/kernel/outcome";
import { lifeOf } from "../session-life";
import { listWorkplaces } from "./queries";

type Switch = { readonly sessionId: string; readonly organisation: string };
type Switched =
  { readonly fault: "notThere" | "tooOld" } | { readonly fault: null; readonly sessionId: string };

/**
 * Ends this session and starts one for another organisation the person works for. It lives as long as the roles there
 * allow, counted from when the password was typed: an older sign-in does not reach an organisation that wants a fresh one.
 */
export async function switchWorkplace({
  sessionId,
  organisation,
}: Switch): Promise<Outcome<Switched, never>> {
  const place = (await listWorkplaces(sessionId)).find(({ id }) => id === organisation);
  if (!place) return ok({ fault: "notThere" });
  const { hours, idleHours } = lifeOf(place.roles);
  const [started] = await beforeSignIn<{ id: string | null }>(
    "select guarded.switch_session($1, $2, $3, $4) as id",
    [sessionId, organisation, hours, idleHours],
  );
  return ok(started?.id ? { fault: null, sessionId: started.id } : { fault: "tooOld" });
}
