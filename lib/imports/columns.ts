type Column = {
  /** Without it a file cannot be read at all. */
  readonly isRequired: boolean;
  /** The heading we write ourselves, by language. */
  readonly heading: { readonly en: string; readonly de: string };
  /** Other headings that mean the same. Case, accents, spaces and punctuation do not matter. */
  readonly synonyms: readonly string[];
  /** What the three lines of the example file say: a unit, its twin on the same invoice line, a quantity. */
  readonly example: readonly [string, string, string];
};

/** Every column an invoice file may have, in the order of the example. A new column is one entry here. */
export const COLUMNS = {
  account: {
    isRequired: true,
    heading: { en: "Account", de: "Kundennummer" },
    synonyms: [
      "Account number",
      "Account no",
      "Customer",
      "Customer number",
      "Konto",
      "Kunde",
      "Kunden-Nr",
      "Kd.-Nr",
    ],
    example: ["K-1001", "K-1001", "K-1001"],
  },
  site: {
    isRequired: false,
    heading: { en: "Ship-to site", de: "Lieferort" },
    synonyms: ["Site", "Ship to", "Delivery site", "Branch", "Standort", "Filiale", "Lieferadresse"],
    example: ["", "", ""],
  },
  invoice: {
    isRequired: true,
    heading: { en: "Invoice", de: "Rechnung" },
    synonyms: ["Invoice number", "Invoice no", "Rechnungsnummer", "Rechnungs-Nr", "Rg.-Nr", "Belegnummer"],
    example: ["R-2401", "R-2401", "R-2401"],
  },
  line: {
    isRequired: true,
    heading: { en: "Line", de: "Position" },
    synonyms: [
      "Line number",
      "Invoice line",
      "Line no",
      "Pos",
      "Pos.-Nr",
      "Positionsnummer",
      "Rechnungsposition",
    ],
    example: ["1", "1", "2"],
  },
  invoicedOn: {
    isRequired: true,
    heading: { en: "Invoice day", de: "Rechnungstag" },
    synonyms: ["Invoice date", "Date", "Rechnungsdatum", "Belegdatum", "Datum"],
    example: ["2026-03-02", "2026-03-02", "2026-03-02"],
  },
  shippedOn: {
    isRequired: false,
    heading: { en: "Shipped on", de: "Versandtag" },
    synonyms: [
      "Ship date",
      "Shipping date",
      "Delivery date",
      "Shipped",
      "Versanddatum",
      "Lieferdatum",
      "Liefertag",
    ],
    example: ["2026-03-03", "2026-03-03", "2026-03-03"],
  },
  currency: {
    isRequired: false,
    heading: { en: "Currency", de: "Währung" },
    synonyms: ["Currency code", "Waehrung", "Whg"],
    example: ["EUR", "EUR", "EUR"],
  },
  part: {
    isRequired: true,
    heading: { en: "Part number", de: "Teilenummer" },
    synonyms: [
      "Part",
      "Part no",
      "Item",
      "Item number",
      "Article",
      "Article number",
      "Artikel",
      "Artikelnummer",
      "Art.-Nr",
      "Teile-Nr",
    ],
    example: ["BR-120", "BR-120", "CH-24"],
  },
  quantity: {
    isRequired: false,
    heading: { en: "Quantity", de: "Menge" },
    synonyms: ["Qty", "Pieces", "Anzahl", "Stück", "Stueck", "Stk"],
    example: ["1", "1", "6"],
  },
  serial: {
    isRequired: false,
    heading: { en: "Serial", de: "Seriennummer" },
    synonyms: ["Serial number", "Serial no", "S/N", "Serien-Nr", "SN", "Fabriknummer"],
    example: ["X7Q2-0001", "X7Q2-0002", ""],
  },
  batch: {
    isRequired: false,
    heading: { en: "Batch", de: "Charge" },
    synonyms: ["Batch code", "Batch number", "Lot", "Lot number", "Chargennummer", "Los", "Losnummer"],
    example: ["L2609", "L2609", ""],
  },
  netPrice: {
    isRequired: true,
    heading: { en: "Net price", de: "Nettopreis" },
    synonyms: [
      "Unit price",
      "Net unit price",
      "Price",
      "Einzelpreis",
      "Netto-Einzelpreis",
      "Preis",
      "Stückpreis",
    ],
    example: ["184.50", "184.50", "61.20"],
  },
  taxCategory: {
    isRequired: true,
    heading: { en: "Tax category", de: "Steuerkategorie" },
    synonyms: [
      "VAT category",
      "Tax code",
      "VAT code",
      "Steuerkennzeichen",
      "Steuerschlüssel",
      "USt-Kategorie",
    ],
    example: ["S", "S", "S"],
  },
  taxRate: {
    isRequired: false,
    heading: { en: "Tax rate", de: "Steuersatz" },
    synonyms: [
      "Tax rate %",
      "VAT rate",
      "VAT %",
      "VAT",
      "MwSt",
      "MwSt-Satz",
      "USt",
      "USt-Satz",
      "Umsatzsteuersatz",
    ],
    example: ["19", "19", "19"],
  },
  exemptionReason: {
    isRequired: false,
    heading: { en: "Exemption reason", de: "Befreiungsgrund" },
    synonyms: [
      "Reason for exemption",
      "Tax exemption reason",
      "Grund der Befreiung",
      "Steuerbefreiungsgrund",
    ],
    example: ["", "", ""],
  },
} as const satisfies Record<string, Column>;

export type ColumnKey = keyof typeof COLUMNS;

/** True for the key of a column. */
export const isColumnKey = (text: string): text is ColumnKey => Object.hasOwn(COLUMNS, text);

/** The keys of all columns, in the order of the example file. */
export const COLUMN_KEYS: readonly ColumnKey[] = Object.keys(COLUMNS).filter(isColumnKey);
