import { execFile } from "node:child_process";
import { readdirSync } from "node:fs";
import { join } from "node:path";
import { promisify } from "node:util";

/** Where Debian keeps the programs of the server, the newest version first. */
const DEBIAN = "/usr/lib/postgresql";

const newest = (): string => {
  const [version] = readdirSync(DEBIAN).toSorted((a, b) => Number(b) - Number(a));
  if (!version) throw new Error(`no PostgreSQL under ${DEBIAN}`);
  return join(DEBIAN, version, "bin", "pg_dump");
};

/** What a dump says about itself and the session that reads it, not about the schema. */
const ABOUT_THE_DUMP = /^(--|SET |SELECT pg_catalog\.set_config|\\(un)?restrict )/;

/** A dump without comments, settings and runs of empty lines: the same schema is always the same text. */
export const normaliseDump = (dump: string): string =>
  `${dump
    .split("\n")
    .filter((line) => !ABOUT_THE_DUMP.test(line))
    .join("\n")
    .replaceAll(/\n{3,}/g, "\n\n")
    .trim()}\n`;

/**
 * The schema of a database as one text: tables, keys, policies, functions, owners and grants. The job queue's own
 * schema is its package's business and stays out.
 */
export async function dumpSchema(url: string): Promise<string> {
  const args = ["--schema-only", "--schema=public", "--schema=guarded", `--dbname=${url}`];
  const { stdout } = await promisify(execFile)(newest(), args, { maxBuffer: 64e6 });
  return normaliseDump(stdout);
}
