import { beforeAll, describe, expect, it } from "vitest";
import { analyseRun } from "@/lib/evidence/run-analysis";
import { parseRunLog } from "@/lib/evidence/run-log-parser";
import { resistanceAt20, withinTolerance } from "@/lib/evidence/winding";
import { claimFacts } from "@/lib/claims/facts-shape";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { storyOn, type Story } from "@/seeders/demo-story";
import { isUnsent } from "@/seeders/claims/plots";
import { quickRenderer } from "./quick-renderer";
import { byColumn, grouped, rowsOf, text } from "./rows";

let story: Story;
beforeAll(async () => {
  story = await storyOn(calendarDay("2026-12-01"), { passwordHash: "hash", render: quickRenderer });
});

describe("the hidden truth of the story", () => {
  const ofPart = (role: string) =>
    story.world.fittings.filter(
      ({ unit }) => unit.batch.part.number === "LMB-2410" && unit.batch.role === role,
    );
  const failed = (fittings: ReturnType<typeof ofPart>) =>
    fittings.filter(({ failedDaysAgo }) => failedDaysAgo !== null);

  it("lets the bad brake batch fail at many times the rate of the other batches of its part", () => {
    const perDay = (role: string) => {
      const days = ofPart(role).reduce(
        (sum, { fittedDaysAgo, failedDaysAgo }) => sum + fittedDaysAgo - (failedDaysAgo ?? 0),
        0,
      );
      return failed(ofPart(role)).length / days;
    };
    expect(perDay("bad") / perDay("usual")).toBeGreaterThan(10);
    // By hand, too: claims by units in service.
    const crude = (role: string) => failed(ofPart(role)).length / ofPart(role).length;
    expect(crude("bad") / crude("usual")).toBeGreaterThan(4);
  });

  it("claims sixty to ninety brakes of the bad batch from three workshops, the largest of them with no more than two thirds", () => {
    const claims = story.cases.filter(({ lines: [line] }) => line.unit?.batch.role === "bad");
    expect(claims.length).toBeGreaterThanOrEqual(60);
    expect(claims.length).toBeLessThanOrEqual(90);
    const workshops = grouped(claims, ({ workshop }) => workshop);
    expect(workshops.size).toBe(3);
    for (const own of workshops.values()) expect(own.length / claims.length).toBeLessThan(2 / 3);
  });

  it("gives the bad batch sisters enough to be told from: four batches, each larger and with failures of its own", () => {
    const bad = story.world.batches.find(({ role }) => role === "bad");
    const sisters = story.world.batches.filter(
      ({ part, role }) => part.number === "LMB-2410" && role === "usual",
    );
    expect(sisters).toHaveLength(4);
    for (const sister of sisters) {
      expect(sister.units).toBeGreaterThan(bad?.units ?? 0);
      const own = ofPart("usual").filter(({ unit }) => unit.batch === sister);
      expect(own.length).toBeGreaterThan(100);
      expect(failed(own).length).toBeGreaterThan(0);
    }
  });

  it("has a young batch with units in service, no failure, and none as old as the usual first failure of its part", () => {
    const young = ofPart("young");
    expect(young.length).toBeGreaterThan(10);
    expect(failed(young)).toEqual([]);
    const firstAge = Math.min(
      ...failed(ofPart("usual")).map(
        ({ fittedDaysAgo, failedDaysAgo }) => fittedDaysAgo - (failedDaysAgo ?? 0),
      ),
    );
    expect(Math.max(...young.map(({ fittedDaysAgo }) => fittedDaysAgo))).toBeLessThan(firstAge);
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
      rowsOf(story.tables, "evidenceFiles").filter(
        ({ kind, takenBy }) => kind === "runLog" && takenBy === "workshop",
      ),
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

  it("finds no fault on the bench only after a run as long as the workshop's, 45 minutes where the claim gives none", () => {
    const files = rowsOf(story.tables, "evidenceFiles");
    const good = rowsOf(story.tables, "findings").filter(({ kind }) => kind === "noFaultFound");
    expect(good.length).toBeGreaterThan(0);
    for (const finding of good) {
      const claim = rowsOf(story.tables, "claims").find(({ id }) => id === finding["claimId"]);
      const one = story.cases.find(({ number }) => number === claim?.["number"]);
      const isLogged = files.some(
        ({ claimId, kind, takenBy }) =>
          claimId === finding["claimId"] && kind === "runLog" && takenBy === "workshop",
      );
      const least = isLogged ? (one?.faultAfterMinutes ?? 0) : 45;
      expect(Number(finding["runMinutes"])).toBeGreaterThanOrEqual(least);
    }
  });
});
