import { beforeAll, describe, expect, it } from "vitest";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { batchScreen } from "@/lib/reliability/batch-screen";
import { expectedExposure, type GroupedObservation } from "@/lib/reliability/expected-exposure";
import { weibullFit } from "@/lib/reliability/weibull";
import { storyOn, type Story } from "@/seeders/demo-story";
import { quickRenderer } from "./quick-renderer";
import { grouped, rowsOf } from "./rows";

let story: Story;
beforeAll(async () => {
  story = await storyOn(calendarDay("2026-11-30"), { passwordHash: "hash", render: quickRenderer });
});

const NOT_FILED = ["draft", "discarded", "withdrawn", "lapsed"];

/** Units in service by batch, as the analyst sees them: a failure is a claim that was filed and not declined. */
function observed(partNumber: string, leftOutBuyer: string | null = null): GroupedObservation[] {
  const claims = new Map(rowsOf(story.tables, "claims").map((claim) => [claim["number"], claim]));
  const counted = new Set(
    story.cases.flatMap(({ number, lines }) => {
      const claim = claims.get(number);
      const counts = !NOT_FILED.includes(String(claim?.["state"])) && claim?.["outcome"] !== "declined";
      return counts ? lines.map(({ fittingId }) => fittingId) : [];
    }),
  );
  return story.world.fittings
    .filter(({ unit }) => unit.batch.part.number === partNumber && unit.account.buyer !== leftOutBuyer)
    .map(({ id, unit, fittedDaysAgo, failedDaysAgo }) => ({
      group: unit.batch.code,
      ageDays: fittedDaysAgo - (failedDaysAgo ?? 0),
      failed: counted.has(id),
    }));
}

function screened(rows: readonly GroupedObservation[]) {
  const usualFirstFailureDays = 90;
  const oldest = new Map(
    [...grouped(rows, ({ group }) => group)].map(([group, own]) => [
      group,
      Math.max(...own.map(({ ageDays }) => ageDays)),
    ]),
  );
  return batchScreen(
    expectedExposure(rows).map((row) => ({
      ...row,
      oldestDays: oldest.get(row.id) ?? 0,
      strongBefore: true,
    })),
    { confidence: 0.95, usualFirstFailureDays },
  ).batches;
}

describe("the life data of the story", () => {
  const codeOf = (role: string): string =>
    story.world.batches.find((batch) => batch.role === role)?.code ?? "";

  it("makes the screen act on the bad batch and on no sister of it", () => {
    const batches = screened(observed("LMB-2410"));
    expect(batches.filter(({ grade }) => grade === "act").map(({ id }) => id)).toEqual([codeOf("bad")]);
    expect(batches.find(({ id }) => id === codeOf("young"))?.grade).toBe("notYetKnown");
  });

  it("shows the bad batch without its largest workshop, too", () => {
    const batches = screened(observed("LMB-2410", "saltmarsh"));
    expect(batches.find(({ id }) => id === codeOf("bad"))?.grade).toBe("act");
  });

  it("raises no alarm on any other part", () => {
    const parts = new Set(story.world.batches.map(({ part }) => part.number));
    for (const part of parts) {
      if (part === "LMB-2410") continue;
      expect([part, screened(observed(part)).filter(({ grade }) => grade === "act")]).toEqual([part, []]);
    }
  });

  it("fits the bad batch as parts that wear out in their first months, not as chance", () => {
    const fit = weibullFit(
      observed("LMB-2410").filter(({ group }) => group === codeOf("bad")),
      {
        confidence: 0.95,
      },
    );
    if (fit.kind === "none") throw new RangeError(fit.reason);
    expect(fit.failures).toBeGreaterThan(50);
    expect(fit.shapeLimits[0]).toBeGreaterThan(1);
    expect(fit.scaleDays).toBeLessThan(365);
  });
});
