import type { Task } from "graphile-worker";

/** Tells the readiness check that the worker is alive. */
export const beat: Task = async (_payload, { query }) => {
  await query(
    "insert into worker_heartbeats (name) values ('worker') on conflict (name) do update set seen_at = now()",
  );
};
