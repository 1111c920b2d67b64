import { beforeAll, describe, expect, it } from "vitest";
import { decideClaim } from "@/lib/claims/deciding/service";
import { settleReturn } from "@/lib/returns/calling-service";
import { disposePart } from "@/lib/returns/bench-service";
import { adminQuery } from "../support/database";
import {
  assessor,
  atTheBench,
  calledIn,
  find,
  goodsIn,
  heldClaim,
  openReturnWorld,
  receive,
  send,
  stateOf,
  type Held,
} from "./returned-parts";

beforeAll(openReturnWorld);

const decide = (claim: Held, returnWaivedReason = "") =>
  decideClaim(assessor(), {
    number: claim.number,
    revision: 1,
    lines: claim.lineIds.map((lineId) => ({
      lineId,
      outcome: "upheld" as const,
      shares: { maker: "1", carrier: "", fitter: "", user: "", wear: "" },
      reasonCode: "faultOfThePart" as const,
      reason: "The log shows it.",
    })),
    letter: "We credit this claim.",
    returnWaivedReason,
  });

const waivedOf = async (claim: Held) =>
  (
    await adminQuery<{ verdict: string | null; line: string | null }>(
      `select v.return_waived_reason as verdict, l.return_waived_reason as line from verdict_lines v
         join claim_lines l on l.id = v.line_id where l.claim_id = $1`,
      [claim.id],
    )
  )[0];

describe("a verdict", () => {
  it("waits for the finding while the part is awaited, sent or received, whatever reason is written", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    expect(await decide(claim, "Not needed.")).toMatchObject({ code: "findingAwaited", detail: { line: 1 } });
    await send(number);
    expect(await decide(claim, "Not needed.")).toMatchObject({ code: "findingAwaited" });
    await receive(number, claim);
    expect(await decide(claim, "Not needed.")).toMatchObject({ code: "findingAwaited" });
    await find(number);
    expect(await decide(claim)).toMatchObject({ ok: true });
    expect(await stateOf(claim)).toBe("examined");
    expect(await waivedOf(claim)).toEqual({ verdict: null, line: null });
  });

  it("needs no reason after the part was disposed of, and keeps where it is", async () => {
    const { claim, number } = await atTheBench();
    await find(number);
    await disposePart(goodsIn(), { number, lineNumber: 1, as: "scrapped" });
    expect(await decide(claim)).toMatchObject({ ok: true });
    expect(await stateOf(claim)).toBe("disposed");
  });

  it("on a part never called in says why it needs none", async () => {
    const claim = await heldClaim();
    expect(await decide(claim)).toMatchObject({ code: "returnReasonMissing", field: "returnWaivedReason" });
    expect(await decide(claim, "The photos are clear.")).toMatchObject({ ok: true });
    expect(await waivedOf(claim)).toEqual({
      verdict: "The photos are clear.",
      line: "The photos are clear.",
    });
  });

  it("on a part that was lost or never sent says why, and leaves it lost or not sent", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    await send(number);
    await settleReturn(assessor(), { number, move: "markMissing", why: "Proof of dispatch shown." });
    expect(await decide(claim)).toMatchObject({ code: "returnReasonMissing" });
    expect(await decide(claim, "Proof of dispatch decides.")).toMatchObject({ ok: true });
    expect(await stateOf(claim)).toBe("missing");
  });
});
