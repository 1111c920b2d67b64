import { appendOnly, ownRows, policies, secure } from "./row-security";

type Run = (sql: string) => Promise<unknown>;

const catalogue = `
  create table makers (
    id uuid primary key default gen_random_uuid(),
    seller_id uuid not null references organisations,
    name text not null,
    unique (seller_id, name),
    unique (seller_id, id)
  );
  create table parts (
    id uuid primary key default gen_random_uuid(),
    seller_id uuid not null references organisations,
    maker_id uuid not null,
    part_number text not null check (length(part_number) between 1 and 40),
    name text not null,
    family text not null,
    serial_tracked boolean not null default true,
    superseded_by_id uuid,
    rated jsonb not null default '{}',
    created_at timestamptz not null default now(),
    unique (seller_id, part_number),
    unique (seller_id, id),
    foreign key (seller_id, maker_id) references makers (seller_id, id),
    foreign key (seller_id, superseded_by_id) references parts (seller_id, id)
  );
  create table batches (
    id uuid primary key default gen_random_uuid(),
    seller_id uuid not null references organisations,
    part_id uuid not null,
    code text not null,
    made_on date,
    unique (seller_id, part_id, code),
    unique (seller_id, id),
    foreign key (seller_id, part_id) references parts (seller_id, id)
  );
`;

const sales = `
  create table invoice_lines (
    id uuid primary key default gen_random_uuid(),
    seller_id uuid not null references organisations,
    buyer_id uuid not null references organisations,
    account_id uuid not null,
    site_id uuid,
    invoice_number text not null,
    line_number integer not null check (line_number > 0),
    invoiced_on date not null,
    shipped_on date not null,
    part_id uuid not null,
    quantity integer not null check (quantity > 0),
    unit_price_minor bigint not null check (unit_price_minor >= 0),
    currency char(3) not null,
    tax_category text not null check (tax_category in ('S', 'Z', 'E', 'AE', 'K', 'G', 'O')),
    tax_rate numeric(6, 3) not null check (tax_rate >= 0 and tax_rate < 100),
    exemption_reason text,
    created_at timestamptz not null default now(),
    check ((tax_category = 'S') = (tax_rate > 0)),
    check (tax_category in ('S', 'Z') or exemption_reason is not null),
    unique (seller_id, invoice_number, line_number),
    unique (seller_id, buyer_id, id),
    foreign key (seller_id, buyer_id, account_id) references trading_accounts (seller_id, buyer_id, id),
    foreign key (buyer_id, site_id) references sites (organisation_id, id),
    foreign key (seller_id, part_id) references parts (seller_id, id)
  );
  create index invoice_lines_by_buyer on invoice_lines (buyer_id, seller_id, invoiced_on);
  create index invoice_lines_by_part on invoice_lines (seller_id, part_id);
  create table units (
    id uuid primary key default gen_random_uuid(),
    seller_id uuid not null references organisations,
    buyer_id uuid references organisations,
    part_id uuid not null,
    batch_id uuid,
    invoice_line_id uuid,
    serial text,
    serial_normal text,
    -- Look-alikes merged, for "did you mean" alone; the same letters as lib/labels/serial.ts.
    serial_folded text generated always as (translate(serial_normal, 'OILSB', '01158')) stored,
    replaces_unit_id uuid,
    built_into_unit_id uuid,
    supplied_under_claim boolean not null default false,
    created_at timestamptz not null default now(),
    check ((serial is null) = (serial_normal is null)),
    check (invoice_line_id is null or buyer_id is not null),
    unique (seller_id, id),
    unique (seller_id, part_id, serial_normal),
    foreign key (seller_id, part_id) references parts (seller_id, id),
    foreign key (seller_id, batch_id) references batches (seller_id, id),
    foreign key (seller_id, buyer_id, invoice_line_id) references invoice_lines (seller_id, buyer_id, id),
    foreign key (seller_id, replaces_unit_id) references units (seller_id, id),
    foreign key (seller_id, built_into_unit_id) references units (seller_id, id)
  );
  create index units_by_buyer_serial on units (buyer_id, serial_normal);
  create index units_by_buyer_folded on units (buyer_id, serial_folded);
  create index units_by_seller_serial on units (seller_id, serial_normal);
  create index units_by_line on units (seller_id, invoice_line_id);
  create index units_by_batch on units (seller_id, batch_id);
`;

const service = `
  create table installers (
    id uuid primary key default gen_random_uuid(),
    workshop_id uuid not null references organisations,
    name text not null,
    code text not null,
    left_on date,
    unique (workshop_id, name),
    unique (workshop_id, code),
    unique (workshop_id, id)
  );
  create table vehicles (
    id uuid primary key default gen_random_uuid(),
    workshop_id uuid not null references organisations,
    frame_serial text not null,
    frame_serial_normal text not null,
    model text not null default '',
    unique (workshop_id, frame_serial_normal),
    unique (workshop_id, id)
  );
  create table fittings (
    id uuid primary key default gen_random_uuid(),
    seller_id uuid not null references organisations,
    workshop_id uuid not null references organisations,
    unit_id uuid not null,
    vehicle_id uuid,
    position text not null default 'single' check (position in ('left', 'right', 'single')),
    fitted_on date not null,
    removed_on date,
    installer_id uuid,
    check (removed_on is null or removed_on >= fitted_on),
    unique (seller_id, workshop_id, id),
    foreign key (seller_id, unit_id) references units (seller_id, id),
    foreign key (workshop_id, vehicle_id) references vehicles (workshop_id, id),
    foreign key (workshop_id, installer_id) references installers (workshop_id, id)
  );
  create index fittings_by_unit on fittings (seller_id, unit_id);
  create index fittings_by_workshop on fittings (workshop_id, fitted_on);
  create index fittings_by_vehicle on fittings (workshop_id, vehicle_id);
`;

const mySeller = (
  table: string,
) => `seller_id = (select ctx_org()) or exists (select 1 from trading_accounts t
    where t.seller_id = ${table}.seller_id and t.buyer_id = (select ctx_org()))`;
const sellerOnly = "seller_id = (select ctx_org())";
const eitherParty = "(select ctx_org()) in (seller_id, buyer_id)";

const security = `
  ${["makers", "parts", "batches"]
    .map(
      (table) =>
        secure(table) +
        policies(table, "web", { select: mySeller(table), insert: sellerOnly, update: sellerOnly }),
    )
    .join("\n")}
  ${secure("invoice_lines")}
  ${policies("invoice_lines", "web", { select: eitherParty, insert: sellerOnly })}
  ${secure("units")}
  ${policies("units", "web", { select: eitherParty, insert: sellerOnly, update: sellerOnly })}
  ${ownRows("installers", "workshop_id")}
  revoke delete on installers from web;
  ${secure("fittings")}
  ${policies("fittings", "web", {
    select: "(select ctx_org()) in (seller_id, workshop_id)",
    insert: "workshop_id = (select ctx_org())",
    update: "workshop_id = (select ctx_org())",
  })}
  ${secure("vehicles")}
  ${policies("vehicles", "web", {
    select: `workshop_id = (select ctx_org()) or exists (select 1 from fittings f
      where f.vehicle_id = vehicles.id and f.seller_id = (select ctx_org()))`,
    insert: "workshop_id = (select ctx_org())",
    update: "workshop_id = (select ctx_org())",
  })}
`;

const ruleBook = `
  create table rule_book_versions (
    id uuid primary key default gen_random_uuid(),
    seller_id uuid not null references organisations,
    kind text not null check (kind in ('terms', 'evidenceList', 'limits', 'serviceLevels')),
    family text,
    part_id uuid,
    rule_number text not null,
    title text not null,
    valid_from date not null,
    body jsonb not null,
    published_at timestamptz not null default now(),
    published_by uuid,
    unique (seller_id, id),
    unique nulls not distinct (seller_id, kind, family, part_id, valid_from),
    foreign key (seller_id, part_id) references parts (seller_id, id)
  );
  create index rule_book_by_kind on rule_book_versions (seller_id, kind, family, valid_from);
  ${secure("rule_book_versions")}
  ${policies("rule_book_versions", "web", { select: mySeller("rule_book_versions"), insert: sellerOnly })}
  ${appendOnly("rule_book_versions")}
`;

export const up = async (run: Run) => {
  for (const part of [catalogue, sales, service, security, ruleBook]) await run(part);
};

export const down = (run: Run) =>
  run(
    `drop table rule_book_versions, fittings, vehicles, installers, units, invoice_lines, batches, parts, makers cascade;`,
  );
