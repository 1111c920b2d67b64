import { insertRow, type Between } from "../support/build";
import { adminQuery } from "../support/database";

type Id = { readonly id: string };
type Credited = {
  readonly claim: Id;
  readonly line: Id;
  readonly verdict: Id;
  readonly person: Id;
};

const YEAR = 2026;

/** Everything that hangs on one verdict that was credited, and its note allocated. */
export async function fillCredit(
  { seller, workshop, account }: Omit<Between, "person">,
  { claim, line, verdict, person }: Credited,
): Promise<void> {
  const both = { seller_id: seller.id, workshop_id: workshop.id };
  await adminQuery(
    `insert into credit_note_series (seller_id, year, prefix) values ($1, $2, 'CN-') on conflict do nothing`,
    [seller.id, YEAR],
  );
  const [series] = await adminQuery<{ sequence: number }>(
    `update credit_note_series set last_sequence = last_sequence + 1, last_issued_on = '2026-05-13'
     where seller_id = $1 and year = $2 returning last_sequence as sequence`,
    [seller.id, YEAR],
  );
  const note = await insertRow("credit_notes", {
    ...both,
    account_id: account.id,
    claim_id: claim.id,
    verdict_id: verdict.id,
    kind: "credit",
    year: YEAR,
    sequence: series?.sequence,
    number: `CN-${YEAR}-${String(series?.sequence).padStart(5, "0")}`,
    issued_on: "2026-05-13",
    currency: "EUR",
    net_minor: 100,
    tax_minor: 19,
    total_minor: 119,
    document: "{}",
    issued_by_id: person.id,
  });
  await insertRow("credit_note_lines", {
    ...both,
    note_id: note["id"],
    position: 1,
    line_id: line.id,
    kind: "part",
    net_minor: 100,
    tax_category: "S",
    tax_rate: 19,
  });
  const allocation = await insertRow("credit_allocations", {
    ...both,
    note_id: note["id"],
    amount_minor: 119,
    how: "invoice",
    reference: "R 1",
    allocated_on: "2026-05-14",
    allocated_by_id: person.id,
  });
  await enter({ ...both, note: note["id"], allocation: null, person, kind: "noteIssued" });
  await enter({ ...both, note: note["id"], allocation: allocation["id"], person, kind: "allocated" });
}

type ToEnter = {
  readonly seller_id: string;
  readonly workshop_id: string;
  readonly note: unknown;
  readonly allocation: unknown;
  readonly person: Id;
  readonly kind: string;
};

/** An entry with its two postings in one statement: apart, the database would refuse both. */
const enter = ({ seller_id: seller, workshop_id: workshop, note, allocation, person, kind }: ToEnter) =>
  adminQuery(
    `with head as (insert into ledger_heads as h (seller_id, sequence) values ($1, 1)
         on conflict (seller_id) do update set sequence = h.sequence + 1 returning sequence),
       entry as (insert into ledger_entries (seller_id, sequence, workshop_id, kind, entry_on, note_id, allocation_id, entered_by_id)
         select $1, sequence, $2, $3, '2026-05-13', $4, $5, $6 from head returning seller_id, sequence)
     insert into ledger_postings (seller_id, sequence, position, account, amount_minor, currency)
       select seller_id, sequence, p.position, p.account, p.amount, 'EUR' from entry,
         (values (1, 'workshopPayable', 119), (2, 'bank', -119)) p (position, account, amount)`,
    [seller, workshop, kind, note, allocation, person.id],
  );
