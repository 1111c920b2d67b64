import { appendOnly, policies, secure } from "./row-security";

type Run = (sql: string) => Promise<unknown>;

const workshop = "workshop_id = (select ctx_org())";
const seller = "seller_id = (select ctx_org())";
const party = "(select ctx_org()) in (seller_id, workshop_id)";
const myself = (column: string) => `${column} = (select ctx_actor())`;

const returns = `
  -- A part called in: the number on the parcel, where it goes, until when. The workshop adds how it was sent.
  create table part_returns (
    id uuid primary key default gen_random_uuid(),
    number text not null unique check (number ~ '^[0-9]{9}$'),
    claim_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    send_to text not null check (length(send_to) between 1 and 400),
    instructions text not null default '' check (length(instructions) <= 1000),
    due_on date not null,
    called_in_by_id uuid not null references users,
    called_in_at timestamptz not null default now(),
    dispatched_at timestamptz,
    dispatched_by_id uuid references users,
    carrier text check (length(carrier) <= 120),
    tracking_number text check (length(tracking_number) <= 80),
    check ((dispatched_at is null) = (dispatched_by_id is null)),
    unique (seller_id, workshop_id, id),
    unique (seller_id, id),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id)
  );
  create index part_returns_by_claim on part_returns (claim_id);
  create index part_returns_due on part_returns (seller_id, due_on);

  -- What arrived: a parcel with or without a number, matched to a return or still waiting for one.
  create table parcels (
    id uuid primary key default gen_random_uuid(),
    seller_id uuid not null references organisations,
    return_id uuid,
    arrived_at timestamptz not null default now(),
    received_by_id uuid not null references users,
    number_written text not null default '' check (length(number_written) <= 80),
    sender_written text not null default '' check (length(sender_written) <= 200),
    part_written text not null default '' check (length(part_written) <= 200),
    serial_written text not null default '' check (length(serial_written) <= 80),
    condition text not null default 'sound' check (condition in ('sound', 'damaged', 'wet', 'leaking')),
    note text not null default '' check (length(note) <= 1000),
    matched_at timestamptz,
    matched_by_id uuid references users,
    check ((return_id is null) = (matched_at is null)),
    unique (seller_id, id),
    foreign key (seller_id, return_id) references part_returns (seller_id, id)
  );
  create index parcels_unmatched on parcels (seller_id, arrived_at) where return_id is null;
  create index parcels_by_return on parcels (seller_id, return_id);

  create table return_lines (
    return_id uuid not null,
    line_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    parcel_id uuid,
    place text check (length(place) between 1 and 40),
    serial_seen text check (length(serial_seen) <= 80),
    received_at timestamptz,
    disposed_as text check (disposed_as in ('kept', 'scrapped', 'sentToMaker', 'sentBack')),
    disposed_at timestamptz,
    disposed_by_id uuid references users,
    primary key (seller_id, return_id, line_id),
    check ((disposed_as is null) = (disposed_at is null)),
    foreign key (seller_id, workshop_id, return_id) references part_returns (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, line_id) references claim_lines (seller_id, workshop_id, id),
    foreign key (seller_id, parcel_id) references parcels (seller_id, id)
  );
  create index return_lines_by_line on return_lines (line_id);
  -- Lines of a distributor by where their part is, and its live claims need no look at the others.
  create index claim_lines_by_return_state on claim_lines (seller_id, return_state, claim_id)
    where return_state in ('awaited', 'sent', 'received', 'missing');

  -- What the bench found. A second look is a second row; the newest counts.
  create table findings (
    id uuid primary key default gen_random_uuid(),
    claim_id uuid not null,
    line_id uuid not null,
    seller_id uuid not null,
    workshop_id uuid not null,
    kind text not null check (kind in ('faultConfirmed', 'otherFault', 'noFaultFound', 'notTheUnit', 'damagedOnTheWay', 'notTestable')),
    note text not null check (length(note) between 1 and 4000),
    run_minutes numeric(6, 2) check (run_minutes >= 0),
    evidence_id uuid,
    bench jsonb not null default '[]',
    found_by_id uuid not null references users,
    found_at timestamptz not null default now(),
    unique (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, claim_id) references claims (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, line_id) references claim_lines (seller_id, workshop_id, id),
    foreign key (seller_id, workshop_id, evidence_id) references evidence_files (seller_id, workshop_id, id)
  );
  create index findings_by_line on findings (line_id, found_at);
  alter table readings add column finding_id uuid,
    add foreign key (seller_id, workshop_id, finding_id) references findings (seller_id, workshop_id, id),
    add check ((taken_by = 'goodsIn') = (finding_id is not null));
  create index readings_by_finding on readings (finding_id) where finding_id is not null;
  -- What was found is a row of its own now.
  alter table claim_lines drop column finding;
`;

// The bench adds its own photos and logs to a claim. Whoever brought a file in may take it back, the other side may not.
const benchEvidence = `
  alter table evidence_files add column taken_by text not null default 'workshop' check (taken_by in ('workshop', 'goodsIn'));
  drop policy web_insert on evidence_files;
  drop policy web_update on evidence_files;
  create policy web_insert on evidence_files for insert to web with check (uploaded_by_id = (select ctx_actor())
    and ((${workshop} and taken_by = 'workshop') or (${seller} and taken_by = 'goodsIn' and exists
      (select 1 from claims c where c.id = evidence_files.claim_id and c.state not in ('draft', 'discarded')))));
  create policy web_update on evidence_files for update to web
    using ((${workshop} and taken_by = 'workshop') or (${seller} and taken_by = 'goodsIn'))
    with check ((${workshop} and taken_by = 'workshop') or (${seller} and taken_by = 'goodsIn'));
`;

const security = `
  ${secure("part_returns")}
  ${policies("part_returns", "web", { select: party, insert: `${seller} and ${myself("called_in_by_id")}`, update: workshop })}
  revoke update on part_returns from web;
  grant update (dispatched_at, dispatched_by_id, carrier, tracking_number) on part_returns to web;
  ${secure("parcels")}
  ${policies("parcels", "web", { select: seller, insert: `${seller} and ${myself("received_by_id")}`, update: seller })}
  revoke update on parcels from web;
  grant update (return_id, matched_at, matched_by_id) on parcels to web;
  ${secure("return_lines")}
  ${policies("return_lines", "web", { select: party, insert: seller, update: seller })}
  revoke update on return_lines from web;
  grant update (parcel_id, place, serial_seen, received_at, disposed_as, disposed_at, disposed_by_id) on return_lines to web;
  ${secure("findings")}
  ${policies("findings", "web", { select: party, insert: `${seller} and ${myself("found_by_id")}` })}
  ${appendOnly("findings")}
`;

export const up = async (run: Run) => {
  for (const part of [returns, benchEvidence, security]) await run(part);
};

export const down = (run: Run) =>
  run(`
    drop policy web_insert on evidence_files;
    drop policy web_update on evidence_files;
    alter table evidence_files drop column taken_by;
    create policy web_insert on evidence_files for insert to web with check (${workshop} and uploaded_by_id = (select ctx_actor()));
    create policy web_update on evidence_files for update to web using (${workshop}) with check (${workshop});
    drop index readings_by_finding;
    alter table readings drop column finding_id;
    drop table findings, return_lines, parcels, part_returns cascade;
    alter table claim_lines add column finding jsonb;
    drop index claim_lines_by_return_state;
  `);
