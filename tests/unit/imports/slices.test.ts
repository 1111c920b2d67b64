import { describe, expect, it } from "vitest";
import { atOnce } from "@/lib/imports/pieces";
import { inSlices } from "@/lib/imports/slices-service";
import { inTurn } from "@/lib/imports/turns-service";

function* counting(to: number, each: () => void) {
  for (let at = 0; at < to; at += 1) {
    each();
    yield undefined;
  }
  return to;
}

const busyFor = (ms: number) => () => {
  const until = performance.now() + ms;
  while (performance.now() < until);
};

describe("long work in slices", () => {
  it("comes to the same as at once", async () => {
    expect(await inSlices(counting(9, () => undefined))).toBe(atOnce(counting(9, () => undefined)));
  });

  it("lets others have their turn, and does in the pauses what it was given for them", async () => {
    let turns = 0;
    let pauses = 0;
    const others = setInterval(() => (turns += 1), 1);
    await inSlices(counting(50, busyFor(2)), () => {
      pauses += 1;
      return Promise.resolve();
    });
    clearInterval(others);
    expect(turns).toBeGreaterThan(2);
    expect(pauses).toBeGreaterThan(2);
  });
});

describe("large files", () => {
  const large = { lineCount: 100_000 };

  it("wait for each other, small ones do not, and one that fails holds nobody up", async () => {
    const order: string[] = [];
    let release = () => {};
    const held = new Promise<void>((resolve) => {
      release = resolve;
    });
    const first = inTurn(large, async () => {
      await held;
      order.push("first");
      throw new Error("gone");
    });
    const second = inTurn({ sizeBytes: 20_000_000 }, () => Promise.resolve(order.push("second")));
    await inTurn({ lineCount: 3 }, () => Promise.resolve(order.push("small")));
    release();
    await expect(first).rejects.toThrow("gone");
    await second;
    expect(order).toEqual(["small", "first", "second"]);
  });
});
