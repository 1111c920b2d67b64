import pg from "pg";

/** A connection of the superuser: to write rows in bulk and to look, never to measure. */
export async function adminOf(url: string): Promise<pg.Client> {
  const admin = new pg.Client({ connectionString: url });
  await admin.connect();
  // Foreign keys are not looked up for copies of rows that keep them; what always holds still does.
  await admin.query("set session_replication_role = replica");
  return admin;
}

async function countOf(admin: pg.Client, sql: string): Promise<number> {
  const { rows } = await admin.query<{ count: number }>(sql);
  return rows[0]?.count ?? 0;
}

// What was seeded is what gets copied, however often; the lists of the originals are taken before the first copy.
const ORIGINALS = `
  create temp table original_units as select * from units;
  create temp table original_claims as select * from claims;
`;

/** Remembers the seeded rows as the ones to copy. Returns how many there are. */
export async function rememberOriginals(admin: pg.Client): Promise<{ claims: number; units: number }> {
  await admin.query(ORIGINALS);
  return {
    claims: await countOf(admin, "select count(*)::int as count from original_claims"),
    units: await countOf(admin, "select count(*)::int as count from original_units"),
  };
}

// Copies of a unit are sold on the same lines, of no batch: batches do not grow with the trade.
const UNITS = `
  insert into units (seller_id, buyer_id, part_id, invoice_line_id, serial, serial_normal)
  select u.seller_id, u.buyer_id, u.part_id, u.invoice_line_id, u.serial || '-' || n, u.serial_normal || 'X' || n
  from generate_series(1, $1) n cross join original_units u where u.serial is not null
  limit greatest(0, $2 - (select count(*) from units))`;

/** Fills the table of units up to so many. */
export async function copyUnits(admin: pg.Client, upTo: number, originals: number): Promise<void> {
  await admin.query(UNITS, [2 * Math.ceil(upTo / originals), upTo]);
  await admin.query("vacuum analyze units");
}

// A number that no claim has; every copy is some minutes older than the last, so that no two are filed at once.
const MAPPING = `
  create temp table copied on commit drop as
  select c.id as old_id, gen_random_uuid() as new_id, c.seller_id, n,
    row_number() over (partition by c.seller_id, c.workshop_id order by n, c.id) as place,
    row_number() over (order by n, c.id) as free
  from generate_series($1::int, $2::int) n cross join original_claims c`;
const FREE = `
  create temp table free_numbers on commit drop as
  select row_number() over (order by n) as free, n::text as number
  from generate_series(10000000, 10000000 + 3 * (select count(*) from claims) + 3 * (select count(*) from copied)) n
  where not exists (select 1 from claims c where c.number = n::text)`;
const CLAIMS = `
  insert into claims select r.* from copied m join original_claims c on c.id = m.old_id
    join free_numbers f on f.free = m.free
    cross join lateral jsonb_populate_record(null::claims, to_jsonb(c) || jsonb_build_object(
      'id', m.new_id, 'number', f.number, 'asked_minor', c.asked_minor + 10 * m.n, 'filed_at', c.filed_at - m.n * interval '7 minutes',
      'answer_due_at', c.answer_due_at - m.n * interval '7 minutes',
      'updated_at', c.updated_at - m.n * interval '7 minutes')) r`;
// Every copied line claims a unit of its own, as in life: the same unit is hardly ever claimed twice.
const LINES = `
  insert into claim_lines (claim_id, seller_id, workshop_id, line_number, part_id, unit_id, invoice_line_id, quantity,
    serial_typed, asked_minor, verdict, attribution, return_state, credit_state)
  select m.new_id, l.seller_id, l.workshop_id, l.line_number, l.part_id, u.id, l.invoice_line_id, l.quantity,
    l.serial_typed, l.asked_minor, l.verdict, l.attribution, l.return_state, l.credit_state
  from copied m join claim_lines l on l.claim_id = m.old_id
    left join bulk_sizes z on z.seller_id = l.seller_id and z.buyer_id = l.workshop_id and l.unit_id is not null
    left join bulk_units u on u.seller_id = z.seller_id and u.buyer_id = z.buyer_id and u.place = 1 + m.place % z.of_all`;
const BULK_UNITS = `
  create temp table bulk_units on commit drop as
  select id, seller_id, buyer_id, row_number() over (partition by seller_id, buyer_id order by id) as place
  from units u where not exists (select 1 from original_units o where o.id = u.id);
  create temp table bulk_sizes on commit drop as
  select seller_id, buyer_id, count(*) as of_all from bulk_units group by seller_id, buyer_id;
  analyze bulk_units; analyze bulk_sizes`;
const DRAFTS = `
  insert into claim_drafts (claim_id, seller_id, workshop_id, body, saved_at)
  select m.new_id, d.seller_id, d.workshop_id, d.body, d.saved_at from copied m join claim_drafts d on d.claim_id = m.old_id`;
const FLAGS = `
  insert into claim_flags (claim_id, seller_id, workshop_id, line_number, kind, detail, at)
  select m.new_id, f.seller_id, f.workshop_id, f.line_number, f.kind, f.detail, f.at
  from copied m join claim_flags f on f.claim_id = m.old_id`;

/** Copies every seeded claim once for each number from `first` to `last`, with its lines, draft and flags. */
export async function copyClaims(admin: pg.Client, first: number, last: number): Promise<void> {
  await admin.query("begin");
  await admin.query(MAPPING, [first, last]);
  await admin.query("create unique index on copied (old_id, n); analyze copied");
  await admin.query(FREE);
  await admin.query("analyze free_numbers");
  await admin.query(BULK_UNITS);
  for (const sql of [CLAIMS, LINES, DRAFTS, FLAGS]) await admin.query(sql);
  await admin.query("commit");
  await admin.query("vacuum analyze claims, claim_lines, claim_drafts, claim_flags");
}
