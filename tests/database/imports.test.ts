import { beforeAll, describe, expect, it } from "vitest";
import { findImportSheet, listImports } from "@/lib/imports/queries";
import { importLines, receiveInvoiceFile } from "@/lib/imports/service";
import { actorAt } from "@/tests/support/actor";
import {
  buildAccount,
  buildDistributor,
  buildOrganisation,
  buildPart,
  buildPerson,
  buildSite,
} from "@/tests/support/build";
import { adminQuery } from "@/tests/support/database";

const HEAD = "Account;Site;Invoice;Line;Invoice date;Part;Qty;Serial;Batch;Price;Tax code;VAT";
const MANY = 10_000;

/** A distributor with an administrator, an account of a workshop with a site, and two parts. */
async function buildTrade() {
  const seller = await buildDistributor();
  const buyer = await buildOrganisation();
  const person = await buildPerson(seller, ["administrator"]);
  await buildSite(buyer, { name: "Mill Lane" });
  await buildAccount(seller, buyer, { account_number: "K-1" });
  const brake = await buildPart(seller, { part_number: "BR-1" });
  await buildPart(seller, { part_number: "CH-1", serial_tracked: false });
  return { seller, buyer, brake, person, actor: actorAt(seller, person, ["administrator"]) };
}
type Trade = Awaited<ReturnType<typeof buildTrade>>;

const unitLine = (invoice: string, line: number, serial: string, price = "184,50") =>
  `K-1;Mill Lane;${invoice};${line};2.3.2026;BR-1;;${serial};L-1;${price};S;19`;
const looseLine = (invoice: string, line: number, quantity = 6) =>
  `K-1;;${invoice};${line};2026-03-02;CH-1;${quantity};;;61,2;S;19`;

function requestWith(text: string, name = "lines.csv") {
  const form = new FormData();
  form.set("file", new File([text], name, { type: "text/csv" }));
  return new Request("http://localhost/api/v1/invoice-imports", { method: "POST", body: form });
}

async function send({ actor }: Pick<Trade, "actor">, ...lines: readonly string[]) {
  const sent = await receiveInvoiceFile(actor, requestWith([HEAD].concat(lines).join("\r\n")));
  if (!sent.ok) throw new Error(sent.code);
  return sent.value;
}

async function sheetOf({ actor }: Pick<Trade, "actor">, importId: string) {
  const sheet = await findImportSheet(actor, importId);
  if (!sheet) throw new Error("no such import");
  return sheet;
}

const written = async ({ seller }: Trade) => {
  const [row] = await adminQuery<{ lines: number; units: number; batches: number }>(
    `select (select count(*)::int from invoice_lines where seller_id = $1) as lines,
       (select count(*)::int from units where seller_id = $1) as units,
       (select count(*)::int from batches where seller_id = $1) as batches`,
    [seller.id],
  );
  return row;
};

describe("an invoice file", () => {
  it("is previewed without a row being written, then imported whole", async () => {
    const trade = await buildTrade();
    const { importId } = await send(
      trade,
      unitLine("R-1", 1, "AA-1"),
      unitLine("R-1", 1, "aa 2"),
      looseLine("R-1", 2),
    );
    const { preview } = await sheetOf(trade, importId);
    expect(preview).toMatchObject({
      problemLineCount: 0,
      result: { invoiceLines: 2, units: 2, batches: 1, unchanged: 0 },
    });
    expect(await written(trade)).toEqual({ lines: 0, units: 0, batches: 0 });

    expect(await importLines(trade.actor, { importId })).toMatchObject({ ok: true });
    const kept = await adminQuery(
      `select l.invoice_number, l.line_number, l.invoiced_on::text, l.shipped_on::text, l.quantity, l.unit_price_minor, l.currency,
         l.tax_category, l.tax_rate, s.name as site, u.serial, u.serial_normal, b.code
       from invoice_lines l left join sites s on s.id = l.site_id left join units u on u.invoice_line_id = l.id
         left join batches b on b.id = u.batch_id
       where l.seller_id = $1 order by l.line_number, u.serial_normal`,
      [trade.seller.id],
    );
    const brake = {
      invoice_number: "R-1",
      line_number: 1,
      invoiced_on: "2026-03-02",
      shipped_on: "2026-03-02",
      quantity: 2,
      unit_price_minor: "18450",
      currency: "EUR",
      tax_category: "S",
      tax_rate: "19.000",
      site: "Mill Lane",
      code: "L-1",
    };
    expect(kept).toEqual([
      { ...brake, serial: "AA-1", serial_normal: "AA1" },
      { ...brake, serial: "aa 2", serial_normal: "AA2" },
      {
        ...brake,
        line_number: 2,
        quantity: 6,
        unit_price_minor: "6120",
        site: null,
        code: null,
        serial: null,
        serial_normal: null,
      },
    ]);
  });

  it("with one bad line writes nothing at all", async () => {
    const trade = await buildTrade();
    const { importId } = await send(trade, unitLine("R-1", 1, "AA-1"), unitLine("R-1", 2, "AA-2", "free"));
    const { preview } = await sheetOf(trade, importId);
    expect(preview?.problems).toMatchObject([{ line: 3, heading: "Net price", given: "free" }]);
    expect(await importLines(trade.actor, { importId })).toMatchObject({
      ok: false,
      code: "importHasProblems",
      detail: { count: 1 },
    });
    expect(await written(trade)).toEqual({ lines: 0, units: 0, batches: 0 });
  });

  it("sent twice is one import, and imported twice changes nothing", async () => {
    const trade = await buildTrade();
    const lines = [unitLine("R-1", 1, "AA-1"), looseLine("R-1", 2)];
    const first = await send(trade, ...lines);
    expect(first.wasSentBefore).toBe(false);
    await importLines(trade.actor, first);
    const before = await written(trade);

    const second = await send(trade, ...lines);
    expect(second).toEqual({ importId: first.importId, wasSentBefore: true });
    expect(await importLines(trade.actor, second)).toMatchObject({ ok: true });
    expect(await written(trade)).toEqual(before);
    expect(await listImports(trade.actor)).toMatchObject([{ id: first.importId, isImported: true }]);
  });

  it("skips what another file brought already, and refuses to change it", async () => {
    const trade = await buildTrade();
    await importLines(trade.actor, await send(trade, unitLine("R-1", 1, "AA-1"), looseLine("R-1", 2)));

    const longer = await send(
      trade,
      unitLine("R-1", 1, "AA-1"),
      looseLine("R-1", 2),
      unitLine("R-2", 1, "AA-2"),
    );
    expect((await sheetOf(trade, longer.importId)).preview?.result).toMatchObject({
      invoiceLines: 1,
      unchanged: 2,
    });
    await importLines(trade.actor, longer);
    expect(await written(trade)).toMatchObject({ lines: 3, units: 2 });

    const other = await send(trade, unitLine("R-1", 1, "AA-1", "1"), unitLine("R-3", 1, "AA-2"));
    expect((await sheetOf(trade, other.importId)).preview?.problems).toMatchObject([
      { line: 2, code: "lineExists" },
      { line: 3, code: "serialKnown", detail: { invoice: "R-2" } },
    ]);
  });

  it("leads to the page that creates an unknown part or account, and is in order once they exist", async () => {
    const trade = await buildTrade();
    const { importId } = await send(
      trade,
      unitLine("R-1", 1, "AA-1").replace("BR-1", "BR-9").replace("K-1", "K-9"),
    );
    const back = `/invoice-lines/${importId}`;
    expect((await sheetOf(trade, importId)).preview?.problems.map(({ create }) => create)).toEqual([
      { what: "account", pathname: "/accounts/new", query: { number: "K-9", back } },
      { what: "part", pathname: "/catalogue/new", query: { partNumber: "BR-9", back } },
    ]);
    await buildPart(trade.seller, { part_number: "BR-9" });
    const buyer = await buildOrganisation();
    await buildSite(buyer, { name: "Mill Lane" });
    await buildAccount(trade.seller, buyer, { account_number: "K-9" });
    expect((await sheetOf(trade, importId)).preview?.problemLineCount).toBe(0);
  });

  it("pressed twice at the same moment is written once", async () => {
    const trade = await buildTrade();
    const sent = await send(trade, unitLine("R-1", 1, "AA-1"));
    const answers = await Promise.all([importLines(trade.actor, sent), importLines(trade.actor, sent)]);
    expect(answers.some(({ ok }) => ok)).toBe(true);
    expect(await written(trade)).toEqual({ lines: 1, units: 1, batches: 1 });
  });

  it("that cannot be read as a whole is refused with what is missing, and not kept", async () => {
    const { actor } = await buildTrade();
    const answers = await Promise.all(
      ["x,y\n1,2", `${HEAD}\n`, "<html>"].map((text) => receiveInvoiceFile(actor, requestWith(text))),
    );
    expect(answers).toMatchObject([
      { code: "importColumnsMissing", detail: { columns: expect.stringContaining("Account, Invoice") } },
      { code: "importWithoutLines" },
      { ok: false },
    ]);
    expect(await listImports(actor)).toEqual([]);
  });
});

describe("who may import", () => {
  let trade: Trade;
  let importId: string;
  beforeAll(async () => {
    trade = await buildTrade();
    ({ importId } = await send(trade, unitLine("R-1", 1, "AA-1")));
  });

  it("is no other role of the distributor", async () => {
    const assessor = actorAt(trade.seller, trade.person, ["assessor", "goodsIn"]);
    expect(await receiveInvoiceFile(assessor, requestWith(HEAD))).toMatchObject({ code: "notAllowed" });
    expect(await importLines(assessor, { importId })).toMatchObject({ code: "notFound" });
    expect(await findImportSheet(assessor, importId)).toBeNull();
    expect(await listImports(assessor)).toEqual([]);
  });

  it("is no workshop, and no other distributor sees the file", async () => {
    const workshop = actorAt(trade.buyer, await buildPerson(trade.buyer, ["administrator"]), [
      "administrator",
    ]);
    expect(await receiveInvoiceFile(workshop, requestWith(HEAD))).toMatchObject({ code: "notAllowed" });
    const stranger = await buildTrade();
    expect(await findImportSheet(stranger.actor, importId)).toBeNull();
    expect(await importLines(stranger.actor, { importId })).toMatchObject({ code: "notFound" });
  });

  it("is kept apart where two distributors send the same bytes", async () => {
    const stranger = await buildTrade();
    const sent = await send(stranger, unitLine("R-1", 1, "AA-1"));
    expect(sent.wasSentBefore).toBe(false);
    expect(sent.importId).not.toBe(importId);
  });
});

it(`imports ${MANY} lines in seconds`, async () => {
  const trade = await buildTrade();
  const lines = Array.from({ length: MANY }, (_line, at) => unitLine(`R-${at >> 3}`, (at & 7) + 1, `S${at}`));
  const { importId } = await send(trade, lines.join("\r\n"));
  const started = performance.now();
  expect(await importLines(trade.actor, { importId })).toMatchObject({ ok: true });
  expect(performance.now() - started).toBeLessThan(15_000);
  expect(await written(trade)).toEqual({ lines: MANY, units: MANY, batches: 1 });
  const again = await send(trade, lines.join("\r\n"), looseLine("R-X", 1));
  expect((await sheetOf(trade, again.importId)).preview?.result).toMatchObject({
    invoiceLines: 1,
    unchanged: MANY,
  });
}, 60_000);
