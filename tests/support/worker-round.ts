import pg from "pg";
import type { JobHelpers, Task } from "graphile-worker";

/** Runs a task of the worker some times over, on connections of the worker's own login. */
export async function runTask(task: Task, times = 1): Promise<void> {
  const pool = new pg.Pool({ connectionString: process.env["DATABASE_URL_WORKER"], max: 2 });
  const withPgClient = async <T>(act: (client: pg.PoolClient) => Promise<T>): Promise<T> => {
    const client = await pool.connect();
    try {
      return await act(client);
    } finally {
      client.release();
    }
  };
  try {
    for (let time = 0; time < times; time += 1) await task({}, { withPgClient } as unknown as JobHelpers);
  } finally {
    await pool.end();
  }
}
