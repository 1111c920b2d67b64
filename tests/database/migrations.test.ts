import { describe, expect, it } from "vitest";
import { migrateDown, migrateUp } from "@/lib/db/migrate";
import { dumpSchema, normaliseDump } from "@/lib/db/schema-dump";
import { adminQuery } from "../support/database";

const url = (login: string): string => process.env[`DATABASE_URL_${login}`] ?? "";
const dump = () => dumpSchema(url("ADMIN"));
const up = () => migrateUp(url("MIGRATOR"), url("WORKER"));

describe("the schema", () => {
  it("is the committed one, so that a migration shows in a review", async () => {
    await expect(await dump()).toMatchFileSnapshot("../../migrations/schema.sql");
  });

  it("goes down to nothing and comes up the same", async () => {
    const before = await dump();
    const undone = await migrateDown(url("MIGRATOR"));
    expect(undone.length).toBeGreaterThanOrEqual(6);
    const left = await adminQuery(
      `select relname as name from pg_class where relnamespace = 'public'::regnamespace
       union all select proname from pg_proc where pronamespace = 'public'::regnamespace
       union all select nspname from pg_namespace where nspname = 'guarded'`,
    );
    expect(left).toEqual([]);
    expect(await up()).toEqual(undone.toReversed());
    expect(await dump()).toBe(before);
  });

  it("is up to date after a second run that has nothing to do", async () => {
    expect(await up()).toEqual([]);
  });
});

describe("a dump as it is compared", () => {
  it("keeps what is the schema and drops what is the day's", () => {
    const one =
      "--\n-- Dumped by pg_dump 15.1\n--\n\n\\restrict abc\n\nSET lock_timeout = 0;\n\n\nCREATE TABLE public.a (\n    id integer\n);\n";
    const other = one.replace("15.1", "15.9").replace("abc", "xyz");
    expect(normaliseDump(one)).toBe("CREATE TABLE public.a (\n    id integer\n);\n");
    expect(normaliseDump(other)).toBe(normaliseDump(one));
    expect(normaliseDump(one.replace("integer", "bigint"))).not.toBe(normaliseDump(one));
  });
});
