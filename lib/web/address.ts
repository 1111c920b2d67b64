import "server-only";
import { isIP } from "node:net";
import { settingIfGiven } from "./settings";

/** The half of an IPv6 address that is one household's or one firm's; the other half its devices draw as they like. */
const NETWORK_GROUPS = 4;

const networkOf = (address: string): string => {
  const [head = "", tail] = address.split("%")[0]?.toLowerCase().split("::") ?? [];
  const groupsOf = (part: string) => (part === "" ? [] : part.split(":"));
  const [left, right] = [groupsOf(head), groupsOf(tail ?? "")];
  const filled =
    tail === undefined ? left : [...left, ...Array(8 - left.length - right.length).fill("0"), ...right];
  return `${filled
    .slice(0, NETWORK_GROUPS)
    .map((group) => group.replace(/^0+(?=.)/u, ""))
    .join(":")}::/64`;
};

/**
 * Where a request came from, out of `X-Forwarded-For`, for counting. Each proxy in front of us adds one entry at the
 * end, so with one proxy the last entry counts and whatever a client wrote before it does not. What is no address is
 * `local`: nobody makes up a place of their own to try from.
 */
export function addressIn(header: string | null, proxies = 1): string {
  const entry = header?.split(",").at(-proxies)?.trim() ?? "";
  const address = entry.replace(/^::ffff:(?=\d+\.)/iu, "");
  const version = isIP(address);
  if (version === 0) return "local";
  return version === 6 ? networkOf(address) : address;
}

/** The same for a request, by how many proxies of ours it passed. */
export const addressOf = (incoming: Headers): string =>
  addressIn(incoming.get("x-forwarded-for"), settingIfGiven("TRUSTED_PROXY"));
