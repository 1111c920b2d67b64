import { createHash, randomInt, randomUUID } from "node:crypto";
import type { Role } from "@/lib/access/roles";
import { claimNumberFrom } from "@/lib/labels/check-digit";
import { normaliseSerial } from "@/lib/labels/serial";
import { adminQuery, type Row } from "./database";

type Id = { readonly id: string };
type Over = Readonly<Row>;

let made = 0;
/** Short and different each time. */
export const unlike = (word: string): string => `${word} ${(made += 1)}-${randomUUID().slice(0, 6)}`;
const idOf = ({ id }: Row): Id => ({ id: String(id) });

/** Inserts a row as the superuser and returns it whole. */
export async function insertRow(table: string, values: Over): Promise<Row> {
  const names = Object.keys(values);
  const sql = `insert into ${table} (${names.join(", ")}) values (${names.map((_name, at) => `$${at + 1}`).join(", ")}) returning *`;
  const [row] = await adminQuery(sql, Object.values(values));
  if (!row) throw new Error(`${table} kept no row`);
  return row;
}

const make = async (table: string, values: Over): Promise<Id> => idOf(await insertRow(table, values));

export const buildOrganisation = (over: Over = {}): Promise<Id> => {
  const name = unlike("Organisation");
  return make("organisations", {
    name,
    legal_name: `${name} Ltd`,
    sells: false,
    buys: true,
    country: "DE",
    currency: "EUR",
    time_zone: "Europe/Berlin",
    ...over,
  });
};

export const buildDistributor = (over: Over = {}) => buildOrganisation({ sells: true, buys: false, ...over });

export const buildSite = (organisation: Id, over: Over = {}) =>
  make("sites", { organisation_id: organisation.id, name: unlike("Site"), ...over });

export const buildAccount = (seller: Id, buyer: Id, over: Over = {}) =>
  make("trading_accounts", {
    seller_id: seller.id,
    buyer_id: buyer.id,
    account_number: unlike("K"),
    currency: "EUR",
    opened_on: "2024-01-02",
    ...over,
  });

/** A person with a membership and its roles. */
export async function buildPerson(organisation: Id, roles: readonly Role[], over: Over = {}) {
  const email = `${randomUUID()}@example.test`;
  const row = await insertRow("users", { email, name: unlike("Person"), ...over });
  await insertMembership(idOf(row), organisation, roles);
  return { id: String(row["id"]), name: String(row["name"]), email: String(row["email"]) };
}

export async function insertMembership(person: Id, organisation: Id, roles: readonly Role[]) {
  const names = { user_id: person.id, organisation_id: organisation.id };
  await insertRow("memberships", { ...names, accepted_at: new Date() });
  for (const role of roles) await insertRow("membership_roles", { ...names, role });
}

const buildMaker = (seller: Id, over: Over = {}) =>
  make("makers", { seller_id: seller.id, name: unlike("Maker"), ...over });

export async function buildPart(seller: Id, over: Over = {}): Promise<Id> {
  const maker = over["maker_id"] ?? (await buildMaker(seller)).id;
  return make("parts", {
    seller_id: seller.id,
    maker_id: maker,
    part_number: unlike("P"),
    name: "Spring-applied brake",
    family: "brake",
    ...over,
  });
}

export const buildBatch = (seller: Id, part: Id, over: Over = {}) =>
  make("batches", {
    seller_id: seller.id,
    part_id: part.id,
    code: unlike("L"),
    made_on: "2025-06-02",
    ...over,
  });

type Sale = { readonly seller: Id; readonly buyer: Id; readonly account: Id; readonly part: Id };

const buildInvoiceLine = ({ seller, buyer, account, part }: Sale, over: Over = {}) =>
  make("invoice_lines", {
    seller_id: seller.id,
    buyer_id: buyer.id,
    account_id: account.id,
    invoice_number: unlike("R"),
    line_number: 1,
    invoiced_on: "2026-01-12",
    shipped_on: "2026-01-13",
    part_id: part.id,
    quantity: 1,
    unit_price_minor: 18_450,
    currency: "EUR",
    tax_category: "S",
    tax_rate: 19,
    ...over,
  });

/** A unit as sold, on an invoice line of its own unless one is named. */
export async function buildUnit(sale: Sale, over: Over = {}) {
  const line = over["invoice_line_id"] ?? (await buildInvoiceLine(sale)).id;
  const serial = String(over["serial"] ?? `BR-${randomInt(1e9, 1e10)}`);
  const unit = await make("units", {
    seller_id: sale.seller.id,
    buyer_id: sale.buyer.id,
    part_id: sale.part.id,
    invoice_line_id: line,
    serial,
    serial_normal: normaliseSerial(serial),
    ...over,
  });
  return { ...unit, serial };
}

export const buildInstaller = (workshop: Id, over: Over = {}) =>
  make("installers", { workshop_id: workshop.id, name: unlike("Installer"), code: unlike("F"), ...over });

export const buildVehicle = (workshop: Id, over: Over = {}) => {
  const frame = unlike("FR");
  return make("vehicles", {
    workshop_id: workshop.id,
    frame_serial: frame,
    frame_serial_normal: normaliseSerial(frame),
    ...over,
  });
};

export const buildFitting = (seller: Id, workshop: Id, unit: Id, over: Over = {}) =>
  make("fittings", {
    seller_id: seller.id,
    workshop_id: workshop.id,
    unit_id: unit.id,
    fitted_on: "2026-02-03",
    ...over,
  });

export type Between = {
  readonly seller: Id;
  readonly workshop: Id;
  readonly account: Id;
  readonly person: Id;
};

/** What a claim in a state after filing must have on its row. */
export const FILED = {
  revision: 1,
  filed_at: "2026-05-06T09:00:00Z",
  filed_on: "2026-05-06",
  failed_on: "2026-05-04",
};
export const DECIDED = { ...FILED, outcome: "upheld", decided_at: "2026-05-12T09:00:00Z" };

// One after the other: thousands of random numbers would meet.
let claims = 1_000_000;

/** A claim row; a draft unless told otherwise. */
export async function buildClaim({ seller, workshop, account, person }: Between, over: Over = {}) {
  const number = claimNumberFrom((claims += 1)).replace("-", "");
  const row = await insertRow("claims", {
    number,
    seller_id: seller.id,
    workshop_id: workshop.id,
    account_id: account.id,
    family: "brake",
    currency: "EUR",
    created_by_id: person.id,
    ...over,
  });
  return { id: String(row["id"]), number };
}

export const buildLine = ({ seller, workshop }: Between, claim: Id, part: Id, over: Over = {}) =>
  make("claim_lines", {
    claim_id: claim.id,
    seller_id: seller.id,
    workshop_id: workshop.id,
    line_number: 1,
    part_id: part.id,
    ...over,
  });

export const buildFile = ({ seller, workshop, person }: Between, claim: Id, over: Over = {}) =>
  make("evidence_files", {
    claim_id: claim.id,
    seller_id: seller.id,
    workshop_id: workshop.id,
    row_id: "label",
    kind: "photo",
    media_type: "image/jpeg",
    original_name: "label.jpg",
    size_bytes: 1000,
    sha256: createHash("sha256").update(randomUUID()).digest("hex"),
    object_key: `originals/${randomUUID()}`,
    uploaded_by_id: person.id,
    ...over,
  });
