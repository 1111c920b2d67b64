import "server-only";
import { cookies, headers } from "next/headers";
import { redirect } from "next/navigation";
import { getToken } from "next-auth/jwt";
import { cache } from "react";
import type { Actor } from "@/lib/access/actor";
import { hasRight, type Organisation, type Right } from "@/lib/access/rights";
import { isRole } from "@/lib/access/roles";
import { beforeSignIn } from "@/lib/db/unit-of-work";
import { isLocale } from "@/lib/kernel/locale";
import { SESSION_COOKIE } from "./cookie";
import { requestIdOf } from "./request-id";
import { setting } from "./settings";

/** A person at work: who, for which organisation, and how they like to see it. */
export type Session = {
  readonly id: string;
  readonly actor: Actor;
  readonly email: string;
  readonly theme: string;
  readonly density: string | null;
  readonly organisation: Organisation & {
    readonly id: string;
    readonly name: string;
    readonly currency: string;
  };
};

type ContextRow = {
  user_id: string;
  organisation_id: string;
  name: string;
  email: string;
  locale: string;
  theme: string;
  density: string | null;
  roles: string[];
  organisation_name: string;
  sells: boolean;
  buys: boolean;
  time_zone: string;
  currency: string;
};

const present = (id: string, row: ContextRow, requestId: string): Session => ({
  id,
  email: row.email,
  theme: row.theme,
  density: row.density,
  organisation: {
    id: row.organisation_id,
    name: row.organisation_name,
    sells: row.sells,
    buys: row.buys,
    currency: row.currency,
  },
  actor: {
    userId: row.user_id,
    name: row.name,
    organisationId: row.organisation_id,
    roles: new Set(row.roles.filter(isRole)),
    locale: isLocale(row.locale) ? row.locale : "en",
    timeZone: row.time_zone,
    requestId,
  } as unknown as Actor,
});

/**
 * The session of this request, read anew from the database each time: a person who was disabled, lost a role or has a
 * new password is out at their next request, whatever their cookie says.
 */
export const currentSession = cache(async (): Promise<Session | null> => {
  const [jar, incoming] = await Promise.all([cookies(), headers()]);
  const name = SESSION_COOKIE();
  const all = Object.fromEntries(jar.getAll().map((cookie) => [cookie.name, cookie.value]));
  const token = await getToken({
    req: { cookies: all, headers: {} } as never,
    secret: setting("NEXTAUTH_SECRET"),
    cookieName: name,
    secureCookie: name.startsWith("__"),
  });
  if (typeof token?.sid !== "string") return null;
  const [row] = await beforeSignIn<ContextRow>("select * from guarded.session_context($1)", [token.sid]);
  return row ? present(token.sid, row, requestIdOf(incoming)) : null;
});

/** The session, or the way to the sign-in page. */
export async function requireSession(): Promise<Session> {
  const session = await currentSession();
  if (session) return session;
  return redirect("/sign-in");
}

/** Who asks, or the way to the sign-in page. */
export const requireActor = async (): Promise<Actor> => (await requireSession()).actor;

/** Whether this person may; draws buttons and guards pages. */
export const may = (session: Session, right: Right): boolean =>
  hasRight(session.actor.roles, right, session.organisation);
