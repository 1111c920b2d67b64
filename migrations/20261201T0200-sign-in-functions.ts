type Run = (sql: string) => Promise<unknown>;

/**
 * The few functions that look beyond the caller's organisation. Each runs as `keeper`, a role without login that
 * holds only the grants named here, with a fixed search path, and is callable by `web` alone.
 */
const guarded = (signature: string, returns: string, body: string) => `
  create function guarded.${signature} returns ${returns} language plpgsql security definer
    set search_path = pg_catalog, public, pg_temp as $body$ ${body} $body$;
  revoke all on function guarded.${signature.replace(/\bp_\w+\s/g, "")} from public;
  grant execute on function guarded.${signature.replace(/\bp_\w+\s/g, "")} to web;
`;

const signIn = [
  guarded(
    "begin_attempt(p_account text, p_address text)",
    "boolean",
    `declare allowed boolean;
     begin
       -- Always the account before the address: two tries at once neither deadlock nor both take the last place.
       perform pg_advisory_xact_lock(hashtextextended(p_account, 0));
       perform pg_advisory_xact_lock(hashtextextended(p_address, 1));
       delete from login_attempts where key_hash in (p_account, p_address) and at < now() - interval '15 minutes';
       select (select count(*) from login_attempts where key_hash = p_account) < 10
          and (select count(*) from login_attempts where key_hash = p_address) < 50 into allowed;
       if allowed then insert into login_attempts (key_hash) values (p_account), (p_address); end if;
       return allowed;
     end`,
  ),
  guarded(
    "clear_attempts(p_account text)",
    "void",
    `begin delete from login_attempts where key_hash = p_account; end`,
  ),
  guarded(
    "sign_in_candidate(p_email text)",
    "table (user_id uuid, password_hash text, organisation_id uuid, roles text[])",
    `begin
       return query select u.id, u.password_hash, m.organisation_id,
           array(select r.role from membership_roles r where r.user_id = u.id and r.organisation_id = m.organisation_id)
         from users u join memberships m on m.user_id = u.id and m.disabled_at is null
         where u.email = p_email and u.disabled_at is null order by m.created_at, m.organisation_id limit 1;
     end`,
  ),
  guarded(
    "start_session(p_user uuid, p_organisation uuid, p_hours integer, p_idle_hours integer, p_device text)",
    "uuid",
    `declare made uuid;
     begin
       insert into sessions (user_id, organisation_id, version, device, idle_hours, expires_at)
         select u.id, m.organisation_id, u.session_version, left(p_device, 200), p_idle_hours, now() + make_interval(hours => p_hours)
         from users u join memberships m on m.user_id = u.id and m.disabled_at is null
         where u.id = p_user and m.organisation_id = p_organisation and u.disabled_at is null
         returning id into made;
       return made;
     end`,
  ),
  guarded(
    "session_context(p_session uuid)",
    "table (user_id uuid, organisation_id uuid, name text, email text, locale text, theme text, density text, roles text[], started_at timestamptz, organisation_name text, sells boolean, buys boolean, time_zone text, currency text)",
    `begin
       update sessions s set last_seen_at = now()
         where s.id = p_session and s.ended_at is null and s.last_seen_at < now() - interval '1 minute'
           and s.last_seen_at > now() - make_interval(hours => s.idle_hours) and s.expires_at > now();
       return query select u.id, s.organisation_id, u.name, u.email, u.locale, u.theme, u.density,
           array(select r.role from membership_roles r
                 where r.user_id = u.id and r.organisation_id = s.organisation_id order by r.role), s.started_at,
           o.name, o.sells, o.buys, o.time_zone, o.currency::text
         from sessions s join users u on u.id = s.user_id
           join organisations o on o.id = s.organisation_id
           join memberships m on m.user_id = u.id and m.organisation_id = s.organisation_id and m.disabled_at is null
         where s.id = p_session and s.ended_at is null and s.expires_at > now() and s.version = u.session_version
           and s.last_seen_at > now() - make_interval(hours => s.idle_hours) and u.disabled_at is null;
     end`,
  ),
  guarded(
    "end_session(p_session uuid)",
    "void",
    `begin update sessions set ended_at = now() where id = p_session and ended_at is null; end`,
  ),
  guarded(
    "organisations_of(p_session uuid)",
    "table (organisation_id uuid, name text)",
    `begin
       return query select o.id, o.name from sessions s
         join users u on u.id = s.user_id and u.disabled_at is null and u.session_version = s.version
         join memberships m on m.user_id = s.user_id and m.disabled_at is null
         join organisations o on o.id = m.organisation_id
         where s.id = p_session and s.ended_at is null and s.expires_at > now() order by o.name;
     end`,
  ),
];

const links = [
  guarded(
    "make_link(p_email text, p_purpose text, p_token_hash text, p_minutes integer)",
    "table (user_id uuid, name text, locale text)",
    `declare found users;
     begin
       -- The row's lock lets one request for a link finish before the next: only the latest link stays open.
       select * into found from users u where u.email = p_email and u.disabled_at is null for update;
       if found.id is null then return; end if;
       update single_use_links l set used_at = now() where l.user_id = found.id and l.purpose = p_purpose and l.used_at is null;
       insert into single_use_links (user_id, purpose, token_hash, expires_at)
         values (found.id, p_purpose, p_token_hash, now() + make_interval(mins => p_minutes));
       return query select found.id, found.name, found.locale;
     end`,
  ),
  guarded(
    "link_owner(p_token_hash text)",
    "table (email text, name text, purpose text)",
    `begin
       return query select u.email, u.name, l.purpose from single_use_links l join users u on u.id = l.user_id
         where l.token_hash = p_token_hash and l.used_at is null and l.expires_at > now() and u.disabled_at is null;
     end`,
  ),
  guarded(
    "use_link(p_token_hash text, p_password_hash text)",
    "text",
    `declare owner_id uuid; owner_email text;
     begin
       update single_use_links l set used_at = now()
         where l.token_hash = p_token_hash and l.used_at is null and l.expires_at > now() returning l.user_id into owner_id;
       if owner_id is null then return null; end if;
       -- Whoever still holds an older mail cannot set the password again.
       update single_use_links l set used_at = now() where l.user_id = owner_id and l.used_at is null;
       update users u set password_hash = p_password_hash, session_version = u.session_version + 1
         where u.id = owner_id and u.disabled_at is null returning u.email into owner_email;
       return owner_email;
     end`,
  ),
  guarded(
    "invite_person(p_email text, p_name text, p_locale text)",
    "uuid",
    `declare invited uuid;
     begin
       if not exists (select 1 from memberships m join membership_roles r
           on r.organisation_id = m.organisation_id and r.user_id = m.user_id and r.role = 'administrator'
         where m.organisation_id = ctx_org() and m.user_id = ctx_actor() and m.disabled_at is null) then
         raise exception 'only an administrator invites' using errcode = 'PP002';
       end if;
       insert into users (email, name, locale) values (p_email, p_name, p_locale)
         on conflict (email) do nothing;
       select id into invited from users where email = p_email;
       insert into memberships (user_id, organisation_id) values (invited, ctx_org())
         on conflict (organisation_id, user_id) do update set disabled_at = null;
       return invited;
     end`,
  ),
  guarded(
    "set_password(p_user uuid, p_password_hash text)",
    "void",
    `begin
       if p_user is distinct from ctx_actor() then raise exception 'only one''s own password' using errcode = 'PP002'; end if;
       update users set password_hash = p_password_hash, session_version = session_version + 1 where id = p_user;
     end`,
  ),
  guarded(
    "own_password_hash()",
    "text",
    `begin return (select password_hash from users where id = ctx_actor()); end`,
  ),
];

const audit = guarded(
  "append_audit(p_action text, p_detail jsonb)",
  "void",
  `declare org uuid := ctx_org(); head audit_heads; entry audit_log;
   begin
     if org is null then raise exception 'no organisation in this transaction' using errcode = 'PP002'; end if;
     insert into audit_heads (organisation_id) values (org) on conflict do nothing;
     select * into head from audit_heads where organisation_id = org for update;
     entry := (org, head.seq + 1, clock_timestamp(), ctx_actor(), p_action, p_detail,
       nullif(current_setting('app.request_id', true), ''), head.hash, '')::audit_log;
     entry.hash := encode(sha256(convert_to(audit_text(entry), 'UTF8')), 'hex');
     insert into audit_log values (entry.*);
     update audit_heads set seq = entry.seq, hash = entry.hash where organisation_id = org;
   end`,
);

// A role or membership that changes ends the person's sessions in that organisation, and in no other one: who invites
// somebody from elsewhere cannot sign them out there.
const sessionBump = `
  create function guarded.end_sessions_of_member() returns trigger language plpgsql security definer
    set search_path = pg_catalog, public, pg_temp as $body$
    begin
      update sessions set ended_at = now() where ended_at is null
        and user_id = coalesce(new.user_id, old.user_id)
        and organisation_id = coalesce(new.organisation_id, old.organisation_id);
      return null;
    end $body$;
  revoke all on function guarded.end_sessions_of_member() from public;
  grant execute on function guarded.end_sessions_of_member() to partproof_owner;
`;

export const up = async (run: Run) => {
  await run(
    `reset role; create schema guarded authorization keeper; grant usage on schema guarded to web, partproof_owner;`,
  );
  await run(`set local role keeper`);
  for (const part of [...signIn, ...links, audit, sessionBump]) await run(part);
  await run(`set local role partproof_owner`);
  await run(`
    create trigger membership_ends_sessions after update on memberships
      for each row execute function guarded.end_sessions_of_member();
    create trigger role_ends_sessions after insert or update or delete on membership_roles
      for each row execute function guarded.end_sessions_of_member();
    alter table memberships enable always trigger membership_ends_sessions;
    alter table membership_roles enable always trigger role_ends_sessions;
  `);
};

export const down = (run: Run) =>
  run(`
    drop trigger membership_ends_sessions on memberships;
    drop trigger role_ends_sessions on membership_roles;
    reset role;
    drop schema guarded cascade;
  `);
