import { expect } from "vitest";
import type { Step } from "@/lib/kernel/explanation";
import { halfUpOf } from "./arbitraries";

// A clerk with the printed steps and a pocket calculator: nothing of the engine is used here.

const minorOf = (text: unknown): bigint => {
  const match = /^(-?)(\d+)\.(\d\d) GBP$/.exec(String(text));
  if (!match) throw new Error(`No amount: ${String(text)}`);
  return BigInt(`${match[1] ?? ""}${match[2] ?? ""}${match[3] ?? ""}`);
};
const isAmount = (text: string): boolean => / GBP$/.test(text);
const printed = (minor: bigint): string => {
  const digits = String(minor).padStart(3, "0");
  return `${digits.slice(0, -2)}.${digits.slice(-2)} GBP`;
};
const ratio = (text: unknown): [bigint, bigint] => {
  const [over = "0", under = "1"] = String(text).split("/");
  return [BigInt(over), BigInt(under)];
};
const lesser = (a: bigint, b: bigint): bigint => (a < b ? a : b);
const times = (amount: unknown, share: unknown): bigint => {
  const [over, under] = ratio(share);
  return halfUpOf(minorOf(amount) * over, under);
};
const sameRatio = (a: unknown, [over, under]: [bigint, bigint]): boolean => {
  const [n, d] = ratio(a);
  return n * under === over * d;
};
const whole = (value: unknown): bigint => BigInt(String(value));

type Input = Step["input"];

/** Rules whose printed result is an amount or a number that follows from the printed input alone. */
const AMOUNTS: Readonly<Record<string, (input: Input) => bigint>> = {
  partPriceInvoiced: (i) => minorOf(i.unitAmount) * whole(i.quantity),
  partPriceTyped: (i) => minorOf(i.unitAmount) * whole(i.quantity),
  coverAmount: (i) => times(i.amount, i.fraction),
  lateFiling: (i) => times(i.amount, i.fraction),
  attribution: (i) => times(i.amount, i.fraction),
  labourAmount: (i) => halfUpOf(minorOf(i.hourlyAmount) * whole(i.minutes), 60n),
  kindCap: (i) => lesser(minorOf(i.amount), minorOf(i.capAmount)),
  invoiceLimit: (i) => {
    const left = minorOf(i.lineAmount) - minorOf(i.creditedAmount);
    return lesser(minorOf(i.amount), left < 0n ? 0n : left);
  },
  declined: () => 0n,
  priceUnknown: () => 0n,
  labourNotPaid: () => 0n,
  labourTermOver: () => 0n,
  currencyDiffers: () => 0n,
  netAfterHandling: (i) => minorOf(i.amount) - minorOf(i.handlingAmount),
  taxGroup: (i) => halfUpOf(minorOf(i.baseAmount) * whole(i.taxRate), 100n),
  total: (i) => minorOf(i.netAmount) + minorOf(i.taxAmount),
};

const SHARES: Readonly<Record<string, (input: Input) => [bigint, bigint]>> = {
  coverFull: () => [1n, 1n],
  coverStraightLine: (i) => [whole(i.coverMonths) - whole(i.monthsUsed), whole(i.coverMonths)],
  termOver: () => [0n, 1n],
  goodwillMonths: (i) => [whole(i.coverMonths) - 1n, 1n],
  labourMinutes: (i) => [lesser(whole(i.claimedMinutes), whole(i.standardMinutes)), 1n],
  creditedShare: (i) => {
    const [[a, b], [c, d]] = [ratio(i.makerShare), ratio(i.carrierShare)];
    return [a * d + c * b, b * d];
  },
};

/** Rules shared out by largest remainder: the printed figure is less than one minor unit from its exact share. */
const SHARED: Readonly<Record<string, (input: Input) => [bigint, bigint]>> = {
  claimCap: (i) => [minorOf(i.capAmount) * minorOf(i.amount), minorOf(i.claimAmount)],
  handlingShare: (i) => [minorOf(i.handlingAmount) * minorOf(i.groupAmount), minorOf(i.noteAmount)],
};

const NOT_A_SUM = ["asked", "coverStep", "monthsUnknown", "noteLines", "handlingSeparate"];

/** Checks one printed step by its printed input; half-up rounding, pounds. */
export function redo({ rule, input, result }: Step): void {
  const [amount, share, shared] = [AMOUNTS[rule], SHARES[rule], SHARED[rule]];
  if (amount) {
    if (isAmount(result) && result !== printed(amount(input))) expect(result).toBe(printed(amount(input)));
  } else if (share) {
    if (!sameRatio(result, share(input))) expect(result).toBe(share(input).join("/"));
  } else if (shared) {
    const [over, under] = shared(input);
    const away = minorOf(result) * under - over;
    if ((away < 0n ? -away : away) >= under) expect(result).toBe(`${rule} ${String(over)}/${String(under)}`);
  } else if (!NOT_A_SUM.includes(rule)) {
    expect(NOT_A_SUM).toContain(rule);
  }
}

/** Checks that a step which goes on from an amount goes on from the one printed before it. */
export function followsOn(steps: readonly Step[]): void {
  let last: string | null = null;
  for (const { input, result } of steps) {
    if (input.amount !== undefined && last !== null && input.amount !== last) expect(input.amount).toBe(last);
    if (isAmount(result)) last = result;
  }
}
