/** How closely a person wants lines set. Kept with the person on the server, put on `<html data-density>`. */
export const DENSITIES = ["shop", "office", "ledger"] as const;
export type Density = (typeof DENSITIES)[number];

/** The attribute for any element from which the density should hold. */
export const densityAttribute = (density: Density): { "data-density": Density } => ({
  "data-density": density,
});
