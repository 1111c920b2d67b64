const LOCAL = /^[a-z0-9!#$%&'*+/=?^_{|}~-]+(\.[a-z0-9!#$%&'*+/=?^_{|}~-]+)*$/;
const DOMAIN = /^[a-z0-9]([a-z0-9-]*[a-z0-9])?(\.[a-z0-9]([a-z0-9-]*[a-z0-9])?)+$/;

/**
 * One plain mail address in small letters, or null. Quoted parts, lists, display names, line ends and letters outside
 * ASCII are no addresses here: each of them has been a way to send somebody else's mail to oneself.
 */
export function readAddress(typed: string): string | null {
  const address = typed.trim().toLowerCase();
  const at = address.indexOf("@");
  const [local, domain] = [address.slice(0, at), address.slice(at + 1)];
  if (at < 1 || address.length > 254 || local.length > 64) return null;
  return LOCAL.test(local) && DOMAIN.test(domain) ? address : null;
}
