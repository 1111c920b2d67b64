import { expect, it } from "vitest";
import { chainTo } from "@/lib/coverage/replacement-chain";

const replaced = new Map([
  ["third", "second"],
  ["second", "first"],
]);

it("leads from the unit that was bought to the one in question", () => {
  expect(chainTo("third", replaced)).toEqual(["first", "second"]);
  expect(chainTo("first", replaced)).toEqual([]);
});

it("refuses to run in a circle", () => {
  expect(() => chainTo("third", new Map([...replaced, ["first", "third"]]))).toThrow(RangeError);
  expect(() =>
    chainTo(
      "a",
      new Map([
        ["b", "b"],
        ["a", "b"],
      ]),
    ),
  ).toThrow(RangeError);
});
