/**
 * Currencies by the decimals of their minor unit, ISO 4217 (the 0, 3 and 4 decimal groups as in npm
 * currency-codes 2.2.0, list dated 2024-06-25; XCG and ZWG, added since, from memory). Metals, the special
 * drawing right and test codes have no minor unit and are left out. The formats of `Intl` disagree with
 * ISO 4217 for some of these (HUF, IQD), so a ledger must never take its decimals from there.
 */
const CODES = {
  0: [
    "BIF",
    "CLP",
    "DJF",
    "GNF",
    "ISK",
    "JPY",
    "KMF",
    "KRW",
    "PYG",
    "RWF",
    "UGX",
    "UYI",
    "VND",
    "VUV",
    "XAF",
    "XOF",
    "XPF",
  ],
  // prettier-ignore
  2: [
    "AED", "AFN", "ALL", "AMD", "ANG", "AOA", "ARS", "AUD", "AWG", "AZN", "BAM", "BBD", "BDT", "BGN", "BMD", "BND",
    "BOB", "BOV", "BRL", "BSD", "BTN", "BWP", "BYN", "BZD", "CAD", "CDF", "CHE", "CHF", "CHW", "CNY", "COP", "COU",
    "CRC", "CUP", "CVE", "CZK", "DKK", "DOP", "DZD", "EGP", "ERN", "ETB", "EUR", "FJD", "FKP", "GBP", "GEL", "GHS",
    "GIP", "GMD", "GTQ", "GYD", "HKD", "HNL", "HTG", "HUF", "IDR", "ILS", "INR", "IRR", "JMD", "KES", "KGS", "KHR",
    "KPW", "KYD", "KZT", "LAK", "LBP", "LKR", "LRD", "LSL", "MAD", "MDL", "MGA", "MKD", "MMK", "MOP", "MRU", "MUR",
    "MVR", "MWK", "MXN", "MXV", "MYR", "MZN", "NAD", "NGN", "NIO", "NOK", "NPR", "NZD", "PAB", "PEN", "PGK", "PHP",
    "PKR", "PLN", "QAR", "RON", "RSD", "RUB", "SAR", "SBD", "SCR", "SDG", "SEK", "SGD", "SHP", "SLE", "SOS", "SRD",
    "SSP", "STN", "SVC", "SYP", "SZL", "THB", "TJS", "TMT", "TOP", "TRY", "TTD", "TWD", "TZS", "UAH", "USD", "USN",
    "UYU", "UZS", "VED", "VES", "WST", "XCD", "XCG", "YER", "ZAR", "ZMW", "ZWG",
  ],
  3: ["BHD", "IQD", "JOD", "KWD", "LYD", "OMR", "TND"],
  4: ["CLF", "UYW"],
} as const;

export type Currency = (typeof CODES)[keyof typeof CODES][number];

const DIGITS: ReadonlyMap<string, number> = new Map(
  Object.entries(CODES).flatMap(([digits, codes]) => codes.map((code) => [code, Number(digits)] as const)),
);

/** Every currency the ledger knows, in alphabetical order. */
export const CURRENCIES: readonly Currency[] = Object.values(CODES)
  .flatMap((codes): readonly Currency[] => codes)
  .toSorted();

/** True for an ISO 4217 code, in capitals, that has a minor unit. */
export const isCurrency = (text: string): text is Currency => DIGITS.has(text);

/** The currency of data that was checked when it came in, as a `char(3)` column gives it. Throws RangeError for any other text. */
export function currencyFrom(text: string): Currency {
  const code = text.trim();
  if (!isCurrency(code)) throw new RangeError(`unknown currency ${code}`);
  return code;
}

/** Decimals of the currency's minor unit by ISO 4217: 2 for EUR, 0 for JPY, 3 for KWD. */
export const minorDigits = (currency: Currency): number => DIGITS.get(currency) ?? 2;
