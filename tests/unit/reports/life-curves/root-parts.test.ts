import { describe, expect, it } from "vitest";
import { batchKeysOf } from "@/lib/reports/life-curves/batch-keys";
import { rootPartsOf, type CataloguePart } from "@/lib/reports/life-curves/root-parts";

const part = (id: string, supersededById: string | null = null, claims = 0): CataloguePart => ({
  id,
  partNumber: `N-${id}`,
  name: `Part ${id}`,
  family: "brake",
  supersededById,
  claims,
});

describe("root parts", () => {
  it("hold every superseded number under the newest, however long the chain", () => {
    const roots = rootPartsOf([part("c"), part("a", "b", 1), part("b", "c", 2)]);
    expect(roots).toHaveLength(1);
    expect(roots[0]).toMatchObject({ partNumber: "N-c", partNumbers: ["N-a", "N-b", "N-c"], claims: 3 });
  });

  it("keep parts apart that share no chain, those with claims first", () => {
    const roots = rootPartsOf([part("x"), part("y", null, 4), part("z", null, 9)]);
    expect(roots.map(({ partNumber }) => partNumber)).toEqual(["N-z", "N-y", "N-x"]);
  });

  it("come to an end where the catalogue leads in a ring, with each number once", () => {
    const roots = rootPartsOf([part("a", "b"), part("b", "a"), part("c", "a")]);
    expect(roots.flatMap(({ partNumbers }) => partNumbers).toSorted()).toEqual(["N-a", "N-b", "N-c"]);
    expect(roots).toHaveLength(1);
  });

  it("end at a successor that is not in the list", () => {
    expect(rootPartsOf([part("a", "gone")])).toMatchObject([{ partNumber: "N-a" }]);
  });
});

describe("names of batches", () => {
  it("are their codes, with the part number where two parts share one", () => {
    const keys = batchKeysOf([
      { id: "1", code: "R2614", partNumber: "A" },
      { id: "2", code: "R2614", partNumber: "B" },
      { id: "3", code: "R2615", partNumber: "B" },
    ]);
    expect([...keys.values()]).toEqual(["R2614 A", "R2614 B", "R2615"]);
  });
});
