import { describe, expect, it } from "vitest";
import { bestMatches, type Expected } from "@/lib/returns/match";

const expected = (
  number: string,
  sender: string,
  serial: string | null,
  part = "Spring-applied brake",
): Expected => ({
  number,
  senders: [sender, `${sender} Ltd`],
  parts: [{ number: `P-${number}`, name: part, serial }],
});
const KNOWN = [
  expected("1", "Harbour Mobility", "BR-20417"),
  expected("2", "Harbour Mobility", "BR-20418"),
  expected("3", "Café Rollt", "MO-1", "Drive motor"),
];
const found = (written: Partial<Parameters<typeof bestMatches>[0]>) =>
  bestMatches({ sender: "", part: "", serial: "", ...written }, KNOWN).map((match) => [
    match.expected.number,
    ...match.reasons,
  ]);

describe("whose parcel it is", () => {
  it("is told by the serial before sender and part together", () => {
    expect(found({ serial: "br 20418", sender: "cafe rollt", part: "drive motor" })).toEqual([
      ["2", "sameSerial"],
      ["3", "samePart", "sameSender"],
    ]);
  });

  it("is told by a serial that is alike but for signs easily taken for each other, named as such", () => {
    expect(found({ serial: "8R-2O4I7" })).toEqual([["1", "likeSerial"]]);
  });

  it("is told by part and sender however they are written, each reason said", () => {
    expect(found({ sender: "HARBOUR MOBILITY, Pier 4" })).toEqual([
      ["1", "sameSender"],
      ["2", "sameSender"],
    ]);
    expect(found({ part: "brake" }).map(([number]) => number)).toEqual(["1", "2"]);
    expect(found({ part: "P-3" })).toEqual([["3", "samePart"]]);
  });

  it("is nobody's where nothing fits, and two letters fit nothing", () => {
    expect(found({ sender: "Somebody else", serial: "ZZ-1" })).toEqual([]);
    expect(found({ sender: "Ha", part: "br" })).toEqual([]);
    expect(found({})).toEqual([]);
  });
});
