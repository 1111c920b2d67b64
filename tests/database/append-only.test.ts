import { beforeAll, describe, expect, it } from "vitest";
import { adminQuery, answerOf, asRole, inTransaction, NOT_ALLOWED } from "../support/database";
import { APPEND_ONLY } from "./catalogue-lint";
import { twoDistributors, type World } from "./two-distributors";

const WRITTEN_ONCE = "PP001";

let world: World;
beforeAll(async () => {
  world = await twoDistributors();
});

const TABLES = [...APPEND_ONLY, "evidence_files"];
const COLUMN: Readonly<Record<string, string>> = {
  audit_log: "detail = '{}'",
  rule_book_versions: "title = 'Other'",
  claim_revisions: "facts = '[]'",
  readings: "raw_text = '1'",
  verdicts: "letter = 'Other'",
  verdict_lines: "reason = 'Other'",
  timeline_entries: "detail = '[]'",
  claim_messages: "body = 'Other'",
  revision_evidence: "revision_id = gen_random_uuid()",
  credit_notes: "number = 'Other'",
  credit_note_lines: "net_minor = 1",
  credit_allocations: "reference = 'Other'",
  ledger_entries: "entry_on = '2020-01-01'",
  ledger_postings: "amount_minor = 1",
  evidence_files: "sha256 = repeat('0', 64)",
};

const attacks = TABLES.flatMap((table) =>
  [`update ${table} set ${COLUMN[table]}`, `delete from ${table}`, `truncate ${table} cascade`].map(
    (sql) => [sql, table] as const,
  ),
);

describe("what is written once", () => {
  it.each(attacks)("stays: %s changes nothing, whoever tries", async (sql, table) => {
    const before = await fingerprint(table);
    expect(before.count).toBeGreaterThan(0);
    const [, second] = world.workshops;
    for (const role of ["web", "worker", "keeper", "postgres"] as const) {
      const answer = await answerOf(asRole(role, { actor: second.person.id, org: second.id }, sql));
      expect([role, [NOT_ALLOWED, WRITTEN_ONCE].includes(answer)]).toEqual([role, true]);
    }
    // The other side finds no row it may change.
    await answerOf(asRole("web", { actor: world.north.person.id, org: world.north.id }, sql));
    // The owner is held by row security too: it finds no row, and meets the trigger where it looks away from it.
    await answerOf(asRole("partproof_owner", {}, sql));
    expect(await fingerprint(table)).toEqual(before);
    const unforced = inTransaction("partproof_owner", { rollback: true }, async (run) => {
      await run(["alter table", table, "no force row level security"].join(" "));
      await run(sql);
    });
    expect(await answerOf(unforced)).toBe(WRITTEN_ONCE);
  });

  it.each(attacks)("stays even while replication is replayed: %s", async (sql) => {
    const answer = await answerOf(
      inTransaction("postgres", { rollback: true }, async (run) => {
        await run("set local session_replication_role = replica");
        await run(sql);
      }),
    );
    expect(answer).toBe(WRITTEN_ONCE);
  });

  it("lets nobody but the superuser replay replication or switch a trigger off", async () => {
    for (const role of ["web", "worker", "keeper"] as const) {
      expect(await answerOf(asRole(role, {}, "set session_replication_role = replica"))).toBe(NOT_ALLOWED);
      const sql = "alter table timeline_entries disable trigger timeline_entries_append_only";
      expect(await answerOf(asRole(role, {}, sql))).toBe(NOT_ALLOWED);
    }
    expect(await answerOf(asRole("partproof_owner", {}, "set session_replication_role = replica"))).toBe(
      NOT_ALLOWED,
    );
  });

  it.each([
    "claim_id = gen_random_uuid()",
    "size_bytes = 1",
    "object_key = 'elsewhere'",
    "media_type = 'image/png'",
    "original_name = 'other.jpg'",
    "received_at = now()",
    "uploaded_by_id = gen_random_uuid()",
  ])("keeps what is known of a file: %s", async (change) => {
    const sql = ["update evidence_files set", change].join(" ");
    for (const role of ["web", "worker", "postgres"] as const) {
      const [, second] = world.workshops;
      expect([role, await answerOf(asRole(role, { actor: second.person.id, org: second.id }, sql))]).toEqual([
        role,
        WRITTEN_ONCE,
      ]);
    }
  });

  it("lets a file be withdrawn once, and never brings it back", async () => {
    const [, second] = world.workshops;
    const context = { actor: second.person.id, org: second.id };
    const withdraw = "update evidence_files set withdrawn_at = '2026-05-07T10:00:00Z'";
    expect(await answerOf(asRole("web", context, withdraw))).toBe("done");
    expect(await answerOf(asRole("web", context, "update evidence_files set withdrawn_at = null"))).toBe(
      WRITTEN_ONCE,
    );
  });
});

/** Everything of a table as one text. */
async function fingerprint(table: string) {
  const [row] = await adminQuery<{ hash: string; count: number }>(
    [
      "select md5(string_agg(t::text, '|' order by t::text)) as hash, count(*)::integer as count from",
      table,
      "t",
    ].join(" "),
  );
  return { hash: row?.hash ?? "", count: row?.count ?? 0 };
}
