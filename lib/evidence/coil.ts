import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { figure, shown, type Figure } from "./figure";
import { CONDUCTOR_K, doubtAbout, resistanceAt, type WindingRefusal } from "./winding";

// The physics of a spring-applied brake's coil: springs clamp the disc, the coil's current must pull the plate free.

export type CoilRefusal = WindingRefusal | "voltageNotPositive";

/** Coil power in W at a voltage and resistance: U²/R. Refuses R <= 0 and U < 0. */
export function coilPower(input: { volt: number; ohm: number }): Outcome<Figure, CoilRefusal> {
  const doubt = doubtAbout(CONDUCTOR_K.copper, [input.ohm], []) ?? doubtAboutVolt(input.volt);
  if (doubt) return doubt;
  const watt = (input.volt * input.volt) / input.ohm;
  return ok(
    figure({
      rule: "coilPower",
      value: watt,
      decimals: 2,
      input: { volt: shown(input.volt), ohm: shown(input.ohm) },
    }),
  );
}

/** The resistance in ohm of a coil rated for a power at a voltage: U²/P. Refuses a power or voltage <= 0. */
export function coilOhmFor(input: { volt: number; watt: number }): Outcome<Figure, CoilRefusal> {
  const doubt = doubtAbout(CONDUCTOR_K.copper, [input.watt], []) ?? doubtAboutVolt(input.volt);
  if (doubt) return doubt;
  const ohm = (input.volt * input.volt) / input.watt;
  return ok(
    figure({
      rule: "coilOhmFor",
      value: ohm,
      decimals: 2,
      input: { volt: shown(input.volt), watt: shown(input.watt) },
    }),
  );
}

/** Current in A a voltage drives through the coil at a temperature. Refuses R20 <= 0, T <= -k, U < 0. */
export function currentAvailable(input: {
  volt: number;
  ohmAt20: number;
  celsius: number;
  k?: number;
}): Outcome<Figure, CoilRefusal> {
  const doubt = doubtAboutVolt(input.volt);
  if (doubt) return doubt;
  const ohm = resistanceAt(input);
  if (!ohm.ok) return ohm;
  const inputs = { volt: shown(input.volt), ohm: shown(ohm.value.value), celsius: shown(input.celsius, 1) };
  return ok(
    figure({ rule: "currentAvailable", value: input.volt / ohm.value.value, decimals: 3, input: inputs }),
  );
}

/**
 * Voltage at which the brake pulls in at a coil temperature. Pull-in needs a current set by gap and springs, so the
 * voltage rises with the copper: U(T) = U20 (k + T)/(k + 20). Refuses U20 <= 0 and T <= -k.
 */
export function pullInVoltage(input: {
  voltAt20: number;
  celsius: number;
  k?: number;
}): Outcome<Figure, CoilRefusal> {
  const k = input.k ?? CONDUCTOR_K.copper;
  const doubt = doubtAboutVolt(input.voltAt20) ?? doubtAbout(k, [], [input.celsius]);
  if (doubt) return doubt;
  const volt = (input.voltAt20 * (k + input.celsius)) / (k + 20);
  const inputs = { voltAt20: shown(input.voltAt20), celsius: shown(input.celsius, 1), k };
  return ok(figure({ rule: "pullInVoltage", value: volt, decimals: 2, input: inputs }));
}

/**
 * Coil temperature in °C above which the voltage at hand no longer releases the brake:
 * Tcrit = (Uavailable/U20)(k + 20) - k. The same brake can pass every cold test and fail every hot one.
 */
export function criticalTemperature(input: {
  availableVolt: number;
  pullInVoltAt20: number;
  k?: number;
}): Outcome<Figure, CoilRefusal> {
  const k = input.k ?? CONDUCTOR_K.copper;
  const doubt = doubtAboutVolt(input.availableVolt) ?? doubtAboutVolt(input.pullInVoltAt20);
  if (doubt) return doubt;
  const celsius = (input.availableVolt / input.pullInVoltAt20) * (k + 20) - k;
  const inputs = {
    availableVolt: shown(input.availableVolt),
    pullInVoltAt20: shown(input.pullInVoltAt20),
    k,
  };
  return ok(figure({ rule: "criticalTemperature", value: celsius, decimals: 1, input: inputs }));
}

/** Current at hand over current needed for release; below 1 the brake does not let go. Refuses a need <= 0. */
export function releaseMargin(input: {
  availableAmpere: number;
  neededAmpere: number;
}): Outcome<Figure, "currentNotPositive"> {
  const known =
    input.neededAmpere > 0 && input.availableAmpere >= 0 && Number.isFinite(input.availableAmpere);
  if (!known) return refuse("currentNotPositive");
  const inputs = {
    availableAmpere: shown(input.availableAmpere, 3),
    neededAmpere: shown(input.neededAmpere, 3),
  };
  return ok(
    figure({
      rule: "releaseMargin",
      value: input.availableAmpere / input.neededAmpere,
      decimals: 2,
      input: inputs,
    }),
  );
}

/** Heat in W of a lining that drags: torque x 2 pi n/60. It dwarfs the coil's own power and heats it further. */
export const dragPower = (input: { newtonMetre: number; rpm: number }): Figure =>
  figure({
    rule: "dragPower",
    value: (input.newtonMetre * 2 * Math.PI * input.rpm) / 60,
    decimals: 0,
    input: {
      newtonMetre: shown(input.newtonMetre),
      rpm: shown(input.rpm, 0),
    },
  });

const doubtAboutVolt = (volt: number) =>
  volt > 0 && Number.isFinite(volt) ? null : refuse("voltageNotPositive", { volt: String(volt) });
