import type { PoolClient } from "pg";

/** Of what the worker hands a task, all that those with statements of their own need. */
export type Connections = {
  readonly withPgClient: <T>(act: (client: PoolClient) => Promise<T>) => Promise<T>;
};
