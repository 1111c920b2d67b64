import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { Serial, TaxCategory } from "./cell-values";

/** What is one and the same for every unit of an invoice line. */
export type LineFacts = {
  readonly accountId: string;
  readonly siteId: string | null;
  readonly invoicedOn: CalendarDay;
  readonly shippedOn: CalendarDay;
  readonly partId: string;
  readonly currency: string;
  readonly unitPriceMinor: string;
  readonly taxCategory: TaxCategory;
  readonly taxRate: string;
  readonly exemptionReason: string | null;
};

/** A line of the file that can be written: the facts of its invoice line, and its unit where it has one. */
export type GoodLine = {
  readonly line: number;
  readonly buyerId: string;
  readonly invoice: string;
  readonly lineNumber: number;
  readonly facts: LineFacts;
  readonly quantity: number;
  readonly serial: Serial | null;
  readonly batch: string | null;
};

export type KnownAccount = {
  readonly id: string;
  readonly buyerId: string;
  readonly buyerName: string;
  readonly currency: string;
  readonly closedOn: CalendarDay | null;
  readonly sites: readonly { readonly id: string; readonly name: string }[];
};
export type KnownPart = { readonly id: string; readonly isSerialTracked: boolean };
export type KnownLine = { readonly id: string; readonly quantity: number; readonly facts: LineFacts };
export type KnownUnit = {
  readonly invoiceLineId: string | null;
  readonly invoice: string | null;
  readonly lineNumber: number | null;
  readonly batch: string | null;
};

/** The accounts and parts a file names, by their numbers. */
export type Catalogue = {
  readonly accounts: ReadonlyMap<string, KnownAccount>;
  readonly parts: ReadonlyMap<string, KnownPart>;
};

/** What is on record already, of all that the good lines of a file speak of; batches by their ids. */
export type Recorded = {
  readonly batches: ReadonlyMap<string, string>;
  readonly lines: ReadonlyMap<string, KnownLine>;
  readonly units: ReadonlyMap<string, KnownUnit>;
};

/** The key of an invoice line among those of one seller. */
export const lineKey = (invoice: string, lineNumber: number): string => `${lineNumber} ${invoice}`;
/** The key of a unit: a serial is unique among those of its part. */
export const unitKey = (partId: string, serialNormal: string): string => `${partId} ${serialNormal}`;
/** The key of a batch: its code is unique among those of its part. */
export const batchKey = (partId: string, code: string): string => `${partId} ${code}`;
