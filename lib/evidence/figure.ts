import { citing, step, type Step } from "@/lib/kernel/explanation";

/** A computed figure with the step that explains it. The value is not rounded; the step prints it rounded once. */
export type Figure = { readonly value: number; readonly step: Step };

type Explained = {
  readonly rule: string;
  readonly value: number;
  readonly decimals: number;
  readonly input: Step["input"];
  readonly source?: string;
};

/** A figure printed with the given number of decimals in its explanation. */
export const figure = ({ rule, value, decimals, input, source }: Explained): Figure => ({
  value,
  step: citing(source, step(rule, value.toFixed(decimals), input)),
});

/** Rounds for an explanation's placeholder; never used for the figure itself. */
export const shown = (value: number, decimals = 2): number => Number(value.toFixed(decimals));
