import type { Instrumentation } from "next";

/** What the framework says by itself is a line of the log like any other: its words may be those of a visitor. */
export async function register() {
  if (process.env.NEXT_RUNTIME !== "nodejs" || process.env.NODE_ENV !== "production") return;
  const { format } = await import("node:util");
  const { log } = await import("@/lib/web/log");
  console.error = (...said: unknown[]) => log.error({ event: "console", said: format(...said) });
  console.warn = (...said: unknown[]) => log.warn({ event: "console", said: format(...said) });
}

/** A fault of a page, with the reference its reader was shown: the line in the log that a question leads to. */
export const onRequestError: Instrumentation.onRequestError = async (fault, request, context) => {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { log } = await import("@/lib/web/log");
  const digest = typeof fault === "object" && fault !== null && "digest" in fault ? fault.digest : undefined;
  log.error({
    event: "pageFault",
    requestId: request.headers["x-request-id"],
    digest,
    method: request.method,
    // Without its query: people type serials and names into searches.
    path: request.path.split("?")[0],
    route: context.routePath,
    fault: fault instanceof Error ? fault.stack : String(fault),
  });
};
