import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { figure, shown, type Figure } from "./figure";

/**
 * The constant k of a conductor in R(T) = R20 (k + T)/(k + 20), in °C. 235 and 225 as the rotating-machine standard
 * uses them (IEC 60034-1, from memory); American texts print 234.5 for copper, which moves an answer by some 0.2 K.
 */
export const CONDUCTOR_K = { copper: 235, aluminium: 225 } as const;

export type WindingRefusal = "resistanceNotPositive" | "temperatureImpossible" | "hotBelowCold";

const RESISTANCE_METHOD = "IEC 60034-1, resistance method (from memory)";

/** Measured resistance brought to 20 °C: R20 = R (k + 20)/(k + T). Refuses R <= 0 and T <= -k. */
export function resistanceAt20(input: {
  ohm: number;
  celsius: number;
  k?: number;
}): Outcome<Figure, WindingRefusal> {
  const k = input.k ?? CONDUCTOR_K.copper;
  const doubt = doubtAbout(k, [input.ohm], [input.celsius]);
  if (doubt) return doubt;
  const ohmAt20 = (input.ohm * (k + 20)) / (k + input.celsius);
  const inputs = { ohm: shown(input.ohm, 3), celsius: shown(input.celsius), k };
  return ok(
    figure({ rule: "resistanceAt20", value: ohmAt20, decimals: 2, input: inputs, source: RESISTANCE_METHOD }),
  );
}

/** Resistance at a temperature from the one at 20 °C. Refuses R20 <= 0 and T <= -k. */
export function resistanceAt(input: {
  ohmAt20: number;
  celsius: number;
  k?: number;
}): Outcome<Figure, WindingRefusal> {
  const k = input.k ?? CONDUCTOR_K.copper;
  const doubt = doubtAbout(k, [input.ohmAt20], [input.celsius]);
  if (doubt) return doubt;
  const ohm = (input.ohmAt20 * (k + input.celsius)) / (k + 20);
  return ok(
    figure({
      rule: "resistanceAt",
      value: ohm,
      decimals: 2,
      input: { ohmAt20: shown(input.ohmAt20), celsius: shown(input.celsius), k },
    }),
  );
}

/**
 * Mean winding temperature in °C from its cold and hot resistance: T2 = (R2/R1)(k + T1) - k. The hottest spot lies
 * 5 to 15 K higher (from memory). A hot resistance below the cold one is refused: a coil that is cooling, a shorted
 * turn, or the two fields swapped.
 */
export function windingTemperature(input: {
  coldOhm: number;
  coldCelsius: number;
  hotOhm: number;
  k?: number;
}): Outcome<Figure, WindingRefusal> {
  const k = input.k ?? CONDUCTOR_K.copper;
  const doubt = doubtAbout(k, [input.coldOhm, input.hotOhm], [input.coldCelsius]);
  if (doubt) return doubt;
  if (input.hotOhm < input.coldOhm)
    return refuse("hotBelowCold", { coldOhm: shown(input.coldOhm), hotOhm: shown(input.hotOhm) });
  const celsius = (input.hotOhm / input.coldOhm) * (k + input.coldCelsius) - k;
  const inputs = {
    coldOhm: shown(input.coldOhm),
    coldCelsius: shown(input.coldCelsius),
    hotOhm: shown(input.hotOhm),
    k,
  };
  return ok(
    figure({
      rule: "windingTemperature",
      value: celsius,
      decimals: 1,
      input: inputs,
      source: RESISTANCE_METHOD,
    }),
  );
}

/** Rise of a winding over the air around it, in kelvin. */
export const riseOverAmbient = (windingCelsius: number, ambientCelsius: number): Figure =>
  figure({
    rule: "riseOverAmbient",
    value: windingCelsius - ambientCelsius,
    decimals: 1,
    input: {
      celsius: shown(windingCelsius, 1),
      ambientCelsius: shown(ambientCelsius, 1),
    },
  });

/** The temperature coefficient at 20 °C that belongs to a conductor constant: 1/(k + 20), per kelvin. */
export const coefficientAt20 = (k: number): number => 1 / (k + 20);

/** The band a maker's tolerance allows around the rated resistance, in ohm at 20 °C, and whether a value lies in it. */
export function withinTolerance(input: { ohmAt20: number; ratedOhm: number; tolerancePercent: number }): {
  readonly fromOhm: number;
  readonly toOhm: number;
  readonly position: "below" | "inside" | "above";
} {
  const spanOhm = (input.ratedOhm * input.tolerancePercent) / 100;
  const [fromOhm, toOhm] = [input.ratedOhm - spanOhm, input.ratedOhm + spanOhm];
  const position = input.ohmAt20 < fromOhm ? "below" : input.ohmAt20 > toOhm ? "above" : "inside";
  return { fromOhm, toOhm, position };
}

/** The refusal a resistance or a temperature earns before it is used, or null. NaN and infinity earn one too. */
export function doubtAbout(k: number, ohms: readonly number[], celsius: readonly number[]) {
  const badOhm = ohms.find((ohm) => !(ohm > 0 && Number.isFinite(ohm)));
  if (badOhm !== undefined) return refuse("resistanceNotPositive", { ohm: String(badOhm) });
  const badCelsius = celsius.find((value) => !(value > -k && Number.isFinite(value)));
  if (badCelsius !== undefined) return refuse("temperatureImpossible", { celsius: String(badCelsius) });
  return null;
}
