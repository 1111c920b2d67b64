import { appendOnly, ownRows, policies, secure } from "./row-security";

type Run = (sql: string) => Promise<unknown>;

const context = `
  -- Plain SQL and stable, so that the planner sees through it and uses the index on the organisation.
  create function ctx_org() returns uuid language sql stable
    as $$ select nullif(current_setting('app.organisation_id', true), '')::uuid $$;
  create function ctx_actor() returns uuid language sql stable
    as $$ select nullif(current_setting('app.actor_id', true), '')::uuid $$;
  create function refuse_change() returns trigger language plpgsql as $$
    begin raise exception 'rows of % are written once', tg_table_name using errcode = 'PP001'; end $$;
  -- An ORM's update that forgets the version cannot skip it.
  create function touch_row() returns trigger language plpgsql as $$
    begin new.lock_version := old.lock_version + 1; new.updated_at := now(); return new; end $$;
  grant usage on schema public to web, worker, keeper, reporter, auditor, backup;
`;

const organisations = `
  create table organisations (
    id uuid primary key default gen_random_uuid(),
    name text not null check (length(name) between 1 and 120),
    legal_name text not null,
    sells boolean not null default false,
    buys boolean not null default false,
    address text not null default '',
    country char(2) not null,
    tax_number text,
    currency char(3) not null,
    time_zone text not null,
    languages text[] not null default '{en}',
    created_at timestamptz not null default now(),
    check (sells or buys)
  );
  create table sites (
    id uuid primary key default gen_random_uuid(),
    organisation_id uuid not null references organisations,
    name text not null,
    address text not null default '',
    created_at timestamptz not null default now(),
    unique (organisation_id, name),
    unique (organisation_id, id)
  );
  create table trading_accounts (
    id uuid primary key default gen_random_uuid(),
    seller_id uuid not null references organisations,
    buyer_id uuid not null references organisations,
    account_number text not null,
    currency char(3) not null,
    opened_on date not null default current_date,
    closed_on date,
    check (seller_id <> buyer_id),
    unique (seller_id, account_number),
    unique (seller_id, buyer_id),
    unique (seller_id, buyer_id, id)
  );
  create index trading_accounts_by_buyer on trading_accounts (buyer_id, seller_id);
`;

const organisationSecurity = `
  ${secure("trading_accounts")}
  ${policies("trading_accounts", "web", {
    select: "(select ctx_org()) in (seller_id, buyer_id)",
    insert: "seller_id = (select ctx_org())",
    update: "seller_id = (select ctx_org())",
    delete: "seller_id = (select ctx_org()) and false",
  })}
  ${secure("organisations")}
  ${policies("organisations", "web", {
    select: `id = (select ctx_org()) or exists (select 1 from trading_accounts t
      where (t.seller_id = organisations.id and t.buyer_id = (select ctx_org()))
         or (t.buyer_id = organisations.id and t.seller_id = (select ctx_org())))`,
    insert: "false",
    update: "id = (select ctx_org())",
    delete: "false",
  })}
  ${secure("sites")}
  ${policies("sites", "web", {
    select: `organisation_id = (select ctx_org()) or exists (select 1 from trading_accounts t
      where t.buyer_id = sites.organisation_id and t.seller_id = (select ctx_org()))`,
    insert: "organisation_id = (select ctx_org())",
    update: "organisation_id = (select ctx_org())",
    delete: "organisation_id = (select ctx_org())",
  })}
`;

const people = `
  create table users (
    id uuid primary key default gen_random_uuid(),
    email text not null unique check (email = lower(email) and email ~ '^[^@\\s<>,;:"]+@[^@\\s<>,;:"]+$' and length(email) <= 254),
    name text not null check (length(name) between 1 and 120),
    locale text not null default 'en' check (locale in ('en', 'de', 'long')),
    theme text not null default 'system' check (theme in ('system', 'light', 'dark')),
    density text check (density in ('shop', 'office', 'ledger')),
    password_hash text,
    session_version integer not null default 1,
    disabled_at timestamptz,
    created_at timestamptz not null default now()
  );
  create table memberships (
    user_id uuid not null references users,
    organisation_id uuid not null references organisations,
    -- Until the person accepts, the organisation knows of them what it wrote into the invitation, and no more.
    invited_name text check (length(invited_name) between 1 and 120),
    invited_email text,
    accepted_at timestamptz,
    disabled_at timestamptz,
    created_at timestamptz not null default now(),
    primary key (organisation_id, user_id),
    check (accepted_at is not null or (invited_name is not null and invited_email is not null))
  );
  create index memberships_by_user on memberships (user_id);
  create table membership_roles (
    organisation_id uuid not null,
    user_id uuid not null,
    role text not null check (role in
      ('technician', 'workshopManager', 'assessor', 'goodsIn', 'accounts', 'analyst', 'administrator')),
    primary key (organisation_id, user_id, role),
    foreign key (organisation_id, user_id) references memberships (organisation_id, user_id)
  );
  create table sessions (
    id uuid primary key default gen_random_uuid(),
    user_id uuid not null references users,
    organisation_id uuid not null references organisations,
    version integer not null,
    device text not null default '',
    idle_hours integer not null,
    started_at timestamptz not null default now(),
    last_seen_at timestamptz not null default now(),
    expires_at timestamptz not null,
    ended_at timestamptz
  );
  create index sessions_by_user on sessions (user_id, organisation_id, last_seen_at);
  create table login_attempts (
    id bigint generated always as identity primary key,
    key_hash text not null,
    at timestamptz not null default now()
  );
  create index login_attempts_by_key on login_attempts (key_hash, at);
  create table single_use_links (
    id uuid primary key default gen_random_uuid(),
    user_id uuid not null references users,
    purpose text not null check (purpose in ('invitation', 'reset')),
    organisation_id uuid,
    token_hash text not null unique check (length(token_hash) = 64),
    expires_at timestamptz not null,
    used_at timestamptz,
    created_at timestamptz not null default now(),
    foreign key (organisation_id, user_id) references memberships (organisation_id, user_id),
    check ((purpose = 'invitation') = (organisation_id is not null))
  );
`;

const peopleSecurity = `
  ${secure("users")}
  ${policies("users", "web", {
    select: `id = (select ctx_actor()) or exists (select 1 from memberships m
      where m.user_id = users.id and m.organisation_id = (select ctx_org()) and m.accepted_at is not null)`,
    update: "id = (select ctx_actor())",
  })}
  revoke update on users from web;
  grant update (name, locale, theme, density) on users to web;
  revoke select on users from web;
  grant select (id, email, name, locale, theme, density, disabled_at, created_at, session_version) on users to web;
  ${ownRows("memberships")}
  -- Nobody is a member by a statement of the web: guarded functions invite and accept.
  revoke insert, update, delete on memberships from web;
  grant update (disabled_at) on memberships to web;
  ${ownRows("membership_roles")}
  ${secure("sessions")}
  ${policies("sessions", "web", { select: "user_id = (select ctx_actor())" })}
  ${secure("login_attempts")}
  ${secure("single_use_links")}
  create policy keeper_all on users for all to keeper using (true) with check (true);
  create policy keeper_all on memberships for all to keeper using (true) with check (true);
  create policy keeper_read on membership_roles for select to keeper using (true);
  create policy keeper_read on organisations for select to keeper using (true);
  create policy keeper_all on sessions for all to keeper using (true) with check (true);
  create policy keeper_all on login_attempts for all to keeper using (true) with check (true);
  create policy keeper_all on single_use_links for all to keeper using (true) with check (true);
  grant select, insert, update on users, memberships, sessions, single_use_links to keeper;
  grant select, insert, delete on login_attempts to keeper;
  grant select on membership_roles, organisations to keeper;
`;

const history = `
  create table audit_heads (
    organisation_id uuid primary key references organisations,
    seq bigint not null default 0,
    hash text not null default ''
  );
  create table audit_log (
    organisation_id uuid not null references organisations,
    seq bigint not null,
    at timestamptz not null default now(),
    actor_id uuid,
    action text not null,
    detail jsonb not null default '{}',
    request_id text,
    prev_hash text not null,
    hash text not null,
    primary key (organisation_id, seq),
    unique (organisation_id, prev_hash)
  );
  -- What the chain is reckoned over. An array as text can be read in one way only, whatever the words in it.
  create function audit_text(entry audit_log) returns text language sql stable as $$
    select jsonb_build_array(entry.prev_hash, entry.organisation_id, entry.seq,
      to_char(entry.at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US'), entry.actor_id, entry.action, entry.detail,
      entry.request_id)::text $$;
  ${appendOnly("audit_log")}
  ${secure("audit_heads")}
  ${secure("audit_log")}
  ${policies("audit_log", "web", { select: "organisation_id = (select ctx_org())" })}
  ${policies("audit_log", "auditor", { select: "true" })}
  create policy keeper_all on audit_heads for all to keeper using (true) with check (true);
  create policy keeper_insert on audit_log for insert to keeper with check (true);
  create policy keeper_read on audit_log for select to keeper using (true);
  grant select, insert, update on audit_heads to keeper;
  grant select, insert on audit_log to keeper;
`;

export const up = async (run: Run) => {
  for (const part of [context, organisations, organisationSecurity, people, peopleSecurity, history])
    await run(part);
};

export const down = (run: Run) =>
  run(`
    drop function audit_text(audit_log);
    drop table audit_log, audit_heads, single_use_links, login_attempts, sessions, membership_roles, memberships,
      sites cascade;
    drop policy web_select on organisations;
    drop table users cascade;
    drop table trading_accounts cascade;
    drop table organisations cascade;
    drop function touch_row(), refuse_change(), ctx_actor(), ctx_org();
  `);
