import { describe, expect, it } from "vitest";
import { emptyDraft } from "@/lib/claims/draft";
import { besidesMinor, readAsked } from "@/lib/claims/filing/read-asked";

const draft = (typed: Partial<ReturnType<typeof emptyDraft>>) => ({ ...emptyDraft(), ...typed });

describe("what is asked for besides the part", () => {
  it("is nothing where every field is empty or nought", () => {
    expect(readAsked(draft({}), "EUR")).toEqual({ asked: null, refused: [] });
    expect(readAsked(draft({ labourMinutes: " 0 ", carriageAsked: "0,00" }), "EUR").asked).toBeNull();
  });

  it("reads minutes, and amounts with a comma or a point, to the minor unit", () => {
    const { asked, refused } = readAsked(
      draft({ labourMinutes: "75", diagnosisAsked: "30", consumablesAsked: "4,05", carriageAsked: "12.5" }),
      "GBP",
    );
    expect(refused).toEqual([]);
    expect(asked).toEqual({
      labourMinutes: 75,
      diagnosisMinor: "3000",
      consumablesMinor: "405",
      carriageMinor: "1250",
    });
    expect(besidesMinor({ asked: asked ?? undefined })).toBe(4655n);
  });

  it("names each field that cannot be read, and keeps reading the others", () => {
    const { asked, refused } = readAsked(
      draft({
        labourMinutes: "1h",
        diagnosisAsked: "1.234,50",
        consumablesAsked: "-3",
        carriageAsked: "9.999",
      }),
      "EUR",
    );
    expect(asked).toBeNull();
    expect(refused.map(({ field, code }) => [field, code])).toEqual([
      ["labourMinutes", "minutesUnread"],
      ["diagnosisAsked", "amountNotReadable"],
      ["consumablesAsked", "amountNegative"],
      ["carriageAsked", "amountTooFine"],
    ]);
  });

  it("takes no decimals in a currency that has none", () => {
    expect(readAsked(draft({ carriageAsked: "12.5" }), "JPY").refused[0]?.code).toBe("amountTooFine");
  });

  it("takes no more than a hundred hours of labour", () => {
    expect(readAsked(draft({ labourMinutes: "6000" }), "EUR").asked?.labourMinutes).toBe(6000);
    expect(readAsked(draft({ labourMinutes: "6001" }), "EUR").refused[0]?.detail).toEqual({ most: 6000 });
  });
});
