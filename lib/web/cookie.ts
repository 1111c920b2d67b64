import "server-only";
import { isSecure } from "./settings";

/**
 * `__Host-` binds the cookie to this host over https. On loopback the product speaks http, where a browser refuses
 * that prefix, so there the plain name is used.
 */
export const SESSION_COOKIE = (): string => (isSecure() ? "__Host-partproof.session" : "partproof.session");

/** The longest a cookie is kept. The session row decides sooner: by role, by idleness, at once when it is ended. */
export const SESSION_SECONDS = 7 * 24 * 3600;
