import { describe, expect, it } from "vitest";
import { inTransaction } from "../support/database";
import { EXCEPTIONS, lintCatalogue } from "./catalogue-lint";

const lintAfter = (...changes: string[]) =>
  inTransaction("postgres", { rollback: true }, async (run) => {
    for (const change of changes) await run(change);
    return lintCatalogue(run);
  });

describe("the catalogue of the database", () => {
  it("keeps organisations apart in every table, policy, view, function, key and trigger", async () => {
    expect(await lintAfter()).toEqual([]);
  });

  it("gives a reason for every exception, and has no exception for what does not exist", async () => {
    const known = await inTransaction("postgres", {}, (run) =>
      run<{ name: string }>(
        `select relname as name from pg_class where relnamespace = 'public'::regnamespace
         union select conname from pg_constraint where connamespace = 'public'::regnamespace`,
      ),
    );
    const names = known.map(({ name }) => name);
    for (const [name, reason] of Object.entries(EXCEPTIONS)) {
      expect(names).toContain(name);
      expect(reason.length).toBeGreaterThan(10);
    }
  });

  it.each([
    [
      "a new table without row security",
      ["create table loose (id uuid primary key default gen_random_uuid(), name text)"],
      ["loose: row security is not on and forced"],
    ],
    [
      "row security switched off",
      ["alter table claims disable row level security"],
      ["claims: row security is not on and forced"],
    ],
    [
      "row security the owner escapes",
      ["alter table units no force row level security"],
      ["units: row security is not on and forced"],
    ],
    [
      "a policy that asks nobody",
      ["create policy open on claims for select to web using (state = 'filed')"],
      ["claims.open: does not ask who is asking"],
    ],
    [
      "a policy that lets anything be written",
      ["alter policy web_insert on sites with check (true)"],
      ["sites.web_insert: does not ask who is asking"],
    ],
    [
      "a policy for everybody",
      ["create policy open on parts for select using (true)"],
      ["parts.open: does not ask who is asking"],
    ],
    [
      "a view with its owner's eyes",
      ["create view all_claims as select * from claims"],
      ["all_claims: a view that looks with its owner's eyes"],
    ],
    [
      "a definer outside of its schema",
      [
        "create function peek() returns bigint language sql security definer as 'select count(*) from claims'",
      ],
      [
        "peek(): has no fixed search path",
        "peek(): lies outside of guarded",
        "peek(): may be called by everybody",
      ],
    ],
    [
      "a definer everybody may call",
      ["grant execute on function guarded.link_owner(text) to public"],
      ["guarded.link_owner(text): may be called by everybody"],
    ],
    [
      "a definer with the caller's search path",
      ["alter function guarded.link_owner(text) reset search_path"],
      ["guarded.link_owner(text): has no fixed search path"],
    ],
    ["a web that passes row security", ["alter role web bypassrls"], ["web: has powers beyond its grants"]],
    ["a web that is the owner", ["grant partproof_owner to web"], ["web: is a member of partproof_owner"]],
    ["a function of the web's own", ["alter function touch_row() owner to web"], ["web: owns touch_row"]],
    ["a table everybody reads", ["grant select on claims to public"], ["claims: PUBLIC may select"]],
    [
      "a table the web may empty",
      ["grant truncate on claim_flags to web"],
      ["claim_flags: web may truncate"],
    ],
    [
      "a serial unique across organisations",
      ["create unique index units_serial on units (serial_normal)"],
      ["units_serial: a clash tells one organisation of another"],
    ],
    [
      "a key without the organisation",
      ["alter table claim_flags add constraint loose_key foreign key (claim_id) references claims"],
      ["loose_key: leads to another organisation's row"],
    ],
    [
      "a trigger replication passes by",
      ["alter table verdicts enable trigger verdicts_append_only"],
      ["verdicts.verdicts_append_only: can be switched off by a setting", "verdicts: can be rewritten"],
    ],
    [
      "a history without its trigger",
      ["drop trigger audit_log_no_truncate on audit_log"],
      ["audit_log: can be rewritten"],
    ],
  ])("is refused with %s", async (_name, changes, findings) => {
    expect((await lintAfter(...changes)).toSorted()).toEqual(findings.toSorted());
  });
});
