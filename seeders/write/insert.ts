import type { Client } from "pg";
import { TABLES, type Row, type Tables } from "../tables";

const inSnakeCase = (name: string): string => name.replace(/[A-Z]/gu, (letter) => `_${letter.toLowerCase()}`);

const asColumns = (row: Row): Row =>
  Object.fromEntries(Object.entries(row).map(([key, value]) => [inSnakeCase(key), value]));

/** Few enough that one statement stays well below what a server takes at once. */
const ROWS_AT_ONCE = 4000;

/** One statement for many rows: the table's own columns give the types, and the rows come in one JSON text. */
const statementFor = (table: string, columns: readonly string[]): string =>
  `insert into ${table} (${columns.join(", ")}) select ${columns.join(", ")} from jsonb_populate_recordset(null::${table}, $1::jsonb)`;

async function insertRows(client: Client, table: string, rows: readonly Row[]): Promise<void> {
  const [first] = rows;
  if (!first) return;
  const columns = Object.keys(asColumns(first));
  for (let at = 0; at < rows.length; at += ROWS_AT_ONCE) {
    const some = rows.slice(at, at + ROWS_AT_ONCE).map(asColumns);
    await client.query(statementFor(table, columns), [JSON.stringify(some)]);
  }
}

/** Writes all rows in one transaction, each table once; nothing stays where one of them is refused. */
export async function writeTables(client: Client, tables: Tables): Promise<void> {
  await client.query("begin");
  try {
    for (const table of TABLES) await insertRows(client, inSnakeCase(table), tables[table] ?? []);
    await client.query("commit");
  } catch (fault) {
    await client.query("rollback");
    throw fault;
  }
}

/** True where nobody has written an organisation yet. */
export async function isEmpty(client: Client): Promise<boolean> {
  const { rowCount } = await client.query("select from organisations limit 1");
  return rowCount === 0;
}
