import { holdUnit, records, timeline, timelineChain } from "./claim-records";
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
    drop function guarded.chain_timeline(), guarded.hold_unit(uuid), guarded.flag_claim(uuid, integer, text, jsonb), guarded.flag_serial(uuid, integer, text);
    set local role partproof_owner;`);
};
