import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { foldLookalikes, groupSerial, normaliseSerial } from "@/lib/labels/serial";

const serial = "B0O81LI7QG96";

describe("the normal form of a serial", () => {
  it.each([
    ["as on the label", "B0O81LI7QG96"],
    ["small letters", "b0o81li7qg96"],
    ["spaces", " B0O8 1LI7 QG96 "],
    ["hyphens", "B0O8-1LI7-QG96"],
    ["other dashes", "B0O8\u20131LI7\u2014QG96\u2212"],
    ["full-width letters", "\uff22\uff10\uff2f81LI7QG96"],
    ["a trailing zero character", "B0O81LI7QG96\u0000"],
    ["zero-width characters", "B0O8\u200b1LI7\u200dQG96\ufeff"],
    ["right-to-left marks", "\u202eB0O81LI7QG96\u200f"],
    ["no-break and thin spaces", "B0O8\u00a01LI7\u2009QG96"],
    ["invisible marks that are letters to a machine", "B0O8\ufe0f1LI7\u034fQG96\u115f"],
    ["soft hyphens and line ends", "B0O8\u00ad1LI7QG96\r\n"],
  ])("is one for %s", (_spelling, raw) => {
    expect(normaliseSerial(raw)).toBe(serial);
  });

  it("keeps O and 0 apart, and finds the twelfth spelling only as a look-alike", () => {
    const twelfth = normaliseSerial("BO0811I7QG96");
    expect(twelfth).not.toBe(serial);
    expect(foldLookalikes(twelfth)).toBe(foldLookalikes(serial));
  });

  it("brings together an accent and its letter once what stood between them is gone", () => {
    expect(normaliseSerial("e\u200d\u0301")).toBe("\u00c9");
  });

  it("keeps what a label may hold", () => {
    expect(normaliseSerial("a/12.4_#ü")).toBe("A/12.4_#Ü");
    expect(normaliseSerial(" - \u200b")).toBe("");
  });

  it("is final: taking it again changes nothing", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary", maxLength: 40 }), (raw) => {
        expect(normaliseSerial(normaliseSerial(raw))).toBe(normaliseSerial(raw));
      }),
      { numRuns: 2000 },
    );
  });

  it("is the same however the serial is grouped for display", () => {
    expect(groupSerial(serial)).toBe("B0O8\u20091LI7\u2009QG96");
    expect(groupSerial("12345")).toBe("1234\u20095");
    expect(groupSerial("1234")).toBe("1234");
    fc.assert(
      fc.property(fc.string({ unit: "grapheme", maxLength: 40 }), (raw) => {
        expect(normaliseSerial(groupSerial(normaliseSerial(raw)))).toBe(normaliseSerial(raw));
      }),
    );
  });
});

describe("look-alikes", () => {
  it("merge each pair the trade confuses, and nothing else", () => {
    expect(foldLookalikes("OILSB-0123456789-ACZQ")).toBe("01158-0123456789-ACZQ");
  });
});
