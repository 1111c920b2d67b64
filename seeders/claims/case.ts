import type { FamilyCode } from "@/lib/parts/families";
import type { Part } from "../story/catalogue";
import type { BuyerKey, SellerKey } from "../story/organisations";
import type { SaleLine } from "../story/sales";
import type { Position } from "../story/service";
import type { Unit } from "../story/units";
import type { Installer, Vehicle } from "../story/workshops";
import type { PlotName } from "./plots";

/** What is special about a claim of the story; most have nothing. */
export type Twist =
  | "badCoil"
  | "fittingFault"
  | "incident"
  | "pair"
  | "noSerial"
  | "chainFirst"
  | "chainSecond"
  | "photoReused"
  | "serialDoubtful"
  | "heldElsewhere"
  | "parcelLost"
  | "parcelWet"
  | "otherUnitSent"
  | "zeroRated";

/** One line of a claim as the workshop knows it. */
export type CaseLine = {
  readonly part: Part;
  /** Null where the serial that was typed belongs to no unit this workshop bought. */
  readonly unit: Unit | null;
  readonly serialTyped: string;
  readonly sale: SaleLine | null;
  readonly quantity: number;
  readonly position: Position;
  readonly fittingId: string | null;
  readonly fittedDaysAgo: number | null;
  readonly installer: Installer | null;
  readonly replacement: Unit | null;
};

/** A claim of the story before anybody has done anything with it. */
export type Case = {
  readonly key: string;
  /** Eight digits, the last a check digit. */
  readonly number: string;
  readonly seller: SellerKey;
  readonly workshop: BuyerKey;
  readonly family: FamilyCode;
  readonly symptom: string;
  readonly plot: PlotName;
  readonly twist: Twist | null;
  /** One of the many: its photos are few and small. */
  readonly isMinor: boolean;
  readonly vehicle: Vehicle;
  readonly failedDaysAgo: number;
  readonly repairedDaysAgo: number;
  /** The day it was sent; for a draft, the day it was started. */
  readonly filedDaysAgo: number;
  /** Minutes until a heat fault shows. */
  readonly faultAfterMinutes: number;
  readonly lines: readonly [CaseLine, ...CaseLine[]];
};
