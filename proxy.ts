import { NextResponse, type NextRequest } from "next/server";
import { requestIdOf } from "@/lib/web/request-id";

const policy = (nonce: string) => {
  const development = process.env.NODE_ENV === "development";
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ""}`,
    development ? "style-src 'self' 'unsafe-inline'" : `style-src 'self' 'nonce-${nonce}'`,
    // Positions of menus and the sizes of charts are style attributes; they cannot run anything.
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' blob: data:",
    "font-src 'self'",
    "connect-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join("; ");
};

/** Headers and nothing else: who may see a page is decided where its data is read, never here. */
export function proxy(request: NextRequest) {
  const nonce = Buffer.from(crypto.randomUUID()).toString("base64");
  const headers = new Headers(request.headers);
  headers.set("x-nonce", nonce);
  // Whatever is done and logged for this page, in however many places, has one id.
  headers.set("x-request-id", requestIdOf(request.headers));
  headers.set("content-security-policy", policy(nonce));
  const response = NextResponse.next({ request: { headers } });
  response.headers.set("content-security-policy", policy(nonce));
  return response;
}

// Uploads stay out: a route matched here has its body buffered and cut at 10 MB.
export const config = { matcher: ["/((?!api/|_next/static|_next/image|favicon.ico|icon.svg).*)"] };
