import { idOf } from "../identity";

export type OrganisationKey = "larkmoor" | "fenwright" | "saltmarsh" | "tworivers" | "hollin" | "quayhead";
export type SellerKey = "larkmoor" | "fenwright";
export type BuyerKey = Exclude<OrganisationKey, "fenwright">;

export type Site = { readonly id: string; readonly name: string; readonly address: string };

export type Organisation = {
  readonly key: OrganisationKey;
  readonly id: string;
  readonly name: string;
  readonly legalName: string;
  readonly sells: boolean;
  readonly buys: boolean;
  readonly address: string;
  readonly country: "GB" | "DE";
  readonly taxNumber: string;
  readonly currency: "GBP" | "EUR";
  readonly timeZone: string;
  readonly language: "en" | "de";
  /** Ship-to sites; the first is where most of the work is done. */
  readonly sites: readonly [Site, ...Site[]];
};

type Sketch = Omit<Organisation, "id" | "key" | "sites" | "country" | "currency" | "timeZone" | "language">;

const BRITISH = { country: "GB", currency: "GBP", timeZone: "Europe/London", language: "en" } as const;
const GERMAN = { country: "DE", currency: "EUR", timeZone: "Europe/Berlin", language: "de" } as const;

type Places = readonly [readonly [string, string], ...(readonly [string, string])[]];

const organisation = (
  key: OrganisationKey,
  home: typeof BRITISH | typeof GERMAN,
  { places, ...sketch }: Sketch & { places: Places },
): Organisation => {
  const [first, ...others] = places;
  const site = ([name, address]: readonly [string, string]): Site => ({
    id: idOf("site", key, name),
    name,
    address,
  });
  return {
    key,
    id: idOf("organisation", key),
    ...home,
    ...sketch,
    sites: [site(first), ...others.map(site)],
  };
};

export const ORGANISATIONS: Readonly<Record<OrganisationKey, Organisation>> = {
  larkmoor: organisation("larkmoor", BRITISH, {
    name: "Larkmoor Parts",
    legalName: "Larkmoor Parts Ltd",
    sells: true,
    buys: true,
    address: "Unit 7, Larkmoor Estate, Withernbridge WB4 2LM",
    taxNumber: "GB 000 4107 26",
    places: [["Service bay", "Unit 9, Larkmoor Estate, Withernbridge WB4 2LM"]],
  }),
  fenwright: organisation("fenwright", GERMAN, {
    name: "Fenwright Supply",
    legalName: "Fenwright Supply GmbH",
    sells: true,
    buys: false,
    address: "Am Torfkanal 18, 00417 Moordeich",
    taxNumber: "DE 000417826",
    places: [["Zentrallager", "Am Torfkanal 18, 00417 Moordeich"]],
  }),
  saltmarsh: organisation("saltmarsh", BRITISH, {
    name: "Saltmarsh Mobility",
    legalName: "Saltmarsh Mobility Ltd",
    sells: false,
    buys: true,
    address: "3 Harbour Road, Ebbingstow EB1 7SM",
    taxNumber: "GB 000 5218 03",
    places: [
      ["Harbour Road", "3 Harbour Road, Ebbingstow EB1 7SM"],
      ["Mill Lane", "41 Mill Lane, Upper Ebbing EB6 3ML"],
    ],
  }),
  tworivers: organisation("tworivers", BRITISH, {
    name: "Two Rivers Repairs",
    legalName: "Two Rivers Repairs Ltd",
    sells: false,
    buys: true,
    address: "12 Weir Street, Confley CF2 8TR",
    taxNumber: "GB 000 6329 14",
    places: [["Weir Street", "12 Weir Street, Confley CF2 8TR"]],
  }),
  hollin: organisation("hollin", BRITISH, {
    name: "Hollin Lane Workshop",
    legalName: "Hollin Lane Workshop CIC",
    sells: false,
    buys: true,
    address: "88 Hollin Lane, Ashgarth AG9 1HL",
    taxNumber: "GB 000 7431 25",
    places: [["Hollin Lane", "88 Hollin Lane, Ashgarth AG9 1HL"]],
  }),
  quayhead: organisation("quayhead", GERMAN, {
    name: "Quayhead Wheels",
    legalName: "Quayhead Wheels GmbH",
    sells: false,
    buys: true,
    address: "Pierstraße 5, 00538 Kaihafen",
    taxNumber: "DE 000538937",
    places: [["Werkstatt Kaihafen", "Pierstraße 5, 00538 Kaihafen"]],
  }),
};

export type Account = {
  readonly id: string;
  readonly seller: SellerKey;
  readonly buyer: BuyerKey;
  readonly number: string;
  readonly currency: "GBP" | "EUR";
  /** Share of the seller's units this account buys. */
  readonly weight: number;
  readonly tax: { readonly category: "S" | "G"; readonly rate: number; readonly reason: string | null };
};

type Terms = Pick<Account, "number" | "weight" | "tax">;

const account = (seller: SellerKey, buyer: BuyerKey, terms: Terms): Account => ({
  id: idOf("account", seller, buyer),
  seller,
  buyer,
  currency: ORGANISATIONS[seller].currency,
  ...terms,
});

const STANDARD_GB = { category: "S", rate: 20, reason: null } as const;
const STANDARD_DE = { category: "S", rate: 19, reason: null } as const;
const EXPORT = { category: "G", rate: 0, reason: "Steuerfreie Ausfuhrlieferung" } as const;

export const ACCOUNTS: readonly Account[] = [
  account("larkmoor", "saltmarsh", { number: "L-2041", weight: 0.45, tax: STANDARD_GB }),
  account("larkmoor", "tworivers", { number: "L-2077", weight: 0.3, tax: STANDARD_GB }),
  account("larkmoor", "hollin", { number: "L-2103", weight: 0.25, tax: STANDARD_GB }),
  account("fenwright", "quayhead", { number: "70018", weight: 0.68, tax: STANDARD_DE }),
  account("fenwright", "larkmoor", { number: "70044", weight: 0.32, tax: EXPORT }),
];

/** The account between two organisations of the story. Throws where they do not trade. */
export function accountBetween(seller: SellerKey, buyer: BuyerKey): Account {
  const found = ACCOUNTS.find((candidate) => candidate.seller === seller && candidate.buyer === buyer);
  if (!found) throw new RangeError(`${buyer} does not buy from ${seller}`);
  return found;
}
