/** Long work that may pause wherever it yields, and gives its result in the end. Who runs it decides about the pauses. */
export type InPieces<T> = Generator<undefined, T, undefined>;

/** The result without a pause: for work that is known to be short. */
export function atOnce<T>(work: InPieces<T>): T {
  for (;;) {
    const step = work.next();
    if (step.done) return step.value;
  }
}
