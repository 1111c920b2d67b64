import "server-only";
import { rows, type Work } from "@/lib/db/unit-of-work";

/** The short name of an organisation the actor belongs to or trades with. */
export async function nameOf(work: Work, organisationId: string): Promise<string> {
  const [found] = await rows<{ name: string }>(work, "select name from organisations where id = $1", [
    organisationId,
  ]);
  return found?.name ?? "";
}

/** The IANA time zone such an organisation works in. */
export async function zoneOf(work: Work, organisationId: string): Promise<string> {
  const [found] = await rows<{ zone: string }>(
    work,
    "select time_zone as zone from organisations where id = $1",
    [organisationId],
  );
  return found?.zone ?? "UTC";
}
