import { isAfter, type CalendarDay } from "@/lib/kernel/calendar-day";
import { ok, refuse } from "@/lib/kernel/outcome";
import {
  readCurrency,
  readDay,
  readLineNumber,
  readOptional,
  readPrice,
  readQuantity,
  readReason,
  readSerial,
  readTaxCategory,
  readTaxRate,
  readText,
} from "./cell-values";
import type { Catalogue, GoodLine, KnownAccount, KnownPart, LineFacts } from "./known";
import { deskFor, type Answer, type Desk, type LineProblem } from "./line-desk";
import type { CsvRow } from "./csv-file";
import type { Heading } from "./heading";

export type Reading = {
  readonly heading: Heading;
  readonly catalogue: Catalogue;
  readonly today: CalendarDay;
};

const LONGEST_NUMBER = 40;
const LONGEST_NAME = 120;

function accountNumbered(number: string, { accounts }: Catalogue): Answer<KnownAccount> {
  const read = readText(number, LONGEST_NUMBER);
  if (!read.ok) return read;
  const account = accounts.get(number);
  return account ? ok(account) : refuse("accountUnknown", { number });
}

function partNumbered(number: string, { parts }: Catalogue): Answer<KnownPart> {
  const read = readText(number, LONGEST_NUMBER);
  if (!read.ok) return read;
  const part = parts.get(number);
  return part ? ok(part) : refuse("partUnknown", { number });
}

function siteNamed(name: string, account: KnownAccount | undefined): Answer<string | null> {
  const read = readOptional(name, LONGEST_NAME);
  if (!read.ok) return read;
  if (read.value === null || !account) return ok(null);
  const wanted = name.toLowerCase();
  const site = account.sites.find((one) => one.name.toLowerCase() === wanted);
  if (site) return ok(site.id);
  return refuse("siteUnknown", {
    workshop: account.buyerName,
    sites: account.sites.map((one) => one.name).join(", "),
  });
}

function readParty({ take }: Desk, catalogue: Catalogue) {
  const account = take("account", (text) => accountNumbered(text, catalogue));
  const siteId = take("site", (text) => siteNamed(text, account));
  return account === undefined || siteId === undefined ? undefined : { account, siteId };
}

function readInvoice({ take, text }: Desk, account: KnownAccount | undefined, today: CalendarDay) {
  const invoice = take("invoice", (cell) => readText(cell, LONGEST_NUMBER));
  const lineNumber = take("line", readLineNumber);
  const invoicedOn = take("invoicedOn", (cell): Answer<CalendarDay> => {
    const day = readDay(cell, today);
    if (!day.ok || !account?.closedOn || !isAfter(day.value, account.closedOn)) return day;
    return refuse("accountClosed", { closedOn: account.closedOn });
  });
  const shippedOn = text("shippedOn") === "" ? invoicedOn : take("shippedOn", (cell) => readDay(cell, today));
  if (invoice === undefined || lineNumber === undefined) return undefined;
  if (invoicedOn === undefined || shippedOn === undefined) return undefined;
  return { invoice, lineNumber, invoicedOn, shippedOn };
}

/** What a part without serial cannot have, and one with serials has to. */
function readGoods({ take }: Desk, catalogue: Catalogue) {
  const part = take("part", (text) => partNumbered(text, catalogue));
  const quantity = take("quantity", (text): Answer<number> => {
    const read = readQuantity(text);
    return read.ok && part?.isSerialTracked && read.value > 1 ? refuse("quantityOfSerial") : read;
  });
  const serial = take("serial", (text) => {
    const read = readSerial(text);
    if (!read.ok || !part) return read;
    if (part.isSerialTracked && read.value === null) return refuse("serialWanted");
    return !part.isSerialTracked && read.value !== null ? refuse("serialNotTaken") : read;
  });
  const batch = take("batch", (text): Answer<string | null> => {
    const read = readOptional(text, LONGEST_NUMBER);
    return part && !part.isSerialTracked && text !== "" ? refuse("batchNotTaken") : read;
  });
  if (part === undefined || quantity === undefined) return undefined;
  return serial === undefined || batch === undefined ? undefined : { part, quantity, serial, batch };
}

function readPay({ take, text }: Desk, account: KnownAccount | undefined) {
  const currency = take("currency", (cell): Answer<string | null> => {
    if (cell === "") return ok(account?.currency ?? null);
    const read = readCurrency(cell);
    if (!read.ok || !account || read.value === account.currency) return read;
    return refuse("currencyNotAccounts", { currency: account.currency });
  });
  const known = readCurrency(currency ?? "");
  // Without a currency nothing is said about decimals: only that a price is missing.
  const price = known.ok
    ? take("netPrice", (cell) => readPrice(cell, known.value))
    : text("netPrice") === ""
      ? take("netPrice", (): Answer<never> => refuse("missing"))
      : undefined;
  return price;
}

function readTax({ take }: Desk) {
  const category = take("taxCategory", readTaxCategory);
  if (category === undefined) return undefined;
  const rate = take("taxRate", (text) => readTaxRate(text, category));
  const reason = take("exemptionReason", (text) => readReason(text, category));
  return rate === undefined || reason === undefined ? undefined : { category, rate, reason };
}

/** A line of the file with what its cells mean, or everything that is wrong with it. */
export function readLine(row: CsvRow, { heading, catalogue, today }: Reading): GoodLine | LineProblem[] {
  const desk = deskFor(row, heading);
  const party = readParty(desk, catalogue);
  const account = party?.account ?? catalogue.accounts.get(desk.text("account"));
  const invoice = readInvoice(desk, account, today);
  const goods = readGoods(desk, catalogue);
  const price = readPay(desk, account);
  const tax = readTax(desk);
  if (desk.problems.length > 0 || !party || !invoice || !goods || !price || !tax) return desk.problems;
  const facts: LineFacts = {
    accountId: party.account.id,
    siteId: party.siteId,
    invoicedOn: invoice.invoicedOn,
    shippedOn: invoice.shippedOn,
    partId: goods.part.id,
    currency: price.currency,
    unitPriceMinor: String(price.minor),
    taxCategory: tax.category,
    taxRate: tax.rate,
    exemptionReason: tax.reason,
  };
  const { invoice: number, lineNumber } = invoice;
  const { quantity, serial, batch } = goods;
  return {
    line: row.line,
    buyerId: party.account.buyerId,
    invoice: number,
    lineNumber,
    facts,
    quantity,
    serial,
    batch,
  };
}
