import "server-only";
import { setImmediate } from "node:timers/promises";
import type { InPieces } from "./pieces";

/** Short enough that nobody else's request waits noticeably, long enough that pausing costs little. */
const SLICE_MS = 8;

export type Slices = {
  /** Lets everybody else have their turn, once this slice is used up. */
  readonly rest: () => Promise<void>;
  readonly isOver: () => boolean;
};

/** Measures out the time that long work may hold the process at a stretch. */
export function slices(): Slices {
  let since = performance.now();
  return {
    isOver: () => performance.now() - since >= SLICE_MS,
    rest: async () => {
      await setImmediate();
      since = performance.now();
    },
  };
}

/** Runs long work to its end, with a pause after each slice. `meanwhile` is done in each of the pauses. */
export async function inSlices<T>(
  work: InPieces<T>,
  meanwhile: () => Promise<void> = () => Promise.resolve(),
): Promise<T> {
  const { isOver, rest } = slices();
  for (;;) {
    const step = work.next();
    if (step.done) return step.value;
    if (!isOver()) continue;
    await meanwhile();
    await rest();
  }
}
