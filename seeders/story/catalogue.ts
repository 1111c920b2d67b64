import type { FamilyCode } from "@/lib/parts/families";
import { idOf } from "../identity";
import type { SellerKey } from "./organisations";

export type MakerName = "Ostrand" | "Kelvane" | "Brannick";

export type Part = {
  readonly id: string;
  readonly seller: SellerKey;
  readonly maker: MakerName;
  readonly number: string;
  readonly name: string;
  readonly family: FamilyCode;
  readonly priceMinor: number;
  readonly serialTracked: boolean;
  readonly rated: Readonly<Record<string, string | number>>;
  readonly supersededBy: string | null;
};

type Sketch = Pick<Part, "maker" | "name" | "family" | "priceMinor" | "rated"> &
  Partial<Pick<Part, "serialTracked" | "supersededBy">>;

const partOf =
  (seller: SellerKey) =>
  (number: string, sketch: Sketch): Part => ({
    id: idOf("part", seller, number),
    seller,
    number,
    serialTracked: true,
    supersededBy: null,
    ...sketch,
  });

type Sold = Pick<Sketch, "maker" | "name" | "priceMinor">;

/** A spring-applied brake by its coil; the figures of the label at 20 °C. */
const brake = (sold: Sold, coilOhm: number, releaseVoltageV: number): Sketch => ({
  ...sold,
  family: "brake",
  rated: {
    voltageV: 24,
    coilOhm,
    coilTolerance: "8/100",
    insulationClass: "155",
    releaseVoltageV,
    airGapMm: 0.2,
    airGapMmMax: 0.4,
  },
});

const motor = (sold: Sold, windingOhm: number, powerW: number): Sketch => ({
  ...sold,
  family: "motor",
  rated: {
    voltageV: 24,
    powerW,
    windingOhm,
    windingTolerance: "10/100",
    insulationClass: "130",
    noLoadCurrentA: 2.4,
  },
});

const controller = (name: string, priceMinor: number, currentA: number): Sketch => ({
  maker: "Brannick",
  name,
  family: "controller",
  priceMinor,
  rated: { voltageV: 24, currentA, brakeOutputV: 24, underVoltageV: 17 },
});

const throttle = (name: string, supersededBy?: string): Sketch => ({
  maker: "Brannick",
  name,
  family: "throttle",
  priceMinor: 3890,
  rated: { trackOhm: 5000, trackTolerance: "20/100", supplyV: 5 },
  supersededBy: supersededBy ?? null,
});

const gearbox = (name: string, priceMinor: number): Sketch => ({
  maker: "Kelvane",
  name,
  family: "gearbox",
  priceMinor,
  rated: { ratio: "32/1", playAtRimMmMax: 6, oilMl: 120 },
});

const block = (name: string, priceMinor: number, capacityAh: number): Sketch => ({
  maker: "Ostrand",
  name,
  family: "battery",
  priceMinor,
  rated: { voltageV: 12, capacityAh, rateHours: 20, endVoltageV: 10.5, chemistry: "lead, absorbent mat" },
});

const larkmoor = partOf("larkmoor");
const fenwright = partOf("fenwright");

export const PARTS: readonly Part[] = [
  larkmoor(
    "LMB-2410",
    brake({ maker: "Ostrand", name: "Drive brake 24 V, 10 W coil", priceMinor: 8640 }, 57.6, 15),
  ),
  larkmoor(
    "LMB-2415",
    brake({ maker: "Kelvane", name: "Drive brake 24 V, 15 W coil", priceMinor: 10_250 }, 38.4, 14.4),
  ),
  larkmoor(
    "LMM-2425",
    motor({ maker: "Kelvane", name: "Drive motor 24 V, 250 W", priceMinor: 21_833 }, 1.1, 250),
  ),
  larkmoor(
    "LMM-2440",
    motor({ maker: "Ostrand", name: "Drive motor 24 V, 400 W", priceMinor: 26_475 }, 0.7, 400),
  ),
  larkmoor("LMC-2470", controller("Drive controller 24 V, 70 A", 31_490, 70)),
  larkmoor("LMC-2412", controller("Drive controller 24 V, 120 A", 42_980, 120)),
  larkmoor("LML-2405", {
    maker: "Brannick",
    name: "Charger 24 V, 5 A, no serial",
    family: "charger",
    priceMinor: 5420,
    serialTracked: false,
    rated: { voltageV: 24, currentA: 5, absorptionV: 28.8, floatV: 27.4 },
  }),
  larkmoor("LML-2408", {
    maker: "Brannick",
    name: "Charger 24 V, 8 A",
    family: "charger",
    priceMinor: 9875,
    rated: { voltageV: 24, currentA: 8, absorptionV: 28.8, floatV: 27.4 },
  }),
  larkmoor("LMA-1236", block("Battery block 12 V, 36 Ah", 7990, 36)),
  larkmoor("LMA-2520", {
    maker: "Kelvane",
    name: "Lithium pack 25.6 V, 20 Ah",
    family: "battery",
    priceMinor: 38_650,
    rated: {
      voltageV: 25.6,
      capacityAh: 20,
      rateHours: 5,
      endVoltageV: 20,
      chemistry: "lithium iron phosphate",
    },
  }),
  larkmoor("LMG-3201", gearbox("Drive gearbox 32:1", 15_720)),
  larkmoor("LMT-0501", throttle("Throttle lever 5 kohm", "LMT-0502")),
  larkmoor("LMT-0502", throttle("Throttle lever 5 kohm, sealed")),
  fenwright(
    "FS-1104",
    brake({ maker: "Ostrand", name: "Federdruckbremse 24 V, 12 W", priceMinor: 9320 }, 48, 14.8),
  ),
  fenwright(
    "FS-1208",
    motor({ maker: "Kelvane", name: "Antriebsmotor 24 V, 300 W", priceMinor: 23_640 }, 0.9, 300),
  ),
  fenwright("FS-1310", controller("Fahrsteuerung 24 V, 90 A", 36_880, 90)),
  fenwright("FS-1405", {
    maker: "Brannick",
    name: "Ladegerät 24 V, 6 A",
    family: "charger",
    priceMinor: 8460,
    rated: { voltageV: 24, currentA: 6, absorptionV: 28.8, floatV: 27.4 },
  }),
  fenwright("FS-1512", block("Batterieblock 12 V, 50 Ah", 10_980, 50)),
  fenwright("FS-1603", gearbox("Antriebsgetriebe 32:1", 17_150)),
  fenwright("FS-1702", throttle("Fahrgeber 5 kOhm")),
];

/** The part of that number in a distributor's catalogue. Throws where the story has none. */
export function partNumbered(number: string): Part {
  const found = PARTS.find((part) => part.number === number);
  if (!found) throw new RangeError(`No part ${number} in the story`);
  return found;
}

export const makerId = (seller: SellerKey, maker: MakerName): string => idOf("maker", seller, maker);
export const MAKERS: readonly MakerName[] = ["Ostrand", "Kelvane", "Brannick"];
