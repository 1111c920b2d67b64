import "../support/heard-log";
import { beforeAll, describe, expect, it } from "vitest";
import { z } from "zod";
import { heardLines, heardText } from "../support/heard-log";
import { inRequest } from "../support/http";
import { startSession } from "./signed-in";
import { twoShops } from "./shops";

const { action } = await import("@/lib/web/action");
const { route } = await import("@/lib/web/route");
const { logTo } = await import("@/lib/web/log");

const ESC = "\u001b";
/** What begins a line, ends one, or tells a screen to do something else with it: 20 of them. */
const BREAKS = [
  ...["\n", "\r\n", "\r", "\v", "\f", "\u0085", "\u2028", "\u2029", "\0", "\u0008"],
  ...[`${ESC}[31m`, `${ESC}[2J`, `${ESC}[1A${ESC}[2K`, `${ESC}]0;title\u0007`, `${ESC}]8;;http://x\u0007`],
  ...["\u009b31m", "\u009d0;title\u009c", "\u007f", "\u202e", "\u2066"],
];
/** Lines somebody would like to see in the log: 5 of them, so 100 payloads. */
const FORGED = [
  '{"level":"error","event":"fault"}',
  '"}\n{"level":"info","event":"request","userId":"somebody else"}',
  "2026-12-01T00:00:00.000Z signed in",
  '\\"}\\n{"level":"info"}',
  '","event":"request","x":"',
];
const PAYLOADS = BREAKS.flatMap((mark) => FORGED.map((line) => `typed${mark}${line}`));

/** All that a log line may never hold as it is. */

const RAW = /[\u0000-\u001f\u007f-\u009f\u061c\u200e\u200f\u2028-\u202e\u2066-\u2069]/u;

/** A log, and all that was written into it. */
function listen() {
  let kept = "";
  const told = logTo({ write: (piece) => (kept += piece) });
  // Tests are quiet unless somebody listens.
  told.level = "info";
  return { told, text: () => kept };
}

let session: string;
beforeAll(async () => {
  const { shops } = await twoShops();
  session = await startSession(shops[0].person, shops[0].workshop);
});

describe("a line of the log", () => {
  it("is in UTC and says its level; what is secret is not in it", () => {
    const { told, text } = listen();
    told.warn({ password: "cedar-1", session: { token: "amber-2", cookie: "flint-3" } });
    const line = text();
    expect(JSON.parse(line)).toMatchObject({ level: "warn", time: expect.stringMatching(/Z$/u) });
    expect(line).not.toMatch(/cedar|amber|flint/u);
  });

  it("cannot be forged by any of 100 texts, wherever they get into one", async () => {
    expect(new Set(PAYLOADS).size).toBe(100);
    const { told, text } = listen();
    for (const typed of PAYLOADS)
      told.warn({ event: "typed", typed, [typed]: { typed: [typed] } }, "%s", typed);
    const lines = text().split("\n").filter(Boolean);
    expect(lines).toHaveLength(PAYLOADS.length);
    for (const [at, line] of lines.entries()) {
      expect(line).not.toMatch(RAW);
      const typed = PAYLOADS[at] ?? "";
      expect(JSON.parse(line)).toMatchObject({
        level: "warn",
        event: "typed",
        typed,
        [typed]: { typed: [typed] },
      });
    }
  });

  it("cannot be forged by the words of a fault, and has the number its reader was told", async () => {
    const before = heardLines().length;
    const told: string[] = [];
    for (const words of PAYLOADS) {
      const fail = (): never => {
        throw new Error(words);
      };
      const pressed = await inRequest({ session }, () =>
        action(z.object({}), async () => fail())(null, new FormData()),
      );
      told.push(/[\da-f-]{36}/u.exec(pressed.ok ? "" : (pressed.message ?? ""))?.[0] ?? "");
      const get = route({ name: "GET /fault" }, async () => fail());
      const request = new Request("http://localhost/fault");
      const answer = await inRequest({ session, headers: {} }, () =>
        get(request, { params: Promise.resolve({}) }),
      );
      told.push(answer.headers.get("x-request-id") ?? "");
      expect(await answer.text()).toContain(`urn:uuid:${told.at(-1)}`);
    }
    const faults = heardLines()
      .slice(before)
      .filter(({ event }) => event === "fault");
    expect(faults.map(({ requestId }) => requestId)).toEqual(told);
    expect(heardLines().length - before).toBe(3 * PAYLOADS.length);
    for (const line of heardText().split("\n")) expect(line).not.toMatch(RAW);
  });

  it("takes no id of a request from outside that is more than letters, digits and dashes", async () => {
    const { requestIdOf } = await import("@/lib/web/request-id");
    const sendable = PAYLOADS.filter((text) => !/[\0\r\n\u0100-\uffff]/u.test(text));
    expect(sendable.length).toBeGreaterThan(20);
    for (const given of sendable)
      expect(requestIdOf(new Headers({ "x-request-id": given }))).toMatch(/^[\da-f-]{36}$/u);
    expect(requestIdOf(new Headers({ "x-request-id": "front-0042" }))).toBe("front-0042");
  });
});
