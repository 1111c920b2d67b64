import type { Role } from "@/lib/access/roles";
import { idOf } from "../identity";
import { ORGANISATIONS, type OrganisationKey } from "./organisations";

export type Person = {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly organisation: OrganisationKey;
  readonly roles: readonly Role[];
  /** A second organisation this person works for, and what as. */
  readonly also: { readonly organisation: OrganisationKey; readonly roles: readonly Role[] } | null;
  /** What the tour shows with this person. */
  readonly note: string;
};

const DOMAINS: Readonly<Record<OrganisationKey, string>> = {
  larkmoor: "larkmoor.example",
  fenwright: "fenwright.example",
  saltmarsh: "saltmarsh.example",
  tworivers: "tworivers.example",
  hollin: "hollinlane.example",
  quayhead: "quayhead.example",
};

type Sketch = Pick<Person, "organisation" | "roles" | "note"> & Partial<Pick<Person, "also">>;

const person = (name: string, sketch: Sketch): Person => {
  const local = name.toLowerCase().replace("ä", "ae").replace("ö", "oe").replace(" ", ".");
  const email = `${local}@${DOMAINS[sketch.organisation]}`;
  return { id: idOf("person", email), name, email, also: null, ...sketch };
};

export const PEOPLE = {
  lou: person("Lou Tanner", {
    organisation: "saltmarsh",
    roles: ["technician"],
    note: "Starts claims at the bench; a query waits for an answer.",
  }),
  maren: person("Maren Holt", {
    organisation: "saltmarsh",
    roles: ["workshopManager", "accounts", "administrator"],
    note: "Checks and sends claims, contests a verdict, keeps the workshop's people.",
  }),
  idris: person("Idris Vale", {
    organisation: "tworivers",
    roles: ["technician", "workshopManager", "administrator"],
    note: "A one-desk workshop; one of its claims was lapsed by the clock.",
  }),
  petra: person("Petra Lowe", {
    organisation: "hollin",
    roles: ["technician", "workshopManager", "administrator"],
    note: "Her gearbox claims come back as a fitting fault.",
  }),
  jonas: person("Jonas Ehrler", {
    organisation: "quayhead",
    roles: ["technician"],
    note: "Works in German; has a draft open.",
  }),
  wiebke: person("Wiebke Sandner", {
    organisation: "quayhead",
    roles: ["workshopManager", "administrator"],
    note: "Checks and sends claims to Fenwright Supply, in German.",
  }),
  ada: person("Ada Merrow", {
    organisation: "larkmoor",
    roles: ["assessor"],
    note: "Judges claims: thirty wait; she holds one after an incident and has parked two.",
  }),
  tobias: person("Tobias Quill", {
    organisation: "larkmoor",
    roles: ["assessor"],
    note: "The second assessor: hears what Ada decided and was contested, and waits for parts.",
  }),
  rosa: person("Rosa Finchley", {
    organisation: "larkmoor",
    roles: ["goodsIn"],
    note: "Receives parts and runs the bench: two parcels without a match, three parts to examine, one that never came.",
  }),
  edwin: person("Edwin Marsh", {
    organisation: "larkmoor",
    roles: ["accounts"],
    note: "Turns verdicts into credit: notes to issue, to allocate, and one that was countered.",
  }),
  nadia: person("Nadia Brook", {
    organisation: "larkmoor",
    roles: ["analyst"],
    note: "Looks for the bad batch: LMB-2410 of batch R2614.",
  }),
  colin: person("Colin Thorpe", {
    organisation: "larkmoor",
    roles: ["administrator"],
    note: "Keeps catalogue, accounts, people and Rule book.",
  }),
  sam: person("Sam Weaver", {
    organisation: "larkmoor",
    roles: ["technician", "workshopManager"],
    note: "Larkmoor's own workshop, which claims from Fenwright Supply.",
  }),
  kit: person("Kit Dunmore", {
    organisation: "larkmoor",
    roles: ["technician"],
    also: { organisation: "saltmarsh", roles: ["technician"] },
    note: "Works at Larkmoor's service bay, and two days a week at Saltmarsh Mobility.",
  }),
  greta: person("Greta Lindau", {
    organisation: "fenwright",
    roles: ["assessor"],
    note: "Judges claims in German; her list is long.",
  }),
  imke: person("Imke Rahn", {
    organisation: "fenwright",
    roles: ["analyst", "assessor"],
    note: "Looks after the life curves, and hears what Greta decided and was contested.",
  }),
  holger: person("Holger Bruns", {
    organisation: "fenwright",
    roles: ["administrator", "goodsIn", "accounts"],
    note: "Keeps catalogue, accounts and Rule book, receives parts.",
  }),
} as const satisfies Record<string, Person>;

export type PersonKey = keyof typeof PEOPLE;

/** Who starts and sends an organisation's claims. */
export const CLAIMANTS: Readonly<
  Record<Exclude<OrganisationKey, "fenwright">, { starts: PersonKey; contests: PersonKey }>
> = {
  saltmarsh: { starts: "lou", contests: "maren" },
  tworivers: { starts: "idris", contests: "idris" },
  hollin: { starts: "petra", contests: "petra" },
  quayhead: { starts: "jonas", contests: "wiebke" },
  larkmoor: { starts: "sam", contests: "sam" },
};

/** Who judges at a distributor: the first takes most, the second hears what the first decided. */
export const ASSESSORS = {
  larkmoor: { first: "ada", second: "tobias", bench: "rosa" },
  fenwright: { first: "greta", second: "imke", bench: "holger" },
} as const;

/** Who issues and allocates credit notes. */
export const ACCOUNTANTS = { larkmoor: "edwin", fenwright: "holger" } as const;

/** The list for the start command and the tour. */
export const peopleList = () =>
  Object.values(PEOPLE).map(({ name, email, organisation, roles, note }) => ({
    name,
    email,
    organisation: ORGANISATIONS[organisation].name,
    roles,
    note,
  }));
