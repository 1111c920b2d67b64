import { beforeAll, describe, expect, it } from "vitest";
import { analyseRun } from "@/lib/evidence/run-analysis";
import { parseRunLog } from "@/lib/evidence/run-log-parser";
import { resistanceAt20, withinTolerance } from "@/lib/evidence/winding";
import { claimFacts } from "@/lib/claims/facts-shape";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { storyOn, type Story } from "@/seeders/demo-story";
import { isUnsent } from "@/seeders/claims/plots";
import { quickRenderer } from "./quick-renderer";
import { byColumn, rowsOf, text } from "./rows";

let story: Story;
beforeAll(async () => {
  story = await storyOn(calendarDay("2026-12-01"), { passwordHash: "hash", render: quickRenderer });
});

describe("the hidden truth of the story", () => {
  it("lets the bad brake batch fail at many times the rate of the other batches of its part", () => {
    const rate = (role: string) => {
      const fittings = story.world.fittings.filter(
        ({ unit }) => unit.batch.part.number === "LMB-2410" && unit.batch.role === role,
      );
      const days = fittings.reduce(
        (sum, { fittedDaysAgo, failedDaysAgo }) => sum + fittedDaysAgo - (failedDaysAgo ?? 0),
        0,
      );
      return fittings.filter(({ failedDaysAgo }) => failedDaysAgo !== null).length / days;
    };
    expect(rate("bad") / rate("usual")).toBeGreaterThan(10);
    const workshops = new Set(
      story.cases.filter(({ twist }) => twist === "badCoil").map(({ workshop }) => workshop),
    );
    expect(workshops.size).toBe(3);
  });

  it("has a young batch with units in service and no failure yet", () => {
    const young = story.world.fittings.filter(({ unit }) => unit.batch.role === "young");
    expect(young.length).toBeGreaterThan(10);
    expect(young.filter(({ failedDaysAgo }) => failedDaysAgo !== null)).toEqual([]);
  });

  it("puts the early gearbox failures on one workshop and one installer", () => {
    const early = story.world.failures.filter(
      ({ unit, fittedDaysAgo, failedDaysAgo }) =>
        unit.batch.part.family === "gearbox" && fittedDaysAgo - failedDaysAgo <= 90,
    );
    expect(early.length).toBeGreaterThanOrEqual(4);
    expect(new Set(early.map(({ installer }) => installer.code))).toEqual(new Set(["HL-3"]));
  });

  it("shows a bad coil as good when it is cold: inside its tolerance at 20 °C", () => {
    const readings = rowsOf(story.tables, "readings").filter(({ kind }) => kind === "coilResistance");
    expect(readings.length).toBeGreaterThan(15);
    for (const reading of readings) {
      const [ohm, celsius] = [Number(reading["canonicalValue"]), Number(reading["temperatureCelsius"])];
      const facts = rowsOf(story.tables, "claimRevisions").find(
        ({ claimId }) => claimId === reading["claimId"],
      );
      const part = story.world.batches.find(
        ({ part: { id } }) => id === claimFacts.parse(facts?.["facts"]).lines[0]?.part.id,
      )?.part;
      const at20 = resistanceAt20({ ohm, celsius });
      if (!at20.ok) throw new RangeError(at20.code);
      const band = withinTolerance({
        ohmAt20: at20.value.value,
        ratedOhm: Number(part?.rated["coilOhm"]),
        tolerancePercent: 8,
      });
      expect(band.position).toBe("inside");
    }
  });

  it("shows the same coils failing hot: every log is read, and its fault stands where the story put it", () => {
    const files = new Map(story.files.map((file) => [file.sha256, file]));
    const logs = byColumn(
      rowsOf(story.tables, "evidenceFiles").filter(({ kind }) => kind === "runLog"),
      "claimId",
    );
    const claims = rowsOf(story.tables, "claims");
    let seen = 0;
    for (const one of story.cases.filter(({ plot }) => !isUnsent(plot))) {
      const claim = claims.find(({ number }) => number === one.number);
      for (const log of logs.get(text(claim, "id")) ?? []) {
        const parsed = parseRunLog(files.get(text(log, "sha256"))?.bytes ?? "");
        if (!parsed.ok) throw new RangeError(parsed.code);
        const { fault, findings } = analyseRun(parsed.value, {
          currentThrough: one.family === "brake" ? "coil" : "load",
        });
        // To the row before or after: a log has a row every ten seconds.
        expect(Math.abs((fault?.afterS ?? 0) - one.faultAfterMinutes * 60)).toBeLessThanOrEqual(10);
        expect(fault?.method).toBe("markedRow");
        expect(findings).toEqual([]);
        if (one.twist === "badCoil") expect(one.faultAfterMinutes).toBeLessThanOrEqual(25);
        seen += 1;
      }
    }
    expect(seen).toBeGreaterThan(20);
  });
});
