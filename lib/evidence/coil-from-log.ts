import { seriesOf, type RunLog } from "./run-log";
import { electricalOf } from "./run-span";
import { CONDUCTOR_K } from "./winding";

/** What the coil's temperature is reckoned from: the rated resistance, or the first row and its temperature. */
export type CoilBasis = {
  readonly method: "ratedResistance" | "firstRow";
  readonly ohm: number;
  readonly celsius: number;
  readonly k: number;
};

/** Mean temperature of the coil along a run from U/I; null where a row has no current or voltage to speak of. */
export type CoilTemperature = { readonly basis: CoilBasis; readonly values: readonly (number | null)[] };

const COLDEST = -60;
const HOTTEST = 400;

/**
 * Temperature of a copper coil from the log's own voltage and current: (R/R1)(k + T1) - k. R1 is the resistance at
 * 20 °C where it is known, else that of the first row at the temperature the log starts with. Null without both
 * current and voltage. It lags nothing, unlike the case: it is what release depends on.
 */
export function coilTemperatureIn(
  log: RunLog,
  rated: { readonly ohmAt20: number; readonly k?: number } | null,
): CoilTemperature | null {
  const ohms = resistancesIn(log);
  if (ohms === null) return null;
  const basis = rated && rated.ohmAt20 > 0 ? ratedBasis(rated) : firstRowBasis(log, ohms);
  if (basis === null) return null;
  const values = ohms.map((ohm) => {
    const celsius = ohm === null ? Number.NaN : (ohm / basis.ohm) * (basis.k + basis.celsius) - basis.k;
    return celsius >= COLDEST && celsius <= HOTTEST ? celsius : null;
  });
  return values.some((value) => value !== null) ? { basis, values } : null;
}

/** U/I row by row, in ohm; null where either is under a fifth of its usual level. Null without both columns. */
export function resistancesIn(log: RunLog): (number | null)[] | null {
  const [current, voltage] = [electricalOf(log, "current"), electricalOf(log, "voltage")];
  const [amperes, volts] = [seriesOf(log, "current")[0]?.values, seriesOf(log, "voltage")[0]?.values];
  if (!current || !voltage || !amperes || !volts) return null;
  return amperes.map((ampere, index) => {
    const volt = volts[index] ?? null;
    const known =
      ampere !== null && volt !== null && ampere >= current.usual / 5 && volt >= voltage.usual / 5;
    return known ? volt / ampere : null;
  });
}

const ratedBasis = (rated: { ohmAt20: number; k?: number }): CoilBasis => ({
  method: "ratedResistance",
  ohm: rated.ohmAt20,
  celsius: 20,
  k: rated.k ?? CONDUCTOR_K.copper,
});

function firstRowBasis(log: RunLog, ohms: readonly (number | null)[]): CoilBasis | null {
  const index = ohms.findIndex((ohm) => ohm !== null);
  const ohm = ohms[index] ?? null;
  const first = (quantity: "temperature" | "ambient") =>
    seriesOf(log, quantity)[0]?.values.find((value) => value !== null) ?? null;
  const celsius = first("temperature") ?? first("ambient");
  return ohm === null || celsius === null
    ? null
    : { method: "firstRow", ohm, celsius, k: CONDUCTOR_K.copper };
}
