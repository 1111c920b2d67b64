import { appendOnly, policies, secure } from "./row-security";

type Run = (sql: string) => Promise<unknown>;

const claims = `
  create table claims (
    id uuid primary key default gen_random_uuid(),
    number text not null unique check (number ~ '^[0-9]{8}$'),
    seller_id uuid not null references organisations,
    workshop_id uuid not null references organisations,
    account_id uuid not null,
    site_id uuid,
    state text not null default 'draft' check (state in ('draft', 'filed', 'beingJudged', 'answerNeeded', 'decided',
      'contested', 'settled', 'withdrawn', 'lapsed', 'discarded')),
    outcome text check (outcome in ('upheld', 'upheldInPart', 'declined')),
    family text,
    symptom text,
    vehicle_id uuid,
    failed_on date,
    currency char(3) not null,
    asked_minor bigint not null default 0 check (asked_minor >= 0),
    safety_reported boolean not null default false,
    incident_known_at timestamptz,
    revision integer not null default 0 check (revision >= 0),
    created_by_id uuid not null references users,
    holder_id uuid references users,
    held_until timestamptz,
    parked_with_id uuid references users,
    parked_question text,
    filed_at timestamptz,
    filed_on date,
    answer_due_at timestamptz,
    clock_stopped_at timestamptz,
    clock_stopped_minutes integer not null default 0,
    query_lapses_on date,
    decided_at timestamptz,
    decided_by_id uuid references users,
    contest_until date,
    lock_version integer not null default 0,
    created_at timestamptz not null default now(),
    updated_at timestamptz not null default now(),
    check (state in ('draft', 'discarded') or (filed_at is not null and revision > 0 and failed_on is not null)),
    check (state not in ('decided', 'contested', 'settled') or (decided_at is not null and outcome is not null)),
    check (failed_on is null or filed_on is null or failed_on <= filed_on),
    unique (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, account_id) references trading_accounts (seller_id, buyer_id, id),
    foreign key (workshop_id, site_id) references sites (organisation_id, id),
    foreign key (workshop_id, vehicle_id) references vehicles (workshop_id, id)
  );
  create index claims_by_seller_state on claims (seller_id, state, filed_at);
  create index claims_by_workshop_state on claims (workshop_id, state, updated_at);
  create index claims_by_vehicle on claims (workshop_id, vehicle_id);
  create trigger claims_touch before update on claims for each row execute function touch_row();
  alter table claims enable always trigger claims_touch;

  -- What the workshop is still writing. The other side never sees a draft.
  create table claim_drafts (
    claim_id uuid primary key,
    seller_id uuid not null,
    workshop_id uuid not null,
    body jsonb not null default '{}',
    saved_at timestamptz not null default now(),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id)
  );

  create table claim_lines (
    id uuid primary key default gen_random_uuid(),
    claim_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    line_number integer not null check (line_number > 0),
    part_id uuid not null,
    unit_id uuid,
    invoice_line_id uuid,
    quantity integer not null default 1 check (quantity > 0),
    serial_typed text,
    fitting_id uuid,
    holds_unit boolean not null default false,
    asked_minor bigint not null default 0 check (asked_minor >= 0),
    verdict text check (verdict in ('upheld', 'upheldInPart', 'declined')),
    attribution jsonb,
    finding jsonb,
    return_state text not null default 'notNeeded' check (return_state in ('notNeeded', 'awaited', 'sent', 'received',
      'examined', 'disposed', 'scrapOnSite', 'notSentInTime', 'missing')),
    return_waived_reason text,
    credit_state text not null default 'none' check (credit_state in ('none', 'due', 'noteIssued', 'allocated', 'paidOut',
      'replaced', 'countered')),
    check (not holds_unit or unit_id is not null),
    unique (claim_id, line_number),
    unique (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id),
    foreign key (seller_id, part_id) references parts (seller_id, id),
    foreign key (seller_id, unit_id) references units (seller_id, id),
    foreign key (seller_id, workshop_id, invoice_line_id) references invoice_lines (seller_id, buyer_id, id),
    foreign key (seller_id, workshop_id, fitting_id) references fittings (seller_id, workshop_id, id)
  );
  -- One live claim for each physical unit.
  create unique index claim_lines_one_holder on claim_lines (seller_id, unit_id) where holds_unit;
  create index claim_lines_by_unit on claim_lines (seller_id, unit_id);
  create index claim_lines_by_part on claim_lines (seller_id, part_id);
  create index claim_lines_by_invoice_line on claim_lines (seller_id, invoice_line_id);
  create index claim_lines_by_claim on claim_lines (claim_id);
  -- Only guarded.hold_unit takes a unit: the clash of a plain update would tell one workshop of another's claim.
  create function keep_claim_line() returns trigger language plpgsql as $$
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
  create trigger claim_lines_kept before update on claim_lines for each row execute function keep_claim_line();
  alter table claim_lines enable always trigger claim_lines_kept;
`;

const moves = `
  create table claim_moves (
    from_state text not null,
    to_state text not null,
    primary key (from_state, to_state)
  );
  insert into claim_moves (from_state, to_state) values
    ('draft', 'filed'), ('draft', 'discarded'),
    ('filed', 'beingJudged'), ('filed', 'withdrawn'),
    ('beingJudged', 'filed'), ('beingJudged', 'answerNeeded'), ('beingJudged', 'decided'), ('beingJudged', 'withdrawn'),
    ('answerNeeded', 'filed'), ('answerNeeded', 'lapsed'), ('answerNeeded', 'withdrawn'),
    ('decided', 'contested'), ('decided', 'settled'),
    ('contested', 'beingJudged'),
    ('settled', 'beingJudged');
  grant select on claim_moves to web, worker;
  create function check_claim_move() returns trigger language plpgsql as $$
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
  create trigger claims_move before update on claims for each row execute function check_claim_move();
  alter table claims enable always trigger claims_move;
`;

const records = `
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

const timeline = `
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

const timelineChain = `
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

const holdUnit = `
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
  -- seller; so is a serial that was sold to somebody else, whose unit the claim never holds, or that nobody knows.
  create function guarded.hold_unit(p_line uuid, p_serial_normal text default null) returns void
    language plpgsql security definer set search_path = pg_catalog, public, pg_temp as $body$
    declare line claim_lines; wanted uuid; holder text;
    begin
      select * into line from claim_lines where id = p_line and workshop_id = ctx_org();
      if line.id is null or line.holds_unit then return; end if;
      wanted := coalesce(line.unit_id, (select id from units where seller_id = line.seller_id
        and part_id = line.part_id and serial_normal = p_serial_normal));
      if line.unit_id is null and p_serial_normal is not null then
        perform guarded.flag_claim(line.claim_id, line.line_number,
          case when wanted is null then 'serialUnknown' else 'soldElsewhere' end, '{}');
      end if;
      if wanted is null then return; end if;
      perform pg_advisory_xact_lock(hashtextextended(wanted::text, 7));
      select c.number into holder from claim_lines l join claims c on c.id = l.claim_id
        where l.seller_id = line.seller_id and l.unit_id = wanted and l.holds_unit;
      if holder is not null then
        perform guarded.flag_claim(line.claim_id, line.line_number, 'unitHeld', jsonb_build_object('otherClaim', holder));
      elsif line.unit_id is not null then
        update claim_lines set holds_unit = true where id = p_line;
      end if;
    end $body$;
  revoke all on function guarded.hold_unit(uuid, text) from public;
  grant execute on function guarded.hold_unit(uuid, text) to web;
`;

const party = "(select ctx_org()) in (seller_id, workshop_id)";
const workshop = "workshop_id = (select ctx_org())";
const seller = "seller_id = (select ctx_org())";
// History names its author, and nobody writes in another's name.
const myself = (column: string) => `${column} = (select ctx_actor())`;
// A claim row is the seller's business from the day it is filed; its drafts are not.
const claimSeen = `workshop_id = (select ctx_org()) or (seller_id = (select ctx_org()) and state not in ('draft', 'discarded'))`;
const parentSeen = (table: string) => `${workshop} or (${seller} and exists
  (select 1 from claims c where c.id = ${table}.claim_id and c.state not in ('draft', 'discarded')))`;

const security = `
  ${secure("claims")}
  ${policies("claims", "web", { select: claimSeen, insert: `${workshop} and state = 'draft'`, update: claimSeen })}
  ${secure("claim_drafts")}
  ${policies("claim_drafts", "web", { select: workshop, insert: workshop, update: workshop, delete: workshop })}
  ${secure("claim_lines")}
  ${policies("claim_lines", "web", { select: parentSeen("claim_lines"), insert: `${workshop} and not holds_unit`, update: parentSeen("claim_lines"), delete: workshop })}
  revoke delete on claim_lines from web;
  ${secure("claim_revisions")}
  ${policies("claim_revisions", "web", { select: party, insert: `${workshop} and ${myself("sent_by_id")}` })}
  ${secure("readings")}
  ${policies("readings", "web", { select: party, insert: party })}
  ${secure("claim_queries")}
  ${policies("claim_queries", "web", { select: party, insert: `${seller} and ${myself("asked_by_id")}`, update: workshop })}
  revoke update on claim_queries from web;
  grant update (answered_at, answered_revision) on claim_queries to web;
  ${secure("verdicts")}
  ${policies("verdicts", "web", { select: party, insert: `${seller} and ${myself("decided_by_id")}` })}
  ${secure("verdict_lines")}
  ${policies("verdict_lines", "web", { select: party, insert: seller })}
  ${secure("claim_messages")}
  ${policies("claim_messages", "web", {
    select: `${party} and (audience = 'both' or author_organisation_id = (select ctx_org()))`,
    insert: `(${parentSeen("claim_messages")}) and author_organisation_id = (select ctx_org())
      and ${myself("author_id")}`,
  })}
  ${secure("claim_flags")}
  ${policies("claim_flags", "web", { select: seller })}
  ${secure("timeline_entries")}
  ${policies("timeline_entries", "web", {
    select: `(${parentSeen("timeline_entries")}) and (only_for_id is null or only_for_id = (select ctx_org()))`,
    insert: `${party} and actor_organisation_id = (select ctx_org()) and ${myself("actor_id")}`,
  })}
  ${secure("timeline_heads")}
  ${["claim_revisions", "readings", "verdicts", "verdict_lines", "timeline_entries", "claim_messages"].map(appendOnly).join("\n")}
  create policy keeper_all on timeline_heads for all to keeper using (true) with check (true);
  create policy keeper_lines on claim_lines for all to keeper using (true) with check (true);
  create policy keeper_claims on claims for select to keeper using (true);
  create policy keeper_flags on claim_flags for all to keeper using (true) with check (true);
  create policy keeper_units on units for select to keeper using (true);
  grant select, insert, update on timeline_heads to keeper;
  grant select, update on claim_lines to keeper;
  grant select, insert on claim_flags to keeper;
  grant select on claims, units to keeper;
`;

export const up = async (run: Run) => {
  for (const part of [claims, moves, records, timeline, security]) await run(part);
  await run(`set local role keeper`);
  for (const part of [timelineChain, holdUnit]) await run(part);
  await run(`set local role partproof_owner`);
  await run(`
    create trigger timeline_chain before insert on timeline_entries
      for each row execute function guarded.chain_timeline();
    alter table timeline_entries enable always trigger timeline_chain;
  `);
};

export const down = async (run: Run) => {
  await run(`drop function timeline_text(timeline_entries);
    drop table timeline_heads, timeline_entries, claim_flags, claim_messages, verdict_lines, verdicts, claim_queries,
    readings, claim_revisions, claim_moves, claim_lines, claim_drafts, claims cascade;
    drop function check_claim_move(), keep_claim_line(); drop policy keeper_units on units;`);
  await run(`set local role keeper;
    drop function guarded.chain_timeline(), guarded.hold_unit(uuid, text), guarded.flag_claim(uuid, integer, text, jsonb), guarded.flag_serial(uuid, integer, text);
    set local role partproof_owner;`);
};
