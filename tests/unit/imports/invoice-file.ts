import type { Catalogue, Recorded } from "@/lib/imports/known";
import { readLines } from "@/lib/imports/check";
import type { CsvFile } from "@/lib/imports/csv-file";
import { readCsv } from "@/lib/imports/csv-service";
import { atOnce } from "@/lib/imports/pieces";
import { calendarDay } from "@/lib/kernel/calendar-day";

const TODAY = calendarDay("2026-05-11");

export const HEAD =
  "Account,Ship-to site,Invoice,Line,Invoice day,Part number,Quantity,Serial,Batch,Net price,Tax category,Tax rate,Exemption reason";

/** A line of the file with a serial, changed where a case needs it. */
export const lineWith = (over: Partial<Record<keyof typeof USUAL, string>> = {}): string =>
  Object.values({ ...USUAL, ...over }).join(",");

const USUAL = {
  account: "K-1",
  site: "",
  invoice: "R-1",
  line: "1",
  invoicedOn: "2026-03-02",
  part: "BR-1",
  quantity: "",
  serial: "AA-1",
  batch: "",
  netPrice: "184.50",
  taxCategory: "S",
  taxRate: "19",
  exemptionReason: "",
};

/** The same for a part without serial. */
export const looseLine = (over: Partial<Record<keyof typeof USUAL, string>> = {}): string =>
  lineWith({ part: "CH-1", serial: "", quantity: "6", line: "2", ...over });

const fileOf = async (...lines: readonly string[]): Promise<CsvFile> => {
  const read = await readCsv(new TextEncoder().encode([HEAD, ...lines].join("\n")), 1000);
  if (!read.ok) throw new Error(read.code);
  return read.value;
};

const CATALOGUE: Catalogue = {
  accounts: new Map([
    [
      "K-1",
      {
        id: "account-1",
        buyerId: "buyer-1",
        buyerName: "Saltmarsh Mobility",
        currency: "EUR",
        closedOn: null,
        sites: [
          { id: "site-1", name: "Harbour Road" },
          { id: "site-2", name: "Mill Lane" },
        ],
      },
    ],
    [
      "K-9",
      {
        id: "account-9",
        buyerId: "buyer-9",
        buyerName: "Hollin Lane Workshop",
        currency: "EUR",
        closedOn: calendarDay("2026-01-31"),
        sites: [],
      },
    ],
  ]),
  parts: new Map([
    ["BR-1", { id: "part-1", isSerialTracked: true }],
    ["CH-1", { id: "part-2", isSerialTracked: false }],
  ]),
};

export const NOTHING_RECORDED: Recorded = { batches: new Map(), lines: new Map(), units: new Map() };

export const read = async (...lines: readonly string[]) =>
  atOnce(readLines(await fileOf(...lines), { catalogue: CATALOGUE, today: TODAY }));

/** What was found wrong, short: the line, the column and the code. */
export const wrongIn = async (...lines: readonly string[]): Promise<string[]> => {
  const { problems } = await read(...lines);
  return problems.map(({ line, column, code }) => `${line} ${column ?? "line"} ${code}`);
};
