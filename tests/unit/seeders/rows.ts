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

/** Things by a name, in the order they came. */
export const grouped = <T>(all: readonly T[], nameOf: (one: T) => string): Map<string, T[]> => {
  const groups = new Map<string, T[]>();
  for (const one of all) {
    const group = groups.get(nameOf(one));
    if (group) group.push(one);
    else groups.set(nameOf(one), [one]);
  }
  return groups;
};

export const byColumn = (rows: readonly Row[], column: string): Map<string, Row[]> =>
  grouped(rows, (row) => text(row, column));
