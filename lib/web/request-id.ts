/**
 * The id every line of the log, the audit row, the outbox and the mail of this request carry: the one a proxy in front
 * gave where it reads like one, or a new one.
 */
export const requestIdOf = (incoming: Headers): string => {
  const given = incoming.get("x-request-id");
  return given && /^[\w-]{8,64}$/u.test(given) ? given : crypto.randomUUID();
};
