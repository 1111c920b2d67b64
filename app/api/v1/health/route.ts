/** Alive: the process answers. Says nothing about what it depends on. */
export const GET = () => Response.json({ status: "live" }, { headers: { "cache-control": "no-store" } });

export const dynamic = "force-dynamic";
