import "server-only";
import { cookies } from "next/headers";
import { encode } from "next-auth/jwt";
import { SESSION_COOKIE, SESSION_SECONDS } from "./cookie";
import { isSecure, setting } from "./settings";

const put = async (value: string, maxAge: number) => {
  const jar = await cookies();
  jar.set(SESSION_COOKIE(), value, {
    httpOnly: true,
    sameSite: "lax",
    path: "/",
    secure: isSecure(),
    maxAge,
  });
};

/** Lets this browser speak for a session: after signing in, or for another one of the same person. */
export const keepSession = async (sid: string): Promise<void> =>
  put(
    await encode({ token: { sid }, secret: setting("NEXTAUTH_SECRET"), maxAge: SESSION_SECONDS }),
    SESSION_SECONDS,
  );

/** Takes the session's cookie from this browser, under the same conditions it was set with. */
export const forgetSession = (): Promise<void> => put("", 0);
