import { AsyncLocalStorage } from "node:async_hooks";
import { readdirSync } from "node:fs";
import { join, relative } from "node:path";
import { encode } from "next-auth/jwt";
import { vi } from "vitest";
import type { Locale } from "@/lib/kernel/locale";

// Two doors of the framework exist only inside its server: the headers of the running request, and the sentences of the
// server build. Both are opened here with what the request says and with the product's own sentences.
const asking = new AsyncLocalStorage<Request>();

const cookiesOf = (request: Request | undefined) =>
  (request?.headers.get("cookie") ?? "")
    .split("; ")
    .filter(Boolean)
    .map((pair) => {
      const at = pair.indexOf("=");
      return { name: pair.slice(0, at), value: pair.slice(at + 1) };
    });

vi.doMock("next/headers", () => ({
  cookies: () => Promise.resolve({ getAll: () => cookiesOf(asking.getStore()) }),
  headers: () => Promise.resolve(asking.getStore()?.headers ?? new Headers()),
}));
vi.doMock("next-intl/server", async () => {
  const { createTranslator } = await import("use-intl/core");
  const { loadMessages } = await import("@/lib/web/messages");
  const throwIt = (fault: Error) => {
    throw fault;
  };
  return {
    getTranslations: (asked: string | { locale: Locale; namespace: string }) => {
      const { locale, namespace } =
        typeof asked === "string" ? { locale: "en" as const, namespace: asked } : asked;
      return Promise.resolve(
        createTranslator({ locale, namespace, messages: loadMessages(locale), onError: throwIt }),
      );
    },
  };
});

type Context = { readonly params: Promise<Readonly<Record<string, string>>> };
type Handler = (request: Request, context: Context) => Response | Promise<Response>;

const METHODS = ["GET", "HEAD", "POST", "PUT", "PATCH", "DELETE"] as const;
export type Method = (typeof METHODS)[number];

/** One route file of the API: its address with `{names}`, and the methods it answers. */
export type ApiRoute = {
  readonly address: string;
  readonly methods: readonly Method[];
  readonly handlers: Readonly<Partial<Record<Method, Handler>>>;
};

const ROOT = join(import.meta.dirname, "../..");

async function loadRoute(file: string): Promise<ApiRoute> {
  const found = (await import(/* @vite-ignore */ file)) as Partial<Record<Method, Handler>>;
  const address = `/${relative(join(ROOT, "app"), file)}`
    .replace(/\/route\.ts$/u, "")
    .replace(/\[(\w+)\]/gu, "{$1}");
  return { address, methods: METHODS.filter((method) => found[method]), handlers: found };
}

/** Every route file under `app/api/v1`, found by walking the folder: a new one is under test from its first day. */
export const apiRoutes: Promise<readonly ApiRoute[]> = Promise.all(
  readdirSync(join(ROOT, "app/api/v1"), { recursive: true, encoding: "utf8" })
    .filter((path) => /(^|\/)route\.ts$/u.test(path))
    .toSorted()
    .map((path) => loadRoute(join(ROOT, "app/api/v1", path))),
);

/** What stands in an address at the place of each `{name}`; null where it is another address. */
function paramsIn(address: string, path: string): Record<string, string> | null {
  const names = address.split("/");
  const parts = path.split("/");
  if (names.length !== parts.length) return null;
  const params: Record<string, string> = {};
  for (const [at, name] of names.entries()) {
    const part = parts[at] ?? "";
    if (name.startsWith("{")) params[name.slice(1, -1)] = decodeURIComponent(part);
    else if (name !== part) return null;
  }
  return params;
}

export type Ask = {
  readonly session?: string;
  readonly headers?: Readonly<Record<string, string>>;
  readonly body?: BodyInit | null;
};

/** The address this installation is told it has. */
const here = (): string => process.env["PUBLIC_URL"] ?? "";

/** Headers of a page of ours, and none where the test is about them. */
export const FROM_OUR_PAGES = (): Record<string, string> => ({ origin: new URL(here()).origin });

/** The cookie that signing in sets for a session row. */
async function cookieFor(session: string): Promise<string> {
  const secret = process.env["NEXTAUTH_SECRET"] ?? "";
  const token = await encode({ token: { sid: session }, secret, maxAge: 3600 });
  return `partproof.session=${token}`;
}

/** Does something as part of a request with these headers: what a form action sees of it. */
export async function inRequest<T>(
  { session, headers }: Omit<Ask, "body">,
  act: () => Promise<T>,
): Promise<T> {
  const sent = new Headers(headers ?? FROM_OUR_PAGES());
  if (session !== undefined) sent.set("cookie", await cookieFor(session));
  return asking.run(new Request(here(), { method: "POST", headers: sent }), act);
}

/** Sends a request to the route that has this address, as the framework would. Throws where there is none. */
export async function ask(
  method: Method,
  path: string,
  { session, headers, body }: Ask = {},
): Promise<Response> {
  const url = new URL(path, here());
  const routes = await apiRoutes;
  const meant = routes.flatMap(({ address, handlers }) => {
    const params = paramsIn(address, url.pathname);
    const handler = handlers[method];
    return params && handler ? [{ params, handler, address }] : [];
  });
  // An address written out stands before one with a place for anything.
  const [found] = meant.toSorted((a, b) => Object.keys(a.params).length - Object.keys(b.params).length);
  if (!found) throw new Error(`no route answers ${method} ${path}`);
  const cookie = session === undefined ? {} : { cookie: await cookieFor(session) };
  const init = { method, headers: { ...cookie, ...(headers ?? FROM_OUR_PAGES()) }, duplex: "half" };
  const request = new Request(url, { ...init, ...(body == null ? {} : { body }) } as RequestInit);
  return asking.run(request, async () => found.handler(request, { params: Promise.resolve(found.params) }));
}

/** The same with a JSON body. */
export const askJson = (
  method: Method,
  path: string,
  sent: unknown,
  { session, headers = {} }: Omit<Ask, "body"> = {},
): Promise<Response> =>
  ask(method, path, {
    ...(session === undefined ? {} : { session }),
    headers: { ...FROM_OUR_PAGES(), "content-type": "application/json", ...headers },
    body: JSON.stringify(sent),
  });

/** A problem document as it came, its members by name. */
export async function problemOf(response: Response): Promise<Record<string, unknown>> {
  const read: unknown = await response.json();
  return { ...Object(read) } as Record<string, unknown>;
}
