import type { Row, TableName, Tables } from "@/seeders/tables";

export const rowsOf = (tables: Tables, table: TableName): readonly Row[] => tables[table] ?? [];

/** A column that must hold a text. */
export const text = (row: Row | undefined, column: string): string => {
  const value = row?.[column];
  if (typeof value !== "string") throw new TypeError(`${column} holds no text`);
  return value;
};

/** A column that must hold an instant. */
export const instant = (row: Row | undefined, column: string): Date => {
  const value = row?.[column];
  if (!(value instanceof Date)) throw new TypeError(`${column} holds no instant`);
  return value;
};

export const byColumn = (rows: readonly Row[], column: string): Map<string, Row[]> => {
  const groups = new Map<string, Row[]>();
  for (const row of rows) groups.set(text(row, column), [...(groups.get(text(row, column)) ?? []), row]);
  return groups;
};
