import pg from "pg";
import { databaseUrl, TEMPLATE, type Login } from "./database-url";

// Before a test file is loaded: a database of its own, copied from the template, and the addresses that lead to it.
const name = `partproof_${process.env["VITEST_POOL_ID"] ?? "1"}`;
const make = [
  `drop database if exists ${name} with (force)`,
  `create database ${name} template ${TEMPLATE} owner partproof_owner`,
  `grant create on database ${name} to migrator`,
];

const client = new pg.Client({ connectionString: databaseUrl("ADMIN", "postgres") });
await client.connect();
try {
  for (const statement of make) await client.query(statement);
} finally {
  await client.end();
}

const LOGINS: readonly Login[] = ["ADMIN", "MIGRATOR", "WEB", "WORKER"];
for (const login of LOGINS) process.env[`DATABASE_URL_${login}`] = databaseUrl(login, name);
process.env["DATABASE_URL"] = databaseUrl("WEB", name);
process.env["LOG_LEVEL"] = "silent";
