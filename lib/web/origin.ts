import "server-only";
import { setting } from "./settings";

/**
 * Whether a write really comes from a page of ours. A browser says where a request started (`Sec-Fetch-Site`, `Origin`);
 * one that says neither is no browser with our cookie in it, and is refused as well.
 */
export function isFromOurPages(incoming: Headers): boolean {
  const origin = incoming.get("origin");
  if (origin !== null) return origin === new URL(setting("PUBLIC_URL")).origin;
  return incoming.get("sec-fetch-site") === "same-origin";
}
