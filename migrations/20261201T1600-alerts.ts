import { policies, secure } from "./row-security";

type Run = (sql: string) => Promise<unknown>;

const MINE = "organisation_id = (select ctx_org()) and user_id = (select ctx_actor())";

// What a mail says at length stays in the mail and on the claim: an alert keeps the short facts its sentence needs. It has
// the number of the claim and no address, for where it leads is the product's to say.
const KEPT = `(select coalesce(jsonb_object_agg(key, value), '{}') from jsonb_each(p_params)
  where jsonb_typeof(value) in ('string', 'number')
    and key not in ('link', 'number', 'name', 'letter', 'question', 'note', 'instructions', 'reason', 'sendTo'))`;

// Written by the functions below alone. A person reads their own, and changes nothing of them but that they were read.
const alerts = `
  create table alerts (
    id uuid primary key default gen_random_uuid(),
    organisation_id uuid not null,
    user_id uuid not null,
    kind text not null check (length(kind) between 1 and 60),
    claim_number text not null check (claim_number ~ '^[0-9]{8}$'),
    dedupe_key text not null,
    params jsonb not null,
    at timestamptz not null default now(),
    read_at timestamptz,
    unique (organisation_id, user_id, dedupe_key),
    foreign key (organisation_id, user_id) references memberships (organisation_id, user_id) on delete cascade
  );
  create index alerts_newest on alerts (organisation_id, user_id, at desc, id);
  create index alerts_unread on alerts (organisation_id, user_id, at) where read_at is null;
  ${secure("alerts")}
  ${policies("alerts", "web", { select: MINE })}
  create policy web_update on alerts for update to web using (${MINE}) with check (${MINE});
  grant update (read_at) on alerts to web;
  create policy keeper_insert on alerts for insert to keeper with check (true);
  grant insert on alerts to keeper;
`;

// Who gets the mail gets the alert. An answer also goes to every assessor: the claim is anybody's to take again. What
// somebody did themselves is in their list and counts as read. The key begins with the organisation that writes, so
// that nobody takes the key of another's alert beforehand.
const mailAndTell = `
  create or replace function guarded.mail_claim_people(p_claim uuid, p_to text, p_kind text, p_params jsonb, p_dedupe text) returns integer
    language plpgsql security definer set search_path = pg_catalog, public, pg_temp as $body$
    declare claim claims; sent integer;
    begin
      select * into claim from claims c where c.id = p_claim and ctx_org() in (c.seller_id, c.workshop_id);
      if claim.id is null then return 0; end if;
      with people as (
        select u.id, u.email, u.locale, u.name, m.organisation_id,
          p_to = 'workshop' or u.id = claim.holder_id as is_mailed
        from memberships m join users u on u.id = m.user_id and u.disabled_at is null
          cross join lateral (select array(select r.role from membership_roles r
            where r.organisation_id = m.organisation_id and r.user_id = m.user_id) as roles) held
        where m.organisation_id = case p_to when 'workshop' then claim.workshop_id when 'holder' then claim.seller_id end
          and m.disabled_at is null and m.accepted_at is not null
          and case p_to when 'workshop' then u.id = claim.created_by_id or 'workshopManager' = any (held.roles)
            else u.id = claim.holder_id or (p_kind = 'queryAnswered' and 'assessor' = any (held.roles)) end),
      told as (
        insert into alerts (organisation_id, user_id, kind, claim_number, dedupe_key, params, read_at)
          select p.organisation_id, p.id, p_kind, claim.number, ctx_org() || ':' || p_dedupe, ${KEPT},
            case when p.id = ctx_actor() then now() end
          from people p on conflict do nothing)
      insert into outbox (organisation_id, kind, dedupe_key, recipient, locale, params, request_id)
        select ctx_org(), p_kind, p_dedupe || ':' || p.id, p.email, p.locale, p_params || jsonb_build_object('name', p.name),
          nullif(current_setting('app.request_id', true), '')
        from people p where p.is_mailed;
      get diagnostics sent = row_count;
      return sent;
    end $body$;
`;

const mailAndTellOfQuery = `
  create or replace function guarded.mail_of_query(p_query uuid, p_kind text, p_dedupe text, p_params jsonb, p_asker_too boolean)
    returns void language sql set search_path = pg_catalog, public, pg_temp as $body$
    with people as (
      select u.id, u.email, u.locale, u.name, c.number, m.organisation_id
      from claim_queries q join claims c on c.id = q.claim_id
        join memberships m on m.organisation_id in (c.workshop_id, c.seller_id) and m.disabled_at is null
        join users u on u.id = m.user_id and u.disabled_at is null
      where q.id = p_query and (
        (m.organisation_id = c.workshop_id and (u.id = c.created_by_id or exists (select 1 from membership_roles r
          where r.user_id = u.id and r.organisation_id = c.workshop_id and r.role = 'workshopManager')))
        or (p_asker_too and m.organisation_id = c.seller_id and u.id = q.asked_by_id))),
    told as (
      insert into alerts (organisation_id, user_id, kind, claim_number, dedupe_key, params)
        select p.organisation_id, p.id, p_kind, p.number, p_dedupe, ${KEPT} from people p on conflict do nothing)
    insert into outbox (kind, dedupe_key, recipient, locale, params)
      select p_kind, p_dedupe || ':' || p.id, p.email, p.locale, p_params || jsonb_build_object('name', p.name)
      from people p on conflict do nothing $body$;
`;

// As they were before there were alerts, to the letter.
const mailOnly = `
  create or replace function guarded.mail_claim_people(p_claim uuid, p_to text, p_kind text, p_params jsonb, p_dedupe text) returns integer
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
`;
const mailOnlyOfQuery = `
  create or replace function guarded.mail_of_query(p_query uuid, p_kind text, p_dedupe text, p_params jsonb, p_asker_too boolean)
    returns void language sql set search_path = pg_catalog, public, pg_temp as $body$
    insert into outbox (kind, dedupe_key, recipient, locale, params)
      select p_kind, p_dedupe || ':' || u.id, u.email, u.locale, p_params || jsonb_build_object('name', u.name)
      from claim_queries q join claims c on c.id = q.claim_id join users u on u.disabled_at is null
      where q.id = p_query and (
        (exists (select 1 from memberships m where m.user_id = u.id and m.organisation_id = c.workshop_id
            and m.disabled_at is null)
          and (u.id = c.created_by_id or exists (select 1 from membership_roles r where r.user_id = u.id
            and r.organisation_id = c.workshop_id and r.role = 'workshopManager')))
        or (p_asker_too and u.id = q.asked_by_id and exists (select 1 from memberships m where m.user_id = u.id
          and m.organisation_id = c.seller_id and m.disabled_at is null)))
      on conflict do nothing $body$;
`;

export const up = async (run: Run) => {
  await run(alerts);
  await run(`set local role keeper`);
  await run(mailAndTell);
  await run(mailAndTellOfQuery);
  await run(`set local role partproof_owner`);
};

export const down = async (run: Run) => {
  await run(`set local role keeper`);
  await run(mailOnly);
  await run(mailOnlyOfQuery);
  await run(`set local role partproof_owner; drop table alerts cascade`);
};
