import type { PartFamily } from "../family";
import { battery } from "./battery";
import { brake } from "./brake";
import { charger } from "./charger";
import { controller } from "./controller";
import { gearbox } from "./gearbox";
import { motor } from "./motor";
import { throttle } from "./throttle";

/** Every part family the product knows. A new family is one file and one line here. */
const REGISTRY = { brake, motor, controller, charger, battery, gearbox, throttle } as const satisfies Record<
  string,
  PartFamily
>;

export type FamilyCode = keyof typeof REGISTRY;

export const FAMILIES: Readonly<Record<FamilyCode, PartFamily>> = REGISTRY;

/** The registry in the order it is offered. */
export const FAMILY_LIST: readonly PartFamily[] = Object.values(REGISTRY);

/** Codes of all families, in the order they are offered. */
export const FAMILY_CODES: readonly FamilyCode[] = FAMILY_LIST.map((family) => family.code).filter(
  isFamilyCode,
);

/** Whether a text names a family. */
export function isFamilyCode(code: string): code is FamilyCode {
  return Object.hasOwn(REGISTRY, code);
}

/** The family of that code, or null where no such family is known. */
export const familyOf = (code: string): PartFamily | null => (isFamilyCode(code) ? FAMILIES[code] : null);
