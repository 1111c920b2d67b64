import { beforeAll, describe, expect, it } from "vitest";
import { PassThrough } from "node:stream";
import { fileClaim } from "@/lib/claims/sending/service";
import { askWorkshop, takeClaim } from "@/lib/claims/judging/service";
import { logTo } from "@/lib/web/log";
import { actorAt } from "../support/actor";
import { adminQuery } from "../support/database";
import { draftReady, excuseMissingRows } from "./draft-ready";
import { twoShops, workerOf } from "./shops";

let world: Awaited<ReturnType<typeof twoShops>>;
beforeAll(async () => {
  world = await twoShops();
});

describe("the id of a request", () => {
  it("stands on the mail that the request asked for, so that a mail leads back to who caused it", async () => {
    const [shop] = world.shops;
    const unit = await world.sell(shop);
    const claim = await draftReady(shop, { unitId: unit.id, partId: world.part.id });
    const technician = workerOf(shop);
    await excuseMissingRows(technician, claim.number);
    await fileClaim(technician, { number: claim.number });
    const assessor = actorAt(world.seller, world.assessor, ["assessor"]);
    await takeClaim(assessor, { number: claim.number });
    await askWorkshop(assessor, { number: claim.number, question: "Which air gap?", rowIds: [] });
    const mails = await adminQuery(
      "select kind, request_id from outbox where params->>'number' = $1 order by created_at",
      [`${claim.number.slice(0, 4)}-${claim.number.slice(4)}`],
    );
    const asked = mails.filter(({ kind }) => kind === "queryAsked");
    expect(asked.length).toBeGreaterThan(0);
    expect(new Set(asked.map(({ request_id }) => request_id))).toEqual(new Set([assessor.requestId]));
  });
});

describe("a line of the log", () => {
  const linesOf = (event: Record<string, unknown>): string[] => {
    const out = new PassThrough();
    const told = logTo(out);
    // Tests are quiet unless somebody listens.
    told.level = "info";
    told.warn(event);
    return String(out.read()).split("\n").filter(Boolean);
  };
  const linesFor = (typed: string): string[] => linesOf({ typed });

  it("is in UTC and says its level; what is secret is not in it", () => {
    const [line = ""] = linesOf({ password: "cedar-1", session: { token: "amber-2", cookie: "flint-3" } });
    expect(JSON.parse(line)).toMatchObject({ level: "warn", time: expect.stringMatching(/Z$/u) });
    expect(line).not.toMatch(/cedar|amber|flint/u);
  });

  it.each(['x\n{"level":"error"}', "x\r\nforged", "\u001b[31mred", "\u2028next", 'x"}\n{"a":"'])(
    "stays one line whatever was typed: %j",
    (typed) => {
      const lines = linesFor(typed);
      expect(lines).toHaveLength(1);
      expect(JSON.parse(lines[0] ?? "")).toMatchObject({ typed });
      expect(lines[0]).not.toContain("\u001b");
    },
  );
});
