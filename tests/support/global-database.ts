import { execFile } from "node:child_process";
import { promisify } from "node:util";
import pg from "pg";
import { databaseUrl, TEMPLATE } from "./database-url";

// Statements about databases take no bound values; the name is a constant.
const MAKE = [
  `drop database if exists ${TEMPLATE} with (force)`,
  `create database ${TEMPLATE} owner partproof_owner`,
];
const OPEN = `revoke all on schema public from public; grant all on schema public to partproof_owner;
  grant create on database ${TEMPLATE} to migrator`;

async function run(database: string, statements: readonly string[]) {
  const client = new pg.Client({ connectionString: databaseUrl("ADMIN", database) });
  await client.connect();
  try {
    for (const statement of statements) await client.query(statement);
  } finally {
    await client.end();
  }
}

/** The schema once, by the product's own migrations and with no row of the demo; every test file works in a copy of it. */
export async function setup() {
  await run("postgres", MAKE);
  await run(TEMPLATE, [OPEN]);
  await promisify(execFile)(
    process.execPath,
    ["--conditions=react-server", "--import", "tsx", "lib/db/migrate-main.ts", "up"],
    {
      env: {
        ...process.env,
        DATABASE_URL_MIGRATOR: databaseUrl("MIGRATOR", TEMPLATE),
        DATABASE_URL_WORKER: databaseUrl("WORKER", TEMPLATE),
      },
    },
  );
}
