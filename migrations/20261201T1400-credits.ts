import { appendOnly, policies, secure } from "./row-security";

type Run = (sql: string) => Promise<unknown>;

const seller = "seller_id = (select ctx_org())";
const party = "(select ctx_org()) in (seller_id, workshop_id)";
const myself = (column: string) => `${column} = (select ctx_actor())`;

const credits = `
  -- What a verdict gives in money, frozen with its steps. A verdict that declines all gives nothing and has none.
  alter table verdicts add column credit jsonb,
    add column credit_net_minor bigint not null default 0 check (credit_net_minor >= 0),
    add column credit_total_minor bigint not null default 0 check (credit_total_minor >= credit_net_minor);
  alter table claims add column contest_waived_at timestamptz;
  alter table rule_book_versions drop constraint rule_book_versions_kind_check,
    add constraint rule_book_versions_kind_check
      check (kind in ('terms', 'evidenceList', 'limits', 'serviceLevels', 'credit'));

  -- One row a distributor and year. A number is taken from it under its lock, in the transaction that issues the document:
  -- what is rolled back gives its number back.
  create table credit_note_series (
    seller_id uuid not null references organisations,
    year integer not null check (year between 2000 and 2999),
    prefix text not null check (length(prefix) <= 8),
    last_sequence integer not null default 0 check (last_sequence >= 0),
    last_issued_on date,
    primary key (seller_id, year)
  );
  -- No number is left out and none is taken twice, whoever writes the row; no day goes back behind the last one's.
  create function keep_series() returns trigger language plpgsql as $$
    begin
      if (new.seller_id, new.year, new.prefix) is distinct from (old.seller_id, old.year, old.prefix)
        or new.last_sequence <> old.last_sequence + 1 or new.last_issued_on is null or new.last_issued_on < old.last_issued_on then
        raise exception 'numbers of credit notes follow each other' using errcode = 'PP003';
      end if;
      return new;
    end $$;
  create trigger credit_note_series_kept before update on credit_note_series for each row execute function keep_series();
  alter table credit_note_series enable always trigger credit_note_series_kept;
  create table credit_notes (
    id uuid primary key default gen_random_uuid(),
    seller_id uuid not null,
    workshop_id uuid not null,
    account_id uuid not null,
    claim_id uuid not null,
    verdict_id uuid not null,
    kind text not null check (kind in ('credit', 'counter')),
    year integer not null,
    sequence integer not null check (sequence > 0),
    number text not null,
    issued_on date not null check (extract(year from issued_on) = year),
    currency char(3) not null,
    net_minor bigint not null check (net_minor >= 0),
    tax_minor bigint not null check (tax_minor >= 0),
    total_minor bigint not null check (total_minor = net_minor + tax_minor),
    -- The whole document as it was issued: parties, lines, tax groups, allowances, explanation.
    document jsonb not null,
    counters_id uuid,
    reason text check (length(reason) between 1 and 1000),
    issued_by_id uuid not null references users,
    issued_at timestamptz not null default now(),
    check ((kind = 'counter') = (counters_id is not null)),
    check ((kind = 'counter') = (reason is not null)),
    unique (seller_id, number),
    unique (seller_id, year, sequence),
    unique (seller_id, workshop_id, id),
    unique (seller_id, workshop_id, counters_id),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, account_id) references trading_accounts (seller_id, buyer_id, id),
    foreign key (seller_id, workshop_id, verdict_id) references verdicts (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, counters_id) references credit_notes (seller_id, workshop_id, id)
  );
  create index credit_notes_by_claim on credit_notes (claim_id);
  create index credit_notes_by_seller on credit_notes (seller_id, issued_on desc, sequence desc);
  create index credit_notes_by_workshop on credit_notes (workshop_id, issued_on desc, sequence desc);
  create table credit_note_lines (
    note_id uuid not null,
    position integer not null check (position > 0),
    seller_id uuid not null,
    workshop_id uuid not null,
    line_id uuid not null,
    invoice_line_id uuid,
    kind text not null check (kind in ('part', 'labour', 'diagnosis', 'consumables', 'carriage')),
    net_minor bigint not null check (net_minor >= 0),
    tax_category text not null check (tax_category in ('S', 'Z', 'E', 'AE', 'K', 'G', 'O')),
    tax_rate numeric(6, 3) not null check (tax_rate >= 0 and tax_rate < 100),
    exemption_reason text,
    primary key (seller_id, note_id, position),
    foreign key (seller_id, workshop_id, note_id) references credit_notes (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, line_id) references claim_lines (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, invoice_line_id) references invoice_lines (seller_id, buyer_id, id)
  );
  create index credit_note_lines_by_line on credit_note_lines (line_id);
  create index credit_note_lines_by_invoice_line on credit_note_lines (seller_id, invoice_line_id);

  -- Where a note went: set against an invoice, or paid out. Taken back by a row of its own with the sign turned.
  create table credit_allocations (
    id uuid primary key default gen_random_uuid(),
    note_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    amount_minor bigint not null check (amount_minor <> 0),
    how text not null check (how in ('invoice', 'paidOut')),
    reference text not null check (length(reference) between 1 and 80),
    allocated_on date not null,
    takes_back_id uuid,
    allocated_by_id uuid not null references users,
    allocated_at timestamptz not null default now(),
    check ((amount_minor < 0) = (takes_back_id is not null)),
    unique (seller_id, workshop_id, id),
    unique (seller_id, workshop_id, takes_back_id),
    foreign key (seller_id, workshop_id, note_id) references credit_notes (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, takes_back_id) references credit_allocations (seller_id, workshop_id, id)
  );
  create index credit_allocations_by_note on credit_allocations (note_id);
  create index credit_allocations_by_workshop on credit_allocations (workshop_id, allocated_on);
  -- One at a time for each note: never more than it, never less than nothing, nothing on one that is countered.
  create function keep_allocations() returns trigger language plpgsql as $$
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
  create trigger credit_allocations_kept after insert on credit_allocations for each row execute function keep_allocations();
  alter table credit_allocations enable always trigger credit_allocations_kept;
  -- A note is countered whole, by a document of the same sums, and only what is open of it: nothing may stand allocated.
  create function check_counter() returns trigger language plpgsql as $$
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
  create trigger credit_notes_counter after insert on credit_notes for each row execute function check_counter();
  alter table credit_notes enable always trigger credit_notes_counter;
`;

const security = `
  ${secure("credit_note_series")}
  ${policies("credit_note_series", "web", { select: seller, insert: `${seller} and last_sequence = 0`, update: seller })}
  ${secure("credit_notes")}
  ${policies("credit_notes", "web", { select: party, insert: `${seller} and ${myself("issued_by_id")}` })}
  ${policies("credit_notes", "worker", { select: "true" })}
  ${secure("credit_note_lines")}
  ${policies("credit_note_lines", "web", { select: party, insert: seller })}
  ${secure("credit_allocations")}
  ${policies("credit_allocations", "web", { select: party, insert: `${seller} and ${myself("allocated_by_id")}` })}
  ${["credit_notes", "credit_note_lines", "credit_allocations"].map(appendOnly).join("\n")}
`;

/** Callable by `worker` alone, run as `keeper` with a fixed search path. */
const guarded = (signature: string, returns: string, body: string) => `
  create function guarded.${signature} returns ${returns} language plpgsql security definer
    set search_path = pg_catalog, public, pg_temp as $body$ ${body} $body$;
  revoke all on function guarded.${signature.replace(/\bp_\w+\s/g, "")} from public;
  grant execute on function guarded.${signature.replace(/\bp_\w+\s/g, "")} to worker;
`;

// Days are those of the workshop, whose right to contest runs out.
const IS_DUE = `c.state = 'decided'
  and (c.contest_waived_at is not null or c.contest_until < (now() at time zone o.time_zone)::date)
  and not exists (select 1 from claim_lines l where l.claim_id = c.id
    and l.credit_state not in ('none', 'allocated', 'paidOut', 'replaced'))`;

/** Claims nobody owes anything on and nobody may contest any more, by their ids alone. */
const dueToSettle = guarded(
  "due_to_settle()",
  "table (claim_id uuid)",
  `begin
     return query select c.id from claims c join organisations o on o.id = c.workshop_id where ${IS_DUE};
   end`,
);

/** Settles one claim if it still is due under its lock. What was declined lets go of its unit. */
const settleClaim = guarded(
  "settle_claim(p_claim uuid)",
  "boolean",
  `declare claim claims;
   begin
     perform 1 from claims c where c.id = p_claim for update skip locked;
     if not found then return false; end if;
     select c.* into claim from claims c join organisations o on o.id = c.workshop_id where c.id = p_claim and ${IS_DUE};
     if claim.id is null then return false; end if;
     update claims set state = 'settled' where id = p_claim;
     update claim_lines set holds_unit = false where claim_id = p_claim and holds_unit and verdict = 'declined';
     insert into timeline_entries (claim_id, seq, seller_id, workshop_id, kind, actor_name, detail, prev_hash, hash)
       values (claim.id, 0, claim.seller_id, claim.workshop_id, 'settle', 'Partproof', '{}', '', '');
     return true;
   end`,
);

// A credit note is for those who keep the workshop's books. Callable by the web: a distributor never reads the addresses.
const mailNote = `
  create function guarded.mail_credit_note(p_note uuid, p_kind text, p_params jsonb, p_dedupe text) returns integer
    language plpgsql security definer set search_path = pg_catalog, public, pg_temp as $body$
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
    end $body$;
  revoke all on function guarded.mail_credit_note(uuid, text, jsonb, text) from public;
  grant execute on function guarded.mail_credit_note(uuid, text, jsonb, text) to web;
`;

export const up = async (run: Run) => {
  for (const part of [credits, security]) await run(part);
  await run(`
    create index claims_to_settle on claims (contest_until) where state = 'decided';
    create policy keeper_settles on claims for update to keeper using (state = 'decided') with check (state in ('decided', 'settled'));
    create policy keeper_settles on timeline_entries for insert to keeper
      with check (kind = 'settle' and actor_id is null and actor_organisation_id is null);
    create policy keeper_read on credit_notes for select to keeper using (true);
    grant select on credit_notes to keeper;
  `);
  await run(`set local role keeper`);
  for (const part of [dueToSettle, settleClaim, mailNote]) await run(part);
  await run(`set local role partproof_owner`);
};

export const down = async (run: Run) => {
  await run(`set local role keeper;
    drop function guarded.mail_credit_note(uuid, text, jsonb, text), guarded.settle_claim(uuid), guarded.due_to_settle();
    set local role partproof_owner;`);
  await run(`
    drop policy keeper_settles on timeline_entries;
    drop policy keeper_settles on claims;
    drop index claims_to_settle;
    drop table credit_allocations, credit_note_lines, credit_notes, credit_note_series cascade;
    drop function keep_allocations(), check_counter(), keep_series();
    alter table rule_book_versions drop constraint rule_book_versions_kind_check,
      add constraint rule_book_versions_kind_check check (kind in ('terms', 'evidenceList', 'limits', 'serviceLevels'));
    alter table claims drop column contest_waived_at;
    alter table verdicts drop column credit, drop column credit_net_minor, drop column credit_total_minor;
  `);
};
