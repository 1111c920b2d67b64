import "server-only";
import type { NextAuthOptions } from "next-auth";
import Credentials from "next-auth/providers/credentials";
import { endSession, signIn } from "@/lib/people/service";
import { addressOf } from "./address";
import { SESSION_COOKIE, SESSION_SECONDS } from "./cookie";
import { isSecure, setting } from "./settings";

const textHeaders = (incoming: Record<string, unknown> | undefined): [string, string][] =>
  Object.entries(incoming ?? {}).flatMap(([name, value]) =>
    typeof value === "string" ? [[name, value]] : [],
  );

/**
 * The cookie holds one thing: the id of a session row. Everything else, roles above all, is read from the database on
 * each request. What a browser posts to the session route is ignored.
 */
export const authOptions = (): NextAuthOptions => ({
  secret: setting("NEXTAUTH_SECRET"),
  session: { strategy: "jwt", maxAge: SESSION_SECONDS },
  useSecureCookies: isSecure(),
  pages: { signIn: "/sign-in", error: "/sign-in" },
  cookies: {
    sessionToken: {
      name: SESSION_COOKIE(),
      options: { httpOnly: true, sameSite: "lax", path: "/", secure: isSecure() },
    },
  },
  providers: [
    Credentials({
      credentials: { email: {}, password: {} },
      async authorize(credentials, request) {
        const sid = await signIn({
          email: credentials?.email ?? "",
          password: credentials?.password ?? "",
          address: addressOf(new Headers(textHeaders(request.headers))),
          device: String(request.headers?.["user-agent"] ?? ""),
        });
        return sid ? { id: sid } : null;
      },
    }),
  ],
  // Signing out by the session route ends the row as well: a copied cookie is worth nothing afterwards.
  events: {
    signOut: async ({ token }) => {
      if (typeof token.sid === "string") await endSession(token.sid);
    },
  },
  callbacks: {
    jwt: ({ token, user, trigger }) => (trigger === "signIn" && user ? { sid: user.id } : { sid: token.sid }),
    session: ({ session }) => ({ expires: session.expires }),
  },
});
