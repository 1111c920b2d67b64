import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readReading } from "@/lib/evidence/reading";
import { reading } from "@/lib/parts/family";

const coil = reading("coilResistance", "resistance", { temperature: "copperTo20" });
const volt = reading("releaseVoltage", "voltage");
const current = reading("coilCurrent", "current");
const gap = reading("airGap", "length");
const heat = reading("surfaceTemperature", "temperature");
const hours = reading("runningHours", "duration", { unit: "h" });
const minutes = reading("timeToFault", "duration");
const capacity = reading("capacityGiven", "charge", { temperature: "capacityTo25" });
const cycles = reading("cycleCount", "count");

const valueOf = (text: string, kind: typeof coil) => {
  const outcome = readReading(text, kind);
  return outcome.ok ? outcome.value.canonicalValue : outcome.code;
};

describe("a reading typed on the pad", () => {
  it.each([
    ["57,6", coil, 57.6],
    ["57.6", coil, 57.6],
    [" 57.6 ohm ", coil, 57.6],
    ["57,6Ω", coil, 57.6],
    ["57,6 \u2126", coil, 57.6],
    ["0.0576 kohm", coil, 57.6],
    ["0,32 kΩ", coil, 320],
    ["57600 mohm", coil, 57.6],
    ["2.2 Mohm", coil, 2_200_000],
    ["2.2 megohm", coil, 2_200_000],
    ["21,6 V", volt, 21.6],
    ["21600 mV", volt, 21.6],
    ["320 mA", current, 0.32],
    ["0,32A", current, 0.32],
    ["84.3 °C", heat, 84.3],
    ["84.3 º C", heat, 84.3],
    ["84 C", heat, 84],
    ["183.2 °F", heat, 84],
    ["183,2F", heat, 84],
    ["−5", heat, -5],
    ["-5 ℃", heat, -5],
    ["0.25 mm", gap, 0.25],
    [",25", gap, 0.25],
    ["250 um", gap, 0.25],
    ["250 µm", gap, 0.25],
    ["90 min", hours, 1.5],
    ["1,5 h", minutes, 90],
    ["560 s", minutes, 9.33333333333],
    ["25,3 Ah", capacity, 25.3],
    ["25300 mAh", capacity, 25.3],
    ["312", cycles, 312],
    ["５７．６", coil, 57.6],
  ])("reads %s", (text, kind, value) => {
    expect(valueOf(text, kind)).toBe(value);
  });

  it("keeps the text as typed, and says when the unit was the pad's own", () => {
    expect(readReading(" 57,6 ", coil)).toEqual({
      ok: true,
      value: {
        rawText: " 57,6 ",
        unit: "ohm",
        unitAssumed: true,
        canonicalUnit: "ohm",
        openCircuit: false,
        canonicalValue: 57.6,
      },
    });
    expect(readReading("0.3 kOhm", coil)).toMatchObject({ value: { unit: "kohm", unitAssumed: false } });
  });

  it.each(["OL", "O.L", "0L", "∞", "open"])(
    "keeps %s on a resistance as an open circuit, not as a number",
    (text) => {
      expect(readReading(text, coil)).toMatchObject({
        ok: true,
        value: { openCircuit: true, canonicalValue: null },
      });
      expect(valueOf(text, volt)).toBe("readingNotANumber");
    },
  );

  it.each([
    ["", coil, "readingEmpty"],
    ["   ", coil, "readingEmpty"],
    ["5".repeat(61), coil, "readingTooLong"],
    ["warm", coil, "readingNotANumber"],
    ["~57", coil, "readingNotANumber"],
    ["57..6", coil, "readingNotANumber"],
    ["57 6", coil, "readingNotANumber"],
    ["10²", coil, "readingUnitUnknown"],
    ["½", coil, "readingNotANumber"],
    ["1.23.4", coil, "readingNotANumber"],
    ["1.234,567.8", coil, "readingNotANumber"],
    ["1e3", coil, "readingUnitUnknown"],
    ["57 bananas", coil, "readingUnitUnknown"],
    ["57 V", coil, "readingUnitOtherKind"],
    ["5 cycles", cycles, "readingUnitUnknown"],
    ["5 MOHM", coil, "readingUnitUnclear"],
    ["5 MV", volt, "readingUnitUnclear"],
    ["-57", coil, "readingImpossible"],
    ["2400 V", volt, "readingImpossible"],
    ["-300 °C", heat, "readingImpossible"],
    ["-24", volt, "readingImpossible"],
  ])("refuses %s by name", (text, kind, code) => {
    expect(valueOf(text, kind)).toBe(code);
  });
});

describe("thousands marks", () => {
  it("are asked about where both readings are possible", () => {
    expect(readReading("1.234 ohm", coil)).toEqual({
      ok: false,
      code: "readingAmbiguous",
      detail: { text: "1.234", decimal: 1.234, whole: 1234 },
    });
    expect(valueOf("1,234", hours)).toBe("readingAmbiguous");
  });

  it("are settled where only one reading can be", () => {
    expect(valueOf("24.125 V", volt)).toBe(24.125);
    expect(valueOf("25,125 °C", heat)).toBe(25.125);
    expect(valueOf("24.125 mV", volt)).toBe("readingAmbiguous");
  });

  it.each([
    ["1.234,5", 1234.5],
    ["1,234.5", 1234.5],
    ["1 234,5", 1234.5],
    ["1'234.5", 1234.5],
    ["1 234,567", 1234.567],
    ["1.234.567", 1_234_567],
    ["0.320", 0.32],
    ["0,320", 0.32],
    ["12345.678", 12_345.678],
  ])("that leave no doubt are read: %s", (text, value) => {
    expect(valueOf(text, coil)).toBe(value);
  });

  it("never change a value by a factor of a thousand in silence", () => {
    const written = fc.record({
      whole: fc.integer({ min: 0, max: 999_999 }),
      tail: fc.stringMatching(/^\d{1,5}$/u),
    });
    fc.assert(
      fc.property(written, fc.constantFrom(".", ","), ({ whole, tail }, mark) => {
        const outcome = readReading(`${whole}${mark}${tail} ohm`, coil);
        if (outcome.ok) expect(outcome.value.canonicalValue).toBeCloseTo(Number(`${whole}.${tail}`), 6);
        else expect([outcome.code, tail.length]).toEqual(["readingAmbiguous", 3]);
      }),
    );
  });
});

it("answers any text at all with a reading or a refusal", () => {
  fc.assert(
    fc.property(
      fc.string({ unit: "binary", maxLength: 80 }),
      fc.constantFrom(coil, volt, heat, cycles),
      (text, kind) => {
        const outcome = readReading(text, kind);
        if (outcome.ok && !outcome.value.openCircuit)
          expect(Number.isFinite(outcome.value.canonicalValue)).toBe(true);
      },
    ),
    { numRuns: 1000 },
  );
});
