import { request } from "node:http";

export type PlainAnswer = { status: number; headers: Record<string, unknown>; body: string };

/** Asks for an address exactly as it is written: a browser would first tidy up `//`, `/../` and `%2e`. */
export const askPlainly = (
  home: string,
  path: string,
  headers: Readonly<Record<string, string>> = {},
): Promise<PlainAnswer> =>
  new Promise((resolve, reject) => {
    const { hostname, port } = new URL(home);
    const asked = request({ hostname, port, path, headers }, (answer) => {
      const pieces: Buffer[] = [];
      answer.on("data", (piece: Buffer) => pieces.push(piece));
      answer.on("error", reject);
      answer.on("end", () =>
        resolve({
          status: answer.statusCode ?? 0,
          headers: answer.headers,
          body: Buffer.concat(pieces).toString("utf8"),
        }),
      );
    });
    asked.on("error", reject);
    asked.end();
  });

type Variant = { readonly path: string; readonly headers: Readonly<Record<string, string>> };

const RSC = { rsc: "1" };
const PREFETCH = { ...RSC, "next-router-prefetch": "1" };

/** One address in the spellings and with the headers in which a page, or its data alone, might be asked for. */
export function variantsOf(path: string): Variant[] {
  const [first = "", ...rest] = path.slice(1);
  const coded = `/%${first.charCodeAt(0).toString(16)}${rest.join("")}`;
  const paths = [
    path,
    `${path}/`,
    `/${path}`,
    `${path}//`,
    `${path}/.`,
    `${path}/%2e`,
    `/x/..${path}`,
    `/x/%2e%2e${path}`,
    `/.${path}`,
    `/%2e${path}`,
    `/sign-in/..${path}`,
    `/sign-in/%2e%2e${path}`,
    `/_next/..${path}`,
    `/_next/static/%2e%2e/%2e%2e${path}`,
    `/api/v1/health/..%2f..%2f..${path}`,
    coded,
    `${path}.rsc`,
    `${path}.txt`,
    `${path}.json`,
    `${path}.segments/_tree.segment.rsc`,
    `${path}.segments/_full.segment.rsc`,
    `/_next/data/build${path}.json`,
    `${path}?_rsc=1a2b3`,
    `${path}?_rsc=1a2b3&__nextLocale=en`,
    `${path}?__nextDataReq=1`,
    `${path};x=1`,
    `${path}%00`,
    `${path}\\`,
    path.toUpperCase(),
  ];
  const headers = [
    RSC,
    PREFETCH,
    { ...RSC, "next-router-segment-prefetch": "/_full" },
    { ...RSC, "next-router-segment-prefetch": "/_tree" },
    { ...RSC, "next-router-state-tree": encodeURIComponent(JSON.stringify(["", {}, null, "refetch"])) },
    { "x-middleware-subrequest": "proxy:proxy:proxy:proxy:proxy" },
    { "x-middleware-subrequest": "middleware:middleware:middleware:middleware:middleware" },
    { "x-middleware-prefetch": "1" },
    { "x-middleware-rewrite": path },
    { "x-middleware-next": "1" },
    { "x-nextjs-data": "1" },
    { "x-matched-path": path },
    { "x-invoke-path": path },
    { "x-invoke-status": "200" },
    { "x-invoke-output": path },
    { "x-now-route-matches": "1=1" },
    { "x-prerender-revalidate": "1" },
    { "x-forwarded-host": "elsewhere.example" },
    { "x-original-url": path, "x-rewrite-url": path },
    { "next-action": "0".repeat(42) },
    { purpose: "prefetch" },
  ];
  return [
    ...paths.map((one) => ({ path: one, headers: {} })),
    ...paths.map((one) => ({ path: one, headers: RSC })),
    ...headers.map((one) => ({ path, headers: one })),
    ...headers.map((one) => ({ path: `${path}?_rsc=1a2b3`, headers: one })),
  ];
}
