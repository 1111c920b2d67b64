import type { FamilyCode } from "@/lib/parts/families";
import type { SellerKey } from "./organisations";

const ENGLISH: Readonly<Record<FamilyCode, string>> = {
  brake: "brakes",
  motor: "motors",
  controller: "controllers",
  charger: "chargers",
  battery: "batteries",
  gearbox: "gearboxes",
  throttle: "throttles",
};

const GERMAN: Readonly<Record<FamilyCode, string>> = {
  brake: "Bremsen",
  motor: "Motoren",
  controller: "Fahrsteuerungen",
  charger: "Ladegeräte",
  battery: "Batterien",
  gearbox: "Getriebe",
  throttle: "Fahrgeber",
};

type Edition = 1 | 2;
const edition = (which: Edition): string => (which === 1 ? "first edition" : "second edition");
const ausgabe = (which: Edition): string => (which === 1 ? "erste Ausgabe" : "zweite Ausgabe");

/** Titles of rules as each distributor words them. */
export const RULE_WORDS = {
  larkmoor: {
    terms: (which: Edition) => `Warranty terms, ${edition(which)}`,
    levels: "Working hours and answers",
    credit: (which: Edition) => `How we credit, ${edition(which)}`,
    list: (family: FamilyCode, which: Edition) => `Evidence list for ${ENGLISH[family]}, ${edition(which)}`,
    limits: (family: FamilyCode) => `Limits of readings for ${ENGLISH[family]}`,
    partLimits: (number: string) => `Limits of readings for ${number}`,
  },
  fenwright: {
    terms: (which: Edition) => `Gewährleistungsbedingungen, ${ausgabe(which)}`,
    levels: "Arbeitszeiten und Antworten",
    credit: (which: Edition) => `Wie wir gutschreiben, ${ausgabe(which)}`,
    list: (family: FamilyCode, which: Edition) => `Nachweisliste für ${GERMAN[family]}, ${ausgabe(which)}`,
    limits: (family: FamilyCode) => `Grenzwerte für ${GERMAN[family]}`,
    partLimits: (number: string) => `Grenzwerte für ${number}`,
  },
} as const satisfies Record<SellerKey, unknown>;
