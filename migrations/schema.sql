CREATE SCHEMA guarded;

ALTER SCHEMA guarded OWNER TO keeper;

CREATE SCHEMA public;

ALTER SCHEMA public OWNER TO pg_database_owner;

COMMENT ON SCHEMA public IS 'standard public schema';

CREATE FUNCTION guarded.accept_invitation(p_token_hash text, p_user uuid) RETURNS uuid
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare joined uuid;
     begin
       perform 1 from memberships m join single_use_links l
         on l.user_id = m.user_id and l.organisation_id = m.organisation_id
       where l.token_hash = p_token_hash for update of m;
       update single_use_links l set used_at = now()
         where l.token_hash = p_token_hash and l.user_id = p_user and l.purpose = 'invitation' and l.used_at is null
           and l.expires_at > now() and exists (select 1 from users u where u.id = p_user and u.disabled_at is null)
         returning l.organisation_id into joined;
       update memberships m set accepted_at = now() where m.user_id = p_user and m.organisation_id = joined
         and m.accepted_at is null and m.disabled_at is null returning m.organisation_id into joined;
       return joined;
     end $$;

ALTER FUNCTION guarded.accept_invitation(p_token_hash text, p_user uuid) OWNER TO keeper;

CREATE FUNCTION guarded.append_audit(p_action text, p_detail jsonb) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare org uuid := ctx_org(); head audit_heads; entry audit_log;
   begin
     if org is null then raise exception 'no organisation in this transaction' using errcode = 'PP002'; end if;
     insert into audit_heads (organisation_id) values (org) on conflict do nothing;
     select * into head from audit_heads where organisation_id = org for update;
     entry := (org, head.seq + 1, clock_timestamp(), ctx_actor(), p_action, p_detail,
       nullif(current_setting('app.request_id', true), ''), head.hash, '')::audit_log;
     entry.hash := encode(sha256(convert_to(audit_text(entry), 'UTF8')), 'hex');
     insert into audit_log values (entry.*);
     update audit_heads set seq = entry.seq, hash = entry.hash where organisation_id = org;
   end $$;

ALTER FUNCTION guarded.append_audit(p_action text, p_detail jsonb) OWNER TO keeper;

CREATE FUNCTION guarded.begin_attempt(p_account text, p_address text) RETURNS boolean
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare allowed boolean;
     begin
       -- Always the account before the address: two tries at once neither deadlock nor both take the last place.
       perform pg_advisory_xact_lock(hashtextextended(p_account, 0)), pg_advisory_xact_lock(hashtextextended(p_address, 1));
       delete from login_attempts where key_hash in (p_account, p_address) and at < now() - interval '15 minutes';
       select (select count(*) from login_attempts where key_hash = p_account) < 10
          and (select count(*) from login_attempts where key_hash = p_address) < 50 into allowed;
       if allowed then insert into login_attempts (key_hash) values (p_account), (p_address); end if;
       return allowed;
     end $$;

ALTER FUNCTION guarded.begin_attempt(p_account text, p_address text) OWNER TO keeper;

CREATE FUNCTION guarded.chain_timeline() RETURNS trigger
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$
    declare head timeline_heads;
    begin
      -- The head stands before it is locked, so that two first entries wait for each other too.
      insert into timeline_heads (claim_id, seq, hash) values (new.claim_id, 0, '') on conflict do nothing;
      select * into head from timeline_heads where claim_id = new.claim_id for update;
      if session_user in ('web', 'worker') then new.at := clock_timestamp(); end if;
      new.seq := head.seq + 1;
      new.prev_hash := head.hash;
      new.hash := encode(sha256(convert_to(timeline_text(new), 'UTF8')), 'hex');
      update timeline_heads set seq = new.seq, hash = new.hash where claim_id = new.claim_id;
      return new;
    end $$;

ALTER FUNCTION guarded.chain_timeline() OWNER TO keeper;

CREATE FUNCTION guarded.clear_attempts(p_account text, p_address text) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin
       -- The try was counted before the password was looked at; one that succeeds gives its place back, so that a
       -- workshop behind one address is not locked out by its own sign-ins.
       perform pg_advisory_xact_lock(hashtextextended(p_account, 0)), pg_advisory_xact_lock(hashtextextended(p_address, 1));
       delete from login_attempts where key_hash = p_account;
       delete from login_attempts where id =
         (select a.id from login_attempts a where a.key_hash = p_address order by a.at desc, a.id desc limit 1);
     end $$;

ALTER FUNCTION guarded.clear_attempts(p_account text, p_address text) OWNER TO keeper;

CREATE FUNCTION guarded.due_to_settle() RETURNS TABLE(claim_id uuid)
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin
     return query select c.id from claims c join organisations o on o.id = c.workshop_id where c.state = 'decided'
  and (c.contest_waived_at is not null or c.contest_until < (now() at time zone o.time_zone)::date)
  and not exists (select 1 from claim_lines l where l.claim_id = c.id
    and l.credit_state not in ('none', 'allocated', 'paidOut', 'replaced'));
   end $$;

ALTER FUNCTION guarded.due_to_settle() OWNER TO keeper;

CREATE FUNCTION guarded.end_session(p_session uuid) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin update sessions set ended_at = now() where id = p_session and ended_at is null; end $$;

ALTER FUNCTION guarded.end_session(p_session uuid) OWNER TO keeper;

CREATE FUNCTION guarded.end_sessions_of_member() RETURNS trigger
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$
    begin
      update sessions set ended_at = now() where ended_at is null
        and user_id = coalesce(new.user_id, old.user_id)
        and organisation_id = coalesce(new.organisation_id, old.organisation_id);
      return null;
    end $$;

ALTER FUNCTION guarded.end_sessions_of_member() OWNER TO keeper;

CREATE FUNCTION guarded.flag_claim(p_claim uuid, p_line integer, p_kind text, p_detail jsonb) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$
    begin
      insert into claim_flags (claim_id, seller_id, workshop_id, line_number, kind, detail)
        select c.id, c.seller_id, c.workshop_id, p_line, p_kind, p_detail from claims c
        where c.id = p_claim and ctx_org() in (c.seller_id, c.workshop_id)
          and not exists (select 1 from claim_flags f where f.claim_id = c.id and f.kind = p_kind
            and f.line_number is not distinct from p_line and f.detail = p_detail);
    end $$;

ALTER FUNCTION guarded.flag_claim(p_claim uuid, p_line integer, p_kind text, p_detail jsonb) OWNER TO keeper;

CREATE FUNCTION guarded.flag_seen_before(p_evidence uuid) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$
    begin
      insert into claim_flags (claim_id, seller_id, workshop_id, kind, detail)
        select e.claim_id, e.seller_id, e.workshop_id,
          case e.kind when 'photo' then 'photoSeenBefore' when 'runLog' then 'logSeenBefore' else 'documentSeenBefore' end,
          jsonb_build_object('otherClaim', c.number, 'name', e.original_name)
        from evidence_files e
          join lateral (select o.claim_id from evidence_files o where o.seller_id = e.seller_id and o.sha256 = e.sha256
            and o.claim_id <> e.claim_id order by o.received_at limit 1) other on true
          join claims c on c.id = other.claim_id
        where e.id = p_evidence and e.workshop_id = ctx_org();
    end $$;

ALTER FUNCTION guarded.flag_seen_before(p_evidence uuid) OWNER TO keeper;

CREATE FUNCTION guarded.flag_serial(p_claim uuid, p_line integer, p_serial_normal text) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$
    declare known boolean;
    begin
      select exists (select 1 from units u join claims c on c.seller_id = u.seller_id
        where c.id = p_claim and u.serial_normal = p_serial_normal) into known;
      perform guarded.flag_claim(p_claim, p_line, case when known then 'soldToOther' else 'serialUnknown' end,
        jsonb_build_object('serial', p_serial_normal));
    end $$;

ALTER FUNCTION guarded.flag_serial(p_claim uuid, p_line integer, p_serial_normal text) OWNER TO keeper;

CREATE FUNCTION guarded.hold_query(p_query uuid) RETURNS TABLE(query_id uuid, asked_on text, lapses_on text, today text, reminders_sent integer, number text, family text, distributor text, question text, row_ids jsonb)
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin
     perform 1 from claims c where c.id = (select q.claim_id from claim_queries q where q.id = p_query)
       for update skip locked;
     if not found then return; end if;
     -- A statement of its own: what is read now is what stands under the lock, not what stood before it.
     return query select q.id, (q.asked_at at time zone o.time_zone)::date::text, c.query_lapses_on::text,
  (now() at time zone o.time_zone)::date::text, q.reminders_sent, c.number, c.family, s.name, q.question, q.items
       from claims c join claim_queries q on q.claim_id = c.id and q.answered_at is null
  join organisations o on o.id = c.workshop_id join organisations s on s.id = c.seller_id where q.id = p_query and c.state = 'answerNeeded' and c.query_lapses_on is not null;
   end $$;

ALTER FUNCTION guarded.hold_query(p_query uuid) OWNER TO keeper;

CREATE FUNCTION guarded.hold_unit(p_line uuid) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$
    declare line claim_lines; holder text;
    begin
      select * into line from claim_lines where id = p_line and workshop_id = ctx_org();
      if line.unit_id is null or line.holds_unit then return; end if;
      perform pg_advisory_xact_lock(hashtextextended(line.unit_id::text, 7));
      select c.number into holder from claim_lines l join claims c on c.id = l.claim_id
        where l.seller_id = line.seller_id and l.unit_id = line.unit_id and l.holds_unit;
      if holder is not null then
        perform guarded.flag_claim(line.claim_id, line.line_number, 'unitHeld', jsonb_build_object('otherClaim', holder));
      elsif exists (select 1 from units where id = line.unit_id and buyer_id = line.workshop_id) then
        update claim_lines set holds_unit = true where id = p_line;
      end if;
    end $$;

ALTER FUNCTION guarded.hold_unit(p_line uuid) OWNER TO keeper;

CREATE FUNCTION guarded.invitation_candidate(p_token_hash text) RETURNS TABLE(user_id uuid, email text, password_hash text, roles text[])
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin
       return query select u.id, u.email, u.password_hash, array(select r.role from membership_roles r
           where r.user_id = m.user_id and r.organisation_id = m.organisation_id)
         from single_use_links l join users u on u.id = l.user_id and u.disabled_at is null and u.password_hash is not null
         join memberships m on m.user_id = l.user_id and m.organisation_id = l.organisation_id and m.accepted_at is null and m.disabled_at is null
         where l.token_hash = p_token_hash and l.used_at is null and l.expires_at > now();
     end $$;

ALTER FUNCTION guarded.invitation_candidate(p_token_hash text) OWNER TO keeper;

CREATE FUNCTION guarded.invite_person(p_email text, p_name text, p_locale text) RETURNS uuid
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare invited uuid;
     begin
       if not exists (select 1 from memberships m join membership_roles r
           on r.organisation_id = m.organisation_id and r.user_id = m.user_id and r.role = 'administrator'
         where m.organisation_id = ctx_org() and m.user_id = ctx_actor() and m.accepted_at is not null and m.disabled_at is null) then
         raise exception 'only an administrator invites' using errcode = 'PP002';
       end if;
       insert into users (email, name, locale) values (p_email, p_name, p_locale)
         on conflict (email) do nothing;
       select id into invited from users where email = p_email;
       insert into memberships (user_id, organisation_id, invited_name, invited_email)
         values (invited, ctx_org(), p_name, p_email) on conflict (organisation_id, user_id) do nothing;
       return invited;
     end $$;

ALTER FUNCTION guarded.invite_person(p_email text, p_name text, p_locale text) OWNER TO keeper;

CREATE FUNCTION guarded.lapse_query(p_query uuid, p_params jsonb) RETURNS boolean
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare claim claims; asked claim_queries; today date;
   begin
     
  select * into claim from claims c where c.id = (select q.claim_id from claim_queries q where q.id = p_query) for update;
  select * into asked from claim_queries q where q.id = p_query;
  if claim.id is null or claim.state <> 'answerNeeded' or asked.answered_at is not null then return false; end if;
  select (now() at time zone o.time_zone)::date into today from organisations o where o.id = claim.workshop_id;
     if claim.query_lapses_on is null or claim.query_lapses_on >= today or asked.reminders_sent = 0 then return false; end if;
     update claims set state = 'lapsed', holder_id = null, held_until = null, parked_with_id = null, parked_question = null
       where id = claim.id;
     update claim_lines set holds_unit = false where claim_id = claim.id and holds_unit;
     
  insert into timeline_entries (claim_id, seq, seller_id, workshop_id, kind, actor_name, detail, prev_hash, hash)
    values (claim.id, 0, claim.seller_id, claim.workshop_id, 'lapse', 'Partproof', jsonb_build_object('answerBy', claim.query_lapses_on), '', '');
     perform guarded.mail_of_query(p_query, 'claimLapsed', 'claimLapsed:' || p_query, p_params, true);
     return true;
   end $$;

ALTER FUNCTION guarded.lapse_query(p_query uuid, p_params jsonb) OWNER TO keeper;

CREATE FUNCTION guarded.link_owner(p_token_hash text) RETURNS TABLE(email text, name text, purpose text, organisation text, has_password boolean)
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin
       return query select u.email, case when u.password_hash is null then coalesce(m.invited_name, u.name) else u.name end,
           l.purpose, coalesce(o.name, ''), u.password_hash is not null
         from single_use_links l join users u on u.id = l.user_id
         left join memberships m on m.user_id = l.user_id and m.organisation_id = l.organisation_id
         left join organisations o on o.id = l.organisation_id
         where l.token_hash = p_token_hash and l.used_at is null and l.expires_at > now() and u.disabled_at is null
           and (l.purpose = 'reset' or (m.accepted_at is null and m.disabled_at is null));
     end $$;

ALTER FUNCTION guarded.link_owner(p_token_hash text) OWNER TO keeper;

CREATE FUNCTION guarded.mail_claim_people(p_claim uuid, p_to text, p_kind text, p_params jsonb, p_dedupe text) RETURNS integer
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$
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
          select p.organisation_id, p.id, p_kind, claim.number, ctx_org() || ':' || p_dedupe, (select coalesce(jsonb_object_agg(key, value), '{}') from jsonb_each(p_params)
  where jsonb_typeof(value) in ('string', 'number')
    and key not in ('link', 'number', 'name', 'letter', 'question', 'note', 'instructions', 'reason', 'sendTo')),
            case when p.id = ctx_actor() then now() end
          from people p on conflict do nothing)
      insert into outbox (organisation_id, kind, dedupe_key, recipient, locale, params, request_id)
        select ctx_org(), p_kind, p_dedupe || ':' || p.id, p.email, p.locale, p_params || jsonb_build_object('name', p.name),
          nullif(current_setting('app.request_id', true), '')
        from people p where p.is_mailed;
      get diagnostics sent = row_count;
      return sent;
    end $$;

ALTER FUNCTION guarded.mail_claim_people(p_claim uuid, p_to text, p_kind text, p_params jsonb, p_dedupe text) OWNER TO keeper;

CREATE FUNCTION guarded.mail_credit_note(p_note uuid, p_kind text, p_params jsonb, p_dedupe text) RETURNS integer
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$
    declare note credit_notes; sent integer;
    begin
      select * into note from credit_notes n where n.id = p_note and n.seller_id = ctx_org();
      if note.id is null then return 0; end if;
      insert into outbox (organisation_id, kind, dedupe_key, recipient, locale, params, request_id)
        select ctx_org(), p_kind, p_dedupe || ':' || u.id, u.email, u.locale, p_params || jsonb_build_object('name', u.name),
          nullif(current_setting('app.request_id', true), '')
        from users u where u.disabled_at is null and exists (select 1 from memberships m
          join membership_roles r on r.user_id = m.user_id and r.organisation_id = m.organisation_id
            and r.role in ('accounts', 'workshopManager')
          where m.user_id = u.id and m.organisation_id = note.workshop_id and m.disabled_at is null and m.accepted_at is not null);
      get diagnostics sent = row_count;
      return sent;
    end $$;

ALTER FUNCTION guarded.mail_credit_note(p_note uuid, p_kind text, p_params jsonb, p_dedupe text) OWNER TO keeper;

CREATE FUNCTION guarded.mail_link_owner(p_token_hash text, p_kind text, p_params jsonb, p_request text) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$
    begin
      insert into outbox (kind, dedupe_key, recipient, locale, params, request_id)
        select p_kind, p_kind || ':' || l.id, u.email, u.locale, p_params || jsonb_build_object('name', u.name), p_request
        from single_use_links l join users u on u.id = l.user_id
        where l.token_hash = p_token_hash and l.used_at is null on conflict do nothing;
    end $$;

ALTER FUNCTION guarded.mail_link_owner(p_token_hash text, p_kind text, p_params jsonb, p_request text) OWNER TO keeper;

CREATE FUNCTION guarded.mail_of_query(p_query uuid, p_kind text, p_dedupe text, p_params jsonb, p_asker_too boolean) RETURNS void
    LANGUAGE sql
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$
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
        select p.organisation_id, p.id, p_kind, p.number, p_dedupe, (select coalesce(jsonb_object_agg(key, value), '{}') from jsonb_each(p_params)
  where jsonb_typeof(value) in ('string', 'number')
    and key not in ('link', 'number', 'name', 'letter', 'question', 'note', 'instructions', 'reason', 'sendTo')) from people p on conflict do nothing)
    insert into outbox (kind, dedupe_key, recipient, locale, params)
      select p_kind, p_dedupe || ':' || p.id, p.email, p.locale, p_params || jsonb_build_object('name', p.name)
      from people p on conflict do nothing $$;

ALTER FUNCTION guarded.mail_of_query(p_query uuid, p_kind text, p_dedupe text, p_params jsonb, p_asker_too boolean) OWNER TO keeper;

CREATE FUNCTION guarded.make_link(p_email text, p_purpose text, p_token_hash text, p_minutes integer) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare found users; inviting uuid := case when p_purpose = 'invitation' then ctx_org() end;
     begin
       -- The row's lock lets one request for a link finish before the next: only the latest link stays open.
       select * into found from users u where u.email = p_email and u.disabled_at is null for update;
       if found.id is null or p_purpose = 'invitation' and not exists (select 1 from memberships m where m.user_id = found.id
           and m.organisation_id = inviting and m.accepted_at is null and m.disabled_at is null) then return; end if;
       update single_use_links l set used_at = now() where l.user_id = found.id and l.purpose = p_purpose
         and l.organisation_id is not distinct from inviting and l.used_at is null;
       insert into single_use_links (user_id, purpose, organisation_id, token_hash, expires_at)
         values (found.id, p_purpose, inviting, p_token_hash, now() + make_interval(mins => p_minutes));
     end $$;

ALTER FUNCTION guarded.make_link(p_email text, p_purpose text, p_token_hash text, p_minutes integer) OWNER TO keeper;

CREATE FUNCTION guarded.open_workshop(p_given jsonb) RETURNS TABLE(organisation_id uuid, was_known boolean)
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare tax text := upper(regexp_replace(coalesce(p_given ->> 'taxNumber', ''), '[^[:alnum:]]', '', 'g')); made uuid;
   begin
     if not (exists (select 1 from memberships m
    join users u on u.id = m.user_id and u.disabled_at is null
    join membership_roles r on r.organisation_id = m.organisation_id and r.user_id = m.user_id and r.role = 'administrator'
    where m.organisation_id = ctx_org() and m.user_id = ctx_actor() and m.disabled_at is null) and exists (select 1 from organisations o where o.id = ctx_org() and o.sells)) then
       raise exception 'only an administrator of a distributor opens a workshop' using errcode = 'PP002';
     end if;
     if length(tax) >= 6 then
       -- Two distributors that enter the same workshop at once must not make two of it.
       perform pg_advisory_xact_lock(hashtextextended(tax, 9));
       select o.id into made from organisations o
         where o.buys and o.id <> ctx_org() and upper(regexp_replace(o.tax_number, '[^[:alnum:]]', '', 'g')) = tax
         order by o.created_at limit 1;
       if made is not null then return query select made, true; return; end if;
     end if;
     made := gen_random_uuid();
     insert into organisations (id, name, legal_name, sells, buys, address, country, tax_number, currency, time_zone, languages)
       values (made, p_given ->> 'name', p_given ->> 'legalName', false, true, p_given ->> 'address', p_given ->> 'country',
         nullif(p_given ->> 'taxNumber', ''), p_given ->> 'currency', p_given ->> 'timeZone', array[p_given ->> 'language']);
     insert into sites (organisation_id, name, address)
       values (made, p_given ->> 'siteName', p_given ->> 'siteAddress');
     return query select made, false;
   end $$;

ALTER FUNCTION guarded.open_workshop(p_given jsonb) OWNER TO keeper;

CREATE FUNCTION guarded.organisations_of(p_session uuid) RETURNS TABLE(organisation_id uuid, name text, roles text[])
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin
       return query select o.id, o.name, array(select r.role from membership_roles r
           where r.user_id = m.user_id and r.organisation_id = m.organisation_id order by r.role)
         from sessions s join users u on u.id = s.user_id and u.disabled_at is null and u.session_version = s.version
         join memberships m on m.user_id = s.user_id and m.accepted_at is not null and m.disabled_at is null
         join organisations o on o.id = m.organisation_id
         where s.id = p_session and s.ended_at is null and s.expires_at > now()
           and s.last_seen_at > now() - make_interval(hours => s.idle_hours) order by o.name, o.id;
     end $$;

ALTER FUNCTION guarded.organisations_of(p_session uuid) OWNER TO keeper;

CREATE FUNCTION guarded.own_password_hash() RETURNS text
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin return (select password_hash from users where id = ctx_actor()); end $$;

ALTER FUNCTION guarded.own_password_hash() OWNER TO keeper;

CREATE FUNCTION guarded.people_seen() RETURNS TABLE(user_id uuid, last_seen_at timestamp with time zone, has_password boolean)
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin
     if not exists (select 1 from memberships m
    join users u on u.id = m.user_id and u.disabled_at is null
    join membership_roles r on r.organisation_id = m.organisation_id and r.user_id = m.user_id and r.role = 'administrator'
    where m.organisation_id = ctx_org() and m.user_id = ctx_actor() and m.disabled_at is null) then
       raise exception 'only an administrator sees who was at work' using errcode = 'PP002';
     end if;
     return query select m.user_id, (select max(s.last_seen_at) from sessions s
           where s.user_id = m.user_id and s.organisation_id = m.organisation_id), u.password_hash is not null
       from memberships m join users u on u.id = m.user_id where m.organisation_id = ctx_org();
   end $$;

ALTER FUNCTION guarded.people_seen() OWNER TO keeper;

CREATE FUNCTION guarded.remind_query(p_query uuid, p_reminder integer, p_lapses_on date, p_params jsonb) RETURNS boolean
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare claim claims; asked claim_queries; today date;
   begin
     
  select * into claim from claims c where c.id = (select q.claim_id from claim_queries q where q.id = p_query) for update;
  select * into asked from claim_queries q where q.id = p_query;
  if claim.id is null or claim.state <> 'answerNeeded' or asked.answered_at is not null then return false; end if;
  select (now() at time zone o.time_zone)::date into today from organisations o where o.id = claim.workshop_id;
     if asked.reminders_sent >= p_reminder then return false; end if;
     if p_lapses_on < today or (p_lapses_on <> claim.query_lapses_on
         and (asked.reminders_sent > 0 or claim.query_lapses_on >= today)) then
       raise exception 'the last day of a query stays' using errcode = 'PP003';
     end if;
     update claim_queries set reminders_sent = p_reminder where id = p_query;
     update claims set query_lapses_on = p_lapses_on where id = claim.id and query_lapses_on <> p_lapses_on;
     
  insert into timeline_entries (claim_id, seq, seller_id, workshop_id, kind, actor_name, detail, prev_hash, hash)
    values (claim.id, 0, claim.seller_id, claim.workshop_id, 'reminded', 'Partproof', jsonb_build_object('round', asked.round, 'reminder', p_reminder, 'answerBy', p_lapses_on), '', '');
     perform guarded.mail_of_query(p_query, 'queryReminder', 'queryReminder:' || p_query || ':' || p_reminder, p_params, false);
     return true;
   end $$;

ALTER FUNCTION guarded.remind_query(p_query uuid, p_reminder integer, p_lapses_on date, p_params jsonb) OWNER TO keeper;

CREATE FUNCTION guarded.session_context(p_session uuid) RETURNS TABLE(user_id uuid, organisation_id uuid, name text, email text, locale text, theme text, density text, roles text[], started_at timestamp with time zone, organisation_name text, sells boolean, buys boolean, time_zone text, currency text)
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin
       update sessions s set last_seen_at = now()
         where s.id = p_session and s.ended_at is null and s.last_seen_at < now() - interval '1 minute'
           and s.last_seen_at > now() - make_interval(hours => s.idle_hours) and s.expires_at > now();
       return query select u.id, s.organisation_id, u.name, u.email, u.locale, u.theme, u.density,
           array(select r.role from membership_roles r
                 where r.user_id = u.id and r.organisation_id = s.organisation_id order by r.role), s.started_at,
           o.name, o.sells, o.buys, o.time_zone, o.currency::text
         from sessions s join users u on u.id = s.user_id
           join organisations o on o.id = s.organisation_id
           join memberships m on m.user_id = u.id and m.organisation_id = s.organisation_id and m.accepted_at is not null and m.disabled_at is null
         where s.id = p_session and s.ended_at is null and s.expires_at > now() and s.version = u.session_version
           and s.last_seen_at > now() - make_interval(hours => s.idle_hours) and u.disabled_at is null;
     end $$;

ALTER FUNCTION guarded.session_context(p_session uuid) OWNER TO keeper;

CREATE FUNCTION guarded.set_password(p_user uuid, p_password_hash text) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin
       if p_user is distinct from ctx_actor() then raise exception 'only one''s own password' using errcode = 'PP002'; end if;
       update users set password_hash = p_password_hash, session_version = session_version + 1 where id = p_user;
     end $$;

ALTER FUNCTION guarded.set_password(p_user uuid, p_password_hash text) OWNER TO keeper;

CREATE FUNCTION guarded.settle_claim(p_claim uuid) RETURNS boolean
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare claim claims;
   begin
     perform 1 from claims c where c.id = p_claim for update skip locked;
     if not found then return false; end if;
     select c.* into claim from claims c join organisations o on o.id = c.workshop_id where c.id = p_claim and c.state = 'decided'
  and (c.contest_waived_at is not null or c.contest_until < (now() at time zone o.time_zone)::date)
  and not exists (select 1 from claim_lines l where l.claim_id = c.id
    and l.credit_state not in ('none', 'allocated', 'paidOut', 'replaced'));
     if claim.id is null then return false; end if;
     update claims set state = 'settled' where id = p_claim;
     update claim_lines set holds_unit = false where claim_id = p_claim and holds_unit and verdict = 'declined';
     insert into timeline_entries (claim_id, seq, seller_id, workshop_id, kind, actor_name, detail, prev_hash, hash)
       values (claim.id, 0, claim.seller_id, claim.workshop_id, 'settle', 'Partproof', '{}', '', '');
     return true;
   end $$;

ALTER FUNCTION guarded.settle_claim(p_claim uuid) OWNER TO keeper;

CREATE FUNCTION guarded.sign_in_candidate(p_email text) RETURNS TABLE(user_id uuid, password_hash text, organisation_id uuid, roles text[])
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin
       return query select u.id, u.password_hash, m.organisation_id,
           array(select r.role from membership_roles r where r.user_id = u.id and r.organisation_id = m.organisation_id)
         from users u join memberships m on m.user_id = u.id and m.accepted_at is not null and m.disabled_at is null
         where u.email = p_email and u.disabled_at is null
         -- Where the person was last at work; for the first time, where they have been a member longest.
         order by (select max(s.last_seen_at) from sessions s where s.user_id = u.id and s.organisation_id = m.organisation_id)
           desc nulls last, m.accepted_at, m.organisation_id limit 1;
     end $$;

ALTER FUNCTION guarded.sign_in_candidate(p_email text) OWNER TO keeper;

CREATE FUNCTION guarded.start_session(p_user uuid, p_organisation uuid, p_hours integer, p_idle_hours integer, p_device text) RETURNS uuid
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare made uuid;
     begin
       insert into sessions (user_id, organisation_id, version, device, idle_hours, expires_at)
         select u.id, m.organisation_id, u.session_version, left(p_device, 200), p_idle_hours, now() + make_interval(hours => p_hours)
         from users u join memberships m on m.user_id = u.id and m.accepted_at is not null and m.disabled_at is null
         where u.id = p_user and m.organisation_id = p_organisation and u.disabled_at is null
         returning id into made;
       return made;
     end $$;

ALTER FUNCTION guarded.start_session(p_user uuid, p_organisation uuid, p_hours integer, p_idle_hours integer, p_device text) OWNER TO keeper;

CREATE FUNCTION guarded.switch_session(p_session uuid, p_organisation uuid, p_hours integer, p_idle_hours integer) RETURNS uuid
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare left_one sessions; made uuid;
     begin
       select s.* into left_one from sessions s
         where s.id = p_session and s.ended_at is null and s.expires_at > now()
           and s.last_seen_at > now() - make_interval(hours => s.idle_hours) for update;
       -- The life of the new session is counted from when the password was typed: going back and forth gains nothing.
       insert into sessions (user_id, organisation_id, version, device, idle_hours, started_at, expires_at)
         select u.id, m.organisation_id, u.session_version, left_one.device, p_idle_hours, left_one.started_at,
           left_one.started_at + make_interval(hours => p_hours)
         from users u join memberships m on m.user_id = u.id and m.accepted_at is not null and m.disabled_at is null
         where u.id = left_one.user_id and u.session_version = left_one.version and u.disabled_at is null
           and m.organisation_id = p_organisation and left_one.started_at + make_interval(hours => p_hours) > now()
         returning id into made;
       if found then update sessions set ended_at = now() where id = p_session; end if;
       return made;
     end $$;

ALTER FUNCTION guarded.switch_session(p_session uuid, p_organisation uuid, p_hours integer, p_idle_hours integer) OWNER TO keeper;

CREATE FUNCTION guarded.use_link(p_token_hash text, p_password_hash text) RETURNS text
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ declare link single_use_links; owner users; invited memberships;
     begin
       perform 1 from memberships m join single_use_links l
         on l.user_id = m.user_id and l.organisation_id = m.organisation_id
       where l.token_hash = p_token_hash for update of m;
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
           and m.accepted_at is null and m.disabled_at is null returning m.* into invited;
         if not found then return null; end if;
       end if;
       -- Whoever still holds an older mail cannot set the password again.
       update single_use_links l set used_at = now()
         where l.user_id = owner.id and l.used_at is null and (l.id = link.id or l.purpose = 'reset');
       update users u set password_hash = p_password_hash, session_version = u.session_version + 1,
         name = coalesce(invited.invited_name, u.name) where u.id = owner.id;
       return owner.email;
     end $$;

ALTER FUNCTION guarded.use_link(p_token_hash text, p_password_hash text) OWNER TO keeper;

CREATE FUNCTION guarded.waiting_queries() RETURNS TABLE(query_id uuid, asked_on text, lapses_on text, today text, reminders_sent integer)
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'pg_catalog', 'public', 'pg_temp'
    AS $$ begin
     return query select q.id, (q.asked_at at time zone o.time_zone)::date::text, c.query_lapses_on::text,
  (now() at time zone o.time_zone)::date::text, q.reminders_sent from claims c join claim_queries q on q.claim_id = c.id and q.answered_at is null
  join organisations o on o.id = c.workshop_id where c.state = 'answerNeeded' and c.query_lapses_on is not null order by c.query_lapses_on, q.id;
   end $$;

ALTER FUNCTION guarded.waiting_queries() OWNER TO keeper;

CREATE TABLE public.audit_log (
    organisation_id uuid NOT NULL,
    seq bigint NOT NULL,
    at timestamp with time zone DEFAULT now() NOT NULL,
    actor_id uuid,
    action text NOT NULL,
    detail jsonb DEFAULT '{}'::jsonb NOT NULL,
    request_id text,
    prev_hash text NOT NULL,
    hash text NOT NULL
);

ALTER TABLE ONLY public.audit_log FORCE ROW LEVEL SECURITY;

ALTER TABLE public.audit_log OWNER TO partproof_owner;

CREATE FUNCTION public.audit_text(entry public.audit_log) RETURNS text
    LANGUAGE sql STABLE
    AS $$
    select jsonb_build_array(entry.prev_hash, entry.organisation_id, entry.seq,
      to_char(entry.at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US'), entry.actor_id, entry.action, entry.detail,
      entry.request_id)::text $$;

ALTER FUNCTION public.audit_text(entry public.audit_log) OWNER TO partproof_owner;

CREATE FUNCTION public.check_claim_move() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
    begin
      if new.state <> old.state and not exists
        (select 1 from public.claim_moves where from_state = old.state and to_state = new.state) then
        raise exception 'a claim does not go from % to %', old.state, new.state using errcode = 'PP003';
      end if;
      if new.revision < old.revision or (new.seller_id, new.workshop_id, new.number, new.created_at)
          is distinct from (old.seller_id, old.workshop_id, old.number, old.created_at) then
        raise exception 'the identity of a claim never changes' using errcode = 'PP003';
      end if;
      return new;
    end $$;

ALTER FUNCTION public.check_claim_move() OWNER TO partproof_owner;

CREATE FUNCTION public.check_counter() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
    declare note credit_notes;
    begin
      if new.kind = 'credit' then return null; end if;
      perform pg_advisory_xact_lock(hashtextextended(new.counters_id::text, 11));
      select * into note from public.credit_notes n where n.id = new.counters_id;
      if note.kind <> 'credit' or (note.currency, note.net_minor, note.tax_minor, note.claim_id)
          is distinct from (new.currency, new.net_minor, new.tax_minor, new.claim_id)
        or (select coalesce(sum(a.amount_minor), 0) from public.credit_allocations a where a.note_id = note.id) <> 0 then
        raise exception 'only an open note is countered, and whole' using errcode = 'PP003';
      end if;
      return null;
    end $$;

ALTER FUNCTION public.check_counter() OWNER TO partproof_owner;

CREATE FUNCTION public.check_ledger_sum() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
    begin
      if not exists (select 1 from public.ledger_postings p where p.seller_id = new.seller_id and p.sequence = new.sequence)
        or exists (select 1 from public.ledger_postings p where p.seller_id = new.seller_id and p.sequence = new.sequence
          group by p.currency having sum(p.amount_minor) <> 0) then
        raise exception 'the postings of an entry sum to nothing' using errcode = 'PP003';
      end if;
      return null;
    end $$;

ALTER FUNCTION public.check_ledger_sum() OWNER TO partproof_owner;

CREATE FUNCTION public.ctx_actor() RETURNS uuid
    LANGUAGE sql STABLE
    AS $$ select nullif(current_setting('app.actor_id', true), '')::uuid $$;

ALTER FUNCTION public.ctx_actor() OWNER TO partproof_owner;

CREATE FUNCTION public.ctx_org() RETURNS uuid
    LANGUAGE sql STABLE
    AS $$ select nullif(current_setting('app.organisation_id', true), '')::uuid $$;

ALTER FUNCTION public.ctx_org() OWNER TO partproof_owner;

CREATE FUNCTION public.keep_allocations() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
    declare note credit_notes; allocated bigint; taken credit_allocations;
    begin
      perform pg_advisory_xact_lock(hashtextextended(new.note_id::text, 11));
      select * into note from public.credit_notes n where n.id = new.note_id;
      select coalesce(sum(a.amount_minor), 0) into allocated from public.credit_allocations a where a.note_id = new.note_id;
      if note.kind <> 'credit' or allocated < 0 or allocated > note.total_minor
        or exists (select 1 from public.credit_notes c where c.counters_id = note.id) then
        raise exception 'more than the note is allocated' using errcode = 'PP003';
      end if;
      if new.takes_back_id is not null then
        select * into taken from public.credit_allocations a where a.id = new.takes_back_id;
        if taken.note_id <> new.note_id or taken.amount_minor <> -new.amount_minor then
          raise exception 'an allocation is taken back whole' using errcode = 'PP003';
        end if;
      end if;
      return null;
    end $$;

ALTER FUNCTION public.keep_allocations() OWNER TO partproof_owner;

CREATE FUNCTION public.keep_claim_line() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
    begin
      if (new.id, new.claim_id, new.seller_id, new.workshop_id, new.line_number)
          is distinct from (old.id, old.claim_id, old.seller_id, old.workshop_id, old.line_number) then
        raise exception 'the identity of a line never changes' using errcode = 'PP003';
      end if;
      if new.holds_unit and current_user <> 'keeper' and (not old.holds_unit or new.unit_id is distinct from old.unit_id) then
        raise exception 'a unit is held through guarded.hold_unit' using errcode = 'PP003';
      end if;
      return new;
    end $$;

ALTER FUNCTION public.keep_claim_line() OWNER TO partproof_owner;

CREATE FUNCTION public.keep_evidence() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
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

ALTER FUNCTION public.keep_evidence() OWNER TO partproof_owner;

CREATE FUNCTION public.keep_outbox() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
    begin
      if (new.kind, new.recipient, new.params, new.dedupe_key) is distinct from (old.kind, old.recipient, old.params, old.dedupe_key)
        or (old.sent_at is not null and new.sent_at is distinct from old.sent_at) then
        raise exception 'a mail in the outbox is not rewritten' using errcode = 'PP001';
      end if;
      return new;
    end $$;

ALTER FUNCTION public.keep_outbox() OWNER TO partproof_owner;

CREATE FUNCTION public.keep_series() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
    begin
      if (new.seller_id, new.year, new.prefix) is distinct from (old.seller_id, old.year, old.prefix)
        or new.last_sequence <> old.last_sequence + 1 or new.last_issued_on is null or new.last_issued_on < old.last_issued_on then
        raise exception 'numbers of credit notes follow each other' using errcode = 'PP003';
      end if;
      return new;
    end $$;

ALTER FUNCTION public.keep_series() OWNER TO partproof_owner;

CREATE FUNCTION public.refuse_change() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
    begin raise exception 'rows of % are written once', tg_table_name using errcode = 'PP001'; end $$;

ALTER FUNCTION public.refuse_change() OWNER TO partproof_owner;

CREATE TABLE public.timeline_entries (
    claim_id uuid NOT NULL,
    seq integer NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    kind text NOT NULL,
    actor_id uuid,
    actor_name text NOT NULL,
    actor_organisation_id uuid,
    only_for_id uuid,
    detail jsonb DEFAULT '{}'::jsonb NOT NULL,
    at timestamp with time zone DEFAULT now() NOT NULL,
    prev_hash text NOT NULL,
    hash text NOT NULL
);

ALTER TABLE ONLY public.timeline_entries FORCE ROW LEVEL SECURITY;

ALTER TABLE public.timeline_entries OWNER TO partproof_owner;

CREATE FUNCTION public.timeline_text(entry public.timeline_entries) RETURNS text
    LANGUAGE sql STABLE
    AS $$
    select jsonb_build_array(entry.prev_hash, entry.claim_id, entry.seq,
      to_char(entry.at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US'), entry.kind, entry.actor_id, entry.actor_name,
      entry.actor_organisation_id, entry.only_for_id, entry.detail)::text $$;

ALTER FUNCTION public.timeline_text(entry public.timeline_entries) OWNER TO partproof_owner;

CREATE FUNCTION public.touch_row() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
    begin new.lock_version := old.lock_version + 1; new.updated_at := now(); return new; end $$;

ALTER FUNCTION public.touch_row() OWNER TO partproof_owner;

CREATE TABLE public.alerts (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    organisation_id uuid NOT NULL,
    user_id uuid NOT NULL,
    kind text NOT NULL,
    claim_number text NOT NULL,
    dedupe_key text NOT NULL,
    params jsonb NOT NULL,
    at timestamp with time zone DEFAULT now() NOT NULL,
    read_at timestamp with time zone,
    CONSTRAINT alerts_claim_number_check CHECK ((claim_number ~ '^[0-9]{8}$'::text)),
    CONSTRAINT alerts_kind_check CHECK (((length(kind) >= 1) AND (length(kind) <= 60)))
);

ALTER TABLE ONLY public.alerts FORCE ROW LEVEL SECURITY;

ALTER TABLE public.alerts OWNER TO partproof_owner;

CREATE TABLE public.audit_heads (
    organisation_id uuid NOT NULL,
    seq bigint DEFAULT 0 NOT NULL,
    hash text DEFAULT ''::text NOT NULL
);

ALTER TABLE ONLY public.audit_heads FORCE ROW LEVEL SECURITY;

ALTER TABLE public.audit_heads OWNER TO partproof_owner;

CREATE TABLE public.batches (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    seller_id uuid NOT NULL,
    part_id uuid NOT NULL,
    code text NOT NULL,
    made_on date
);

ALTER TABLE ONLY public.batches FORCE ROW LEVEL SECURITY;

ALTER TABLE public.batches OWNER TO partproof_owner;

CREATE TABLE public.claim_drafts (
    claim_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    body jsonb DEFAULT '{}'::jsonb NOT NULL,
    saved_at timestamp with time zone DEFAULT now() NOT NULL
);

ALTER TABLE ONLY public.claim_drafts FORCE ROW LEVEL SECURITY;

ALTER TABLE public.claim_drafts OWNER TO partproof_owner;

CREATE TABLE public.claim_flags (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    claim_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    line_number integer,
    kind text NOT NULL,
    detail jsonb DEFAULT '{}'::jsonb NOT NULL,
    at timestamp with time zone DEFAULT now() NOT NULL
);

ALTER TABLE ONLY public.claim_flags FORCE ROW LEVEL SECURITY;

ALTER TABLE public.claim_flags OWNER TO partproof_owner;

CREATE TABLE public.claim_lines (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    claim_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    line_number integer NOT NULL,
    part_id uuid NOT NULL,
    unit_id uuid,
    invoice_line_id uuid,
    quantity integer DEFAULT 1 NOT NULL,
    serial_typed text,
    fitting_id uuid,
    holds_unit boolean DEFAULT false NOT NULL,
    asked_minor bigint DEFAULT 0 NOT NULL,
    verdict text,
    attribution jsonb,
    return_state text DEFAULT 'notNeeded'::text NOT NULL,
    return_waived_reason text,
    credit_state text DEFAULT 'none'::text NOT NULL,
    CONSTRAINT claim_lines_asked_minor_check CHECK ((asked_minor >= 0)),
    CONSTRAINT claim_lines_check CHECK (((NOT holds_unit) OR (unit_id IS NOT NULL))),
    CONSTRAINT claim_lines_credit_state_check CHECK ((credit_state = ANY (ARRAY['none'::text, 'due'::text, 'noteIssued'::text, 'allocated'::text, 'paidOut'::text, 'replaced'::text, 'countered'::text]))),
    CONSTRAINT claim_lines_line_number_check CHECK ((line_number > 0)),
    CONSTRAINT claim_lines_quantity_check CHECK ((quantity > 0)),
    CONSTRAINT claim_lines_return_state_check CHECK ((return_state = ANY (ARRAY['notNeeded'::text, 'awaited'::text, 'sent'::text, 'received'::text, 'examined'::text, 'disposed'::text, 'scrapOnSite'::text, 'notSentInTime'::text, 'missing'::text]))),
    CONSTRAINT claim_lines_verdict_check CHECK ((verdict = ANY (ARRAY['upheld'::text, 'upheldInPart'::text, 'declined'::text])))
);

ALTER TABLE ONLY public.claim_lines FORCE ROW LEVEL SECURITY;

ALTER TABLE public.claim_lines OWNER TO partproof_owner;

CREATE TABLE public.claim_messages (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    claim_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    author_id uuid NOT NULL,
    author_name text NOT NULL,
    author_organisation_id uuid NOT NULL,
    audience text NOT NULL,
    body text NOT NULL,
    at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT claim_messages_audience_check CHECK ((audience = ANY (ARRAY['both'::text, 'own'::text]))),
    CONSTRAINT claim_messages_body_check CHECK (((length(body) >= 1) AND (length(body) <= 4000)))
);

ALTER TABLE ONLY public.claim_messages FORCE ROW LEVEL SECURITY;

ALTER TABLE public.claim_messages OWNER TO partproof_owner;

CREATE TABLE public.claim_moves (
    from_state text NOT NULL,
    to_state text NOT NULL
);

ALTER TABLE public.claim_moves OWNER TO partproof_owner;

CREATE TABLE public.claim_queries (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    claim_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    round integer NOT NULL,
    items jsonb NOT NULL,
    question text NOT NULL,
    asked_by_id uuid NOT NULL,
    asked_at timestamp with time zone DEFAULT now() NOT NULL,
    answered_at timestamp with time zone,
    answered_revision integer,
    reminders_sent integer DEFAULT 0 NOT NULL,
    CONSTRAINT claim_queries_question_check CHECK ((length(question) <= 4000)),
    CONSTRAINT claim_queries_reminders_sent_check CHECK (((reminders_sent >= 0) AND (reminders_sent <= 2))),
    CONSTRAINT claim_queries_round_check CHECK ((round > 0))
);

ALTER TABLE ONLY public.claim_queries FORCE ROW LEVEL SECURITY;

ALTER TABLE public.claim_queries OWNER TO partproof_owner;

CREATE TABLE public.claim_revisions (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    claim_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    revision integer NOT NULL,
    facts jsonb NOT NULL,
    sha256 text NOT NULL,
    sent_by_id uuid NOT NULL,
    sent_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT claim_revisions_revision_check CHECK ((revision > 0)),
    CONSTRAINT claim_revisions_sha256_check CHECK ((length(sha256) = 64))
);

ALTER TABLE ONLY public.claim_revisions FORCE ROW LEVEL SECURITY;

ALTER TABLE public.claim_revisions OWNER TO partproof_owner;

CREATE TABLE public.claims (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    number text NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    account_id uuid NOT NULL,
    site_id uuid,
    state text DEFAULT 'draft'::text NOT NULL,
    outcome text,
    family text,
    symptom text,
    vehicle_id uuid,
    failed_on date,
    currency character(3) NOT NULL,
    asked_minor bigint DEFAULT 0 NOT NULL,
    safety_reported boolean DEFAULT false NOT NULL,
    incident_known_at timestamp with time zone,
    revision integer DEFAULT 0 NOT NULL,
    created_by_id uuid NOT NULL,
    holder_id uuid,
    held_until timestamp with time zone,
    parked_with_id uuid,
    parked_question text,
    filed_at timestamp with time zone,
    filed_on date,
    answer_due_at timestamp with time zone,
    clock_stopped_at timestamp with time zone,
    clock_stopped_minutes integer DEFAULT 0 NOT NULL,
    query_lapses_on date,
    decided_at timestamp with time zone,
    decided_by_id uuid,
    contest_until date,
    lock_version integer DEFAULT 0 NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    updated_at timestamp with time zone DEFAULT now() NOT NULL,
    contest_waived_at timestamp with time zone,
    CONSTRAINT claims_asked_minor_check CHECK ((asked_minor >= 0)),
    CONSTRAINT claims_check CHECK (((state = ANY (ARRAY['draft'::text, 'discarded'::text])) OR ((filed_at IS NOT NULL) AND (revision > 0) AND (failed_on IS NOT NULL)))),
    CONSTRAINT claims_check1 CHECK (((state <> ALL (ARRAY['decided'::text, 'contested'::text, 'settled'::text])) OR ((decided_at IS NOT NULL) AND (outcome IS NOT NULL)))),
    CONSTRAINT claims_check2 CHECK (((failed_on IS NULL) OR (filed_on IS NULL) OR (failed_on <= filed_on))),
    CONSTRAINT claims_number_check CHECK ((number ~ '^[0-9]{8}$'::text)),
    CONSTRAINT claims_outcome_check CHECK ((outcome = ANY (ARRAY['upheld'::text, 'upheldInPart'::text, 'declined'::text]))),
    CONSTRAINT claims_revision_check CHECK ((revision >= 0)),
    CONSTRAINT claims_state_check CHECK ((state = ANY (ARRAY['draft'::text, 'filed'::text, 'beingJudged'::text, 'answerNeeded'::text, 'decided'::text, 'contested'::text, 'settled'::text, 'withdrawn'::text, 'lapsed'::text, 'discarded'::text])))
);

ALTER TABLE ONLY public.claims FORCE ROW LEVEL SECURITY;

ALTER TABLE public.claims OWNER TO partproof_owner;

CREATE TABLE public.credit_allocations (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    note_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    amount_minor bigint NOT NULL,
    how text NOT NULL,
    reference text NOT NULL,
    allocated_on date NOT NULL,
    takes_back_id uuid,
    allocated_by_id uuid NOT NULL,
    allocated_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT credit_allocations_amount_minor_check CHECK ((amount_minor <> 0)),
    CONSTRAINT credit_allocations_check CHECK (((amount_minor < 0) = (takes_back_id IS NOT NULL))),
    CONSTRAINT credit_allocations_how_check CHECK ((how = ANY (ARRAY['invoice'::text, 'paidOut'::text]))),
    CONSTRAINT credit_allocations_reference_check CHECK (((length(reference) >= 1) AND (length(reference) <= 80)))
);

ALTER TABLE ONLY public.credit_allocations FORCE ROW LEVEL SECURITY;

ALTER TABLE public.credit_allocations OWNER TO partproof_owner;

CREATE TABLE public.credit_note_lines (
    note_id uuid NOT NULL,
    "position" integer NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    line_id uuid NOT NULL,
    invoice_line_id uuid,
    kind text NOT NULL,
    net_minor bigint NOT NULL,
    tax_category text NOT NULL,
    tax_rate numeric(6,3) NOT NULL,
    exemption_reason text,
    CONSTRAINT credit_note_lines_kind_check CHECK ((kind = ANY (ARRAY['part'::text, 'labour'::text, 'diagnosis'::text, 'consumables'::text, 'carriage'::text]))),
    CONSTRAINT credit_note_lines_net_minor_check CHECK ((net_minor >= 0)),
    CONSTRAINT credit_note_lines_position_check CHECK (("position" > 0)),
    CONSTRAINT credit_note_lines_tax_category_check CHECK ((tax_category = ANY (ARRAY['S'::text, 'Z'::text, 'E'::text, 'AE'::text, 'K'::text, 'G'::text, 'O'::text]))),
    CONSTRAINT credit_note_lines_tax_rate_check CHECK (((tax_rate >= (0)::numeric) AND (tax_rate < (100)::numeric)))
);

ALTER TABLE ONLY public.credit_note_lines FORCE ROW LEVEL SECURITY;

ALTER TABLE public.credit_note_lines OWNER TO partproof_owner;

CREATE TABLE public.credit_note_series (
    seller_id uuid NOT NULL,
    year integer NOT NULL,
    prefix text NOT NULL,
    last_sequence integer DEFAULT 0 NOT NULL,
    last_issued_on date,
    CONSTRAINT credit_note_series_last_sequence_check CHECK ((last_sequence >= 0)),
    CONSTRAINT credit_note_series_prefix_check CHECK ((length(prefix) <= 8)),
    CONSTRAINT credit_note_series_year_check CHECK (((year >= 2000) AND (year <= 2999)))
);

ALTER TABLE ONLY public.credit_note_series FORCE ROW LEVEL SECURITY;

ALTER TABLE public.credit_note_series OWNER TO partproof_owner;

CREATE TABLE public.credit_notes (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    account_id uuid NOT NULL,
    claim_id uuid NOT NULL,
    verdict_id uuid NOT NULL,
    kind text NOT NULL,
    year integer NOT NULL,
    sequence integer NOT NULL,
    number text NOT NULL,
    issued_on date NOT NULL,
    currency character(3) NOT NULL,
    net_minor bigint NOT NULL,
    tax_minor bigint NOT NULL,
    total_minor bigint NOT NULL,
    document jsonb NOT NULL,
    counters_id uuid,
    reason text,
    issued_by_id uuid NOT NULL,
    issued_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT credit_notes_check CHECK ((EXTRACT(year FROM issued_on) = (year)::numeric)),
    CONSTRAINT credit_notes_check1 CHECK ((total_minor = (net_minor + tax_minor))),
    CONSTRAINT credit_notes_check2 CHECK (((kind = 'counter'::text) = (counters_id IS NOT NULL))),
    CONSTRAINT credit_notes_check3 CHECK (((kind = 'counter'::text) = (reason IS NOT NULL))),
    CONSTRAINT credit_notes_kind_check CHECK ((kind = ANY (ARRAY['credit'::text, 'counter'::text]))),
    CONSTRAINT credit_notes_net_minor_check CHECK ((net_minor >= 0)),
    CONSTRAINT credit_notes_reason_check CHECK (((length(reason) >= 1) AND (length(reason) <= 1000))),
    CONSTRAINT credit_notes_sequence_check CHECK ((sequence > 0)),
    CONSTRAINT credit_notes_tax_minor_check CHECK ((tax_minor >= 0))
);

ALTER TABLE ONLY public.credit_notes FORCE ROW LEVEL SECURITY;

ALTER TABLE public.credit_notes OWNER TO partproof_owner;

CREATE TABLE public.evidence_files (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    claim_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    row_id text NOT NULL,
    kind text NOT NULL,
    media_type text NOT NULL,
    original_name text NOT NULL,
    size_bytes bigint NOT NULL,
    sha256 text NOT NULL,
    object_key text NOT NULL,
    view_key text,
    view_state text DEFAULT 'waiting'::text NOT NULL,
    width_px integer,
    height_px integer,
    captured jsonb DEFAULT '{}'::jsonb NOT NULL,
    summary jsonb,
    uploaded_by_id uuid NOT NULL,
    received_at timestamp with time zone DEFAULT now() NOT NULL,
    withdrawn_at timestamp with time zone,
    taken_by text DEFAULT 'workshop'::text NOT NULL,
    CONSTRAINT evidence_files_kind_check CHECK ((kind = ANY (ARRAY['photo'::text, 'runLog'::text, 'document'::text]))),
    CONSTRAINT evidence_files_media_type_check CHECK ((media_type = ANY (ARRAY['image/jpeg'::text, 'image/png'::text, 'image/webp'::text, 'application/pdf'::text, 'text/csv'::text, 'text/plain'::text]))),
    CONSTRAINT evidence_files_original_name_check CHECK ((length(original_name) <= 200)),
    CONSTRAINT evidence_files_sha256_check CHECK ((sha256 ~ '^[0-9a-f]{64}$'::text)),
    CONSTRAINT evidence_files_size_bytes_check CHECK (((size_bytes > 0) AND (size_bytes <= 26214400))),
    CONSTRAINT evidence_files_taken_by_check CHECK ((taken_by = ANY (ARRAY['workshop'::text, 'goodsIn'::text]))),
    CONSTRAINT evidence_files_view_state_check CHECK ((view_state = ANY (ARRAY['waiting'::text, 'ready'::text, 'unreadable'::text, 'notNeeded'::text])))
);

ALTER TABLE ONLY public.evidence_files FORCE ROW LEVEL SECURITY;

ALTER TABLE public.evidence_files OWNER TO partproof_owner;

CREATE TABLE public.findings (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    claim_id uuid NOT NULL,
    line_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    kind text NOT NULL,
    note text NOT NULL,
    run_minutes numeric(6,2),
    evidence_id uuid,
    bench jsonb DEFAULT '[]'::jsonb NOT NULL,
    found_by_id uuid NOT NULL,
    found_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT findings_kind_check CHECK ((kind = ANY (ARRAY['faultConfirmed'::text, 'otherFault'::text, 'noFaultFound'::text, 'notTheUnit'::text, 'damagedOnTheWay'::text, 'notTestable'::text]))),
    CONSTRAINT findings_note_check CHECK (((length(note) >= 1) AND (length(note) <= 4000))),
    CONSTRAINT findings_run_minutes_check CHECK ((run_minutes >= (0)::numeric))
);

ALTER TABLE ONLY public.findings FORCE ROW LEVEL SECURITY;

ALTER TABLE public.findings OWNER TO partproof_owner;

CREATE TABLE public.fittings (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    unit_id uuid NOT NULL,
    vehicle_id uuid,
    "position" text DEFAULT 'single'::text NOT NULL,
    fitted_on date NOT NULL,
    removed_on date,
    installer_id uuid,
    CONSTRAINT fittings_check CHECK (((removed_on IS NULL) OR (removed_on >= fitted_on))),
    CONSTRAINT fittings_position_check CHECK (("position" = ANY (ARRAY['left'::text, 'right'::text, 'single'::text])))
);

ALTER TABLE ONLY public.fittings FORCE ROW LEVEL SECURITY;

ALTER TABLE public.fittings OWNER TO partproof_owner;

CREATE TABLE public.idempotency_keys (
    organisation_id uuid NOT NULL,
    route text NOT NULL,
    key text NOT NULL,
    fingerprint text NOT NULL,
    status integer,
    response jsonb,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT idempotency_keys_key_check CHECK (((length(key) >= 8) AND (length(key) <= 200)))
);

ALTER TABLE ONLY public.idempotency_keys FORCE ROW LEVEL SECURITY;

ALTER TABLE public.idempotency_keys OWNER TO partproof_owner;

CREATE TABLE public.installers (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    workshop_id uuid NOT NULL,
    name text NOT NULL,
    code text NOT NULL,
    left_on date
);

ALTER TABLE ONLY public.installers FORCE ROW LEVEL SECURITY;

ALTER TABLE public.installers OWNER TO partproof_owner;

CREATE TABLE public.invoice_imports (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    seller_id uuid NOT NULL,
    sha256 text NOT NULL,
    file_name text NOT NULL,
    object_key text NOT NULL,
    mapping jsonb DEFAULT '{}'::jsonb NOT NULL,
    state text DEFAULT 'previewed'::text NOT NULL,
    line_count integer DEFAULT 0 NOT NULL,
    created_by_id uuid NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    imported_at timestamp with time zone,
    CONSTRAINT invoice_imports_file_name_check CHECK ((length(file_name) <= 200)),
    CONSTRAINT invoice_imports_sha256_check CHECK ((sha256 ~ '^[0-9a-f]{64}$'::text)),
    CONSTRAINT invoice_imports_state_check CHECK ((state = ANY (ARRAY['previewed'::text, 'imported'::text])))
);

ALTER TABLE ONLY public.invoice_imports FORCE ROW LEVEL SECURITY;

ALTER TABLE public.invoice_imports OWNER TO partproof_owner;

CREATE TABLE public.invoice_lines (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    seller_id uuid NOT NULL,
    buyer_id uuid NOT NULL,
    account_id uuid NOT NULL,
    site_id uuid,
    invoice_number text NOT NULL,
    line_number integer NOT NULL,
    invoiced_on date NOT NULL,
    shipped_on date NOT NULL,
    part_id uuid NOT NULL,
    quantity integer NOT NULL,
    unit_price_minor bigint NOT NULL,
    currency character(3) NOT NULL,
    tax_category text NOT NULL,
    tax_rate numeric(6,3) NOT NULL,
    exemption_reason text,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT invoice_lines_check CHECK (((tax_category = 'S'::text) = (tax_rate > (0)::numeric))),
    CONSTRAINT invoice_lines_check1 CHECK (((tax_category = ANY (ARRAY['S'::text, 'Z'::text])) OR (exemption_reason IS NOT NULL))),
    CONSTRAINT invoice_lines_line_number_check CHECK ((line_number > 0)),
    CONSTRAINT invoice_lines_quantity_check CHECK ((quantity > 0)),
    CONSTRAINT invoice_lines_tax_category_check CHECK ((tax_category = ANY (ARRAY['S'::text, 'Z'::text, 'E'::text, 'AE'::text, 'K'::text, 'G'::text, 'O'::text]))),
    CONSTRAINT invoice_lines_tax_rate_check CHECK (((tax_rate >= (0)::numeric) AND (tax_rate < (100)::numeric))),
    CONSTRAINT invoice_lines_unit_price_minor_check CHECK ((unit_price_minor >= 0))
);

ALTER TABLE ONLY public.invoice_lines FORCE ROW LEVEL SECURITY;

ALTER TABLE public.invoice_lines OWNER TO partproof_owner;

CREATE TABLE public.ledger_entries (
    seller_id uuid NOT NULL,
    sequence bigint NOT NULL,
    workshop_id uuid NOT NULL,
    kind text NOT NULL,
    entry_on date NOT NULL,
    note_id uuid NOT NULL,
    allocation_id uuid,
    counters_sequence bigint,
    entered_by_id uuid NOT NULL,
    entered_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT ledger_entries_check CHECK (((kind = ANY (ARRAY['allocated'::text, 'allocationTakenBack'::text])) = (allocation_id IS NOT NULL))),
    CONSTRAINT ledger_entries_check1 CHECK (((kind = ANY (ARRAY['noteCountered'::text, 'allocationTakenBack'::text])) = (counters_sequence IS NOT NULL))),
    CONSTRAINT ledger_entries_kind_check CHECK ((kind = ANY (ARRAY['noteIssued'::text, 'noteCountered'::text, 'allocated'::text, 'allocationTakenBack'::text])))
);

ALTER TABLE ONLY public.ledger_entries FORCE ROW LEVEL SECURITY;

ALTER TABLE public.ledger_entries OWNER TO partproof_owner;

CREATE TABLE public.ledger_heads (
    seller_id uuid NOT NULL,
    sequence bigint DEFAULT 0 NOT NULL
);

ALTER TABLE ONLY public.ledger_heads FORCE ROW LEVEL SECURITY;

ALTER TABLE public.ledger_heads OWNER TO partproof_owner;

CREATE TABLE public.ledger_postings (
    seller_id uuid NOT NULL,
    sequence bigint NOT NULL,
    "position" integer NOT NULL,
    account text NOT NULL,
    amount_minor bigint NOT NULL,
    currency character(3) NOT NULL,
    CONSTRAINT ledger_postings_account_check CHECK ((account = ANY (ARRAY['claimsExpense'::text, 'tax'::text, 'workshopPayable'::text, 'receivable'::text, 'bank'::text]))),
    CONSTRAINT ledger_postings_amount_minor_check CHECK ((amount_minor <> 0)),
    CONSTRAINT ledger_postings_position_check CHECK (("position" > 0))
);

ALTER TABLE ONLY public.ledger_postings FORCE ROW LEVEL SECURITY;

ALTER TABLE public.ledger_postings OWNER TO partproof_owner;

CREATE TABLE public.login_attempts (
    id bigint NOT NULL,
    key_hash text NOT NULL,
    at timestamp with time zone DEFAULT now() NOT NULL
);

ALTER TABLE ONLY public.login_attempts FORCE ROW LEVEL SECURITY;

ALTER TABLE public.login_attempts OWNER TO partproof_owner;

ALTER TABLE public.login_attempts ALTER COLUMN id ADD GENERATED ALWAYS AS IDENTITY (
    SEQUENCE NAME public.login_attempts_id_seq
    START WITH 1
    INCREMENT BY 1
    NO MINVALUE
    NO MAXVALUE
    CACHE 1
);

CREATE TABLE public.makers (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    seller_id uuid NOT NULL,
    name text NOT NULL
);

ALTER TABLE ONLY public.makers FORCE ROW LEVEL SECURITY;

ALTER TABLE public.makers OWNER TO partproof_owner;

CREATE TABLE public.membership_roles (
    organisation_id uuid NOT NULL,
    user_id uuid NOT NULL,
    role text NOT NULL,
    CONSTRAINT membership_roles_role_check CHECK ((role = ANY (ARRAY['technician'::text, 'workshopManager'::text, 'assessor'::text, 'goodsIn'::text, 'accounts'::text, 'analyst'::text, 'administrator'::text])))
);

ALTER TABLE ONLY public.membership_roles FORCE ROW LEVEL SECURITY;

ALTER TABLE public.membership_roles OWNER TO partproof_owner;

CREATE TABLE public.memberships (
    user_id uuid NOT NULL,
    organisation_id uuid NOT NULL,
    invited_name text,
    invited_email text,
    accepted_at timestamp with time zone,
    disabled_at timestamp with time zone,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT memberships_check CHECK (((accepted_at IS NOT NULL) OR ((invited_name IS NOT NULL) AND (invited_email IS NOT NULL)))),
    CONSTRAINT memberships_invited_name_check CHECK (((length(invited_name) >= 1) AND (length(invited_name) <= 120)))
);

ALTER TABLE ONLY public.memberships FORCE ROW LEVEL SECURITY;

ALTER TABLE public.memberships OWNER TO partproof_owner;

CREATE TABLE public.organisations (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    name text NOT NULL,
    legal_name text NOT NULL,
    sells boolean DEFAULT false NOT NULL,
    buys boolean DEFAULT false NOT NULL,
    address text DEFAULT ''::text NOT NULL,
    country character(2) NOT NULL,
    tax_number text,
    currency character(3) NOT NULL,
    time_zone text NOT NULL,
    languages text[] DEFAULT '{en}'::text[] NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT organisations_check CHECK ((sells OR buys)),
    CONSTRAINT organisations_name_check CHECK (((length(name) >= 1) AND (length(name) <= 120)))
);

ALTER TABLE ONLY public.organisations FORCE ROW LEVEL SECURITY;

ALTER TABLE public.organisations OWNER TO partproof_owner;

CREATE TABLE public.outbox (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    organisation_id uuid,
    kind text NOT NULL,
    dedupe_key text NOT NULL,
    recipient text NOT NULL,
    locale text NOT NULL,
    params jsonb NOT NULL,
    request_id text,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    not_before timestamp with time zone DEFAULT now() NOT NULL,
    sent_at timestamp with time zone,
    tries integer DEFAULT 0 NOT NULL,
    parked_at timestamp with time zone,
    last_fault text
);

ALTER TABLE ONLY public.outbox FORCE ROW LEVEL SECURITY;

ALTER TABLE public.outbox OWNER TO partproof_owner;

CREATE TABLE public.parcels (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    seller_id uuid NOT NULL,
    return_id uuid,
    arrived_at timestamp with time zone DEFAULT now() NOT NULL,
    received_by_id uuid NOT NULL,
    number_written text DEFAULT ''::text NOT NULL,
    sender_written text DEFAULT ''::text NOT NULL,
    part_written text DEFAULT ''::text NOT NULL,
    serial_written text DEFAULT ''::text NOT NULL,
    condition text DEFAULT 'sound'::text NOT NULL,
    note text DEFAULT ''::text NOT NULL,
    matched_at timestamp with time zone,
    matched_by_id uuid,
    CONSTRAINT parcels_check CHECK (((return_id IS NULL) = (matched_at IS NULL))),
    CONSTRAINT parcels_condition_check CHECK ((condition = ANY (ARRAY['sound'::text, 'damaged'::text, 'wet'::text, 'leaking'::text]))),
    CONSTRAINT parcels_note_check CHECK ((length(note) <= 1000)),
    CONSTRAINT parcels_number_written_check CHECK ((length(number_written) <= 80)),
    CONSTRAINT parcels_part_written_check CHECK ((length(part_written) <= 200)),
    CONSTRAINT parcels_sender_written_check CHECK ((length(sender_written) <= 200)),
    CONSTRAINT parcels_serial_written_check CHECK ((length(serial_written) <= 80))
);

ALTER TABLE ONLY public.parcels FORCE ROW LEVEL SECURITY;

ALTER TABLE public.parcels OWNER TO partproof_owner;

CREATE TABLE public.part_returns (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    number text NOT NULL,
    claim_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    send_to text NOT NULL,
    instructions text DEFAULT ''::text NOT NULL,
    due_on date NOT NULL,
    called_in_by_id uuid NOT NULL,
    called_in_at timestamp with time zone DEFAULT now() NOT NULL,
    dispatched_at timestamp with time zone,
    dispatched_by_id uuid,
    carrier text,
    tracking_number text,
    CONSTRAINT part_returns_carrier_check CHECK ((length(carrier) <= 120)),
    CONSTRAINT part_returns_check CHECK (((dispatched_at IS NULL) = (dispatched_by_id IS NULL))),
    CONSTRAINT part_returns_instructions_check CHECK ((length(instructions) <= 1000)),
    CONSTRAINT part_returns_number_check CHECK ((number ~ '^[0-9]{9}$'::text)),
    CONSTRAINT part_returns_send_to_check CHECK (((length(send_to) >= 1) AND (length(send_to) <= 400))),
    CONSTRAINT part_returns_tracking_number_check CHECK ((length(tracking_number) <= 80))
);

ALTER TABLE ONLY public.part_returns FORCE ROW LEVEL SECURITY;

ALTER TABLE public.part_returns OWNER TO partproof_owner;

CREATE TABLE public.parts (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    seller_id uuid NOT NULL,
    maker_id uuid NOT NULL,
    part_number text NOT NULL,
    name text NOT NULL,
    family text NOT NULL,
    serial_tracked boolean DEFAULT true NOT NULL,
    superseded_by_id uuid,
    rated jsonb DEFAULT '{}'::jsonb NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT parts_part_number_check CHECK (((length(part_number) >= 1) AND (length(part_number) <= 40)))
);

ALTER TABLE ONLY public.parts FORCE ROW LEVEL SECURITY;

ALTER TABLE public.parts OWNER TO partproof_owner;

CREATE TABLE public.readings (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    claim_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    revision integer NOT NULL,
    line_number integer DEFAULT 1 NOT NULL,
    kind text NOT NULL,
    raw_text text NOT NULL,
    unit text NOT NULL,
    canonical_value numeric,
    temperature_celsius numeric,
    instrument text,
    taken_by text NOT NULL,
    finding_id uuid,
    CONSTRAINT readings_check CHECK (((taken_by = 'goodsIn'::text) = (finding_id IS NOT NULL))),
    CONSTRAINT readings_taken_by_check CHECK ((taken_by = ANY (ARRAY['workshop'::text, 'goodsIn'::text])))
);

ALTER TABLE ONLY public.readings FORCE ROW LEVEL SECURITY;

ALTER TABLE public.readings OWNER TO partproof_owner;

CREATE TABLE public.return_lines (
    return_id uuid NOT NULL,
    line_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    parcel_id uuid,
    place text,
    serial_seen text,
    received_at timestamp with time zone,
    disposed_as text,
    disposed_at timestamp with time zone,
    disposed_by_id uuid,
    CONSTRAINT return_lines_check CHECK (((disposed_as IS NULL) = (disposed_at IS NULL))),
    CONSTRAINT return_lines_disposed_as_check CHECK ((disposed_as = ANY (ARRAY['kept'::text, 'scrapped'::text, 'sentToMaker'::text, 'sentBack'::text]))),
    CONSTRAINT return_lines_place_check CHECK (((length(place) >= 1) AND (length(place) <= 40))),
    CONSTRAINT return_lines_serial_seen_check CHECK ((length(serial_seen) <= 80))
);

ALTER TABLE ONLY public.return_lines FORCE ROW LEVEL SECURITY;

ALTER TABLE public.return_lines OWNER TO partproof_owner;

CREATE TABLE public.revision_evidence (
    revision_id uuid NOT NULL,
    evidence_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL
);

ALTER TABLE ONLY public.revision_evidence FORCE ROW LEVEL SECURITY;

ALTER TABLE public.revision_evidence OWNER TO partproof_owner;

CREATE TABLE public.rule_book_versions (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    seller_id uuid NOT NULL,
    kind text NOT NULL,
    family text,
    part_id uuid,
    rule_number text NOT NULL,
    title text NOT NULL,
    valid_from date NOT NULL,
    body jsonb NOT NULL,
    published_at timestamp with time zone DEFAULT now() NOT NULL,
    published_by uuid,
    CONSTRAINT rule_book_versions_kind_check CHECK ((kind = ANY (ARRAY['terms'::text, 'evidenceList'::text, 'limits'::text, 'serviceLevels'::text, 'credit'::text])))
);

ALTER TABLE ONLY public.rule_book_versions FORCE ROW LEVEL SECURITY;

ALTER TABLE public.rule_book_versions OWNER TO partproof_owner;

CREATE TABLE public.sessions (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    user_id uuid NOT NULL,
    organisation_id uuid NOT NULL,
    version integer NOT NULL,
    device text DEFAULT ''::text NOT NULL,
    idle_hours integer NOT NULL,
    started_at timestamp with time zone DEFAULT now() NOT NULL,
    last_seen_at timestamp with time zone DEFAULT now() NOT NULL,
    expires_at timestamp with time zone NOT NULL,
    ended_at timestamp with time zone
);

ALTER TABLE ONLY public.sessions FORCE ROW LEVEL SECURITY;

ALTER TABLE public.sessions OWNER TO partproof_owner;

CREATE TABLE public.single_use_links (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    user_id uuid NOT NULL,
    purpose text NOT NULL,
    organisation_id uuid,
    token_hash text NOT NULL,
    expires_at timestamp with time zone NOT NULL,
    used_at timestamp with time zone,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT single_use_links_check CHECK (((purpose = 'invitation'::text) = (organisation_id IS NOT NULL))),
    CONSTRAINT single_use_links_purpose_check CHECK ((purpose = ANY (ARRAY['invitation'::text, 'reset'::text]))),
    CONSTRAINT single_use_links_token_hash_check CHECK ((length(token_hash) = 64))
);

ALTER TABLE ONLY public.single_use_links FORCE ROW LEVEL SECURITY;

ALTER TABLE public.single_use_links OWNER TO partproof_owner;

CREATE TABLE public.sites (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    organisation_id uuid NOT NULL,
    name text NOT NULL,
    address text DEFAULT ''::text NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL
);

ALTER TABLE ONLY public.sites FORCE ROW LEVEL SECURITY;

ALTER TABLE public.sites OWNER TO partproof_owner;

CREATE TABLE public.timeline_heads (
    claim_id uuid NOT NULL,
    seq integer NOT NULL,
    hash text NOT NULL
);

ALTER TABLE ONLY public.timeline_heads FORCE ROW LEVEL SECURITY;

ALTER TABLE public.timeline_heads OWNER TO partproof_owner;

CREATE TABLE public.trading_accounts (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    seller_id uuid NOT NULL,
    buyer_id uuid NOT NULL,
    account_number text NOT NULL,
    currency character(3) NOT NULL,
    opened_on date DEFAULT CURRENT_DATE NOT NULL,
    closed_on date,
    CONSTRAINT trading_accounts_check CHECK ((seller_id <> buyer_id))
);

ALTER TABLE ONLY public.trading_accounts FORCE ROW LEVEL SECURITY;

ALTER TABLE public.trading_accounts OWNER TO partproof_owner;

CREATE TABLE public.units (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    seller_id uuid NOT NULL,
    buyer_id uuid,
    part_id uuid NOT NULL,
    batch_id uuid,
    invoice_line_id uuid,
    serial text,
    serial_normal text,
    serial_folded text GENERATED ALWAYS AS (translate(serial_normal, 'OILSB'::text, '01158'::text)) STORED,
    replaces_unit_id uuid,
    built_into_unit_id uuid,
    supplied_under_claim boolean DEFAULT false NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT units_check CHECK (((serial IS NULL) = (serial_normal IS NULL))),
    CONSTRAINT units_check1 CHECK (((invoice_line_id IS NULL) OR (buyer_id IS NOT NULL)))
);

ALTER TABLE ONLY public.units FORCE ROW LEVEL SECURITY;

ALTER TABLE public.units OWNER TO partproof_owner;

CREATE TABLE public.users (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    email text NOT NULL,
    name text NOT NULL,
    locale text DEFAULT 'en'::text NOT NULL,
    theme text DEFAULT 'system'::text NOT NULL,
    density text,
    password_hash text,
    session_version integer DEFAULT 1 NOT NULL,
    disabled_at timestamp with time zone,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT users_density_check CHECK ((density = ANY (ARRAY['shop'::text, 'office'::text, 'ledger'::text]))),
    CONSTRAINT users_email_check CHECK (((email = lower(email)) AND (email ~ '^[^@\s<>,;:"]+@[^@\s<>,;:"]+$'::text) AND (length(email) <= 254))),
    CONSTRAINT users_locale_check CHECK ((locale = ANY (ARRAY['en'::text, 'de'::text, 'long'::text]))),
    CONSTRAINT users_name_check CHECK (((length(name) >= 1) AND (length(name) <= 120))),
    CONSTRAINT users_theme_check CHECK ((theme = ANY (ARRAY['system'::text, 'light'::text, 'dark'::text])))
);

ALTER TABLE ONLY public.users FORCE ROW LEVEL SECURITY;

ALTER TABLE public.users OWNER TO partproof_owner;

CREATE TABLE public.vehicles (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    workshop_id uuid NOT NULL,
    frame_serial text NOT NULL,
    frame_serial_normal text NOT NULL,
    model text DEFAULT ''::text NOT NULL
);

ALTER TABLE ONLY public.vehicles FORCE ROW LEVEL SECURITY;

ALTER TABLE public.vehicles OWNER TO partproof_owner;

CREATE TABLE public.verdict_lines (
    verdict_id uuid NOT NULL,
    line_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    outcome text NOT NULL,
    attribution jsonb NOT NULL,
    reason_code text NOT NULL,
    reason text NOT NULL,
    rule_version_id uuid,
    coverage jsonb NOT NULL,
    return_waived_reason text,
    CONSTRAINT verdict_lines_outcome_check CHECK ((outcome = ANY (ARRAY['upheld'::text, 'upheldInPart'::text, 'declined'::text]))),
    CONSTRAINT verdict_lines_reason_check CHECK (((length(reason) >= 1) AND (length(reason) <= 4000)))
);

ALTER TABLE ONLY public.verdict_lines FORCE ROW LEVEL SECURITY;

ALTER TABLE public.verdict_lines OWNER TO partproof_owner;

CREATE TABLE public.verdicts (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    claim_id uuid NOT NULL,
    seller_id uuid NOT NULL,
    workshop_id uuid NOT NULL,
    revision integer NOT NULL,
    revision_sha256 text NOT NULL,
    outcome text NOT NULL,
    letter text NOT NULL,
    decided_by_id uuid NOT NULL,
    decided_at timestamp with time zone DEFAULT now() NOT NULL,
    reverses_id uuid,
    credit jsonb,
    credit_net_minor bigint DEFAULT 0 NOT NULL,
    credit_total_minor bigint DEFAULT 0 NOT NULL,
    CONSTRAINT verdicts_check CHECK ((credit_total_minor >= credit_net_minor)),
    CONSTRAINT verdicts_credit_net_minor_check CHECK ((credit_net_minor >= 0)),
    CONSTRAINT verdicts_letter_check CHECK ((length(letter) <= 4000)),
    CONSTRAINT verdicts_outcome_check CHECK ((outcome = ANY (ARRAY['upheld'::text, 'upheldInPart'::text, 'declined'::text])))
);

ALTER TABLE ONLY public.verdicts FORCE ROW LEVEL SECURITY;

ALTER TABLE public.verdicts OWNER TO partproof_owner;

CREATE TABLE public.worker_heartbeats (
    name text NOT NULL,
    seen_at timestamp with time zone DEFAULT now() NOT NULL
);

ALTER TABLE public.worker_heartbeats OWNER TO partproof_owner;

ALTER TABLE ONLY public.alerts
    ADD CONSTRAINT alerts_organisation_id_user_id_dedupe_key_key UNIQUE (organisation_id, user_id, dedupe_key);

ALTER TABLE ONLY public.alerts
    ADD CONSTRAINT alerts_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.audit_heads
    ADD CONSTRAINT audit_heads_pkey PRIMARY KEY (organisation_id);

ALTER TABLE ONLY public.audit_log
    ADD CONSTRAINT audit_log_organisation_id_prev_hash_key UNIQUE (organisation_id, prev_hash);

ALTER TABLE ONLY public.audit_log
    ADD CONSTRAINT audit_log_pkey PRIMARY KEY (organisation_id, seq);

ALTER TABLE ONLY public.batches
    ADD CONSTRAINT batches_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.batches
    ADD CONSTRAINT batches_seller_id_id_key UNIQUE (seller_id, id);

ALTER TABLE ONLY public.batches
    ADD CONSTRAINT batches_seller_id_part_id_code_key UNIQUE (seller_id, part_id, code);

ALTER TABLE ONLY public.claim_drafts
    ADD CONSTRAINT claim_drafts_pkey PRIMARY KEY (claim_id);

ALTER TABLE ONLY public.claim_flags
    ADD CONSTRAINT claim_flags_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.claim_lines
    ADD CONSTRAINT claim_lines_claim_id_line_number_key UNIQUE (claim_id, line_number);

ALTER TABLE ONLY public.claim_lines
    ADD CONSTRAINT claim_lines_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.claim_lines
    ADD CONSTRAINT claim_lines_seller_id_workshop_id_id_key UNIQUE (seller_id, workshop_id, id);

ALTER TABLE ONLY public.claim_messages
    ADD CONSTRAINT claim_messages_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.claim_moves
    ADD CONSTRAINT claim_moves_pkey PRIMARY KEY (from_state, to_state);

ALTER TABLE ONLY public.claim_queries
    ADD CONSTRAINT claim_queries_claim_id_round_key UNIQUE (claim_id, round);

ALTER TABLE ONLY public.claim_queries
    ADD CONSTRAINT claim_queries_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.claim_revisions
    ADD CONSTRAINT claim_revisions_claim_id_revision_key UNIQUE (claim_id, revision);

ALTER TABLE ONLY public.claim_revisions
    ADD CONSTRAINT claim_revisions_claim_id_revision_sha256_key UNIQUE (claim_id, revision, sha256);

ALTER TABLE ONLY public.claim_revisions
    ADD CONSTRAINT claim_revisions_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.claim_revisions
    ADD CONSTRAINT claim_revisions_seller_id_workshop_id_id_key UNIQUE (seller_id, workshop_id, id);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_number_key UNIQUE (number);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_seller_id_workshop_id_id_key UNIQUE (seller_id, workshop_id, id);

ALTER TABLE ONLY public.credit_allocations
    ADD CONSTRAINT credit_allocations_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.credit_allocations
    ADD CONSTRAINT credit_allocations_seller_id_workshop_id_id_key UNIQUE (seller_id, workshop_id, id);

ALTER TABLE ONLY public.credit_allocations
    ADD CONSTRAINT credit_allocations_seller_id_workshop_id_takes_back_id_key UNIQUE (seller_id, workshop_id, takes_back_id);

ALTER TABLE ONLY public.credit_note_lines
    ADD CONSTRAINT credit_note_lines_pkey PRIMARY KEY (seller_id, note_id, "position");

ALTER TABLE ONLY public.credit_note_series
    ADD CONSTRAINT credit_note_series_pkey PRIMARY KEY (seller_id, year);

ALTER TABLE ONLY public.credit_notes
    ADD CONSTRAINT credit_notes_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.credit_notes
    ADD CONSTRAINT credit_notes_seller_id_number_key UNIQUE (seller_id, number);

ALTER TABLE ONLY public.credit_notes
    ADD CONSTRAINT credit_notes_seller_id_workshop_id_counters_id_key UNIQUE (seller_id, workshop_id, counters_id);

ALTER TABLE ONLY public.credit_notes
    ADD CONSTRAINT credit_notes_seller_id_workshop_id_id_key UNIQUE (seller_id, workshop_id, id);

ALTER TABLE ONLY public.credit_notes
    ADD CONSTRAINT credit_notes_seller_id_year_sequence_key UNIQUE (seller_id, year, sequence);

ALTER TABLE ONLY public.evidence_files
    ADD CONSTRAINT evidence_files_claim_id_row_id_sha256_key UNIQUE (claim_id, row_id, sha256);

ALTER TABLE ONLY public.evidence_files
    ADD CONSTRAINT evidence_files_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.evidence_files
    ADD CONSTRAINT evidence_files_seller_id_workshop_id_id_key UNIQUE (seller_id, workshop_id, id);

ALTER TABLE ONLY public.findings
    ADD CONSTRAINT findings_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.findings
    ADD CONSTRAINT findings_seller_id_workshop_id_id_key UNIQUE (seller_id, workshop_id, id);

ALTER TABLE ONLY public.fittings
    ADD CONSTRAINT fittings_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.fittings
    ADD CONSTRAINT fittings_seller_id_workshop_id_id_key UNIQUE (seller_id, workshop_id, id);

ALTER TABLE ONLY public.idempotency_keys
    ADD CONSTRAINT idempotency_keys_pkey PRIMARY KEY (organisation_id, route, key);

ALTER TABLE ONLY public.installers
    ADD CONSTRAINT installers_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.installers
    ADD CONSTRAINT installers_workshop_id_code_key UNIQUE (workshop_id, code);

ALTER TABLE ONLY public.installers
    ADD CONSTRAINT installers_workshop_id_id_key UNIQUE (workshop_id, id);

ALTER TABLE ONLY public.installers
    ADD CONSTRAINT installers_workshop_id_name_key UNIQUE (workshop_id, name);

ALTER TABLE ONLY public.invoice_imports
    ADD CONSTRAINT invoice_imports_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.invoice_imports
    ADD CONSTRAINT invoice_imports_seller_id_id_key UNIQUE (seller_id, id);

ALTER TABLE ONLY public.invoice_imports
    ADD CONSTRAINT invoice_imports_seller_id_sha256_key UNIQUE (seller_id, sha256);

ALTER TABLE ONLY public.invoice_lines
    ADD CONSTRAINT invoice_lines_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.invoice_lines
    ADD CONSTRAINT invoice_lines_seller_id_buyer_id_id_key UNIQUE (seller_id, buyer_id, id);

ALTER TABLE ONLY public.invoice_lines
    ADD CONSTRAINT invoice_lines_seller_id_invoice_number_line_number_key UNIQUE (seller_id, invoice_number, line_number);

ALTER TABLE ONLY public.ledger_entries
    ADD CONSTRAINT ledger_entries_pkey PRIMARY KEY (seller_id, sequence);

ALTER TABLE ONLY public.ledger_entries
    ADD CONSTRAINT ledger_entries_seller_id_allocation_id_key UNIQUE (seller_id, allocation_id);

ALTER TABLE ONLY public.ledger_entries
    ADD CONSTRAINT ledger_entries_seller_id_counters_sequence_key UNIQUE (seller_id, counters_sequence);

ALTER TABLE ONLY public.ledger_heads
    ADD CONSTRAINT ledger_heads_pkey PRIMARY KEY (seller_id);

ALTER TABLE ONLY public.ledger_postings
    ADD CONSTRAINT ledger_postings_pkey PRIMARY KEY (seller_id, sequence, "position");

ALTER TABLE ONLY public.login_attempts
    ADD CONSTRAINT login_attempts_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.makers
    ADD CONSTRAINT makers_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.makers
    ADD CONSTRAINT makers_seller_id_id_key UNIQUE (seller_id, id);

ALTER TABLE ONLY public.makers
    ADD CONSTRAINT makers_seller_id_name_key UNIQUE (seller_id, name);

ALTER TABLE ONLY public.membership_roles
    ADD CONSTRAINT membership_roles_pkey PRIMARY KEY (organisation_id, user_id, role);

ALTER TABLE ONLY public.memberships
    ADD CONSTRAINT memberships_pkey PRIMARY KEY (organisation_id, user_id);

ALTER TABLE ONLY public.organisations
    ADD CONSTRAINT organisations_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.outbox
    ADD CONSTRAINT outbox_organisation_id_dedupe_key_key UNIQUE NULLS NOT DISTINCT (organisation_id, dedupe_key);

ALTER TABLE ONLY public.outbox
    ADD CONSTRAINT outbox_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.parcels
    ADD CONSTRAINT parcels_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.parcels
    ADD CONSTRAINT parcels_seller_id_id_key UNIQUE (seller_id, id);

ALTER TABLE ONLY public.part_returns
    ADD CONSTRAINT part_returns_number_key UNIQUE (number);

ALTER TABLE ONLY public.part_returns
    ADD CONSTRAINT part_returns_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.part_returns
    ADD CONSTRAINT part_returns_seller_id_id_key UNIQUE (seller_id, id);

ALTER TABLE ONLY public.part_returns
    ADD CONSTRAINT part_returns_seller_id_workshop_id_id_key UNIQUE (seller_id, workshop_id, id);

ALTER TABLE ONLY public.parts
    ADD CONSTRAINT parts_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.parts
    ADD CONSTRAINT parts_seller_id_id_key UNIQUE (seller_id, id);

ALTER TABLE ONLY public.parts
    ADD CONSTRAINT parts_seller_id_part_number_key UNIQUE (seller_id, part_number);

ALTER TABLE ONLY public.readings
    ADD CONSTRAINT readings_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.return_lines
    ADD CONSTRAINT return_lines_pkey PRIMARY KEY (seller_id, return_id, line_id);

ALTER TABLE ONLY public.revision_evidence
    ADD CONSTRAINT revision_evidence_pkey PRIMARY KEY (revision_id, evidence_id);

ALTER TABLE ONLY public.rule_book_versions
    ADD CONSTRAINT rule_book_versions_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.rule_book_versions
    ADD CONSTRAINT rule_book_versions_seller_id_id_key UNIQUE (seller_id, id);

ALTER TABLE ONLY public.rule_book_versions
    ADD CONSTRAINT rule_book_versions_seller_id_kind_family_part_id_valid_from_key UNIQUE NULLS NOT DISTINCT (seller_id, kind, family, part_id, valid_from);

ALTER TABLE ONLY public.sessions
    ADD CONSTRAINT sessions_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.single_use_links
    ADD CONSTRAINT single_use_links_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.single_use_links
    ADD CONSTRAINT single_use_links_token_hash_key UNIQUE (token_hash);

ALTER TABLE ONLY public.sites
    ADD CONSTRAINT sites_organisation_id_id_key UNIQUE (organisation_id, id);

ALTER TABLE ONLY public.sites
    ADD CONSTRAINT sites_organisation_id_name_key UNIQUE (organisation_id, name);

ALTER TABLE ONLY public.sites
    ADD CONSTRAINT sites_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.timeline_entries
    ADD CONSTRAINT timeline_entries_claim_id_prev_hash_key UNIQUE (claim_id, prev_hash);

ALTER TABLE ONLY public.timeline_entries
    ADD CONSTRAINT timeline_entries_pkey PRIMARY KEY (claim_id, seq);

ALTER TABLE ONLY public.timeline_heads
    ADD CONSTRAINT timeline_heads_pkey PRIMARY KEY (claim_id);

ALTER TABLE ONLY public.trading_accounts
    ADD CONSTRAINT trading_accounts_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.trading_accounts
    ADD CONSTRAINT trading_accounts_seller_id_account_number_key UNIQUE (seller_id, account_number);

ALTER TABLE ONLY public.trading_accounts
    ADD CONSTRAINT trading_accounts_seller_id_buyer_id_id_key UNIQUE (seller_id, buyer_id, id);

ALTER TABLE ONLY public.trading_accounts
    ADD CONSTRAINT trading_accounts_seller_id_buyer_id_key UNIQUE (seller_id, buyer_id);

ALTER TABLE ONLY public.units
    ADD CONSTRAINT units_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.units
    ADD CONSTRAINT units_seller_id_id_key UNIQUE (seller_id, id);

ALTER TABLE ONLY public.units
    ADD CONSTRAINT units_seller_id_part_id_serial_normal_key UNIQUE (seller_id, part_id, serial_normal);

ALTER TABLE ONLY public.users
    ADD CONSTRAINT users_email_key UNIQUE (email);

ALTER TABLE ONLY public.users
    ADD CONSTRAINT users_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.vehicles
    ADD CONSTRAINT vehicles_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.vehicles
    ADD CONSTRAINT vehicles_workshop_id_frame_serial_normal_key UNIQUE (workshop_id, frame_serial_normal);

ALTER TABLE ONLY public.vehicles
    ADD CONSTRAINT vehicles_workshop_id_id_key UNIQUE (workshop_id, id);

ALTER TABLE ONLY public.verdict_lines
    ADD CONSTRAINT verdict_lines_pkey PRIMARY KEY (verdict_id, line_id);

ALTER TABLE ONLY public.verdicts
    ADD CONSTRAINT verdicts_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.verdicts
    ADD CONSTRAINT verdicts_reverses_id_key UNIQUE (reverses_id);

ALTER TABLE ONLY public.verdicts
    ADD CONSTRAINT verdicts_seller_id_workshop_id_id_key UNIQUE (seller_id, workshop_id, id);

ALTER TABLE ONLY public.worker_heartbeats
    ADD CONSTRAINT worker_heartbeats_pkey PRIMARY KEY (name);

CREATE INDEX alerts_newest ON public.alerts USING btree (organisation_id, user_id, at DESC, id);

CREATE INDEX alerts_unread ON public.alerts USING btree (organisation_id, user_id, at) WHERE (read_at IS NULL);

CREATE INDEX claim_flags_by_claim ON public.claim_flags USING btree (claim_id);

CREATE INDEX claim_lines_by_claim ON public.claim_lines USING btree (claim_id);

CREATE INDEX claim_lines_by_invoice_line ON public.claim_lines USING btree (seller_id, invoice_line_id);

CREATE INDEX claim_lines_by_part ON public.claim_lines USING btree (seller_id, part_id);

CREATE INDEX claim_lines_by_return_state ON public.claim_lines USING btree (seller_id, return_state, claim_id) WHERE (return_state = ANY (ARRAY['awaited'::text, 'sent'::text, 'received'::text, 'missing'::text]));

CREATE INDEX claim_lines_by_unit ON public.claim_lines USING btree (seller_id, unit_id);

CREATE UNIQUE INDEX claim_lines_one_holder ON public.claim_lines USING btree (seller_id, unit_id) WHERE holds_unit;

CREATE INDEX claim_messages_by_claim ON public.claim_messages USING btree (claim_id, at);

CREATE INDEX claims_answer_needed ON public.claims USING btree (query_lapses_on) WHERE (state = 'answerNeeded'::text);

CREATE INDEX claims_by_vehicle ON public.claims USING btree (workshop_id, vehicle_id);

CREATE INDEX claims_by_workshop_state ON public.claims USING btree (workshop_id, state, updated_at);

CREATE INDEX claims_held ON public.claims USING btree (holder_id, state, safety_reported DESC, answer_due_at, filed_at NULLS FIRST, id) WHERE (holder_id IS NOT NULL);

CREATE INDEX claims_own_asked ON public.claims USING btree (workshop_id, state, asked_minor, id);

CREATE INDEX claims_own_due ON public.claims USING btree (workshop_id, state, answer_due_at, id);

CREATE INDEX claims_own_filed ON public.claims USING btree (workshop_id, state, filed_at NULLS FIRST, id) INCLUDE (seller_id);

CREATE INDEX claims_own_urgent ON public.claims USING btree (workshop_id, state, safety_reported DESC, answer_due_at, filed_at NULLS FIRST, id);

CREATE INDEX claims_parked ON public.claims USING btree (parked_with_id, state, safety_reported DESC, answer_due_at, filed_at NULLS FIRST, id) WHERE (parked_with_id IS NOT NULL);

CREATE INDEX claims_received_asked ON public.claims USING btree (seller_id, state, asked_minor, id);

CREATE INDEX claims_received_due ON public.claims USING btree (seller_id, state, answer_due_at, id);

CREATE INDEX claims_received_filed ON public.claims USING btree (seller_id, state, filed_at NULLS FIRST, id) INCLUDE (workshop_id);

CREATE INDEX claims_received_urgent ON public.claims USING btree (seller_id, state, safety_reported DESC, answer_due_at, filed_at NULLS FIRST, id);

CREATE INDEX claims_to_settle ON public.claims USING btree (contest_until) WHERE (state = 'decided'::text);

CREATE INDEX credit_allocations_by_note ON public.credit_allocations USING btree (note_id);

CREATE INDEX credit_allocations_by_workshop ON public.credit_allocations USING btree (workshop_id, allocated_on);

CREATE INDEX credit_note_lines_by_invoice_line ON public.credit_note_lines USING btree (seller_id, invoice_line_id);

CREATE INDEX credit_note_lines_by_line ON public.credit_note_lines USING btree (line_id);

CREATE INDEX credit_notes_by_claim ON public.credit_notes USING btree (claim_id);

CREATE INDEX credit_notes_by_seller ON public.credit_notes USING btree (seller_id, issued_on DESC, sequence DESC);

CREATE INDEX credit_notes_by_workshop ON public.credit_notes USING btree (workshop_id, issued_on DESC, sequence DESC);

CREATE INDEX evidence_files_by_claim ON public.evidence_files USING btree (claim_id);

CREATE INDEX evidence_files_by_hash ON public.evidence_files USING btree (seller_id, sha256);

CREATE INDEX findings_by_line ON public.findings USING btree (line_id, found_at);

CREATE INDEX fittings_by_unit ON public.fittings USING btree (seller_id, unit_id);

CREATE INDEX fittings_by_vehicle ON public.fittings USING btree (workshop_id, vehicle_id);

CREATE INDEX fittings_by_workshop ON public.fittings USING btree (workshop_id, fitted_on);

CREATE INDEX invoice_lines_by_buyer ON public.invoice_lines USING btree (buyer_id, invoiced_on);

CREATE INDEX invoice_lines_by_part ON public.invoice_lines USING btree (seller_id, part_id);

CREATE INDEX ledger_entries_by_day ON public.ledger_entries USING btree (seller_id, entry_on DESC, sequence DESC);

CREATE INDEX ledger_entries_by_note ON public.ledger_entries USING btree (note_id);

CREATE INDEX ledger_entries_by_workshop ON public.ledger_entries USING btree (seller_id, workshop_id, sequence DESC);

CREATE INDEX login_attempts_by_key ON public.login_attempts USING btree (key_hash, at);

CREATE INDEX memberships_by_user ON public.memberships USING btree (user_id);

CREATE INDEX outbox_waiting ON public.outbox USING btree (not_before) WHERE ((sent_at IS NULL) AND (parked_at IS NULL));

CREATE INDEX parcels_by_return ON public.parcels USING btree (seller_id, return_id);

CREATE INDEX parcels_unmatched ON public.parcels USING btree (seller_id, arrived_at) WHERE (return_id IS NULL);

CREATE INDEX part_returns_by_claim ON public.part_returns USING btree (claim_id);

CREATE INDEX part_returns_due ON public.part_returns USING btree (seller_id, due_on);

CREATE INDEX readings_by_claim ON public.readings USING btree (claim_id, revision);

CREATE INDEX readings_by_finding ON public.readings USING btree (finding_id) WHERE (finding_id IS NOT NULL);

CREATE INDEX return_lines_by_line ON public.return_lines USING btree (line_id);

CREATE INDEX rule_book_by_kind ON public.rule_book_versions USING btree (seller_id, kind, family, valid_from);

CREATE INDEX sessions_by_user ON public.sessions USING btree (user_id, organisation_id, last_seen_at);

CREATE INDEX trading_accounts_by_buyer ON public.trading_accounts USING btree (buyer_id, seller_id);

CREATE INDEX units_by_batch ON public.units USING btree (seller_id, batch_id);

CREATE INDEX units_by_buyer_folded ON public.units USING btree (buyer_id, serial_folded);

CREATE INDEX units_by_buyer_serial ON public.units USING btree (buyer_id, serial_normal);

CREATE INDEX units_by_line ON public.units USING btree (seller_id, invoice_line_id);

CREATE INDEX units_by_seller_serial ON public.units USING btree (seller_id, serial_normal);

CREATE INDEX verdicts_by_claim ON public.verdicts USING btree (claim_id, decided_at);

CREATE TRIGGER audit_log_append_only BEFORE DELETE OR UPDATE ON public.audit_log FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.audit_log ENABLE ALWAYS TRIGGER audit_log_append_only;

CREATE TRIGGER audit_log_no_truncate BEFORE TRUNCATE ON public.audit_log FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.audit_log ENABLE ALWAYS TRIGGER audit_log_no_truncate;

CREATE TRIGGER claim_lines_kept BEFORE UPDATE ON public.claim_lines FOR EACH ROW EXECUTE FUNCTION public.keep_claim_line();

ALTER TABLE public.claim_lines ENABLE ALWAYS TRIGGER claim_lines_kept;

CREATE TRIGGER claim_messages_append_only BEFORE DELETE OR UPDATE ON public.claim_messages FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.claim_messages ENABLE ALWAYS TRIGGER claim_messages_append_only;

CREATE TRIGGER claim_messages_no_truncate BEFORE TRUNCATE ON public.claim_messages FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.claim_messages ENABLE ALWAYS TRIGGER claim_messages_no_truncate;

CREATE TRIGGER claim_revisions_append_only BEFORE DELETE OR UPDATE ON public.claim_revisions FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.claim_revisions ENABLE ALWAYS TRIGGER claim_revisions_append_only;

CREATE TRIGGER claim_revisions_no_truncate BEFORE TRUNCATE ON public.claim_revisions FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.claim_revisions ENABLE ALWAYS TRIGGER claim_revisions_no_truncate;

CREATE TRIGGER claims_move BEFORE UPDATE ON public.claims FOR EACH ROW EXECUTE FUNCTION public.check_claim_move();

ALTER TABLE public.claims ENABLE ALWAYS TRIGGER claims_move;

CREATE TRIGGER claims_touch BEFORE UPDATE ON public.claims FOR EACH ROW EXECUTE FUNCTION public.touch_row();

ALTER TABLE public.claims ENABLE ALWAYS TRIGGER claims_touch;

CREATE TRIGGER credit_allocations_append_only BEFORE DELETE OR UPDATE ON public.credit_allocations FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.credit_allocations ENABLE ALWAYS TRIGGER credit_allocations_append_only;

CREATE TRIGGER credit_allocations_kept AFTER INSERT ON public.credit_allocations FOR EACH ROW EXECUTE FUNCTION public.keep_allocations();

ALTER TABLE public.credit_allocations ENABLE ALWAYS TRIGGER credit_allocations_kept;

CREATE TRIGGER credit_allocations_no_truncate BEFORE TRUNCATE ON public.credit_allocations FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.credit_allocations ENABLE ALWAYS TRIGGER credit_allocations_no_truncate;

CREATE TRIGGER credit_note_lines_append_only BEFORE DELETE OR UPDATE ON public.credit_note_lines FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.credit_note_lines ENABLE ALWAYS TRIGGER credit_note_lines_append_only;

CREATE TRIGGER credit_note_lines_no_truncate BEFORE TRUNCATE ON public.credit_note_lines FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.credit_note_lines ENABLE ALWAYS TRIGGER credit_note_lines_no_truncate;

CREATE TRIGGER credit_note_series_kept BEFORE UPDATE ON public.credit_note_series FOR EACH ROW EXECUTE FUNCTION public.keep_series();

ALTER TABLE public.credit_note_series ENABLE ALWAYS TRIGGER credit_note_series_kept;

CREATE TRIGGER credit_notes_append_only BEFORE DELETE OR UPDATE ON public.credit_notes FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.credit_notes ENABLE ALWAYS TRIGGER credit_notes_append_only;

CREATE TRIGGER credit_notes_counter AFTER INSERT ON public.credit_notes FOR EACH ROW EXECUTE FUNCTION public.check_counter();

ALTER TABLE public.credit_notes ENABLE ALWAYS TRIGGER credit_notes_counter;

CREATE TRIGGER credit_notes_no_truncate BEFORE TRUNCATE ON public.credit_notes FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.credit_notes ENABLE ALWAYS TRIGGER credit_notes_no_truncate;

CREATE TRIGGER evidence_kept BEFORE UPDATE ON public.evidence_files FOR EACH ROW EXECUTE FUNCTION public.keep_evidence();

ALTER TABLE public.evidence_files ENABLE ALWAYS TRIGGER evidence_kept;

CREATE TRIGGER evidence_never_deleted BEFORE DELETE ON public.evidence_files FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.evidence_files ENABLE ALWAYS TRIGGER evidence_never_deleted;

CREATE TRIGGER evidence_no_truncate BEFORE TRUNCATE ON public.evidence_files FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.evidence_files ENABLE ALWAYS TRIGGER evidence_no_truncate;

CREATE TRIGGER findings_append_only BEFORE DELETE OR UPDATE ON public.findings FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.findings ENABLE ALWAYS TRIGGER findings_append_only;

CREATE TRIGGER findings_no_truncate BEFORE TRUNCATE ON public.findings FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.findings ENABLE ALWAYS TRIGGER findings_no_truncate;

CREATE TRIGGER ledger_entries_append_only BEFORE DELETE OR UPDATE ON public.ledger_entries FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.ledger_entries ENABLE ALWAYS TRIGGER ledger_entries_append_only;

CREATE CONSTRAINT TRIGGER ledger_entries_balance AFTER INSERT ON public.ledger_entries DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION public.check_ledger_sum();

ALTER TABLE public.ledger_entries ENABLE ALWAYS TRIGGER ledger_entries_balance;

CREATE TRIGGER ledger_entries_no_truncate BEFORE TRUNCATE ON public.ledger_entries FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.ledger_entries ENABLE ALWAYS TRIGGER ledger_entries_no_truncate;

CREATE TRIGGER ledger_postings_append_only BEFORE DELETE OR UPDATE ON public.ledger_postings FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.ledger_postings ENABLE ALWAYS TRIGGER ledger_postings_append_only;

CREATE CONSTRAINT TRIGGER ledger_postings_balance AFTER INSERT ON public.ledger_postings DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION public.check_ledger_sum();

ALTER TABLE public.ledger_postings ENABLE ALWAYS TRIGGER ledger_postings_balance;

CREATE TRIGGER ledger_postings_no_truncate BEFORE TRUNCATE ON public.ledger_postings FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.ledger_postings ENABLE ALWAYS TRIGGER ledger_postings_no_truncate;

CREATE TRIGGER membership_ends_sessions AFTER UPDATE ON public.memberships FOR EACH ROW EXECUTE FUNCTION guarded.end_sessions_of_member();

ALTER TABLE public.memberships ENABLE ALWAYS TRIGGER membership_ends_sessions;

CREATE TRIGGER outbox_kept BEFORE UPDATE ON public.outbox FOR EACH ROW EXECUTE FUNCTION public.keep_outbox();

ALTER TABLE public.outbox ENABLE ALWAYS TRIGGER outbox_kept;

CREATE TRIGGER readings_append_only BEFORE DELETE OR UPDATE ON public.readings FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.readings ENABLE ALWAYS TRIGGER readings_append_only;

CREATE TRIGGER readings_no_truncate BEFORE TRUNCATE ON public.readings FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.readings ENABLE ALWAYS TRIGGER readings_no_truncate;

CREATE TRIGGER revision_evidence_append_only BEFORE DELETE OR UPDATE ON public.revision_evidence FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.revision_evidence ENABLE ALWAYS TRIGGER revision_evidence_append_only;

CREATE TRIGGER revision_evidence_no_truncate BEFORE TRUNCATE ON public.revision_evidence FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.revision_evidence ENABLE ALWAYS TRIGGER revision_evidence_no_truncate;

CREATE TRIGGER role_ends_sessions AFTER INSERT OR DELETE OR UPDATE ON public.membership_roles FOR EACH ROW EXECUTE FUNCTION guarded.end_sessions_of_member();

ALTER TABLE public.membership_roles ENABLE ALWAYS TRIGGER role_ends_sessions;

CREATE TRIGGER rule_book_versions_append_only BEFORE DELETE OR UPDATE ON public.rule_book_versions FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.rule_book_versions ENABLE ALWAYS TRIGGER rule_book_versions_append_only;

CREATE TRIGGER rule_book_versions_no_truncate BEFORE TRUNCATE ON public.rule_book_versions FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.rule_book_versions ENABLE ALWAYS TRIGGER rule_book_versions_no_truncate;

CREATE TRIGGER timeline_chain BEFORE INSERT ON public.timeline_entries FOR EACH ROW EXECUTE FUNCTION guarded.chain_timeline();

ALTER TABLE public.timeline_entries ENABLE ALWAYS TRIGGER timeline_chain;

CREATE TRIGGER timeline_entries_append_only BEFORE DELETE OR UPDATE ON public.timeline_entries FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.timeline_entries ENABLE ALWAYS TRIGGER timeline_entries_append_only;

CREATE TRIGGER timeline_entries_no_truncate BEFORE TRUNCATE ON public.timeline_entries FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.timeline_entries ENABLE ALWAYS TRIGGER timeline_entries_no_truncate;

CREATE TRIGGER verdict_lines_append_only BEFORE DELETE OR UPDATE ON public.verdict_lines FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.verdict_lines ENABLE ALWAYS TRIGGER verdict_lines_append_only;

CREATE TRIGGER verdict_lines_no_truncate BEFORE TRUNCATE ON public.verdict_lines FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.verdict_lines ENABLE ALWAYS TRIGGER verdict_lines_no_truncate;

CREATE TRIGGER verdicts_append_only BEFORE DELETE OR UPDATE ON public.verdicts FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.verdicts ENABLE ALWAYS TRIGGER verdicts_append_only;

CREATE TRIGGER verdicts_no_truncate BEFORE TRUNCATE ON public.verdicts FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

ALTER TABLE public.verdicts ENABLE ALWAYS TRIGGER verdicts_no_truncate;

ALTER TABLE ONLY public.alerts
    ADD CONSTRAINT alerts_organisation_id_user_id_fkey FOREIGN KEY (organisation_id, user_id) REFERENCES public.memberships(organisation_id, user_id) ON DELETE CASCADE;

ALTER TABLE ONLY public.audit_heads
    ADD CONSTRAINT audit_heads_organisation_id_fkey FOREIGN KEY (organisation_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.audit_log
    ADD CONSTRAINT audit_log_organisation_id_fkey FOREIGN KEY (organisation_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.batches
    ADD CONSTRAINT batches_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.batches
    ADD CONSTRAINT batches_seller_id_part_id_fkey FOREIGN KEY (seller_id, part_id) REFERENCES public.parts(seller_id, id);

ALTER TABLE ONLY public.claim_drafts
    ADD CONSTRAINT claim_drafts_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.claim_flags
    ADD CONSTRAINT claim_flags_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.claim_lines
    ADD CONSTRAINT claim_lines_seller_id_part_id_fkey FOREIGN KEY (seller_id, part_id) REFERENCES public.parts(seller_id, id);

ALTER TABLE ONLY public.claim_lines
    ADD CONSTRAINT claim_lines_seller_id_unit_id_fkey FOREIGN KEY (seller_id, unit_id) REFERENCES public.units(seller_id, id);

ALTER TABLE ONLY public.claim_lines
    ADD CONSTRAINT claim_lines_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.claim_lines
    ADD CONSTRAINT claim_lines_seller_id_workshop_id_fitting_id_fkey FOREIGN KEY (seller_id, workshop_id, fitting_id) REFERENCES public.fittings(seller_id, workshop_id, id);

ALTER TABLE ONLY public.claim_lines
    ADD CONSTRAINT claim_lines_seller_id_workshop_id_invoice_line_id_fkey FOREIGN KEY (seller_id, workshop_id, invoice_line_id) REFERENCES public.invoice_lines(seller_id, buyer_id, id);

ALTER TABLE ONLY public.claim_messages
    ADD CONSTRAINT claim_messages_author_id_fkey FOREIGN KEY (author_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.claim_messages
    ADD CONSTRAINT claim_messages_author_organisation_id_fkey FOREIGN KEY (author_organisation_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.claim_messages
    ADD CONSTRAINT claim_messages_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.claim_queries
    ADD CONSTRAINT claim_queries_asked_by_id_fkey FOREIGN KEY (asked_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.claim_queries
    ADD CONSTRAINT claim_queries_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.claim_revisions
    ADD CONSTRAINT claim_revisions_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.claim_revisions
    ADD CONSTRAINT claim_revisions_sent_by_id_fkey FOREIGN KEY (sent_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_created_by_id_fkey FOREIGN KEY (created_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_decided_by_id_fkey FOREIGN KEY (decided_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_holder_id_fkey FOREIGN KEY (holder_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_parked_with_id_fkey FOREIGN KEY (parked_with_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_seller_id_workshop_id_account_id_fkey FOREIGN KEY (seller_id, workshop_id, account_id) REFERENCES public.trading_accounts(seller_id, buyer_id, id);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_workshop_id_fkey FOREIGN KEY (workshop_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_workshop_id_site_id_fkey FOREIGN KEY (workshop_id, site_id) REFERENCES public.sites(organisation_id, id);

ALTER TABLE ONLY public.claims
    ADD CONSTRAINT claims_workshop_id_vehicle_id_fkey FOREIGN KEY (workshop_id, vehicle_id) REFERENCES public.vehicles(workshop_id, id);

ALTER TABLE ONLY public.credit_allocations
    ADD CONSTRAINT credit_allocations_allocated_by_id_fkey FOREIGN KEY (allocated_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.credit_allocations
    ADD CONSTRAINT credit_allocations_seller_id_workshop_id_note_id_fkey FOREIGN KEY (seller_id, workshop_id, note_id) REFERENCES public.credit_notes(seller_id, workshop_id, id);

ALTER TABLE ONLY public.credit_allocations
    ADD CONSTRAINT credit_allocations_seller_id_workshop_id_takes_back_id_fkey FOREIGN KEY (seller_id, workshop_id, takes_back_id) REFERENCES public.credit_allocations(seller_id, workshop_id, id);

ALTER TABLE ONLY public.credit_note_lines
    ADD CONSTRAINT credit_note_lines_seller_id_workshop_id_invoice_line_id_fkey FOREIGN KEY (seller_id, workshop_id, invoice_line_id) REFERENCES public.invoice_lines(seller_id, buyer_id, id);

ALTER TABLE ONLY public.credit_note_lines
    ADD CONSTRAINT credit_note_lines_seller_id_workshop_id_line_id_fkey FOREIGN KEY (seller_id, workshop_id, line_id) REFERENCES public.claim_lines(seller_id, workshop_id, id);

ALTER TABLE ONLY public.credit_note_lines
    ADD CONSTRAINT credit_note_lines_seller_id_workshop_id_note_id_fkey FOREIGN KEY (seller_id, workshop_id, note_id) REFERENCES public.credit_notes(seller_id, workshop_id, id);

ALTER TABLE ONLY public.credit_note_series
    ADD CONSTRAINT credit_note_series_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.credit_notes
    ADD CONSTRAINT credit_notes_issued_by_id_fkey FOREIGN KEY (issued_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.credit_notes
    ADD CONSTRAINT credit_notes_seller_id_workshop_id_account_id_fkey FOREIGN KEY (seller_id, workshop_id, account_id) REFERENCES public.trading_accounts(seller_id, buyer_id, id);

ALTER TABLE ONLY public.credit_notes
    ADD CONSTRAINT credit_notes_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.credit_notes
    ADD CONSTRAINT credit_notes_seller_id_workshop_id_counters_id_fkey FOREIGN KEY (seller_id, workshop_id, counters_id) REFERENCES public.credit_notes(seller_id, workshop_id, id);

ALTER TABLE ONLY public.credit_notes
    ADD CONSTRAINT credit_notes_seller_id_workshop_id_verdict_id_fkey FOREIGN KEY (seller_id, workshop_id, verdict_id) REFERENCES public.verdicts(seller_id, workshop_id, id);

ALTER TABLE ONLY public.evidence_files
    ADD CONSTRAINT evidence_files_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.evidence_files
    ADD CONSTRAINT evidence_files_uploaded_by_id_fkey FOREIGN KEY (uploaded_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.findings
    ADD CONSTRAINT findings_found_by_id_fkey FOREIGN KEY (found_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.findings
    ADD CONSTRAINT findings_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.findings
    ADD CONSTRAINT findings_seller_id_workshop_id_evidence_id_fkey FOREIGN KEY (seller_id, workshop_id, evidence_id) REFERENCES public.evidence_files(seller_id, workshop_id, id);

ALTER TABLE ONLY public.findings
    ADD CONSTRAINT findings_seller_id_workshop_id_line_id_fkey FOREIGN KEY (seller_id, workshop_id, line_id) REFERENCES public.claim_lines(seller_id, workshop_id, id);

ALTER TABLE ONLY public.fittings
    ADD CONSTRAINT fittings_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.fittings
    ADD CONSTRAINT fittings_seller_id_unit_id_fkey FOREIGN KEY (seller_id, unit_id) REFERENCES public.units(seller_id, id);

ALTER TABLE ONLY public.fittings
    ADD CONSTRAINT fittings_workshop_id_fkey FOREIGN KEY (workshop_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.fittings
    ADD CONSTRAINT fittings_workshop_id_installer_id_fkey FOREIGN KEY (workshop_id, installer_id) REFERENCES public.installers(workshop_id, id);

ALTER TABLE ONLY public.fittings
    ADD CONSTRAINT fittings_workshop_id_vehicle_id_fkey FOREIGN KEY (workshop_id, vehicle_id) REFERENCES public.vehicles(workshop_id, id);

ALTER TABLE ONLY public.idempotency_keys
    ADD CONSTRAINT idempotency_keys_organisation_id_fkey FOREIGN KEY (organisation_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.installers
    ADD CONSTRAINT installers_workshop_id_fkey FOREIGN KEY (workshop_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.invoice_imports
    ADD CONSTRAINT invoice_imports_created_by_id_fkey FOREIGN KEY (created_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.invoice_imports
    ADD CONSTRAINT invoice_imports_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.invoice_lines
    ADD CONSTRAINT invoice_lines_buyer_id_fkey FOREIGN KEY (buyer_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.invoice_lines
    ADD CONSTRAINT invoice_lines_buyer_id_site_id_fkey FOREIGN KEY (buyer_id, site_id) REFERENCES public.sites(organisation_id, id);

ALTER TABLE ONLY public.invoice_lines
    ADD CONSTRAINT invoice_lines_seller_id_buyer_id_account_id_fkey FOREIGN KEY (seller_id, buyer_id, account_id) REFERENCES public.trading_accounts(seller_id, buyer_id, id);

ALTER TABLE ONLY public.invoice_lines
    ADD CONSTRAINT invoice_lines_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.invoice_lines
    ADD CONSTRAINT invoice_lines_seller_id_part_id_fkey FOREIGN KEY (seller_id, part_id) REFERENCES public.parts(seller_id, id);

ALTER TABLE ONLY public.ledger_entries
    ADD CONSTRAINT ledger_entries_entered_by_id_fkey FOREIGN KEY (entered_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.ledger_entries
    ADD CONSTRAINT ledger_entries_seller_id_counters_sequence_fkey FOREIGN KEY (seller_id, counters_sequence) REFERENCES public.ledger_entries(seller_id, sequence);

ALTER TABLE ONLY public.ledger_entries
    ADD CONSTRAINT ledger_entries_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.ledger_entries
    ADD CONSTRAINT ledger_entries_seller_id_workshop_id_allocation_id_fkey FOREIGN KEY (seller_id, workshop_id, allocation_id) REFERENCES public.credit_allocations(seller_id, workshop_id, id);

ALTER TABLE ONLY public.ledger_entries
    ADD CONSTRAINT ledger_entries_seller_id_workshop_id_note_id_fkey FOREIGN KEY (seller_id, workshop_id, note_id) REFERENCES public.credit_notes(seller_id, workshop_id, id);

ALTER TABLE ONLY public.ledger_entries
    ADD CONSTRAINT ledger_entries_workshop_id_fkey FOREIGN KEY (workshop_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.ledger_heads
    ADD CONSTRAINT ledger_heads_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.ledger_postings
    ADD CONSTRAINT ledger_postings_seller_id_sequence_fkey FOREIGN KEY (seller_id, sequence) REFERENCES public.ledger_entries(seller_id, sequence);

ALTER TABLE ONLY public.makers
    ADD CONSTRAINT makers_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.membership_roles
    ADD CONSTRAINT membership_roles_organisation_id_user_id_fkey FOREIGN KEY (organisation_id, user_id) REFERENCES public.memberships(organisation_id, user_id);

ALTER TABLE ONLY public.memberships
    ADD CONSTRAINT memberships_organisation_id_fkey FOREIGN KEY (organisation_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.memberships
    ADD CONSTRAINT memberships_user_id_fkey FOREIGN KEY (user_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.outbox
    ADD CONSTRAINT outbox_organisation_id_fkey FOREIGN KEY (organisation_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.parcels
    ADD CONSTRAINT parcels_matched_by_id_fkey FOREIGN KEY (matched_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.parcels
    ADD CONSTRAINT parcels_received_by_id_fkey FOREIGN KEY (received_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.parcels
    ADD CONSTRAINT parcels_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.parcels
    ADD CONSTRAINT parcels_seller_id_return_id_fkey FOREIGN KEY (seller_id, return_id) REFERENCES public.part_returns(seller_id, id);

ALTER TABLE ONLY public.part_returns
    ADD CONSTRAINT part_returns_called_in_by_id_fkey FOREIGN KEY (called_in_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.part_returns
    ADD CONSTRAINT part_returns_dispatched_by_id_fkey FOREIGN KEY (dispatched_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.part_returns
    ADD CONSTRAINT part_returns_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.parts
    ADD CONSTRAINT parts_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.parts
    ADD CONSTRAINT parts_seller_id_maker_id_fkey FOREIGN KEY (seller_id, maker_id) REFERENCES public.makers(seller_id, id);

ALTER TABLE ONLY public.parts
    ADD CONSTRAINT parts_seller_id_superseded_by_id_fkey FOREIGN KEY (seller_id, superseded_by_id) REFERENCES public.parts(seller_id, id);

ALTER TABLE ONLY public.readings
    ADD CONSTRAINT readings_claim_id_revision_fkey FOREIGN KEY (claim_id, revision) REFERENCES public.claim_revisions(claim_id, revision);

ALTER TABLE ONLY public.readings
    ADD CONSTRAINT readings_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.readings
    ADD CONSTRAINT readings_seller_id_workshop_id_finding_id_fkey FOREIGN KEY (seller_id, workshop_id, finding_id) REFERENCES public.findings(seller_id, workshop_id, id);

ALTER TABLE ONLY public.return_lines
    ADD CONSTRAINT return_lines_disposed_by_id_fkey FOREIGN KEY (disposed_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.return_lines
    ADD CONSTRAINT return_lines_seller_id_parcel_id_fkey FOREIGN KEY (seller_id, parcel_id) REFERENCES public.parcels(seller_id, id);

ALTER TABLE ONLY public.return_lines
    ADD CONSTRAINT return_lines_seller_id_workshop_id_line_id_fkey FOREIGN KEY (seller_id, workshop_id, line_id) REFERENCES public.claim_lines(seller_id, workshop_id, id);

ALTER TABLE ONLY public.return_lines
    ADD CONSTRAINT return_lines_seller_id_workshop_id_return_id_fkey FOREIGN KEY (seller_id, workshop_id, return_id) REFERENCES public.part_returns(seller_id, workshop_id, id);

ALTER TABLE ONLY public.revision_evidence
    ADD CONSTRAINT revision_evidence_seller_id_workshop_id_evidence_id_fkey FOREIGN KEY (seller_id, workshop_id, evidence_id) REFERENCES public.evidence_files(seller_id, workshop_id, id);

ALTER TABLE ONLY public.revision_evidence
    ADD CONSTRAINT revision_evidence_seller_id_workshop_id_revision_id_fkey FOREIGN KEY (seller_id, workshop_id, revision_id) REFERENCES public.claim_revisions(seller_id, workshop_id, id);

ALTER TABLE ONLY public.rule_book_versions
    ADD CONSTRAINT rule_book_versions_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.rule_book_versions
    ADD CONSTRAINT rule_book_versions_seller_id_part_id_fkey FOREIGN KEY (seller_id, part_id) REFERENCES public.parts(seller_id, id);

ALTER TABLE ONLY public.sessions
    ADD CONSTRAINT sessions_organisation_id_fkey FOREIGN KEY (organisation_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.sessions
    ADD CONSTRAINT sessions_user_id_fkey FOREIGN KEY (user_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.single_use_links
    ADD CONSTRAINT single_use_links_organisation_id_user_id_fkey FOREIGN KEY (organisation_id, user_id) REFERENCES public.memberships(organisation_id, user_id);

ALTER TABLE ONLY public.single_use_links
    ADD CONSTRAINT single_use_links_user_id_fkey FOREIGN KEY (user_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.sites
    ADD CONSTRAINT sites_organisation_id_fkey FOREIGN KEY (organisation_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.timeline_entries
    ADD CONSTRAINT timeline_entries_actor_organisation_id_fkey FOREIGN KEY (actor_organisation_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.timeline_entries
    ADD CONSTRAINT timeline_entries_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.timeline_heads
    ADD CONSTRAINT timeline_heads_claim_id_fkey FOREIGN KEY (claim_id) REFERENCES public.claims(id);

ALTER TABLE ONLY public.trading_accounts
    ADD CONSTRAINT trading_accounts_buyer_id_fkey FOREIGN KEY (buyer_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.trading_accounts
    ADD CONSTRAINT trading_accounts_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.units
    ADD CONSTRAINT units_buyer_id_fkey FOREIGN KEY (buyer_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.units
    ADD CONSTRAINT units_seller_id_batch_id_fkey FOREIGN KEY (seller_id, batch_id) REFERENCES public.batches(seller_id, id);

ALTER TABLE ONLY public.units
    ADD CONSTRAINT units_seller_id_built_into_unit_id_fkey FOREIGN KEY (seller_id, built_into_unit_id) REFERENCES public.units(seller_id, id);

ALTER TABLE ONLY public.units
    ADD CONSTRAINT units_seller_id_buyer_id_invoice_line_id_fkey FOREIGN KEY (seller_id, buyer_id, invoice_line_id) REFERENCES public.invoice_lines(seller_id, buyer_id, id);

ALTER TABLE ONLY public.units
    ADD CONSTRAINT units_seller_id_fkey FOREIGN KEY (seller_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.units
    ADD CONSTRAINT units_seller_id_part_id_fkey FOREIGN KEY (seller_id, part_id) REFERENCES public.parts(seller_id, id);

ALTER TABLE ONLY public.units
    ADD CONSTRAINT units_seller_id_replaces_unit_id_fkey FOREIGN KEY (seller_id, replaces_unit_id) REFERENCES public.units(seller_id, id);

ALTER TABLE ONLY public.vehicles
    ADD CONSTRAINT vehicles_workshop_id_fkey FOREIGN KEY (workshop_id) REFERENCES public.organisations(id);

ALTER TABLE ONLY public.verdict_lines
    ADD CONSTRAINT verdict_lines_seller_id_rule_version_id_fkey FOREIGN KEY (seller_id, rule_version_id) REFERENCES public.rule_book_versions(seller_id, id);

ALTER TABLE ONLY public.verdict_lines
    ADD CONSTRAINT verdict_lines_seller_id_workshop_id_line_id_fkey FOREIGN KEY (seller_id, workshop_id, line_id) REFERENCES public.claim_lines(seller_id, workshop_id, id);

ALTER TABLE ONLY public.verdict_lines
    ADD CONSTRAINT verdict_lines_seller_id_workshop_id_verdict_id_fkey FOREIGN KEY (seller_id, workshop_id, verdict_id) REFERENCES public.verdicts(seller_id, workshop_id, id);

ALTER TABLE ONLY public.verdicts
    ADD CONSTRAINT verdicts_claim_id_revision_revision_sha256_fkey FOREIGN KEY (claim_id, revision, revision_sha256) REFERENCES public.claim_revisions(claim_id, revision, sha256);

ALTER TABLE ONLY public.verdicts
    ADD CONSTRAINT verdicts_decided_by_id_fkey FOREIGN KEY (decided_by_id) REFERENCES public.users(id);

ALTER TABLE ONLY public.verdicts
    ADD CONSTRAINT verdicts_seller_id_workshop_id_claim_id_fkey FOREIGN KEY (seller_id, workshop_id, claim_id) REFERENCES public.claims(seller_id, workshop_id, id);

ALTER TABLE ONLY public.verdicts
    ADD CONSTRAINT verdicts_seller_id_workshop_id_reverses_id_fkey FOREIGN KEY (seller_id, workshop_id, reverses_id) REFERENCES public.verdicts(seller_id, workshop_id, id);

ALTER TABLE public.alerts ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.audit_heads ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.audit_log ENABLE ROW LEVEL SECURITY;

CREATE POLICY auditor_select ON public.audit_log FOR SELECT TO auditor USING (true);

ALTER TABLE public.batches ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.claim_drafts ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.claim_flags ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.claim_lines ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.claim_messages ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.claim_queries ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.claim_revisions ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.claims ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.credit_allocations ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.credit_note_lines ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.credit_note_series ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.credit_notes ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.evidence_files ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.findings ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.fittings ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.idempotency_keys ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.installers ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.invoice_imports ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.invoice_lines ENABLE ROW LEVEL SECURITY;

CREATE POLICY keeper_all ON public.audit_heads TO keeper USING (true) WITH CHECK (true);

CREATE POLICY keeper_all ON public.login_attempts TO keeper USING (true) WITH CHECK (true);

CREATE POLICY keeper_all ON public.memberships TO keeper USING (true) WITH CHECK (true);

CREATE POLICY keeper_all ON public.sessions TO keeper USING (true) WITH CHECK (true);

CREATE POLICY keeper_all ON public.single_use_links TO keeper USING (true) WITH CHECK (true);

CREATE POLICY keeper_all ON public.timeline_heads TO keeper USING (true) WITH CHECK (true);

CREATE POLICY keeper_all ON public.users TO keeper USING (true) WITH CHECK (true);

CREATE POLICY keeper_claims ON public.claims FOR SELECT TO keeper USING (true);

CREATE POLICY keeper_clock ON public.claim_queries FOR UPDATE TO keeper USING ((answered_at IS NULL)) WITH CHECK ((answered_at IS NULL));

CREATE POLICY keeper_clock ON public.claims FOR UPDATE TO keeper USING ((state = 'answerNeeded'::text)) WITH CHECK ((state = ANY (ARRAY['answerNeeded'::text, 'lapsed'::text])));

CREATE POLICY keeper_clock ON public.timeline_entries FOR INSERT TO keeper WITH CHECK (((kind = ANY (ARRAY['reminded'::text, 'lapse'::text])) AND (actor_id IS NULL) AND (actor_organisation_id IS NULL)));

CREATE POLICY keeper_flags ON public.claim_flags TO keeper USING (true) WITH CHECK (true);

CREATE POLICY keeper_insert ON public.alerts FOR INSERT TO keeper WITH CHECK (true);

CREATE POLICY keeper_insert ON public.audit_log FOR INSERT TO keeper WITH CHECK (true);

CREATE POLICY keeper_insert ON public.organisations FOR INSERT TO keeper WITH CHECK ((buys AND (NOT sells)));

CREATE POLICY keeper_insert ON public.outbox FOR INSERT TO keeper WITH CHECK (true);

CREATE POLICY keeper_insert ON public.sites FOR INSERT TO keeper WITH CHECK (true);

CREATE POLICY keeper_lines ON public.claim_lines TO keeper USING (true) WITH CHECK (true);

CREATE POLICY keeper_read ON public.audit_log FOR SELECT TO keeper USING (true);

CREATE POLICY keeper_read ON public.claim_queries FOR SELECT TO keeper USING (true);

CREATE POLICY keeper_read ON public.credit_notes FOR SELECT TO keeper USING (true);

CREATE POLICY keeper_read ON public.evidence_files FOR SELECT TO keeper USING (true);

CREATE POLICY keeper_read ON public.membership_roles FOR SELECT TO keeper USING (true);

CREATE POLICY keeper_read ON public.organisations FOR SELECT TO keeper USING (true);

CREATE POLICY keeper_settles ON public.claims FOR UPDATE TO keeper USING ((state = 'decided'::text)) WITH CHECK ((state = ANY (ARRAY['decided'::text, 'settled'::text])));

CREATE POLICY keeper_settles ON public.timeline_entries FOR INSERT TO keeper WITH CHECK (((kind = 'settle'::text) AND (actor_id IS NULL) AND (actor_organisation_id IS NULL)));

CREATE POLICY keeper_units ON public.units FOR SELECT TO keeper USING (true);

ALTER TABLE public.ledger_entries ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.ledger_heads ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.ledger_postings ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.login_attempts ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.makers ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.membership_roles ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.memberships ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.organisations ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.outbox ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.parcels ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.part_returns ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.parts ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.readings ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.return_lines ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.revision_evidence ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.rule_book_versions ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.sessions ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.single_use_links ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.sites ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.timeline_entries ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.timeline_heads ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.trading_accounts ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.units ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.users ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.vehicles ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.verdict_lines ENABLE ROW LEVEL SECURITY;

ALTER TABLE public.verdicts ENABLE ROW LEVEL SECURITY;

CREATE POLICY web_delete ON public.claim_drafts FOR DELETE TO web USING ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_delete ON public.claim_lines FOR DELETE TO web USING ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_delete ON public.installers FOR DELETE TO web USING ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_delete ON public.membership_roles FOR DELETE TO web USING ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_delete ON public.memberships FOR DELETE TO web USING ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_delete ON public.organisations FOR DELETE TO web USING (false);

CREATE POLICY web_delete ON public.sites FOR DELETE TO web USING ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_delete ON public.trading_accounts FOR DELETE TO web USING (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND false));

CREATE POLICY web_insert ON public.batches FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.claim_drafts FOR INSERT TO web WITH CHECK ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.claim_lines FOR INSERT TO web WITH CHECK (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) AND (NOT holds_unit)));

CREATE POLICY web_insert ON public.claim_messages FOR INSERT TO web WITH CHECK ((((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (EXISTS ( SELECT 1
   FROM public.claims c
  WHERE ((c.id = claim_messages.claim_id) AND (c.state <> ALL (ARRAY['draft'::text, 'discarded'::text]))))))) AND (author_organisation_id = ( SELECT public.ctx_org() AS ctx_org)) AND (author_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_insert ON public.claim_queries FOR INSERT TO web WITH CHECK (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (asked_by_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_insert ON public.claim_revisions FOR INSERT TO web WITH CHECK (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) AND (sent_by_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_insert ON public.claims FOR INSERT TO web WITH CHECK (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) AND (state = 'draft'::text)));

CREATE POLICY web_insert ON public.credit_allocations FOR INSERT TO web WITH CHECK (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (allocated_by_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_insert ON public.credit_note_lines FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.credit_note_series FOR INSERT TO web WITH CHECK (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (last_sequence = 0)));

CREATE POLICY web_insert ON public.credit_notes FOR INSERT TO web WITH CHECK (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (issued_by_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_insert ON public.evidence_files FOR INSERT TO web WITH CHECK (((uploaded_by_id = ( SELECT public.ctx_actor() AS ctx_actor)) AND (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) AND (taken_by = 'workshop'::text)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (taken_by = 'goodsIn'::text) AND (EXISTS ( SELECT 1
   FROM public.claims c
  WHERE ((c.id = evidence_files.claim_id) AND (c.state <> ALL (ARRAY['draft'::text, 'discarded'::text])))))))));

CREATE POLICY web_insert ON public.findings FOR INSERT TO web WITH CHECK (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (found_by_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_insert ON public.fittings FOR INSERT TO web WITH CHECK ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.idempotency_keys FOR INSERT TO web WITH CHECK ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.installers FOR INSERT TO web WITH CHECK ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.invoice_imports FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.invoice_lines FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.ledger_entries FOR INSERT TO web WITH CHECK (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (entered_by_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_insert ON public.ledger_heads FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.ledger_postings FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.makers FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.membership_roles FOR INSERT TO web WITH CHECK ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.memberships FOR INSERT TO web WITH CHECK ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.organisations FOR INSERT TO web WITH CHECK (false);

CREATE POLICY web_insert ON public.outbox FOR INSERT TO web WITH CHECK ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.parcels FOR INSERT TO web WITH CHECK (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (received_by_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_insert ON public.part_returns FOR INSERT TO web WITH CHECK (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (called_in_by_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_insert ON public.parts FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.readings FOR INSERT TO web WITH CHECK (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_insert ON public.return_lines FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.revision_evidence FOR INSERT TO web WITH CHECK ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.rule_book_versions FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.sites FOR INSERT TO web WITH CHECK ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.timeline_entries FOR INSERT TO web WITH CHECK ((((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)) AND (actor_organisation_id = ( SELECT public.ctx_org() AS ctx_org)) AND (actor_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_insert ON public.trading_accounts FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.units FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.vehicles FOR INSERT TO web WITH CHECK ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.verdict_lines FOR INSERT TO web WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_insert ON public.verdicts FOR INSERT TO web WITH CHECK (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (decided_by_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_select ON public.alerts FOR SELECT TO web USING (((organisation_id = ( SELECT public.ctx_org() AS ctx_org)) AND (user_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_select ON public.audit_log FOR SELECT TO web USING ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.batches FOR SELECT TO web USING (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) OR (EXISTS ( SELECT 1
   FROM public.trading_accounts t
  WHERE ((t.seller_id = batches.seller_id) AND (t.buyer_id = ( SELECT public.ctx_org() AS ctx_org)))))));

CREATE POLICY web_select ON public.claim_drafts FOR SELECT TO web USING ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.claim_flags FOR SELECT TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.claim_lines FOR SELECT TO web USING (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (EXISTS ( SELECT 1
   FROM public.claims c
  WHERE ((c.id = claim_lines.claim_id) AND (c.state <> ALL (ARRAY['draft'::text, 'discarded'::text]))))))));

CREATE POLICY web_select ON public.claim_messages FOR SELECT TO web USING ((((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)) AND ((audience = 'both'::text) OR (author_organisation_id = ( SELECT public.ctx_org() AS ctx_org)))));

CREATE POLICY web_select ON public.claim_queries FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.claim_revisions FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.claims FOR SELECT TO web USING (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (state <> ALL (ARRAY['draft'::text, 'discarded'::text])))));

CREATE POLICY web_select ON public.credit_allocations FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.credit_note_lines FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.credit_note_series FOR SELECT TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.credit_notes FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.evidence_files FOR SELECT TO web USING (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (EXISTS ( SELECT 1
   FROM public.claims c
  WHERE ((c.id = evidence_files.claim_id) AND (c.state <> ALL (ARRAY['draft'::text, 'discarded'::text]))))))));

CREATE POLICY web_select ON public.findings FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.fittings FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.idempotency_keys FOR SELECT TO web USING ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.installers FOR SELECT TO web USING ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.invoice_imports FOR SELECT TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.invoice_lines FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = buyer_id)));

CREATE POLICY web_select ON public.ledger_entries FOR SELECT TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.ledger_heads FOR SELECT TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.ledger_postings FOR SELECT TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.makers FOR SELECT TO web USING (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) OR (EXISTS ( SELECT 1
   FROM public.trading_accounts t
  WHERE ((t.seller_id = makers.seller_id) AND (t.buyer_id = ( SELECT public.ctx_org() AS ctx_org)))))));

CREATE POLICY web_select ON public.membership_roles FOR SELECT TO web USING ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.memberships FOR SELECT TO web USING ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.organisations FOR SELECT TO web USING (((id = ( SELECT public.ctx_org() AS ctx_org)) OR (EXISTS ( SELECT 1
   FROM public.trading_accounts t
  WHERE (((t.seller_id = organisations.id) AND (t.buyer_id = ( SELECT public.ctx_org() AS ctx_org))) OR ((t.buyer_id = organisations.id) AND (t.seller_id = ( SELECT public.ctx_org() AS ctx_org))))))));

CREATE POLICY web_select ON public.parcels FOR SELECT TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_select ON public.part_returns FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.parts FOR SELECT TO web USING (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) OR (EXISTS ( SELECT 1
   FROM public.trading_accounts t
  WHERE ((t.seller_id = parts.seller_id) AND (t.buyer_id = ( SELECT public.ctx_org() AS ctx_org)))))));

CREATE POLICY web_select ON public.readings FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.return_lines FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.revision_evidence FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.rule_book_versions FOR SELECT TO web USING (((seller_id = ( SELECT public.ctx_org() AS ctx_org)) OR (EXISTS ( SELECT 1
   FROM public.trading_accounts t
  WHERE ((t.seller_id = rule_book_versions.seller_id) AND (t.buyer_id = ( SELECT public.ctx_org() AS ctx_org)))))));

CREATE POLICY web_select ON public.sessions FOR SELECT TO web USING ((user_id = ( SELECT public.ctx_actor() AS ctx_actor)));

CREATE POLICY web_select ON public.sites FOR SELECT TO web USING (((organisation_id = ( SELECT public.ctx_org() AS ctx_org)) OR (EXISTS ( SELECT 1
   FROM public.trading_accounts t
  WHERE ((t.buyer_id = sites.organisation_id) AND (t.seller_id = ( SELECT public.ctx_org() AS ctx_org)))))));

CREATE POLICY web_select ON public.timeline_entries FOR SELECT TO web USING ((((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (EXISTS ( SELECT 1
   FROM public.claims c
  WHERE ((c.id = timeline_entries.claim_id) AND (c.state <> ALL (ARRAY['draft'::text, 'discarded'::text]))))))) AND ((only_for_id IS NULL) OR (only_for_id = ( SELECT public.ctx_org() AS ctx_org)))));

CREATE POLICY web_select ON public.trading_accounts FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = buyer_id)));

CREATE POLICY web_select ON public.units FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = buyer_id)));

CREATE POLICY web_select ON public.users FOR SELECT TO web USING (((id = ( SELECT public.ctx_actor() AS ctx_actor)) OR (EXISTS ( SELECT 1
   FROM public.memberships m
  WHERE ((m.user_id = users.id) AND (m.organisation_id = ( SELECT public.ctx_org() AS ctx_org)) AND (m.accepted_at IS NOT NULL))))));

CREATE POLICY web_select ON public.vehicles FOR SELECT TO web USING (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) OR (EXISTS ( SELECT 1
   FROM public.fittings f
  WHERE ((f.vehicle_id = vehicles.id) AND (f.seller_id = ( SELECT public.ctx_org() AS ctx_org)))))));

CREATE POLICY web_select ON public.verdict_lines FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_select ON public.verdicts FOR SELECT TO web USING (((( SELECT public.ctx_org() AS ctx_org) = seller_id) OR (( SELECT public.ctx_org() AS ctx_org) = workshop_id)));

CREATE POLICY web_update ON public.alerts FOR UPDATE TO web USING (((organisation_id = ( SELECT public.ctx_org() AS ctx_org)) AND (user_id = ( SELECT public.ctx_actor() AS ctx_actor)))) WITH CHECK (((organisation_id = ( SELECT public.ctx_org() AS ctx_org)) AND (user_id = ( SELECT public.ctx_actor() AS ctx_actor))));

CREATE POLICY web_update ON public.batches FOR UPDATE TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.claim_drafts FOR UPDATE TO web USING ((workshop_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.claim_lines FOR UPDATE TO web USING (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (EXISTS ( SELECT 1
   FROM public.claims c
  WHERE ((c.id = claim_lines.claim_id) AND (c.state <> ALL (ARRAY['draft'::text, 'discarded'::text])))))))) WITH CHECK (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (EXISTS ( SELECT 1
   FROM public.claims c
  WHERE ((c.id = claim_lines.claim_id) AND (c.state <> ALL (ARRAY['draft'::text, 'discarded'::text]))))))));

CREATE POLICY web_update ON public.claim_queries FOR UPDATE TO web USING ((workshop_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.claims FOR UPDATE TO web USING (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (state <> ALL (ARRAY['draft'::text, 'discarded'::text]))))) WITH CHECK (((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (state <> ALL (ARRAY['draft'::text, 'discarded'::text])))));

CREATE POLICY web_update ON public.credit_note_series FOR UPDATE TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.evidence_files FOR UPDATE TO web USING ((((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) AND (taken_by = 'workshop'::text)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (taken_by = 'goodsIn'::text)))) WITH CHECK ((((workshop_id = ( SELECT public.ctx_org() AS ctx_org)) AND (taken_by = 'workshop'::text)) OR ((seller_id = ( SELECT public.ctx_org() AS ctx_org)) AND (taken_by = 'goodsIn'::text))));

CREATE POLICY web_update ON public.fittings FOR UPDATE TO web USING ((workshop_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.idempotency_keys FOR UPDATE TO web USING ((organisation_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.installers FOR UPDATE TO web USING ((workshop_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.invoice_imports FOR UPDATE TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.ledger_heads FOR UPDATE TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.makers FOR UPDATE TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.membership_roles FOR UPDATE TO web USING ((organisation_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.memberships FOR UPDATE TO web USING ((organisation_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.organisations FOR UPDATE TO web USING ((id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.parcels FOR UPDATE TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.part_returns FOR UPDATE TO web USING ((workshop_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.parts FOR UPDATE TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.return_lines FOR UPDATE TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.sites FOR UPDATE TO web USING ((organisation_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((organisation_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.trading_accounts FOR UPDATE TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.units FOR UPDATE TO web USING ((seller_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((seller_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY web_update ON public.users FOR UPDATE TO web USING ((id = ( SELECT public.ctx_actor() AS ctx_actor))) WITH CHECK ((id = ( SELECT public.ctx_actor() AS ctx_actor)));

CREATE POLICY web_update ON public.vehicles FOR UPDATE TO web USING ((workshop_id = ( SELECT public.ctx_org() AS ctx_org))) WITH CHECK ((workshop_id = ( SELECT public.ctx_org() AS ctx_org)));

CREATE POLICY worker_select ON public.credit_notes FOR SELECT TO worker USING (true);

CREATE POLICY worker_select ON public.evidence_files FOR SELECT TO worker USING (true);

CREATE POLICY worker_select ON public.outbox FOR SELECT TO worker USING (true);

CREATE POLICY worker_update ON public.evidence_files FOR UPDATE TO worker USING (true) WITH CHECK (true);

CREATE POLICY worker_update ON public.outbox FOR UPDATE TO worker USING (true) WITH CHECK (true);

GRANT USAGE ON SCHEMA guarded TO web;
GRANT USAGE ON SCHEMA guarded TO partproof_owner;
GRANT USAGE ON SCHEMA guarded TO worker;

REVOKE USAGE ON SCHEMA public FROM PUBLIC;
GRANT ALL ON SCHEMA public TO partproof_owner;
GRANT USAGE ON SCHEMA public TO web;
GRANT USAGE ON SCHEMA public TO worker;
GRANT USAGE ON SCHEMA public TO keeper;
GRANT USAGE ON SCHEMA public TO reporter;
GRANT USAGE ON SCHEMA public TO auditor;
GRANT USAGE ON SCHEMA public TO backup;

REVOKE ALL ON FUNCTION guarded.accept_invitation(p_token_hash text, p_user uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.accept_invitation(p_token_hash text, p_user uuid) TO web;

REVOKE ALL ON FUNCTION guarded.append_audit(p_action text, p_detail jsonb) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.append_audit(p_action text, p_detail jsonb) TO web;

REVOKE ALL ON FUNCTION guarded.begin_attempt(p_account text, p_address text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.begin_attempt(p_account text, p_address text) TO web;

REVOKE ALL ON FUNCTION guarded.chain_timeline() FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.chain_timeline() TO partproof_owner;

REVOKE ALL ON FUNCTION guarded.clear_attempts(p_account text, p_address text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.clear_attempts(p_account text, p_address text) TO web;

REVOKE ALL ON FUNCTION guarded.due_to_settle() FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.due_to_settle() TO worker;

REVOKE ALL ON FUNCTION guarded.end_session(p_session uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.end_session(p_session uuid) TO web;

REVOKE ALL ON FUNCTION guarded.end_sessions_of_member() FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.end_sessions_of_member() TO partproof_owner;

REVOKE ALL ON FUNCTION guarded.flag_claim(p_claim uuid, p_line integer, p_kind text, p_detail jsonb) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.flag_claim(p_claim uuid, p_line integer, p_kind text, p_detail jsonb) TO web;

REVOKE ALL ON FUNCTION guarded.flag_seen_before(p_evidence uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.flag_seen_before(p_evidence uuid) TO web;

REVOKE ALL ON FUNCTION guarded.flag_serial(p_claim uuid, p_line integer, p_serial_normal text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.flag_serial(p_claim uuid, p_line integer, p_serial_normal text) TO web;

REVOKE ALL ON FUNCTION guarded.hold_query(p_query uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.hold_query(p_query uuid) TO worker;

REVOKE ALL ON FUNCTION guarded.hold_unit(p_line uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.hold_unit(p_line uuid) TO web;

REVOKE ALL ON FUNCTION guarded.invitation_candidate(p_token_hash text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.invitation_candidate(p_token_hash text) TO web;

REVOKE ALL ON FUNCTION guarded.invite_person(p_email text, p_name text, p_locale text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.invite_person(p_email text, p_name text, p_locale text) TO web;

REVOKE ALL ON FUNCTION guarded.lapse_query(p_query uuid, p_params jsonb) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.lapse_query(p_query uuid, p_params jsonb) TO worker;

REVOKE ALL ON FUNCTION guarded.link_owner(p_token_hash text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.link_owner(p_token_hash text) TO web;

REVOKE ALL ON FUNCTION guarded.mail_claim_people(p_claim uuid, p_to text, p_kind text, p_params jsonb, p_dedupe text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.mail_claim_people(p_claim uuid, p_to text, p_kind text, p_params jsonb, p_dedupe text) TO web;

REVOKE ALL ON FUNCTION guarded.mail_credit_note(p_note uuid, p_kind text, p_params jsonb, p_dedupe text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.mail_credit_note(p_note uuid, p_kind text, p_params jsonb, p_dedupe text) TO web;

REVOKE ALL ON FUNCTION guarded.mail_link_owner(p_token_hash text, p_kind text, p_params jsonb, p_request text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.mail_link_owner(p_token_hash text, p_kind text, p_params jsonb, p_request text) TO web;

REVOKE ALL ON FUNCTION guarded.mail_of_query(p_query uuid, p_kind text, p_dedupe text, p_params jsonb, p_asker_too boolean) FROM PUBLIC;

REVOKE ALL ON FUNCTION guarded.make_link(p_email text, p_purpose text, p_token_hash text, p_minutes integer) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.make_link(p_email text, p_purpose text, p_token_hash text, p_minutes integer) TO web;

REVOKE ALL ON FUNCTION guarded.open_workshop(p_given jsonb) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.open_workshop(p_given jsonb) TO web;

REVOKE ALL ON FUNCTION guarded.organisations_of(p_session uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.organisations_of(p_session uuid) TO web;

REVOKE ALL ON FUNCTION guarded.own_password_hash() FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.own_password_hash() TO web;

REVOKE ALL ON FUNCTION guarded.people_seen() FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.people_seen() TO web;

REVOKE ALL ON FUNCTION guarded.remind_query(p_query uuid, p_reminder integer, p_lapses_on date, p_params jsonb) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.remind_query(p_query uuid, p_reminder integer, p_lapses_on date, p_params jsonb) TO worker;

REVOKE ALL ON FUNCTION guarded.session_context(p_session uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.session_context(p_session uuid) TO web;

REVOKE ALL ON FUNCTION guarded.set_password(p_user uuid, p_password_hash text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.set_password(p_user uuid, p_password_hash text) TO web;

REVOKE ALL ON FUNCTION guarded.settle_claim(p_claim uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.settle_claim(p_claim uuid) TO worker;

REVOKE ALL ON FUNCTION guarded.sign_in_candidate(p_email text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.sign_in_candidate(p_email text) TO web;

REVOKE ALL ON FUNCTION guarded.start_session(p_user uuid, p_organisation uuid, p_hours integer, p_idle_hours integer, p_device text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.start_session(p_user uuid, p_organisation uuid, p_hours integer, p_idle_hours integer, p_device text) TO web;

REVOKE ALL ON FUNCTION guarded.switch_session(p_session uuid, p_organisation uuid, p_hours integer, p_idle_hours integer) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.switch_session(p_session uuid, p_organisation uuid, p_hours integer, p_idle_hours integer) TO web;

REVOKE ALL ON FUNCTION guarded.use_link(p_token_hash text, p_password_hash text) FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.use_link(p_token_hash text, p_password_hash text) TO web;

REVOKE ALL ON FUNCTION guarded.waiting_queries() FROM PUBLIC;
GRANT ALL ON FUNCTION guarded.waiting_queries() TO worker;

GRANT SELECT ON TABLE public.audit_log TO web;
GRANT SELECT ON TABLE public.audit_log TO auditor;
GRANT SELECT,INSERT ON TABLE public.audit_log TO keeper;

GRANT SELECT,INSERT ON TABLE public.timeline_entries TO web;
GRANT INSERT ON TABLE public.timeline_entries TO keeper;

GRANT SELECT ON TABLE public.alerts TO web;
GRANT INSERT ON TABLE public.alerts TO keeper;

GRANT UPDATE(read_at) ON TABLE public.alerts TO web;

GRANT SELECT,INSERT,UPDATE ON TABLE public.audit_heads TO keeper;

GRANT SELECT,INSERT,UPDATE ON TABLE public.batches TO web;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE public.claim_drafts TO web;

GRANT SELECT ON TABLE public.claim_flags TO web;
GRANT SELECT,INSERT ON TABLE public.claim_flags TO keeper;

GRANT SELECT,INSERT,UPDATE ON TABLE public.claim_lines TO web;
GRANT SELECT,UPDATE ON TABLE public.claim_lines TO keeper;

GRANT SELECT,INSERT ON TABLE public.claim_messages TO web;

GRANT SELECT ON TABLE public.claim_moves TO web;
GRANT SELECT ON TABLE public.claim_moves TO worker;
GRANT SELECT ON TABLE public.claim_moves TO keeper;

GRANT SELECT,INSERT ON TABLE public.claim_queries TO web;
GRANT SELECT ON TABLE public.claim_queries TO keeper;

GRANT UPDATE(answered_at) ON TABLE public.claim_queries TO web;

GRANT UPDATE(answered_revision) ON TABLE public.claim_queries TO web;

GRANT UPDATE(reminders_sent) ON TABLE public.claim_queries TO keeper;

GRANT SELECT,INSERT ON TABLE public.claim_revisions TO web;

GRANT SELECT,INSERT,UPDATE ON TABLE public.claims TO web;
GRANT SELECT ON TABLE public.claims TO keeper;

GRANT UPDATE(state) ON TABLE public.claims TO keeper;

GRANT UPDATE(holder_id) ON TABLE public.claims TO keeper;

GRANT UPDATE(held_until) ON TABLE public.claims TO keeper;

GRANT UPDATE(parked_with_id) ON TABLE public.claims TO keeper;

GRANT UPDATE(parked_question) ON TABLE public.claims TO keeper;

GRANT UPDATE(query_lapses_on) ON TABLE public.claims TO keeper;

GRANT SELECT,INSERT ON TABLE public.credit_allocations TO web;

GRANT SELECT,INSERT ON TABLE public.credit_note_lines TO web;

GRANT SELECT,INSERT,UPDATE ON TABLE public.credit_note_series TO web;

GRANT SELECT,INSERT ON TABLE public.credit_notes TO web;
GRANT SELECT ON TABLE public.credit_notes TO worker;
GRANT SELECT ON TABLE public.credit_notes TO keeper;

GRANT SELECT,INSERT,UPDATE ON TABLE public.evidence_files TO web;
GRANT SELECT,UPDATE ON TABLE public.evidence_files TO worker;
GRANT SELECT ON TABLE public.evidence_files TO keeper;

GRANT SELECT,INSERT ON TABLE public.findings TO web;

GRANT SELECT,INSERT,UPDATE ON TABLE public.fittings TO web;

GRANT SELECT,INSERT,UPDATE ON TABLE public.idempotency_keys TO web;

GRANT SELECT,INSERT,UPDATE ON TABLE public.installers TO web;

GRANT SELECT,INSERT,UPDATE ON TABLE public.invoice_imports TO web;

GRANT SELECT,INSERT ON TABLE public.invoice_lines TO web;

GRANT SELECT,INSERT ON TABLE public.ledger_entries TO web;

GRANT SELECT,INSERT,UPDATE ON TABLE public.ledger_heads TO web;

GRANT SELECT,INSERT ON TABLE public.ledger_postings TO web;

GRANT SELECT,INSERT,DELETE ON TABLE public.login_attempts TO keeper;

GRANT SELECT,INSERT,UPDATE ON TABLE public.makers TO web;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE public.membership_roles TO web;
GRANT SELECT ON TABLE public.membership_roles TO keeper;

GRANT SELECT ON TABLE public.memberships TO web;
GRANT SELECT,INSERT,UPDATE ON TABLE public.memberships TO keeper;

GRANT UPDATE(disabled_at) ON TABLE public.memberships TO web;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE public.organisations TO web;
GRANT SELECT,INSERT ON TABLE public.organisations TO keeper;

GRANT INSERT ON TABLE public.outbox TO web;
GRANT SELECT,UPDATE ON TABLE public.outbox TO worker;
GRANT INSERT ON TABLE public.outbox TO keeper;

GRANT SELECT,INSERT ON TABLE public.parcels TO web;

GRANT UPDATE(return_id) ON TABLE public.parcels TO web;

GRANT UPDATE(matched_at) ON TABLE public.parcels TO web;

GRANT UPDATE(matched_by_id) ON TABLE public.parcels TO web;

GRANT SELECT,INSERT ON TABLE public.part_returns TO web;

GRANT UPDATE(dispatched_at) ON TABLE public.part_returns TO web;

GRANT UPDATE(dispatched_by_id) ON TABLE public.part_returns TO web;

GRANT UPDATE(carrier) ON TABLE public.part_returns TO web;

GRANT UPDATE(tracking_number) ON TABLE public.part_returns TO web;

GRANT SELECT,INSERT,UPDATE ON TABLE public.parts TO web;

GRANT SELECT,INSERT ON TABLE public.readings TO web;

GRANT SELECT,INSERT ON TABLE public.return_lines TO web;

GRANT UPDATE(parcel_id) ON TABLE public.return_lines TO web;

GRANT UPDATE(place) ON TABLE public.return_lines TO web;

GRANT UPDATE(serial_seen) ON TABLE public.return_lines TO web;

GRANT UPDATE(received_at) ON TABLE public.return_lines TO web;

GRANT UPDATE(disposed_as) ON TABLE public.return_lines TO web;

GRANT UPDATE(disposed_at) ON TABLE public.return_lines TO web;

GRANT UPDATE(disposed_by_id) ON TABLE public.return_lines TO web;

GRANT SELECT,INSERT ON TABLE public.revision_evidence TO web;

GRANT SELECT,INSERT ON TABLE public.rule_book_versions TO web;

GRANT SELECT ON TABLE public.sessions TO web;
GRANT SELECT,INSERT,UPDATE ON TABLE public.sessions TO keeper;

GRANT SELECT,INSERT,UPDATE ON TABLE public.single_use_links TO keeper;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE public.sites TO web;
GRANT INSERT ON TABLE public.sites TO keeper;

GRANT SELECT,INSERT,UPDATE ON TABLE public.timeline_heads TO keeper;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE public.trading_accounts TO web;

GRANT SELECT,INSERT,UPDATE ON TABLE public.units TO web;
GRANT SELECT ON TABLE public.units TO keeper;

GRANT SELECT,INSERT,UPDATE ON TABLE public.users TO keeper;

GRANT SELECT(id) ON TABLE public.users TO web;

GRANT SELECT(email) ON TABLE public.users TO web;

GRANT SELECT(name),UPDATE(name) ON TABLE public.users TO web;

GRANT SELECT(locale),UPDATE(locale) ON TABLE public.users TO web;

GRANT SELECT(theme),UPDATE(theme) ON TABLE public.users TO web;

GRANT SELECT(density),UPDATE(density) ON TABLE public.users TO web;

GRANT SELECT(session_version) ON TABLE public.users TO web;

GRANT SELECT(disabled_at) ON TABLE public.users TO web;

GRANT SELECT(created_at) ON TABLE public.users TO web;

GRANT SELECT,INSERT,UPDATE ON TABLE public.vehicles TO web;

GRANT SELECT,INSERT ON TABLE public.verdict_lines TO web;

GRANT SELECT,INSERT ON TABLE public.verdicts TO web;

GRANT SELECT ON TABLE public.worker_heartbeats TO web;
GRANT SELECT,INSERT,UPDATE ON TABLE public.worker_heartbeats TO worker;
