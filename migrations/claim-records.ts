// What is said and kept about a claim: revisions, readings, verdicts, talk, flags, the timeline and who holds a unit.

export const records = `
  create table claim_revisions (
    id uuid primary key default gen_random_uuid(),
    claim_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    revision integer not null check (revision > 0),
    facts jsonb not null,
    sha256 text not null check (length(sha256) = 64),
    sent_by_id uuid not null references users,
    sent_at timestamptz not null default now(),
    unique (claim_id, revision),
    unique (claim_id, revision, sha256),
    unique (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id)
  );
  create table readings (
    id uuid primary key default gen_random_uuid(),
    claim_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    revision integer not null,
    line_number integer not null default 1,
    kind text not null,
    raw_text text not null,
    unit text not null,
    canonical_value numeric,
    temperature_celsius numeric,
    instrument text,
    taken_by text not null check (taken_by in ('workshop', 'goodsIn')),
    foreign key (claim_id, revision) references claim_revisions (claim_id, revision),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id)
  );
  create index readings_by_claim on readings (claim_id, revision);
  create table claim_queries (
    id uuid primary key default gen_random_uuid(),
    claim_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    round integer not null check (round > 0),
    items jsonb not null,
    question text not null check (length(question) <= 4000),
    asked_by_id uuid not null references users,
    asked_at timestamptz not null default now(),
    answered_at timestamptz,
    answered_revision integer,
    unique (claim_id, round),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id)
  );
  create table verdicts (
    id uuid primary key default gen_random_uuid(),
    claim_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    revision integer not null,
    revision_sha256 text not null,
    outcome text not null check (outcome in ('upheld', 'upheldInPart', 'declined')),
    letter text not null check (length(letter) <= 4000),
    decided_by_id uuid not null references users,
    decided_at timestamptz not null default now(),
    reverses_id uuid,
    unique (seller_id, workshop_id, id),
    unique (reverses_id),
    foreign key (claim_id, revision, revision_sha256) references claim_revisions (claim_id, revision, sha256),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, reverses_id) references verdicts (seller_id, workshop_id, id)
  );
  create index verdicts_by_claim on verdicts (claim_id, decided_at);
  create table verdict_lines (
    verdict_id uuid not null,
    line_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    outcome text not null check (outcome in ('upheld', 'upheldInPart', 'declined')),
    attribution jsonb not null,
    reason_code text not null,
    reason text not null check (length(reason) between 1 and 4000),
    rule_version_id uuid,
    coverage jsonb not null,
    return_waived_reason text,
    primary key (verdict_id, line_id),
    foreign key (seller_id, workshop_id, verdict_id) references verdicts (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, line_id) references claim_lines (seller_id, workshop_id, id),
    foreign key (seller_id, rule_version_id) references rule_book_versions (seller_id, id)
  );
  create table claim_messages (
    id uuid primary key default gen_random_uuid(),
    claim_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    author_id uuid not null references users,
    author_name text not null,
    author_organisation_id uuid not null references organisations,
    audience text not null check (audience in ('both', 'own')),
    body text not null check (length(body) between 1 and 4000),
    at timestamptz not null default now(),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id)
  );
  create index claim_messages_by_claim on claim_messages (claim_id, at);
  -- What the distributor alone is told: a unit claimed twice, a photo seen before, a serial never sold there.
  create table claim_flags (
    id uuid primary key default gen_random_uuid(),
    claim_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    line_number integer,
    kind text not null,
    detail jsonb not null default '{}',
    at timestamptz not null default now(),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id)
  );
  create index claim_flags_by_claim on claim_flags (claim_id);
`;

export const timeline = `
  create table timeline_entries (
    claim_id uuid not null,
    seq integer not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    kind text not null,
    actor_id uuid,
    actor_name text not null,
    actor_organisation_id uuid references organisations,
    only_for_id uuid,
    detail jsonb not null default '{}',
    at timestamptz not null default now(),
    prev_hash text not null,
    hash text not null,
    primary key (claim_id, seq),
    unique (claim_id, prev_hash),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id)
  );
  create table timeline_heads (
    claim_id uuid primary key references claims,
    seq integer not null,
    hash text not null
  );
  -- What the chain is reckoned over. An array as text can be read in one way only, whatever the words in it.
  create function timeline_text(entry timeline_entries) returns text language sql stable as $$
    select jsonb_build_array(entry.prev_hash, entry.claim_id, entry.seq,
      to_char(entry.at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US'), entry.kind, entry.actor_id, entry.actor_name,
      entry.actor_organisation_id, entry.only_for_id, entry.detail)::text $$;
`;

export const timelineChain = `
  -- Number, time and chain are the database's: nobody who writes an entry can choose them.
  create function guarded.chain_timeline() returns trigger language plpgsql security definer
    set search_path = pg_catalog, public, pg_temp as $body$
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
    end $body$;
  revoke all on function guarded.chain_timeline() from public;
  grant execute on function guarded.chain_timeline() to partproof_owner;
`;

export const holdUnit = `
  create function guarded.flag_claim(p_claim uuid, p_line integer, p_kind text, p_detail jsonb) returns void
    language plpgsql security definer set search_path = pg_catalog, public, pg_temp as $body$
    begin
      insert into claim_flags (claim_id, seller_id, workshop_id, line_number, kind, detail)
        select c.id, c.seller_id, c.workshop_id, p_line, p_kind, p_detail from claims c
        where c.id = p_claim and ctx_org() in (c.seller_id, c.workshop_id)
          and not exists (select 1 from claim_flags f where f.claim_id = c.id and f.kind = p_kind
            and f.line_number is not distinct from p_line and f.detail = p_detail);
    end $body$;
  revoke all on function guarded.flag_claim(uuid, integer, text, jsonb) from public;
  grant execute on function guarded.flag_claim(uuid, integer, text, jsonb) to web;

  -- Whether a serial is unknown or was shipped to somebody else is the distributor's to know.
  create function guarded.flag_serial(p_claim uuid, p_line integer, p_serial_normal text) returns void
    language plpgsql security definer set search_path = pg_catalog, public, pg_temp as $body$
    declare known boolean;
    begin
      select exists (select 1 from units u join claims c on c.seller_id = u.seller_id
        where c.id = p_claim and u.serial_normal = p_serial_normal) into known;
      perform guarded.flag_claim(p_claim, p_line, case when known then 'soldToOther' else 'serialUnknown' end,
        jsonb_build_object('serial', p_serial_normal));
    end $body$;
  revoke all on function guarded.flag_serial(uuid, integer, text) from public;
  grant execute on function guarded.flag_serial(uuid, integer, text) to web;

  -- Looks across workshops and answers nothing. A second claim on a unit is stored, flagged and told to nobody but the
  -- seller. Only who bought the unit holds it: an id that somebody guessed holds nothing.
  create function guarded.hold_unit(p_line uuid) returns void
    language plpgsql security definer set search_path = pg_catalog, public, pg_temp as $body$
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
    end $body$;
  revoke all on function guarded.hold_unit(uuid) from public;
  grant execute on function guarded.hold_unit(uuid) to web;
`;
