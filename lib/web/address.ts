import "server-only";

/** The network address a request came from, as the server in front of us reports it; `local` where there is none. */
export const addressOf = (incoming: Headers): string =>
  incoming.get("x-forwarded-for")?.split(",").at(-1)?.trim() || "local";
