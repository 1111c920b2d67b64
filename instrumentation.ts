import type { Instrumentation } from "next";

/** A fault of a page, with the reference its reader was shown: the line in the log that a question leads to. */
export const onRequestError: Instrumentation.onRequestError = async (fault, request, context) => {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { log } = await import("@/lib/web/log");
  const digest = typeof fault === "object" && fault !== null && "digest" in fault ? fault.digest : undefined;
  log.error({
    event: "pageFault",
    digest,
    method: request.method,
    // Without its query: people type serials and names into searches.
    path: request.path.split("?")[0],
    route: context.routePath,
    fault: fault instanceof Error ? fault.stack : String(fault),
  });
};
