import { describe, expect, it } from "vitest";
import { addDays, calendarDay } from "@/lib/kernel/calendar-day";
import { readClaimsBehind, readLifeCurves } from "@/lib/reports";
import { behindQuery, lifeCurvesQuery } from "@/lib/reports/life-curves/schema";
import { actorAt } from "../support/actor";
import { buildBatch, buildDistributor, buildPerson } from "../support/build";
import { ask } from "../support/http";
import { observedWorld, playUnit } from "./observed-world";
import { startSession } from "./signed-in";

const CUT = calendarDay("2026-06-30");
const SHIPPED = "2026-01-10";
const FITTED = "2026-02-01";
const on = (days: number) => addDays(calendarDay(FITTED), days);

describe("the curves of an address", () => {
  const asked = (over: Record<string, unknown> = {}) => lifeCurvesQuery.parse({ cut: CUT, ...over });

  /** Three usual batches of forty and one of thirty of which a dozen failed, all fitted on one day. */
  async function badBatch() {
    const built = await observedWorld();
    const bad = await buildBatch(built.seller, built.part, { code: "R2614" });
    const fittings = [[FITTED, null]] as const;
    for (let unit = 0; unit < 30; unit += 1)
      await playUnit(built, bad, {
        shippedOn: SHIPPED,
        fittings,
        claims: unit < 12 ? [{ told: "undecided", failedOn: on(40 + unit * 4) }] : [],
      });
    for (const code of ["R2601", "R2602", "R2603"]) {
      const usual = await buildBatch(built.seller, built.part, { code });
      for (let unit = 0; unit < 40; unit += 1)
        await playUnit(built, usual, {
          shippedOn: SHIPPED,
          fittings,
          claims: unit === 0 ? [{ told: "upheld", failedOn: on(60) }] : [],
        });
    }
    return built;
  }

  it("put the bad batch first, on Act, and each of its points opens the claims it stands for", async () => {
    const built = await badBatch();
    const actor = actorAt(built.seller, built.analyst, ["analyst"]);
    const view = (await readLifeCurves(actor, asked()))?.view;
    expect(view?.batches[0]).toMatchObject({ key: "R2614", grade: "act", failed: 12, units: 30 });
    expect(view?.series[0]?.curve).toHaveLength(12);
    for (const step of view?.series[0]?.curve.slice(0, 3) ?? []) {
      const range = { of: ["R2614"], from: step.ageDays, to: step.ageDays };
      const behind = await readClaimsBehind(actor, behindQuery.parse({ cut: CUT, ...range }));
      expect(behind?.total).toBe(step.failed);
    }
    const others = behindQuery.parse({ cut: CUT, of: "R2614", others: "yes" });
    expect((await readClaimsBehind(actor, others))?.total).toBe(view?.rest?.failed);
  });

  it("are nobody's without the right, and empty for another distributor", async () => {
    const { seller, analyst: person } = await observedWorld();
    expect(await readLifeCurves(actorAt(seller, person, ["technician"]), asked())).toBeNull();
    expect(await readClaimsBehind(actorAt(seller, person, ["accounts"]), behindQuery.parse({}))).toBeNull();
    const stranger = await buildDistributor();
    const spy = await buildPerson(stranger, ["analyst"]);
    expect(await readLifeCurves(actorAt(stranger, spy, ["analyst"]), asked())).toBeNull();
  });

  it("take a day that is none, or still to come, for today, and say so", async () => {
    const built = await observedWorld();
    const actor = actorAt(built.seller, built.analyst, ["analyst"]);
    expect(await readLifeCurves(actor, asked({ cut: "soon" }))).toMatchObject({ isCutUnread: true });
    expect(await readLifeCurves(actor, asked({ cut: "2999-01-01" }))).toMatchObject({
      isCutUnread: true,
    });
    expect((await readLifeCurves(actor, asked()))?.view.query.cut).toBe(CUT);
  });
});

describe("the table as a file", () => {
  it("comes with its head for the analyst, and is not there for anybody else", async () => {
    const world = await observedWorld();
    const { seller, analyst, part, between } = world;
    const batch = await buildBatch(seller, part, { code: "=R2614" });
    await playUnit(world, batch, { shippedOn: SHIPPED, fittings: [[FITTED, null]] });
    const file = async (session: string) => ask("GET", `/api/v1/life-curves?cut=${CUT}`, { session });
    const answer = await file(await startSession(analyst, seller));
    expect(answer.status).toBe(200);
    expect(answer.headers.get("content-disposition")).toBe(
      'attachment; filename="life-curves-2026-06-30.csv"',
    );
    const [head, row] = (await answer.text()).split("\r\n");
    expect(head).toContain("units_in_service");
    expect(row).toMatch(/^'=R2614,/u);
    const stranger = await file(await startSession(between.person, between.workshop));
    expect(stranger.status).toBe(404);
  });
});
