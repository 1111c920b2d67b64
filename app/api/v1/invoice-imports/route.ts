import { importPath } from "@/lib/imports/paths";
import { receiveInvoiceFile } from "@/lib/imports/service";
import { route } from "@/lib/web/route";

/** Leads a browser on; the answer to a form that was sent without script is a page, not a document. */
const seeOther = (path: string, query: Readonly<Record<string, string | number>>) => {
  const search = new URLSearchParams(Object.entries(query).map(([name, value]) => [name, String(value)]));
  const location = search.size > 0 ? `${path}?${search}` : path;
  return new Response(null, { status: 303, headers: { location } });
};

/** One invoice file, streamed and kept for its preview. Nothing of it is imported yet. */
export const POST = route({ name: "POST /invoice-imports" }, async ({ session, request }) => {
  const received = await receiveInvoiceFile(session.actor, request);
  if (!request.headers.get("accept")?.includes("text/html")) return received;
  if (!received.ok) return seeOther("/invoice-lines", { refused: received.code, ...received.detail });
  const { importId, wasSentBefore } = received.value;
  return seeOther(importPath({ importId }), wasSentBefore ? { again: 1 } : {});
});

export const dynamic = "force-dynamic";
