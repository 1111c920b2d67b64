import { expect, it } from "vitest";
import { leadsBack } from "@/lib/parts/supersession";

const CHAIN = [
  { partNumber: "A", successor: "B" },
  { partNumber: "B", successor: "C" },
];

it("sees that a part cannot take its own place", () => {
  expect(leadsBack([], { partNumber: "A", successor: "A" })).toBe(true);
});

it("sees a ring over several parts", () => {
  expect(leadsBack(CHAIN, { partNumber: "C", successor: "A" })).toBe(true);
});

it("lets a chain grow at its end, and be joined from outside", () => {
  expect(leadsBack(CHAIN, { partNumber: "C", successor: "D" })).toBe(false);
  expect(leadsBack(CHAIN, { partNumber: "X", successor: "A" })).toBe(false);
});

it("does not walk for ever round a ring that is already there", () => {
  const ring = [...CHAIN, { partNumber: "C", successor: "B" }];
  expect(leadsBack(ring, { partNumber: "X", successor: "A" })).toBe(false);
});
