import pg from "pg";
import { afterAll } from "vitest";
import { databaseUrl, type Login } from "./database-url";

export type Row = Record<string, unknown>;

/** Logins of the product, and roles without login that only another role becomes. */
export type DatabaseRole =
  "web" | "worker" | "partproof_owner" | "keeper" | "reporter" | "auditor" | "postgres";

type Context = { readonly actor?: string; readonly org?: string };

const DATE = 1082;
// Days stay the text they are: the driver would make instants in the machine's zone of them.
pg.types.setTypeParser(DATE, (text) => text);

const pools = new Map<Login, pg.Pool>();

const poolFor = (login: Login): pg.Pool => {
  const database = new URL(process.env["DATABASE_URL"] ?? "").pathname.slice(1);
  const pool = pools.get(login) ?? new pg.Pool({ connectionString: databaseUrl(login, database), max: 12 });
  pools.set(login, pool);
  return pool;
};

afterAll(async () => {
  await Promise.all([...pools.values()].map((pool) => pool.end()));
  pools.clear();
});

/** Rows of a statement as the superuser, whom no row security holds: to build and to look, never to prove. */
export async function adminQuery<Found extends Row = Row>(
  sql: string,
  bind: unknown[] = [],
): Promise<Found[]> {
  const { rows } = await poolFor("ADMIN").query(sql, bind);
  return rows as Found[];
}

const LOGIN_OF: Readonly<Record<DatabaseRole, Login>> = {
  web: "WEB",
  worker: "WORKER",
  partproof_owner: "ADMIN",
  keeper: "ADMIN",
  reporter: "ADMIN",
  auditor: "ADMIN",
  postgres: "ADMIN",
};

export type Run = <Found extends Row = Row>(sql: string, bind?: unknown[]) => Promise<Found[]>;

async function become(client: pg.PoolClient, role: DatabaseRole, { actor, org }: Context) {
  const roleSql = `set local role ${role}`;
  if (LOGIN_OF[role] === "ADMIN") await client.query(roleSql);
  await client.query(
    "select set_config('app.actor_id', $1, true), set_config('app.organisation_id', $2, true)",
    [actor ?? "", org ?? ""],
  );
}

/** Several statements of one role in one transaction; what it wrote stays, unless it fails or says `rollback`. */
export async function inTransaction<T>(
  role: DatabaseRole,
  { rollback = false, ...context }: Context & { readonly rollback?: boolean },
  act: (run: Run) => Promise<T>,
): Promise<T> {
  const client = await poolFor(LOGIN_OF[role]).connect();
  try {
    await client.query("begin");
    await become(client, role, context);
    const result = await act(
      async <Found extends Row>(sql: string, bind: unknown[] = []) =>
        (await client.query(sql, bind)).rows as Found[],
    );
    await client.query(rollback ? "rollback" : "commit");
    return result;
  } catch (fault) {
    await client.query("rollback");
    throw fault;
  } finally {
    client.release();
  }
}

/** One statement as a role, in a transaction that carries who asks and for which organisation. */
export const asRole = <Found extends Row = Row>(
  role: DatabaseRole,
  context: Context,
  sql: string,
  bind: unknown[] = [],
): Promise<Found[]> => inTransaction(role, context, (run) => run<Found>(sql, bind));

/** What the database answered: "done", or the state of its refusal (`42501`, `PP001`, ...). */
export async function answerOf(work: Promise<unknown>): Promise<string> {
  try {
    await work;
    return "done";
  } catch (fault) {
    const at = fault as { code?: unknown; original?: { code?: unknown } };
    return String(at.original?.code ?? at.code ?? fault);
  }
}

/** Refused because the role lacks the right, or because the row would be somebody else's. */
export const NOT_ALLOWED = "42501";
