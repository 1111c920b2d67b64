/** A rate without the zeros the database keeps behind it: "20.000" is "20", "5.500" is "5.5", "0.000" is "0". */
export const plainRate = (taxRate: string): string =>
  taxRate.includes(".") ? taxRate.replace(/\.?0+$/u, "") : taxRate;
