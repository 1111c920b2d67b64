import "server-only";
import type { Actor } from "@/lib/access/actor";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { findReturn } from "./card-queries";
import type { ReturnView } from "./view";

type Refused = "notFound" | "labelNeedsAnswer" | "labelRefused";

/**
 * The return a label is asked for. Refuses `labelRefused` for a battery that is not sound and `labelNeedsAnswer` for one
 * nobody has looked at: neither travels under an ordinary label.
 */
export async function findForLabel(
  actor: Actor,
  { number, cells }: { number: string; cells: "sound" | "unsafe" | undefined },
): Promise<Outcome<ReturnView, Refused>> {
  const returned = number === "" ? null : await findReturn(actor, number);
  if (!returned) return refuse("notFound");
  const isAsked = returned.lines.some(({ asksForDanger }) => asksForDanger);
  if (isAsked && cells === "unsafe") return refuse("labelRefused");
  return isAsked && cells !== "sound" ? refuse("labelNeedsAnswer") : ok(returned);
}
