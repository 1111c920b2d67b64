import "server-only";
import { getTranslations } from "next-intl/server";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";
import { mediaTypeFor, problemResponse } from "./problem";

type Keyed = { actor: Actor; route: string; key: string | null; fingerprint: string };
type Kept = { fingerprint: string; status: number | null; response: unknown };

const claimKey = ({ actor, route, key, fingerprint }: Keyed) =>
  unitOfWork(actor, (work) =>
    rows<{ key: string }>(
      work,
      `insert into idempotency_keys (organisation_id, route, key, fingerprint) values ($1, $2, $3, $4)
       on conflict (organisation_id, route, key) do update set created_at = now(), fingerprint = excluded.fingerprint
         where idempotency_keys.status is null and idempotency_keys.created_at < now() - interval '1 minute'
       returning key`,
      [actor.organisationId, route, key, fingerprint],
    ),
  );

const find = async ({ actor, route, key }: Keyed): Promise<Kept | undefined> => {
  const [kept] = await unitOfWork(actor, (work) =>
    rows<Kept>(
      work,
      `select fingerprint, status, response from idempotency_keys where organisation_id = $1 and route = $2 and key = $3`,
      [actor.organisationId, route, key],
    ),
  );
  return kept;
};

const keep = ({ actor, route, key }: Keyed, status: number, response: unknown) =>
  unitOfWork(actor, (work) =>
    rows(
      work,
      `update idempotency_keys set status = $4, response = $5 where organisation_id = $1 and route = $2 and key = $3 returning key`,
      [actor.organisationId, route, key, status, JSON.stringify(response)],
    ),
  );

const refuse = async (keyed: Keyed, code: "keyMissing" | "keyReused" | "keyRunning", status: number) => {
  const t = await getTranslations({ locale: keyed.actor.locale, namespace: "problems" });
  return problemResponse({ status, code, title: t(code) }, keyed.actor.requestId);
};

/**
 * A request that may be sent twice and takes effect once (after draft-ietf-httpapi-idempotency-key-header-07): no key
 * 400, the same key with other content 422, still running 409, finished: the first answer again. The key belongs to an
 * organisation and a route. What the handler changes must itself be safe to repeat after a crash in between, because a
 * key left without an answer is free again after a minute.
 */
export async function withIdempotency(keyed: Keyed, act: () => Promise<Response>): Promise<Response> {
  if (!keyed.key || keyed.key.length < 8 || keyed.key.length > 200) return refuse(keyed, "keyMissing", 400);
  const [claimed] = await claimKey(keyed);
  if (!claimed) {
    const kept = await find(keyed);
    if (kept && kept.fingerprint !== keyed.fingerprint) return refuse(keyed, "keyReused", 422);
    if (!kept || kept.status === null) return refuse(keyed, "keyRunning", 409);
    return Response.json(kept.response, {
      status: kept.status,
      headers: {
        "content-type": mediaTypeFor(kept.status),
        "cache-control": "private, no-store",
        "x-request-id": keyed.actor.requestId,
        "idempotent-replay": "true",
      },
    });
  }
  const response = await act();
  await keep(keyed, response.status, await response.clone().json());
  return response;
}
