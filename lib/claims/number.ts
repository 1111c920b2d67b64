/** How a claim number is written: two groups of four, `4107-3826`. Stored as its eight digits. */
export const printClaimNumber = (digits: string): string => `${digits.slice(0, 4)}-${digits.slice(4)}`;

/** The eight digits of a claim number, however it was written. */
export const claimDigits = (number: string): string => number.replace(/\D/gu, "");
