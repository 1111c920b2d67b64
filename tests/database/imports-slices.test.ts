import { monitorEventLoopDelay } from "node:perf_hooks";
import { describe, expect, it } from "vitest";
import { findImportSheet } from "@/lib/imports/queries";
import { importLines, receiveInvoiceFile } from "@/lib/imports/service";
import { LIMITS } from "@/lib/kernel/limits";
import { actorAt } from "@/tests/support/actor";
import {
  buildAccount,
  buildDistributor,
  buildOrganisation,
  buildPart,
  buildPerson,
} from "@/tests/support/build";

const HEAD = "Account;Site;Invoice;Line;Invoice date;Part;Qty;Serial;Batch;Price;Tax code;VAT;Remark\n";
/** Work in one piece gives nobody a turn; work in slices gives one every few milliseconds. */
const FEWEST_TURNS = 8;

async function buildSeller() {
  const seller = await buildDistributor();
  await buildAccount(seller, await buildOrganisation(), { account_number: "K-1" });
  await buildPart(seller, { part_number: "BR-1" });
  return actorAt(seller, await buildPerson(seller, ["administrator"]), ["administrator"]);
}

/** As many lines as the largest file that is taken has room for. */
function requestWith(lineAt: (at: number) => string, mostLines: number) {
  const lines = [HEAD];
  let size = HEAD.length;
  for (let at = 0; at < mostLines && size < LIMITS.importBytes - 25_000; at += 1) {
    const line = `${lineAt(at)}\n`;
    size += Buffer.byteLength(line);
    lines.push(line);
  }
  const form = new FormData();
  form.set("file", new File([lines.join("")], "lines.csv", { type: "text/csv" }));
  return new Request("http://localhost/api/v1/invoice-imports", { method: "POST", body: form });
}

/**
 * What came of it, and how often anything else had its turn meanwhile. How long a turn had to wait is printed and not
 * judged: on a busy machine that is the neighbours' doing.
 */
async function watched<T>(name: string, act: () => Promise<T>) {
  const delay = monitorEventLoopDelay({ resolution: 5 });
  let turns = 0;
  let isOver = false;
  const count = () => {
    turns += 1;
    if (!isOver) setTimeout(count, 1);
  };
  setTimeout(count, 1);
  delay.enable();
  const done = await act();
  isOver = true;
  delay.disable();
  const p99Ms = delay.percentile(99) / 1e6;
  process.stdout.write(
    `${name}: others waited ${p99Ms.toFixed(0)} ms at the 99th percentile, ${turns} turns\n`,
  );
  return { done, turns };
}

const REMARK = "sold over the counter".repeat(2);
const good = (invoice: string, line: number, serial: string, remark = "") =>
  `K-1;;${invoice};${line};2.3.2026;BR-1;;${serial};L-1;184,50;S;19;${remark}`;

const PATIENT = { timeout: 180_000 };
const LINES = 60_000;

describe("while a large file is received and previewed, everybody else has their turn", () => {
  it.for([
    ["lines in order", (at: number) => good(`R-${at >> 3}`, (at & 7) + 1, `S${at}`, REMARK), 0],
    ["units of one invoice line", (at: number) => good("R-1", 1, `S${at}`), 0],
    ["lines wrong in every cell", (at: number) => `K${at};x;;0;x;P${at};-;;;x;x;x;${REMARK}`, LINES],
    ["lines of one letter", () => "x", LINES],
    ["lines of thousands of cells", (at: number) => `${";".repeat(9_000)}${at}`, 2_774],
    ["long cells", (at: number) => `${at}${"é".repeat(4_000)};x`, 3_120],
    ["cells of two lines", (at: number) => `"${at}\nb";x`, LINES],
  ] as const)("%s", PATIENT, async ([name, lineAt, problems]) => {
    const actor = await buildSeller();
    // Every line of the others is wrong: as many of them as there are problems to find.
    const request = requestWith(lineAt, problems || LINES);
    const received = await watched(`${name}, received`, () => receiveInvoiceFile(actor, request));
    if (!received.done.ok) throw new Error(received.done.code);
    const { importId } = received.done.value;
    const sheet = await watched(`${name}, previewed`, () => findImportSheet(actor, importId));
    expect(sheet.done?.preview?.problemLineCount).toBe(problems);
    expect(sheet.turns).toBeGreaterThan(FEWEST_TURNS);
  });
});

it("while 40000 lines are written, everybody else has their turn too", PATIENT, async () => {
  const actor = await buildSeller();
  const request = requestWith((at) => good(`R-${at >> 3}`, (at & 7) + 1, `S${at}`), 40_000);
  const received = await receiveInvoiceFile(actor, request);
  if (!received.ok) throw new Error(received.code);
  const { done, turns } = await watched("written", () => importLines(actor, received.value));
  expect(done).toMatchObject({ ok: true });
  expect(turns).toBeGreaterThan(FEWEST_TURNS);
});
