import { appendOnly, policies, secure } from "./row-security";

type Run = (sql: string) => Promise<unknown>;

const seller = "seller_id = (select ctx_org())";

// The Day book: every movement an entry with a number of its own in its distributor's book, its postings summing to nothing.
const ledger = `
  create table ledger_heads (
    seller_id uuid primary key references organisations,
    sequence bigint not null default 0
  );
  create table ledger_entries (
    seller_id uuid not null references organisations,
    sequence bigint not null,
    workshop_id uuid not null references organisations,
    kind text not null check (kind in ('noteIssued', 'noteCountered', 'allocated', 'allocationTakenBack')),
    entry_on date not null,
    note_id uuid not null,
    allocation_id uuid,
    counters_sequence bigint,
    entered_by_id uuid not null references users,
    entered_at timestamptz not null default now(),
    primary key (seller_id, sequence),
    unique (seller_id, counters_sequence),
    unique (seller_id, allocation_id),
    check ((kind in ('allocated', 'allocationTakenBack')) = (allocation_id is not null)),
    check ((kind in ('noteCountered', 'allocationTakenBack')) = (counters_sequence is not null)),
    foreign key (seller_id, workshop_id, note_id) references credit_notes (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, allocation_id) references credit_allocations (seller_id, workshop_id, id),
    foreign key (seller_id, counters_sequence) references ledger_entries (seller_id, sequence)
  );
  create index ledger_entries_by_day on ledger_entries (seller_id, entry_on desc, sequence desc);
  create index ledger_entries_by_workshop on ledger_entries (seller_id, workshop_id, sequence desc);
  create index ledger_entries_by_note on ledger_entries (note_id);
  create table ledger_postings (
    seller_id uuid not null,
    sequence bigint not null,
    position integer not null check (position > 0),
    account text not null check (account in ('claimsExpense', 'tax', 'workshopPayable', 'receivable', 'bank')),
    amount_minor bigint not null check (amount_minor <> 0),
    currency char(3) not null,
    primary key (seller_id, sequence, position),
    foreign key (seller_id, sequence) references ledger_entries (seller_id, sequence)
  );
  create function check_ledger_sum() returns trigger language plpgsql as $$
    begin
      if not exists (select 1 from public.ledger_postings p where p.seller_id = new.seller_id and p.sequence = new.sequence)
        or exists (select 1 from public.ledger_postings p where p.seller_id = new.seller_id and p.sequence = new.sequence
          group by p.currency having sum(p.amount_minor) <> 0) then
        raise exception 'the postings of an entry sum to nothing' using errcode = 'PP003';
      end if;
      return null;
    end $$;
  create constraint trigger ledger_entries_balance after insert on ledger_entries deferrable initially deferred
    for each row execute function check_ledger_sum();
  create constraint trigger ledger_postings_balance after insert on ledger_postings deferrable initially deferred
    for each row execute function check_ledger_sum();
  alter table ledger_entries enable always trigger ledger_entries_balance;
  alter table ledger_postings enable always trigger ledger_postings_balance;
`;

const security = `
  ${secure("ledger_heads")}
  ${policies("ledger_heads", "web", { select: seller, insert: seller, update: seller })}
  ${secure("ledger_entries")}
  ${policies("ledger_entries", "web", { select: seller, insert: `${seller} and entered_by_id = (select ctx_actor())` })}
  ${secure("ledger_postings")}
  ${policies("ledger_postings", "web", { select: seller, insert: seller })}
  ${["ledger_entries", "ledger_postings"].map(appendOnly).join("\n")}
`;

export const up = async (run: Run) => {
  for (const part of [ledger, security]) await run(part);
};

export const down = (run: Run) =>
  run(`
    drop table ledger_postings, ledger_entries, ledger_heads cascade;
    drop function check_ledger_sum();
  `);
