import type { Limits } from "./limits-shape";

/** A temperature a run is held against; `name` is the insulation class, and empty for a caution. */
type RunLimitOfPart = {
  readonly key: "insulation" | "warn" | "alarm";
  readonly name: string;
  readonly celsius: number;
};

/** The temperatures a run log of a part is drawn against: its insulation class, and the cautions about touching it. */
export const runLimitsOf = ({ insulationClass, surfaceCautions }: Limits): RunLimitOfPart[] => [
  // A class is named by its limit: 130 (B) is 130 °C.
  ...(insulationClass
    ? [{ key: "insulation" as const, name: insulationClass, celsius: Number.parseInt(insulationClass, 10) }]
    : []),
  ...surfaceCautions.map(({ grade, fromCelsius }) => ({ key: grade, name: "", celsius: fromCelsius })),
];
