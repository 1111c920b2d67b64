import { readdirSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, it } from "vitest";
import { sequelize } from "@/lib/db/sequelize";
import { adminQuery } from "../support/database";

const FOLDER = join(import.meta.dirname, "../../models");

/** What a column is called in the database, by what a model calls it. */
const COLUMN_TYPE: Readonly<Record<string, string>> = {
  UUID: "uuid",
  TEXT: "text",
  JSONB: "jsonb",
  DATE: "timestamptz",
  DATEONLY: "date",
  CHAR: "bpchar",
  INTEGER: "int4",
  BIGINT: "int8",
  BOOLEAN: "bool",
  DECIMAL: "numeric",
  "ARRAY(TEXT)": "_text",
};

const typeOf = (type: unknown): string => {
  const key = String(Reflect.get(Object(type), "key"));
  return key === "ARRAY" ? `ARRAY(${typeOf(Reflect.get(Object(type), "type"))})` : key;
};

beforeAll(async () => {
  for (const file of readdirSync(FOLDER)) await import(/* @vite-ignore */ join(FOLDER, file));
});

describe("the models", () => {
  it("are one a file, and each is a table", async () => {
    const names = sequelize.modelManager.models.map((model) => String(model.getTableName()));
    expect(names.length).toBe(readdirSync(FOLDER).length);
    const tables = await adminQuery<{ name: string }>(
      "select table_name as name from information_schema.tables where table_schema = 'public'",
    );
    expect(tables.map(({ name }) => name)).toEqual(expect.arrayContaining(names));
  });

  it("have the columns of their tables, with the same types and no other", async () => {
    for (const model of sequelize.modelManager.models) {
      const columns = await adminQuery<{ name: string; type: string }>(
        `select column_name as name, udt_name as type from information_schema.columns
         where table_schema = 'public' and table_name = $1`,
        [model.getTableName()],
      );
      const attributes = Object.values<{ field?: string; type: unknown }>(model.rawAttributes).map((one) => ({
        name: one.field,
        type: COLUMN_TYPE[typeOf(one.type)],
      }));
      const sorted = (list: readonly unknown[]) => list.map((one) => JSON.stringify(one)).toSorted();
      expect(sorted(attributes)).toEqual(sorted(columns));
    }
  });
});
