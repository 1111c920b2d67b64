import { createHash, randomUUID } from "node:crypto";
import {
  buildAccount,
  buildBatch,
  buildClaim,
  buildDistributor,
  buildFile,
  buildFitting,
  buildInstaller,
  buildLine,
  buildOrganisation,
  buildPart,
  buildPerson,
  buildSite,
  buildUnit,
  buildVehicle,
  DECIDED,
  insertRow,
  unlike,
  type Between,
} from "../support/build";
import { asRole } from "../support/database";
import { fillCredit } from "./fill-credit";
import { fillReturn } from "./fill-return";

export type Member = { readonly id: string; readonly person: { readonly id: string; readonly name: string } };
type Distributor = Member & { readonly part: { readonly id: string } };

const sha256 = () => createHash("sha256").update(randomUUID()).digest("hex");

/** What every organisation has of its own, whomever it trades with. */
async function fillOrganisation({ id, person }: Member) {
  const session = {
    user_id: person.id,
    organisation_id: id,
    version: 1,
    idle_hours: 8,
    expires_at: "2036-01-01T00:00:00Z",
  };
  await insertRow("sessions", session);
  await insertRow("outbox", {
    organisation_id: id,
    kind: "claimFiled",
    dedupe_key: unlike("key"),
    recipient: "somebody@example.test",
    locale: "en",
    params: "{}",
  });
  await insertRow("idempotency_keys", {
    organisation_id: id,
    route: "POST /api/v1/claims",
    key: randomUUID(),
    fingerprint: sha256(),
  });
  await insertRow("single_use_links", {
    user_id: person.id,
    purpose: "invitation",
    organisation_id: id,
    token_hash: sha256(),
    expires_at: "2036-01-01T00:00:00Z",
  });
  await insertRow("alerts", {
    organisation_id: id,
    user_id: person.id,
    kind: "claimFiled",
    claim_number: "41073826",
    dedupe_key: unlike("key"),
    params: "{}",
  });
  await buildSite({ id });
  await asRole("web", { actor: person.id, org: id }, "select guarded.append_audit('signedIn', '{}')");
}

async function distributor(): Promise<Distributor> {
  const { id } = await buildDistributor();
  const person = await buildPerson({ id }, ["assessor", "administrator"]);
  await fillOrganisation({ id, person });
  const part = await buildPart({ id });
  await buildBatch({ id }, part);
  await insertRow("rule_book_versions", {
    seller_id: id,
    kind: "terms",
    rule_number: "G 1",
    title: "Terms",
    valid_from: "2024-01-01",
    body: "{}",
  });
  await insertRow("invoice_imports", {
    seller_id: id,
    sha256: sha256(),
    file_name: "lines.csv",
    object_key: `imports/${randomUUID()}`,
    created_by_id: person.id,
  });
  return { id, person, part };
}

async function workshop(): Promise<Member> {
  const { id } = await buildOrganisation();
  const person = await buildPerson({ id }, ["technician", "workshopManager"]);
  await fillOrganisation({ id, person });
  return { id, person };
}

/** Everything that hangs on one decided claim. */
async function fillClaim(between: Between, assessor: { readonly id: string }, part: { readonly id: string }) {
  const { seller, workshop: shop, account, person } = between;
  const unit = await buildUnit({ seller, buyer: shop, account, part });
  const [vehicle, installer] = [await buildVehicle(shop), await buildInstaller(shop)];
  await buildFitting(seller, shop, unit, { vehicle_id: vehicle.id, installer_id: installer.id });
  const claim = await buildClaim(between, { ...DECIDED, state: "decided", vehicle_id: vehicle.id });
  const both = { seller_id: seller.id, workshop_id: shop.id };
  const ofClaim = { claim_id: claim.id, ...both };
  const line = await buildLine(between, claim, part, { unit_id: unit.id, holds_unit: true });
  await insertRow("claim_drafts", { ...ofClaim, body: "{}" });
  const file = await buildFile(between, claim);
  const sent = { ...ofClaim, revision: 1, facts: "{}", sha256: sha256(), sent_by_id: person.id };
  const revision = await insertRow("claim_revisions", sent);
  await insertRow("revision_evidence", { revision_id: revision["id"], evidence_id: file.id, ...both });
  await insertRow("readings", {
    ...ofClaim,
    revision: 1,
    kind: "airGap",
    raw_text: "0,35",
    unit: "mm",
    canonical_value: 0.35,
    taken_by: "workshop",
  });
  await insertRow("claim_queries", {
    ...ofClaim,
    round: 1,
    items: "[]",
    question: "How warm?",
    asked_by_id: assessor.id,
  });
  const verdict = await insertRow("verdicts", {
    ...ofClaim,
    revision: 1,
    revision_sha256: sent.sha256,
    outcome: "upheld",
    letter: "The lining came off.",
    decided_by_id: assessor.id,
  });
  await insertRow("verdict_lines", {
    ...both,
    verdict_id: verdict["id"],
    line_id: line.id,
    outcome: "upheld",
    attribution: '{"maker":"1"}',
    reason_code: "faultOfThePart",
    reason: "The lining came off.",
    coverage: "{}",
  });
  const given = { claim, line, verdict: { id: String(verdict["id"]) }, person: assessor };
  await fillCredit(between, given);
  await fillReturn({ claim, line, seller, workshop: shop, person: assessor });
  const author = { author_id: person.id, author_name: "Robin", author_organisation_id: shop.id };
  await insertRow("claim_messages", {
    ...ofClaim,
    ...author,
    audience: "both",
    body: "Sent with the carrier.",
  });
  await insertRow("claim_flags", { ...ofClaim, line_number: 1, kind: "serialUnknown" });
  const actor = { actor_id: person.id, actor_name: "Robin", actor_organisation_id: shop.id };
  await insertRow("timeline_entries", {
    ...ofClaim,
    ...actor,
    seq: 0,
    kind: "file",
    prev_hash: "",
    hash: "",
  });
}

export type World = Awaited<ReturnType<typeof twoDistributors>>;

/**
 * Two distributors and three workshops. All but one pair trade, and each pair that trades has a decided claim with
 * everything that can hang on it, and a draft.
 */
export async function twoDistributors() {
  const [north, south] = [await distributor(), await distributor()];
  const workshops = [await workshop(), await workshop(), await workshop()] as const;
  const [first, second, third] = workshops;
  const trades: readonly (readonly [Distributor, Member])[] = [
    [north, first],
    [north, second],
    [north, third],
    [south, second],
    [south, third],
  ];
  const drafts = new Map<string, { readonly id: string; readonly number: string }>();
  for (const [seller, buyer] of trades) {
    const account = await buildAccount(seller, buyer);
    const between = { seller, workshop: buyer, account, person: buyer.person };
    await fillClaim(between, seller.person, seller.part);
    const draft = await buildClaim(between);
    drafts.set(`${seller.id} ${buyer.id}`, draft);
    await buildLine(between, draft, seller.part);
    await buildFile(between, draft);
  }
  const members: readonly Member[] = [north, south, first, second, third];
  const partnersOf = new Map(
    members.map(({ id }) => [
      id,
      trades.flatMap(([a, b]) => (a.id === id ? [b.id] : b.id === id ? [a.id] : [])),
    ]),
  );
  return { north, south, workshops, members, partnersOf, drafts };
}
