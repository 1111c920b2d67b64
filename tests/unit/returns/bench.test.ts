import { describe, expect, it } from "vitest";
import { checkReturns } from "@/lib/claims/deciding/finding-waits";
import { RETURN_STATES } from "@/lib/claims/lifecycle";
import { FAMILY_LIST, isFamilyCode } from "@/lib/parts/families";
import { readingKindOf } from "@/lib/parts/family";
import { BENCH_PLANS } from "@/lib/returns/bench-plan";
import { readBenchReadings, readRunMinutes } from "@/lib/returns/bench-readings";
import {
  benchRunSeconds,
  findingAllowed,
  neededRunSeconds,
  timeToFaultSeconds,
} from "@/lib/returns/bench-run";
import { asksForDanger, conditionFrom, isQuarantined } from "@/lib/returns/danger";
import { DANGER_SIGNS, FINDING_KINDS } from "@/lib/returns/kinds";

const [family] = FAMILY_LIST;
const reading = (minutes: number | null) => ({
  readings: [{ kind: "timeToFault", canonicalValue: minutes }],
});

describe("the bench plans", () => {
  it("take readings their family knows, each step once, and one warm run", () => {
    for (const one of FAMILY_LIST) {
      const plan = isFamilyCode(one.code) ? BENCH_PLANS[one.code] : [];
      expect(new Set(plan.map(({ id }) => id)).size).toBe(plan.length);
      expect(plan.filter(({ does }) => does === "run")).toHaveLength(1);
      for (const step of plan)
        if (step.does === "read") expect(readingKindOf(one, step.reading), step.id).not.toBeNull();
    }
  });
});

describe("how long the bench must run a part", () => {
  // Common practice of the trade, no source: the claim's time to fault, 45 minutes where it states none.
  it("is the claim's time to fault, and 45 minutes where it states none", () => {
    expect(neededRunSeconds(timeToFaultSeconds(reading(12), []))).toBe(720);
    expect(neededRunSeconds(timeToFaultSeconds(reading(null), []))).toBe(2700);
    expect(neededRunSeconds(timeToFaultSeconds({ readings: [] }, [{ shape: 1, isRead: false }]))).toBe(2700);
  });

  it("counts the typed minutes only where no log was read", () => {
    expect(benchRunSeconds({ minutes: 50, logSummary: null })).toBe(3000);
    expect(benchRunSeconds({ minutes: null, logSummary: null })).toBe(0);
  });

  it("holds for no fault found alone", () => {
    const run = { minutes: null, logSummary: null };
    for (const kind of FINDING_KINDS)
      expect(findingAllowed({ kind, run, claimSeconds: null, isQuarantined: false }).ok).toBe(
        kind !== "noFaultFound",
      );
  });
});

describe("what is typed at the bench", () => {
  it("reads minutes and readings with comma or point, and leaves empty ones out", () => {
    expect(readRunMinutes("44,5")).toEqual({ ok: true, value: 44.5 });
    expect(readRunMinutes("1 h")).toEqual({ ok: true, value: 60 });
    expect(readRunMinutes(" ")).toEqual({ ok: true, value: null });
    for (const text of ["-5", "soon", "99999"])
      expect(readRunMinutes(text)).toMatchObject({ code: "readingUnread" });
    if (!family) throw new Error("there are families");
    const kind = family.readings[0]?.code ?? "";
    const empty = { raw: " ", temperature: "", instrument: "" };
    expect(readBenchReadings({ [kind]: empty }, family)).toEqual({ ok: true, value: [] });
    expect(readBenchReadings({ nothing: { ...empty, raw: "1" } }, family)).toMatchObject({
      code: "readingUnread",
    });
  });
});

describe("a battery in a parcel", () => {
  it("is the only family that is looked at for danger first", () => {
    expect(FAMILY_LIST.filter(asksForDanger).map(({ code }) => code)).toEqual(["battery"]);
  });

  it("with any sign is never written down as sound, and waits in quarantine", () => {
    const battery = FAMILY_LIST.find(asksForDanger) ?? null;
    for (const sign of DANGER_SIGNS) {
      expect(conditionFrom([sign], "sound")).not.toBe("sound");
      expect(isQuarantined(battery, conditionFrom([sign], "sound"))).toBe(true);
    }
    expect(isQuarantined(battery, conditionFrom([], "sound"))).toBe(false);
    expect(isQuarantined(battery, null)).toBe(false);
    expect(conditionFrom(["wet", "leaking"], "damaged")).toBe("leaking");
  });
});

describe("a verdict and the finding", () => {
  it("waits for parts on their way, asks why where nothing will be examined, and asks nothing after the bench", () => {
    const answer = (returnState: (typeof RETURN_STATES)[number], reason: string) => {
      const checked = checkReturns([{ lineNumber: 1, returnState }], reason);
      return checked.ok ? "given" : checked.code;
    };
    expect(Object.fromEntries(RETURN_STATES.map((state) => [state, answer(state, "")]))).toEqual({
      notNeeded: "returnReasonMissing",
      awaited: "findingAwaited",
      sent: "findingAwaited",
      received: "findingAwaited",
      examined: "given",
      disposed: "given",
      scrapOnSite: "returnReasonMissing",
      notSentInTime: "returnReasonMissing",
      missing: "returnReasonMissing",
    });
    for (const state of ["awaited", "sent", "received"] as const)
      expect(answer(state, "A reason.")).toBe("findingAwaited");
  });
});
