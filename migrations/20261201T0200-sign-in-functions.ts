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

const atWork = "m.accepted_at is not null and m.disabled_at is null";
const isInvited = "m.accepted_at is null and m.disabled_at is null";

const signIn = [
  guarded(
    "begin_attempt(p_account text, p_address text)",
    "boolean",
    `declare allowed boolean;
     begin
       -- Always the account before the address: two tries at once neither deadlock nor both take the last place.
       perform pg_advisory_xact_lock(hashtextextended(p_account, 0)), pg_advisory_xact_lock(hashtextextended(p_address, 1));
       delete from login_attempts where key_hash in (p_account, p_address) and at < now() - interval '15 minutes';
       select (select count(*) from login_attempts where key_hash = p_account) < 10
          and (select count(*) from login_attempts where key_hash = p_address) < 50 into allowed;
       if allowed then insert into login_attempts (key_hash) values (p_account), (p_address); end if;
       return allowed;
     end`,
  ),
  guarded(
    "clear_attempts(p_account text, p_address text)",
    "void",
    `begin
       -- The try was counted before the password was looked at; one that succeeds gives its place back, so that a
       -- workshop behind one address is not locked out by its own sign-ins.
       perform pg_advisory_xact_lock(hashtextextended(p_account, 0)), pg_advisory_xact_lock(hashtextextended(p_address, 1));
       delete from login_attempts where key_hash = p_account;
       delete from login_attempts where id =
         (select a.id from login_attempts a where a.key_hash = p_address order by a.at desc, a.id desc limit 1);
     end`,
  ),
  guarded(
    "sign_in_candidate(p_email text)",
    "table (user_id uuid, password_hash text, organisation_id uuid, roles text[])",
    `begin
       return query select u.id, u.password_hash, m.organisation_id,
           array(select r.role from membership_roles r where r.user_id = u.id and r.organisation_id = m.organisation_id)
         from users u join memberships m on m.user_id = u.id and ${atWork}
         where u.email = p_email and u.disabled_at is null
         -- Where the person was last at work; for the first time, where they have been a member longest.
         order by (select max(s.last_seen_at) from sessions s where s.user_id = u.id and s.organisation_id = m.organisation_id)
           desc nulls last, m.accepted_at, m.organisation_id limit 1;
     end`,
  ),
  guarded(
    "start_session(p_user uuid, p_organisation uuid, p_hours integer, p_idle_hours integer, p_device text)",
    "uuid",
    `declare made uuid;
     begin
       insert into sessions (user_id, organisation_id, version, device, idle_hours, expires_at)
         select u.id, m.organisation_id, u.session_version, left(p_device, 200), p_idle_hours, now() + make_interval(hours => p_hours)
         from users u join memberships m on m.user_id = u.id and ${atWork}
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
           join memberships m on m.user_id = u.id and m.organisation_id = s.organisation_id and ${atWork}
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
    "table (organisation_id uuid, name text, roles text[])",
    `begin
       return query select o.id, o.name, array(select r.role from membership_roles r
           where r.user_id = m.user_id and r.organisation_id = m.organisation_id order by r.role)
         from sessions s join users u on u.id = s.user_id and u.disabled_at is null and u.session_version = s.version
         join memberships m on m.user_id = s.user_id and ${atWork}
         join organisations o on o.id = m.organisation_id
         where s.id = p_session and s.ended_at is null and s.expires_at > now()
           and s.last_seen_at > now() - make_interval(hours => s.idle_hours) order by o.name, o.id;
     end`,
  ),
  guarded(
    "switch_session(p_session uuid, p_organisation uuid, p_hours integer, p_idle_hours integer)",
    "uuid",
    `declare left_one sessions; made uuid;
     begin
       select s.* into left_one from sessions s
         where s.id = p_session and s.ended_at is null and s.expires_at > now()
           and s.last_seen_at > now() - make_interval(hours => s.idle_hours) for update;
       -- The life of the new session is counted from when the password was typed: going back and forth gains nothing.
       insert into sessions (user_id, organisation_id, version, device, idle_hours, started_at, expires_at)
         select u.id, m.organisation_id, u.session_version, left_one.device, p_idle_hours, left_one.started_at,
           left_one.started_at + make_interval(hours => p_hours)
         from users u join memberships m on m.user_id = u.id and ${atWork}
         where u.id = left_one.user_id and u.session_version = left_one.version and u.disabled_at is null
           and m.organisation_id = p_organisation and left_one.started_at + make_interval(hours => p_hours) > now()
         returning id into made;
       if found then update sessions set ended_at = now() where id = p_session; end if;
       return made;
     end`,
  ),
];

// The membership before the account, the account before its links: everybody takes them in this order.
const lockOwner = `perform 1 from memberships m join single_use_links l
         on l.user_id = m.user_id and l.organisation_id = m.organisation_id
       where l.token_hash = p_token_hash for update of m;`;

const links = [
  guarded(
    "make_link(p_email text, p_purpose text, p_token_hash text, p_minutes integer)",
    "void",
    `declare found users; inviting uuid := case when p_purpose = 'invitation' then ctx_org() end;
     begin
       -- The row's lock lets one request for a link finish before the next: only the latest link stays open.
       select * into found from users u where u.email = p_email and u.disabled_at is null for update;
       if found.id is null or p_purpose = 'invitation' and not exists (select 1 from memberships m where m.user_id = found.id
           and m.organisation_id = inviting and ${isInvited}) then return; end if;
       update single_use_links l set used_at = now() where l.user_id = found.id and l.purpose = p_purpose
         and l.organisation_id is not distinct from inviting and l.used_at is null;
       insert into single_use_links (user_id, purpose, organisation_id, token_hash, expires_at)
         values (found.id, p_purpose, inviting, p_token_hash, now() + make_interval(mins => p_minutes));
     end`,
  ),
  guarded(
    "link_owner(p_token_hash text)",
    "table (email text, name text, purpose text, organisation text, has_password boolean)",
    `begin
       return query select u.email, case when u.password_hash is null then coalesce(m.invited_name, u.name) else u.name end,
           l.purpose, coalesce(o.name, ''), u.password_hash is not null
         from single_use_links l join users u on u.id = l.user_id
         left join memberships m on m.user_id = l.user_id and m.organisation_id = l.organisation_id
         left join organisations o on o.id = l.organisation_id
         where l.token_hash = p_token_hash and l.used_at is null and l.expires_at > now() and u.disabled_at is null
           and (l.purpose = 'reset' or (${isInvited}));
     end`,
  ),
  guarded(
    "use_link(p_token_hash text, p_password_hash text)",
    "text",
    `declare link single_use_links; owner users; invited memberships;
     begin
       ${lockOwner}
       select u.* into owner from users u join single_use_links l on l.user_id = u.id
         where l.token_hash = p_token_hash and u.disabled_at is null for update of u;
       select l.* into link from single_use_links l
         where l.token_hash = p_token_hash and l.user_id = owner.id and l.used_at is null and l.expires_at > now();
       if link.id is null then return null; end if;
       if link.purpose = 'invitation' then
         -- Whoever invites an address must not be able to have its password set anew: once there is one, only its
         -- owner accepts, and signs in for it.
         if owner.password_hash is not null then return null; end if;
         update memberships m set accepted_at = now() where m.user_id = owner.id and m.organisation_id = link.organisation_id
           and ${isInvited} returning m.* into invited;
         if not found then return null; end if;
       end if;
       -- Whoever still holds an older mail cannot set the password again.
       update single_use_links l set used_at = now()
         where l.user_id = owner.id and l.used_at is null and (l.id = link.id or l.purpose = 'reset');
       update users u set password_hash = p_password_hash, session_version = u.session_version + 1,
         name = coalesce(invited.invited_name, u.name) where u.id = owner.id;
       return owner.email;
     end`,
  ),
  guarded(
    "invitation_candidate(p_token_hash text)",
    "table (user_id uuid, email text, password_hash text, roles text[])",
    `begin
       return query select u.id, u.email, u.password_hash, array(select r.role from membership_roles r
           where r.user_id = m.user_id and r.organisation_id = m.organisation_id)
         from single_use_links l join users u on u.id = l.user_id and u.disabled_at is null and u.password_hash is not null
         join memberships m on m.user_id = l.user_id and m.organisation_id = l.organisation_id and ${isInvited}
         where l.token_hash = p_token_hash and l.used_at is null and l.expires_at > now();
     end`,
  ),
  guarded(
    "accept_invitation(p_token_hash text, p_user uuid)",
    "uuid",
    `declare joined uuid;
     begin
       ${lockOwner}
       update single_use_links l set used_at = now()
         where l.token_hash = p_token_hash and l.user_id = p_user and l.purpose = 'invitation' and l.used_at is null
           and l.expires_at > now() and exists (select 1 from users u where u.id = p_user and u.disabled_at is null)
         returning l.organisation_id into joined;
       update memberships m set accepted_at = now() where m.user_id = p_user and m.organisation_id = joined
         and ${isInvited} returning m.organisation_id into joined;
       return joined;
     end`,
  ),
  guarded(
    "invite_person(p_email text, p_name text, p_locale text)",
    "uuid",
    `declare invited uuid;
     begin
       if not exists (select 1 from memberships m join membership_roles r
           on r.organisation_id = m.organisation_id and r.user_id = m.user_id and r.role = 'administrator'
         where m.organisation_id = ctx_org() and m.user_id = ctx_actor() and ${atWork}) then
         raise exception 'only an administrator invites' using errcode = 'PP002';
       end if;
       insert into users (email, name, locale) values (p_email, p_name, p_locale)
         on conflict (email) do nothing;
       select id into invited from users where email = p_email;
       insert into memberships (user_id, organisation_id, invited_name, invited_email)
         values (invited, ctx_org(), p_name, p_email) on conflict (organisation_id, user_id) do nothing;
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
    drop trigger membership_ends_sessions on memberships; drop trigger role_ends_sessions on membership_roles;
    reset role; drop schema guarded cascade;
  `);
