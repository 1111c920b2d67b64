import { idOf } from "../identity";
import type { Chance } from "../random";
import type { BuyerKey } from "./organisations";

export type Installer = {
  readonly id: string;
  readonly workshop: BuyerKey;
  readonly name: string;
  readonly code: string;
};
export type Vehicle = {
  readonly id: string;
  readonly workshop: BuyerKey;
  readonly frameSerial: string;
  readonly model: string;
};

const NAMES: Readonly<Record<BuyerKey, { prefix: string; names: readonly string[] }>> = {
  saltmarsh: {
    prefix: "SM",
    names: ["Lou Tanner", "Bram Oakes", "Nell Harker", "Ivo Stanes", "Tess Farrow"],
  },
  tworivers: { prefix: "TR", names: ["Idris Vale", "Cora Wick", "Milo Ashby", "Una Peel"] },
  hollin: { prefix: "HL", names: ["Petra Lowe", "Gil Sutter", "Dale Orme", "Wren Tolley"] },
  quayhead: { prefix: "QW", names: ["Jonas Ehrler", "Mara Tiedje", "Falk Ohmsen", "Silke Brahm"] },
  larkmoor: { prefix: "LB", names: ["Sam Weaver", "Orla Finch", "Reg Malton", "Kit Dunmore"] },
};

/** Everybody who fits parts, by workshop. The distributor sees the code, never the name. */
export const INSTALLERS: Readonly<Record<BuyerKey, readonly Installer[]>> = {
  saltmarsh: installersAt("saltmarsh"),
  tworivers: installersAt("tworivers"),
  hollin: installersAt("hollin"),
  quayhead: installersAt("quayhead"),
  larkmoor: installersAt("larkmoor"),
};

function installersAt(workshop: BuyerKey): Installer[] {
  const { prefix, names } = NAMES[workshop];
  return names.map((name, place) => {
    const code = `${prefix}-${place + 1}`;
    return { id: idOf("installer", workshop, code), workshop, name, code };
  });
}

/** Whose gearboxes come back early: the key is left out of its seat. */
export const CARELESS_INSTALLER_CODE = "HL-3";

type ModelRow = readonly [model: string, prefix: string];
const MODELS: readonly ModelRow[] = [
  ["Haddle 3", "HD3"],
  ["Haddle 4", "HD4"],
  ["Brindlow 240", "BL2"],
  ["Corvesk", "CVK"],
  ["Tolmin Chair", "TMC"],
  ["Marrowby", "MWB"],
];

/** The vehicles a workshop looks after; parts go into known vehicles about as often as into new ones. */
export function vehicleYard(workshop: BuyerKey, chance: Chance) {
  const draw = chance.fork(`vehicles ${workshop}`);
  const known: Vehicle[] = [];
  return {
    known,
    next: (): Vehicle => {
      const old = known[draw.whole(0, known.length)];
      if (old && draw.happens(0.45)) return old;
      const [model, prefix] = draw.pick(MODELS);
      const frameSerial = `${prefix}-${String(draw.whole(10_000, 99_999))}-${String(known.length + 1).padStart(4, "0")}`;
      const vehicle = { id: idOf("vehicle", workshop, frameSerial), workshop, frameSerial, model };
      known.push(vehicle);
      return vehicle;
    },
  };
}
