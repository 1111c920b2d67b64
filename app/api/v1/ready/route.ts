import { readiness } from "@/lib/web/readiness";

/** Ready: database, migrations, store, and a worker seen in the last minute; 503 with the names of what is missing. */
export async function GET() {
  const parts = await readiness();
  const isReady = Object.values(parts).every(Boolean);
  return Response.json(
    { status: isReady ? "ready" : "notReady", parts },
    { status: isReady ? 200 : 503, headers: { "cache-control": "no-store" } },
  );
}

export const dynamic = "force-dynamic";
