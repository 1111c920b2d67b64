import { appendOnly, policies, secure } from "./row-security";

type Run = (sql: string) => Promise<unknown>;

const workshop = "workshop_id = (select ctx_org())";
const seller = "seller_id = (select ctx_org())";

const evidence = `
  create table evidence_files (
    id uuid primary key default gen_random_uuid(),
    claim_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    row_id text not null,
    kind text not null check (kind in ('photo', 'runLog', 'document')),
    media_type text not null check (media_type in ('image/jpeg', 'image/png', 'image/webp', 'application/pdf', 'text/csv', 'text/plain')),
    original_name text not null check (length(original_name) <= 200),
    size_bytes bigint not null check (size_bytes > 0 and size_bytes <= 26214400),
    sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
    object_key text not null,
    view_key text,
    view_state text not null default 'waiting' check (view_state in ('waiting', 'ready', 'unreadable', 'notNeeded')),
    width_px integer,
    height_px integer,
    captured jsonb not null default '{}',
    summary jsonb,
    uploaded_by_id uuid not null references users,
    received_at timestamptz not null default now(),
    withdrawn_at timestamptz,
    unique (claim_id, row_id, sha256),
    unique (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id)
  );
  create index evidence_files_by_claim on evidence_files (claim_id);
  create index evidence_files_by_hash on evidence_files (seller_id, sha256);
  -- The bytes and what is known of them never change; a file can only be withdrawn and get its view copy.
  create function keep_evidence() returns trigger language plpgsql as $$
    begin
      if (new.id, new.claim_id, new.seller_id, new.workshop_id, new.sha256, new.size_bytes, new.object_key, new.media_type,
          new.original_name, new.uploaded_by_id, new.received_at)
        is distinct from (old.id, old.claim_id, old.seller_id, old.workshop_id, old.sha256, old.size_bytes, old.object_key,
          old.media_type, old.original_name, old.uploaded_by_id, old.received_at)
        or (old.withdrawn_at is not null and new.withdrawn_at is distinct from old.withdrawn_at)
        or (old.view_state in ('ready', 'unreadable') and new.view_state <> old.view_state) then
        raise exception 'evidence is never replaced' using errcode = 'PP001';
      end if;
      return new;
    end $$;
  create trigger evidence_kept before update on evidence_files for each row execute function keep_evidence();
  create trigger evidence_never_deleted before delete on evidence_files for each row execute function refuse_change();
  create trigger evidence_no_truncate before truncate on evidence_files for each statement execute function refuse_change();
  alter table evidence_files enable always trigger evidence_kept;
  alter table evidence_files enable always trigger evidence_never_deleted;
  alter table evidence_files enable always trigger evidence_no_truncate;

  create table revision_evidence (
    revision_id uuid not null,
    evidence_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    primary key (revision_id, evidence_id),
    foreign key (seller_id, workshop_id, revision_id) references claim_revisions (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, evidence_id) references evidence_files (seller_id, workshop_id, id)
  );
  ${appendOnly("revision_evidence")}
  ${secure("evidence_files")}
  ${policies("evidence_files", "web", {
    select: `${workshop} or (${seller} and exists (select 1 from claims c where c.id = evidence_files.claim_id
      and c.state not in ('draft', 'discarded')))`,
    insert: `${workshop} and uploaded_by_id = (select ctx_actor())`,
    update: workshop,
  })}
  ${policies("evidence_files", "worker", { select: "true", update: "true" })}
  ${secure("revision_evidence")}
  ${policies("revision_evidence", "web", { select: "(select ctx_org()) in (seller_id, workshop_id)", insert: workshop })}
`;

const imports = `
  create table invoice_imports (
    id uuid primary key default gen_random_uuid(),
    seller_id uuid not null references organisations,
    sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
    file_name text not null check (length(file_name) <= 200),
    object_key text not null,
    mapping jsonb not null default '{}',
    state text not null default 'previewed' check (state in ('previewed', 'imported')),
    line_count integer not null default 0,
    created_by_id uuid not null references users,
    created_at timestamptz not null default now(),
    imported_at timestamptz,
    unique (seller_id, id),
    unique (seller_id, sha256)
  );
  ${secure("invoice_imports")}
  ${policies("invoice_imports", "web", { select: seller, insert: seller, update: seller })}
`;

const operations = `
  create table outbox (
    id uuid primary key default gen_random_uuid(),
    organisation_id uuid references organisations,
    kind text not null,
    dedupe_key text not null,
    recipient text not null,
    locale text not null,
    params jsonb not null,
    request_id text,
    created_at timestamptz not null default now(),
    not_before timestamptz not null default now(),
    sent_at timestamptz,
    tries integer not null default 0,
    parked_at timestamptz,
    last_fault text,
    unique nulls not distinct (organisation_id, dedupe_key)
  );
  create index outbox_waiting on outbox (not_before) where sent_at is null and parked_at is null;
  create function keep_outbox() returns trigger language plpgsql as $$
    begin
      if (new.kind, new.recipient, new.params, new.dedupe_key) is distinct from (old.kind, old.recipient, old.params, old.dedupe_key)
        or (old.sent_at is not null and new.sent_at is distinct from old.sent_at) then
        raise exception 'a mail in the outbox is not rewritten' using errcode = 'PP001';
      end if;
      return new;
    end $$;
  create trigger outbox_kept before update on outbox for each row execute function keep_outbox();
  alter table outbox enable always trigger outbox_kept;
  ${secure("outbox")}
  ${policies("outbox", "web", { insert: "organisation_id = (select ctx_org())" })}
  ${policies("outbox", "worker", { select: "true", update: "true" })}
  create policy keeper_insert on outbox for insert to keeper with check (true);
  grant insert on outbox to keeper;

  create table idempotency_keys (
    organisation_id uuid not null references organisations,
    route text not null,
    key text not null check (length(key) between 8 and 200),
    fingerprint text not null,
    status integer,
    response jsonb,
    created_at timestamptz not null default now(),
    primary key (organisation_id, route, key)
  );
  ${secure("idempotency_keys")}
  ${policies("idempotency_keys", "web", {
    select: "organisation_id = (select ctx_org())",
    insert: "organisation_id = (select ctx_org())",
    update: "organisation_id = (select ctx_org())",
  })}

  create table worker_heartbeats (name text primary key, seen_at timestamptz not null default now());
  grant select on worker_heartbeats to web, worker;
  grant insert, update on worker_heartbeats to worker;
`;

// A mail to somebody who is not signed in has no organisation of its own to write from.
const anonymousMail = `
  create function guarded.mail_link_owner(p_token_hash text, p_kind text, p_params jsonb, p_request text) returns void
    language plpgsql security definer set search_path = pg_catalog, public, pg_temp as $body$
    begin
      insert into outbox (kind, dedupe_key, recipient, locale, params, request_id)
        select p_kind, p_kind || ':' || l.id, u.email, u.locale, p_params || jsonb_build_object('name', u.name), p_request
        from single_use_links l join users u on u.id = l.user_id
        where l.token_hash = p_token_hash and l.used_at is null on conflict do nothing;
    end $body$;
  revoke all on function guarded.mail_link_owner(text, text, jsonb, text) from public;
  grant execute on function guarded.mail_link_owner(text, text, jsonb, text) to web;
`;

// A distributor never reads the addresses of a workshop's people, nor the other way round; it may only send them word.
const claimMail = `
  create function guarded.mail_claim_people(p_claim uuid, p_to text, p_kind text, p_params jsonb, p_dedupe text) returns integer
    language plpgsql security definer set search_path = pg_catalog, public, pg_temp as $body$
    declare claim claims; sent integer;
    begin
      select * into claim from claims c where c.id = p_claim and ctx_org() in (c.seller_id, c.workshop_id);
      if claim.id is null then return 0; end if;
      insert into outbox (organisation_id, kind, dedupe_key, recipient, locale, params, request_id)
        select ctx_org(), p_kind, p_dedupe || ':' || u.id, u.email, u.locale, p_params || jsonb_build_object('name', u.name),
          nullif(current_setting('app.request_id', true), '')
        from users u
        where u.disabled_at is null and (
          (p_to = 'workshop' and exists (select 1 from memberships m where m.user_id = u.id
            and m.organisation_id = claim.workshop_id and m.disabled_at is null and m.accepted_at is not null)
            and (u.id = claim.created_by_id or exists (select 1 from membership_roles r where r.user_id = u.id
              and r.organisation_id = claim.workshop_id and r.role = 'workshopManager')))
          or (p_to = 'holder' and u.id = claim.holder_id and exists (select 1 from memberships m where m.user_id = u.id
            and m.organisation_id = claim.seller_id and m.disabled_at is null and m.accepted_at is not null)));
      get diagnostics sent = row_count;
      return sent;
    end $body$;
  revoke all on function guarded.mail_claim_people(uuid, text, text, jsonb, text) from public;
  grant execute on function guarded.mail_claim_people(uuid, text, text, jsonb, text) to web;
`;

// The job queue lives in a schema of its own that the worker owns; the web may only add a job, through this one door.
const jobs = `
  create function graphile_worker.enqueue(p_task text, p_payload jsonb, p_key text) returns void language sql
    security definer set search_path = graphile_worker, pg_catalog, pg_temp as $body$
    select graphile_worker.add_job(p_task, p_payload::json, job_key => p_key, max_attempts => 8) $body$;
  revoke all on function graphile_worker.enqueue(text, jsonb, text) from public;
  grant usage on schema graphile_worker to web;
  grant execute on function graphile_worker.enqueue(text, jsonb, text) to web;
`;

export const up = async (run: Run) => {
  for (const part of [evidence, imports, operations]) await run(part);
  await run(`set local role keeper`);
  await run(anonymousMail);
  await run(claimMail);
  await run(`set local role worker`);
  await run(jobs);
  await run(`set local role partproof_owner`);
};

export const down = async (run: Run) => {
  await run(`set local role worker; drop function graphile_worker.enqueue(text, jsonb, text);
    revoke usage on schema graphile_worker from web; set local role keeper;
    drop function guarded.mail_link_owner(text, text, jsonb, text),
      guarded.mail_claim_people(uuid, text, text, jsonb, text); set local role partproof_owner;`);
  await run(`drop table worker_heartbeats, idempotency_keys, outbox, invoice_imports, revision_evidence, evidence_files cascade;
    drop function keep_outbox(), keep_evidence();`);
};
