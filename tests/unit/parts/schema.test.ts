import { expect, it } from "vitest";
import { catalogueQuery, newPartInput } from "@/lib/parts/schema";

const PART = {
  partNumber: " LMB  2410 ",
  name: "Drive brake",
  family: "brake",
  maker: "Ostrand",
  tracking: "serial",
};

it("tidies what was typed", () => {
  expect(newPartInput.parse(PART)).toMatchObject({ partNumber: "LMB 2410", supersededBy: "", back: "" });
});

it("names the sentence for each thing that is missing or too long", () => {
  const read = newPartInput.safeParse({ ...PART, partNumber: "  ", name: "x".repeat(121) });
  expect(read.error?.issues.map(({ path, message }) => [path.join("."), message])).toEqual([
    ["partNumber", "missing"],
    ["name", "tooLong"],
  ]);
});

it("shows the first page where the address cannot be read", () => {
  expect(catalogueQuery.parse({ q: ["a", "b"], page: "-3", note: "<b>" })).toEqual({
    q: "",
    page: 1,
    note: undefined,
  });
});
