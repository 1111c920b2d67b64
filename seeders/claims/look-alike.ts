import { normaliseSerial } from "@/lib/labels/serial";
import type { Unit } from "../story/units";

const LOOK_ALIKES: readonly (readonly [string, string])[] = [
  ["B", "8"],
  ["8", "B"],
  ["0", "O"],
  ["O", "0"],
  ["S", "5"],
  ["5", "S"],
  ["1", "I"],
  ["I", "1"],
];

/** A serial that looks like a unit's own on a worn label and was never shipped. Throws where it has no such letter. */
export function lookAlikeOf(unit: Unit, units: readonly Unit[]): string {
  const shipped = new Set(units.map(({ serial }) => normaliseSerial(serial)));
  for (const [letter, other] of LOOK_ALIKES) {
    const typed = unit.serial.replace(letter, other);
    if (typed !== unit.serial && !shipped.has(normaliseSerial(typed))) return typed;
  }
  throw new RangeError(`${unit.serial} has no letter that looks like another`);
}
