import { adminQuery, type Row } from "../support/database";
import { type Member } from "./two-distributors";

const PARTY_COLUMNS = ["organisation_id", "seller_id", "workshop_id", "buyer_id"];

/** A table that holds organisations' rows, with the columns that say whose they are and all that can be written. */
export type Table = {
  readonly name: string;
  readonly parties: readonly string[];
  readonly columns: readonly string[];
};

/** Every such table, as the catalogue knows them: a new one is tried the day it exists. */
export const listTables = () =>
  adminQuery<{ name: string; parties: string[]; columns: string[] }>(
    `select c.table_name as name, array_agg(c.column_name::text order by c.ordinal_position)
         filter (where c.column_name = any ($1)) as parties,
       array_agg(c.column_name::text order by c.ordinal_position) filter (where c.is_generated = 'NEVER') as columns
     from information_schema.columns c join information_schema.tables t using (table_schema, table_name)
     where c.table_schema = 'public' and t.table_type = 'BASE TABLE' group by 1
     having bool_or(c.column_name = any ($1)) order by 1`,
    [PARTY_COLUMNS],
  );

export const contextOf = ({ id, person }: Member) => ({ actor: person.id, org: id });
export const partiesOf = (table: Table, row: Row) => table.parties.map((column) => String(row[column]));

/** All rows of a table, as they are. */
export const allOf = ({ name }: Table) => {
  const sql = `select * from ${name}`;
  return adminQuery(sql);
};

/** Rows of which an organisation is no party. */
export const foreignTo = async (member: Member, table: Table) =>
  (await allOf(table)).filter((row) => !partiesOf(table, row).includes(member.id));
