import type { Run } from "../support/database";

/** What a check of the database's own catalogue found wrong, one sentence each. */
type Check = (run: Run) => Promise<string[]>;
type Found = { what: string };

const ORGANISATION_COLUMNS = ["organisation_id", "seller_id", "workshop_id", "buyer_id"];

/** Tables that hold no organisation's data. */
const WITHOUT_ROW_SECURITY: Readonly<Record<string, string>> = {
  claim_moves: "the steps a claim may take, the same for everybody and readable by all",
  worker_heartbeats: "the name of a background process and when it was last alive",
};

/** Unique keys that do not begin with an organisation and still tell one nothing about another. */
const UNIQUE_ACROSS: Readonly<Record<string, string>> = {
  users_email_key: "one account a person; web cannot insert, guarded.invite_person swallows the clash",
  claims_number_key: "seven random digits, drawn again on a clash",
  part_returns_number_key: "eight random digits, drawn again on a clash",
  claim_drafts_pkey: "the claim's own id",
  claim_lines_claim_id_line_number_key: "within one claim",
  claim_lines_one_holder: "web cannot set holds_unit; guarded.hold_unit answers nothing",
  claim_revisions_claim_id_revision_key: "within one claim",
  claim_revisions_claim_id_revision_sha256_key: "within one claim",
  claim_queries_claim_id_round_key: "within one claim",
  timeline_entries_pkey: "within one claim",
  timeline_entries_claim_id_prev_hash_key: "within one claim",
  timeline_heads_pkey: "the claim's own id; nobody but guarded.chain_timeline writes it",
  verdicts_reverses_id_key: "an earlier verdict of the same claim, by its random id",
  verdict_lines_pkey: "within one verdict",
  evidence_files_claim_id_row_id_sha256_key: "within one claim",
  revision_evidence_pkey: "within one revision",
  single_use_links_token_hash_key: "256 random bits; web cannot write the table",
};

/** Foreign keys between organisations' tables that carry no organisation. */
const PLAIN_KEYS: Readonly<Record<string, string>> = {
  readings_claim_id_revision_fkey: "beside a key to the claim with both organisations",
  verdicts_claim_id_revision_revision_sha256_fkey: "beside a key to the claim with both organisations",
  timeline_heads_claim_id_fkey: "written by guarded.chain_timeline alone",
};

/** Rows of these are written once. */
export const APPEND_ONLY = [
  "audit_log",
  "rule_book_versions",
  "claim_revisions",
  "readings",
  "verdicts",
  "verdict_lines",
  "timeline_entries",
  "claim_messages",
  "revision_evidence",
  "credit_notes",
  "credit_note_lines",
  "credit_allocations",
  "ledger_entries",
  "ledger_postings",
] as const;

const texts = (rows: readonly Found[]) => rows.map(({ what }) => what);

const rowSecurity: Check = async (run) =>
  texts(
    await run<Found>(
      `select relname || ': row security is not on and forced' as what from pg_class
       where relnamespace = 'public'::regnamespace and relkind in ('r', 'p')
         and not (relrowsecurity and relforcerowsecurity) and relname <> all ($1) order by 1`,
      [Object.keys(WITHOUT_ROW_SECURITY)],
    ),
  );

/** The product's policies ask for the context; those of the worker, the keeper and the auditor look across on purpose. */
const policiesAskForContext: Check = async (run) =>
  texts(
    await run<Found>(
      `select tablename || '.' || policyname || ': does not ask who is asking' as what from pg_policies
       where schemaname = 'public' and not (roles <@ array['worker', 'keeper', 'auditor']::name[])
         and (coalesce(qual, 'false') !~ '(ctx_org|ctx_actor)\\(\\)|^false$'
           or coalesce(with_check, 'false') !~ '(ctx_org|ctx_actor)\\(\\)|^false$') order by 1`,
    ),
  );

/** A table with row security, grants to web and no policy is closed; one with organisation data and no policy is a slip. */
const policiesExist: Check = async (run) =>
  texts(
    await run<Found>(
      `select distinct c.table_name || ': has organisations'' rows and no policy' as what from information_schema.columns c
       join pg_class t on t.relname = c.table_name and t.relnamespace = 'public'::regnamespace and t.relkind = 'r'
       where c.table_schema = 'public' and c.column_name = any ($1)
         and not exists (select 1 from pg_policies p where p.tablename = c.table_name) order by 1`,
      [ORGANISATION_COLUMNS],
    ),
  );

const views: Check = async (run) =>
  texts(
    await run<Found>(
      `select relname || ': a view that looks with its owner''s eyes' as what from pg_class
       where relnamespace in ('public'::regnamespace, 'guarded'::regnamespace) and relkind in ('v', 'm')
         and not coalesce('security_invoker=true' = any (reloptions) or 'security_invoker=on' = any (reloptions), false)
       order by 1`,
    ),
  );

/** A function that runs with another's rights is found in one schema, by one owner, with one search path, for web alone. */
const definers: Check = async (run) =>
  texts(
    await run<Found>(
      `select p.oid::regprocedure || ': ' || f.fault as what
       from pg_proc p join pg_namespace n on n.oid = p.pronamespace
         cross join lateral (values
           ('lies outside of guarded', n.nspname <> 'guarded' and p.proname <> 'enqueue'),
           ('is not the keeper''s', n.nspname = 'guarded' and pg_get_userbyid(p.proowner) <> 'keeper'),
           ('has no fixed search path', not exists (select 1 from unnest(p.proconfig) s
             where s in ('search_path=pg_catalog, public, pg_temp', 'search_path=graphile_worker, pg_catalog, pg_temp'))),
           ('may be called by everybody', p.proacl is null or exists
             (select 1 from aclexplode(p.proacl) a where a.grantee = 0)))
         as f (fault, is_so)
       where p.prosecdef and f.is_so and n.nspname not in ('pg_catalog', 'information_schema') order by 1`,
    ),
  );

const roles: Check = async (run) =>
  texts(
    await run<Found>(
      `select rolname || ': has powers beyond its grants' as what from pg_roles
         where rolname in ('web', 'worker', 'keeper', 'partproof_owner', 'migrator', 'reporter', 'auditor')
           and (rolsuper or rolbypassrls or rolcreaterole or rolcreatedb or rolreplication)
       union all select rolname || ': can sign in' from pg_roles
         where rolname in ('keeper', 'partproof_owner') and rolcanlogin
       union all select 'web: is a member of ' || roleid::regrole from pg_auth_members where member = 'web'::regrole
       union all select 'web: owns ' || relname from pg_class where relowner = 'web'::regrole
       union all select 'web: owns ' || proname from pg_proc where proowner = 'web'::regrole
       union all select 'web: owns ' || nspname from pg_namespace where nspowner = 'web'::regrole
       order by 1`,
    ),
  );

const grants: Check = async (run) =>
  texts(
    await run<Found>(
      `select table_name || ': ' || grantee || ' may ' || lower(privilege_type) as what
       from information_schema.role_table_grants where table_schema = 'public'
         and (grantee = 'PUBLIC' or (grantee in ('web', 'worker', 'keeper') and privilege_type in ('TRUNCATE', 'REFERENCES', 'TRIGGER')))
       order by 1`,
    ),
  );

const uniqueKeys: Check = async (run) =>
  texts(
    await run<Found>(
      `select i.relname || ': a clash tells one organisation of another' as what
       from pg_index x join pg_class i on i.oid = x.indexrelid join pg_class t on t.oid = x.indrelid
         join pg_attribute a on a.attrelid = x.indrelid and a.attnum = x.indkey[0]
         left join pg_attrdef d on d.adrelid = a.attrelid and d.adnum = a.attnum
       where t.relnamespace = 'public'::regnamespace and x.indisunique and t.relrowsecurity
         and not (a.attname = any ($1) and x.indpred is null)
         and not (x.indnatts = 1 and (coalesce(pg_get_expr(d.adbin, d.adrelid), '') = 'gen_random_uuid()' or a.attidentity <> ''))
         and i.relname <> all ($2) order by 1`,
      [ORGANISATION_COLUMNS, Object.keys(UNIQUE_ACROSS)],
    ),
  );

/** Foreign keys ignore row security: without the organisation in it, a row can be hung on somebody else's. */
const foreignKeys: Check = async (run) =>
  texts(
    await run<Found>(
      `with tenant as (select attrelid, attnum from pg_attribute where attname = any ($1) and not attisdropped)
       select k.conname || ': leads to another organisation''s row' as what from pg_constraint k
       where k.contype = 'f' and k.connamespace = 'public'::regnamespace and k.conname <> all ($2)
         and exists (select 1 from tenant t where t.attrelid = k.conrelid)
         and exists (select 1 from tenant t where t.attrelid = k.confrelid)
         and not exists (select 1 from unnest(k.conkey, k.confkey) as pair (own, far)
           join tenant o on o.attrelid = k.conrelid and o.attnum = pair.own
           join tenant f on f.attrelid = k.confrelid and f.attnum = pair.far)
       order by 1`,
      [ORGANISATION_COLUMNS, Object.keys(PLAIN_KEYS)],
    ),
  );

const triggers: Check = async (run) => [
  ...texts(
    await run<Found>(
      `select tgrelid::regclass || '.' || tgname || ': can be switched off by a setting' as what from pg_trigger
       where not tgisinternal and tgenabled <> 'A'
         and tgrelid in (select oid from pg_class where relnamespace = 'public'::regnamespace) order by 1`,
    ),
  ),
  ...texts(
    await run<Found>(
      // Deleting, updating and emptying are 8, 16 and 32 in the type of a trigger.
      `select t.name || ': can be rewritten' as what from unnest($1::text[]) as t (name)
       where (select bit_or(g.tgtype::integer) & 56 from pg_trigger g where g.tgrelid = to_regclass('public.' || t.name)
         and g.tgfoid = 'refuse_change()'::regprocedure and g.tgenabled = 'A') is distinct from 56 order by 1`,
      [[...APPEND_ONLY]],
    ),
  ),
];

const CHECKS: readonly Check[] = [
  rowSecurity,
  policiesAskForContext,
  policiesExist,
  views,
  definers,
  roles,
  grants,
  uniqueKeys,
  foreignKeys,
  triggers,
];

/** Reads the catalogue and says what is wrong with it; nothing, where the database keeps organisations apart. */
export async function lintCatalogue(run: Run): Promise<string[]> {
  const findings: string[] = [];
  for (const check of CHECKS) findings.push(...(await check(run)));
  return findings;
}

/** Every exception the checks make, with its reason. */
export const EXCEPTIONS = { ...WITHOUT_ROW_SECURITY, ...UNIQUE_ACROSS, ...PLAIN_KEYS };
