import { expect, it } from "vitest";
import { newAccountInput } from "@/lib/accounts/schema";

const WORKSHOP = {
  number: " L-2200 ",
  currency: "GBP",
  name: "Reedbank  Wheels",
  legalName: "Reedbank Wheels Ltd",
  address: "5 Reed Row\nEbbingstow",
  country: "gb",
  taxNumber: "GB 000 8842 19",
  timeZone: "Europe/London",
  language: "en",
  siteName: "Reed Row",
};

const wrongFields = (given: unknown): string[] => {
  const read = newAccountInput.safeParse(given);
  return read.success ? [] : read.error.issues.map(({ path }) => path.join(".")).toSorted();
};

it("reads a complete new workshop, tidied", () => {
  expect(newAccountInput.parse(WORKSHOP)).toMatchObject({
    number: "L-2200",
    name: "Reedbank Wheels",
    country: "GB",
    buyerId: "",
    siteAddress: "",
  });
});

it("asks for everything a new workshop needs, at once", () => {
  expect(wrongFields({ number: "L-1", currency: "GBP", language: "en", timeZone: "Europe/Nowhere" })).toEqual(
    ["address", "country", "legalName", "name", "siteName", "timeZone"],
  );
});

it("needs none of it where an organisation is chosen", () => {
  const chosen = {
    number: "L-1",
    currency: "GBP",
    language: "en",
    buyerId: "0d6c1a1e-3a53-4c7e-9d2b-0f2a3c4d5e6f",
  };
  expect(wrongFields(chosen)).toEqual([]);
});

it("takes no currency nobody knows", () => {
  expect(wrongFields({ ...WORKSHOP, currency: "XYZ" })).toContain("currency");
});
