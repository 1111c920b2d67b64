import type { Outcome } from "@/lib/kernel/outcome";

/** The figure of an outcome that must have one; fails the test by name otherwise. */
export function valueOf(outcome: Outcome<{ readonly value: number }>): number {
  if (!outcome.ok) throw new Error(`refused: ${outcome.code}`);
  return outcome.value.value;
}

/** The value of an outcome that must have one. */
export function given<T>(outcome: Outcome<T>): T {
  if (!outcome.ok) throw new Error(`refused: ${outcome.code} ${JSON.stringify(outcome.detail)}`);
  return outcome.value;
}
