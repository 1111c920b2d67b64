/**
 * SQL pieces shared by the migrations of the first schema. Frozen: a later change of style gets its own file,
 * because an old migration must still do tomorrow exactly what it did the day it first ran.
 */

/** Row security that even the table's owner obeys; nothing is visible until a policy says so. */
export const secure = (table: string) => `
  alter table ${table} enable row level security;
  alter table ${table} force row level security;
  revoke all on ${table} from public;
`;

type Rules = { select?: string; insert?: string; update?: string; delete?: string };

/** One policy per command, each with its own condition; a command without a condition is not granted at all. */
export function policies(table: string, role: string, rules: Rules): string {
  const lines: string[] = [];
  const name = (command: string) => `${role}_${command}`;
  if (rules.select)
    lines.push(`create policy ${name("select")} on ${table} for select to ${role} using (${rules.select});`);
  if (rules.insert)
    lines.push(
      `create policy ${name("insert")} on ${table} for insert to ${role} with check (${rules.insert});`,
    );
  if (rules.update)
    lines.push(
      `create policy ${name("update")} on ${table} for update to ${role} using (${rules.update}) with check (${rules.update});`,
    );
  if (rules.delete)
    lines.push(`create policy ${name("delete")} on ${table} for delete to ${role} using (${rules.delete});`);
  for (const command of Object.keys(rules)) lines.push(`grant ${command} on ${table} to ${role};`);
  return lines.join("\n");
}

/** Rows of one organisation, seen and changed by nobody else. */
export const ownRows = (table: string, column = "organisation_id") => {
  const mine = `${column} = (select ctx_org())`;
  return secure(table) + policies(table, "web", { select: mine, insert: mine, update: mine, delete: mine });
};

/** A row that is written once. The trigger holds for every role and even while replication is replayed. */
export const appendOnly = (table: string) => `
  create trigger ${table}_append_only before update or delete on ${table}
    for each row execute function refuse_change();
  create trigger ${table}_no_truncate before truncate on ${table}
    for each statement execute function refuse_change();
  alter table ${table} enable always trigger ${table}_append_only;
  alter table ${table} enable always trigger ${table}_no_truncate;
`;
