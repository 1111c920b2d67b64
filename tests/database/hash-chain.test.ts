import { beforeEach, describe, expect, it } from "vitest";
import { appendToAudit, appendToTimeline } from "@/lib/claims/timeline/service";
import { unitOfWork } from "@/lib/db/unit-of-work";
import { actorAt } from "../support/actor";
import {
  buildAccount,
  buildClaim,
  buildDistributor,
  buildOrganisation,
  buildPerson,
  FILED,
} from "../support/build";
import { adminQuery, answerOf, asRole, inTransaction, NOT_ALLOWED } from "../support/database";

type Shop = { id: string; person: { id: string; name: string } };
let shop: Shop;
let seller: { id: string };
let claim: { id: string; number: string };

beforeEach(async () => {
  seller = await buildDistributor();
  const { id } = await buildOrganisation();
  shop = { id, person: await buildPerson({ id }, ["technician"]) };
  const account = await buildAccount(seller, shop);
  claim = await buildClaim(
    { seller, workshop: shop, account, person: shop.person },
    { ...FILED, state: "filed" },
  );
});

const worker = () => actorAt(shop, shop.person, ["technician"]);
const parties = () => ({ id: claim.id, sellerId: seller.id, workshopId: shop.id });

const note = (kind: string) =>
  unitOfWork(worker(), (work) =>
    appendToTimeline(work, parties(), { kind, detail: { text: `„${kind}“, "quoted"` } }),
  );

/** Entries of a claim whose hash, number or link to the one before does not hold, and a head that is not the last one. */
const brokenLinks = async (): Promise<string[]> => {
  const rows = await adminQuery<{ what: string }>(
    `with chain as (select t.*, timeline_text(t) as text, lag(hash, 1, '') over w as before, row_number() over w as place
         from timeline_entries t where claim_id = $1 window w as (order by seq))
     select 'entry ' || seq as what from chain
       where hash <> encode(sha256(convert_to(text, 'UTF8')), 'hex') or prev_hash <> before or seq <> place
     union all select 'head' from timeline_heads h where h.claim_id = $1
       and not exists (select 1 from (select seq, hash from chain order by seq desc limit 1) l
         where l.seq = h.seq and l.hash = h.hash)
     order by 1`,
    [claim.id],
  );
  return rows.map(({ what }) => what);
};

/** As the superuser with every trigger of the table switched off: what only somebody with the machine could do. */
const tamper = (sql: string) =>
  inTransaction("postgres", {}, async (run) => {
    await run("alter table timeline_entries disable trigger all");
    await run(sql, [claim.id]);
    await run("alter table timeline_entries enable always trigger timeline_entries_append_only");
    await run("alter table timeline_entries enable always trigger timeline_entries_no_truncate");
    await run("alter table timeline_entries enable always trigger timeline_chain");
  });

describe("the chain of a claim's timeline", () => {
  beforeEach(async () => {
    for (const kind of ["file", "take", "ask", "answer"]) await note(kind);
  });

  it("holds as written, numbered from one", async () => {
    expect(await brokenLinks()).toEqual([]);
    const rows = await adminQuery("select seq, kind from timeline_entries where claim_id = $1 order by seq", [
      claim.id,
    ]);
    expect(rows).toEqual([
      { seq: 1, kind: "file" },
      { seq: 2, kind: "take" },
      { seq: 3, kind: "ask" },
      { seq: 4, kind: "answer" },
    ]);
  });

  it.each([
    [
      "a word changed",
      `update timeline_entries set detail = '{"text":"other"}' where claim_id = $1 and seq = 2`,
      ["entry 2"],
    ],
    [
      "a time moved",
      "update timeline_entries set at = at - interval '1 day' where claim_id = $1 and seq = 3",
      ["entry 3"],
    ],
    [
      "another author",
      "update timeline_entries set actor_name = 'Somebody' where claim_id = $1 and seq = 1",
      ["entry 1"],
    ],
    [
      "an entry hidden from one side",
      "update timeline_entries set only_for_id = seller_id where claim_id = $1 and seq = 4",
      ["entry 4"],
    ],
    [
      "an entry taken out",
      "delete from timeline_entries where claim_id = $1 and seq = 2",
      ["entry 3", "entry 4"],
    ],
    ["the tail cut off", "delete from timeline_entries where claim_id = $1 and seq = 4", ["head"]],
    [
      "two entries changing places",
      "update timeline_entries set seq = case seq when 2 then 103 else 102 end where claim_id = $1 and seq in (2, 3)",
      ["entry 102", "entry 103", "entry 4", "head"],
    ],
  ])("shows %s", async (_name, sql, broken) => {
    await tamper(sql);
    expect(await brokenLinks()).toEqual(broken);
  });

  it("is numbered, timed and linked by the database, whatever is sent", async () => {
    await asRole(
      "web",
      { actor: shop.person.id, org: shop.id },
      `insert into timeline_entries (claim_id, seq, seller_id, workshop_id, kind, actor_id, actor_name, actor_organisation_id,
         at, prev_hash, hash) values ($1, 99, $2, $3, 'note', $4, 'Robin', $3, '2020-01-01', 'made up', 'made up')`,
      [claim.id, seller.id, shop.id, shop.person.id],
    );
    expect(await brokenLinks()).toEqual([]);
    const [last] = await adminQuery<{ seq: number; recent: boolean }>(
      "select seq, at > now() - interval '1 minute' as recent from timeline_entries where claim_id = $1 order by seq desc limit 1",
      [claim.id],
    );
    expect(last).toEqual({ seq: 5, recent: true });
  });

  it("stays one chain when forty entries come at the same moment", async () => {
    await Promise.all(Array.from({ length: 40 }, (_entry, at) => note(`note${at}`)));
    expect(await brokenLinks()).toEqual([]);
    const [row] = await adminQuery("select max(seq) as last from timeline_entries where claim_id = $1", [
      claim.id,
    ]);
    expect(row?.["last"]).toBe(44);
  });

  it("takes no entry in another person's or organisation's name", async () => {
    const other = await buildPerson(shop, ["technician"]);
    const entry = (actor: string, organisation: string) =>
      answerOf(
        asRole(
          "web",
          { actor: shop.person.id, org: shop.id },
          `insert into timeline_entries (claim_id, seq, seller_id, workshop_id, kind, actor_id, actor_name, actor_organisation_id,
             prev_hash, hash) values ($1, 0, $2, $3, 'note', $4, 'Robin', $5, '', '')`,
          [claim.id, seller.id, shop.id, actor, organisation],
        ),
      );
    expect(await entry(other.id, shop.id)).toBe(NOT_ALLOWED);
    expect(await entry(shop.person.id, seller.id)).toBe(NOT_ALLOWED);
    expect(await entry(shop.person.id, shop.id)).toBe("done");
  });
});

describe("the chain of an organisation's audit", () => {
  const broken = async () => {
    const rows = await adminQuery<{ seq: string }>(
      `with chain as (select a.*, audit_text(a) as text, lag(hash, 1, '') over (order by seq) as before
         from audit_log a where organisation_id = $1)
       select seq from chain where hash <> encode(sha256(convert_to(text, 'UTF8')), 'hex') or prev_hash <> before`,
      [shop.id],
    );
    return rows.map(({ seq }) => Number(seq));
  };

  it("shows a changed entry, and stays whole under twenty writers", async () => {
    const write = () => unitOfWork(worker(), (work) => appendToAudit(work, "exported", { lines: 12 }));
    await Promise.all(Array.from({ length: 20 }, write));
    expect(await broken()).toEqual([]);
    await inTransaction("postgres", {}, async (run) => {
      await run("alter table audit_log disable trigger all");
      await run(`update audit_log set detail = '{"lines":11}' where organisation_id = $1 and seq = 7`, [
        shop.id,
      ]);
      await run("alter table audit_log enable always trigger audit_log_append_only");
      await run("alter table audit_log enable always trigger audit_log_no_truncate");
    });
    expect(await broken()).toEqual([7]);
  });

  it("is written for the organisation in the context alone", async () => {
    expect(await answerOf(asRole("web", {}, "select guarded.append_audit('signedIn', '{}')"))).toBe("PP002");
  });
});
