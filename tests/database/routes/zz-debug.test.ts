import { setFlagsFromString } from "node:v8";
import { runInNewContext } from "node:vm";
import { beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { LIMITS } from "@/lib/kernel/limits";
import { ask, problemOf } from "../../support/http";
import { buildClaim } from "../../support/build";
import { adminQuery } from "../../support/database";
import { startSession } from "../signed-in";
import { twoShops, type Shop } from "../shops";
import * as made from "../storage/material";
import { keysIn, openUploads, useOwnBucket } from "../storage/own-bucket";
import { form, post, type Taken } from "./multipart";

let shop: Shop;
let session: string;
let claim: { id: string };

import { log } from "@/lib/web/log";
beforeAll(async () => {
  vi.spyOn(log, "error").mockImplementation((it) => void process.stdout.write(`FAULT ${JSON.stringify(it)}\n`));
  await useOwnBucket();
  [shop] = (await twoShops()).shops;
  session = await startSession(shop.person, shop.workshop);
});
beforeEach(async () => {
  claim = await buildClaim(shop);
});

const fields = (kind: string) => ({ claimId: claim.id, rowId: "label", kind });
const rowsOfClaim = () => adminQuery("select id from evidence_files where claim_id = $1", [claim.id]);

async function expectNothingLeft() {
  expect(await keysIn("quarantine/")).toEqual([]);
  expect(await openUploads()).toBe(0);
  expect(await rowsOfClaim()).toEqual([]);
}

/** Lines of a run log, different for every name, as many bytes as wanted. */
async function* runLog(name: string, bytes: number): AsyncGenerator<Uint8Array> {
  const head = Buffer.from(`time_s,current_a\n0,0 ${name}\n`);
  yield head;
  const piece = Buffer.alloc(64 * 1024, `${name},2.5\n`);
  for (let sent = head.length; sent < bytes; sent += piece.length) yield piece.subarray(0, bytes - sent);
}

async function* breaksOffAfter(content: AsyncIterable<Uint8Array>, bytes: number) {
  let sent = 0;
  for await (const piece of content) {
    yield piece;
    sent += piece.length;
    if (sent >= bytes) throw new Error("the line went dead");
  }
}

describe("a body that breaks off", () => {
  it.each([0, 100, 9_000, 1_000_000, 9_000_000, 20_000_000])(
    "after %i bytes leaves nothing in the store or the database",
    async (bytes) => {
      const content = breaksOffAfter(runLog("broken", 24_000_000), bytes);
      const answer = await post(
        "/api/v1/evidence",
        session,
        form(fields("runLog"), { name: "run.csv", content }),
      );
      expect([answer.status, (await problemOf(answer))["code"]]).toEqual([409, "uploadBroken"]);
      await expectNothingLeft();
    },
  );

  it.each([100, 9_000, 9_000_000])(
    "by an end that comes too early, after %i bytes, leaves nothing either",
    async (bytes) => {
      const sent = form(fields("runLog"), { name: "run.csv", content: runLog("short", bytes) }, false);
      const answer = await post("/api/v1/evidence", session, sent);
      expect(answer.status).toBeGreaterThanOrEqual(400);
      expect(answer.status).toBeLessThan(500);
      await expectNothingLeft();
    },
  );
});

/** What the web may do on a table is taken away while something is tried: the database answers with a fault. */
async function without(right: "select" | "insert", table: string, act: () => Promise<void>) {
  const takeAway = { select: "revoke select", insert: "revoke insert" }[right];
  const giveBack = { select: "grant select", insert: "grant insert" }[right];
  const named = [`${takeAway} on ${table} from web`, `${giveBack} on ${table} to web`] as const;
  await adminQuery(named[0]);
  try {
    await act();
  } finally {
    await adminQuery(named[1]);
  }
}

describe("a fault of the database", () => {
  const sendPhoto = async (taken?: Taken) =>
    post(
      "/api/v1/evidence",
      session,
      form(fields("photo"), { name: "label.jpg", content: await made.jpegPhoto(900, 900) }),
      taken,
    );

  it("before the first byte is a problem document, nothing is kept, and the process lives on", async () => {
    await without("select", "claims", async () => {
      const answer = await sendPhoto();
      expect(answer.headers.get("content-type")).toBe("application/problem+json");
      const problem = await problemOf(answer);
      expect(problem).toMatchObject({ status: 500, code: "fault" });
      expect(problem["title"]).toContain(answer.headers.get("x-request-id"));
      expect(JSON.stringify(problem)).not.toMatch(/permission|claims|postgres|select/iu);
    });
    await expectNothingLeft();
    expect((await sendPhoto()).status).toBe(200);
  });

  it("after the last byte leaves no row and nothing in quarantine", async () => {
    await without("insert", "evidence_files", async () => {
      const answer = await sendPhoto();
      expect([answer.status, (await problemOf(answer))["code"]]).toEqual([500, "fault"]);
    });
    await expectNothingLeft();
    expect((await sendPhoto()).status).toBe(200);
  });

  it("twenty times over leaves no place taken for the next upload", async () => {
    await without("select", "claims", async () => {
      for (let time = 0; time < 20; time += 1) expect((await sendPhoto()).status).toBe(500);
    });
    expect((await sendPhoto()).status).toBe(200);
  });
});

describe("a fault of the store", () => {
  it("is a problem document, and the next upload is taken", async () => {
    const bucket = process.env["STORE_BUCKET"];
    process.env["STORE_BUCKET"] = "no-such-bucket";
    const sendLog = (name: string) =>
      post(
        "/api/v1/evidence",
        session,
        form(fields("runLog"), { name: "run.csv", content: runLog(name, 12e6) }),
      );
    const answer = await sendLog("lost");
    process.env["STORE_BUCKET"] = bucket;
    expect(answer.status).toBeGreaterThanOrEqual(400);
    expect(answer.headers.get("content-type")).toBe("application/problem+json");
    await expectNothingLeft();
    expect((await sendLog("found")).status).toBe(200);
  });
});

setFlagsFromString("--expose-gc");
const collect: () => void = runInNewContext("gc");

/** Heap and what lies beside it, in megabytes: what is held, without what the sender here has thrown away. */
const memoryMb = (): number => {
  collect();
  const { heapUsed, external } = process.memoryUsage();
  return (heapUsed + external) / 1e6;
};

describe("eight files of 25 MB at once", () => {
  it("are kept with memory flat, a ninth is told to wait, and the process answers meanwhile", async () => {
    const before = memoryMb();
    let most = before;
    const timer = setInterval(() => (most = Math.max(most, memoryMb())), 50);
    const bodies = Array.from({ length: 8 }, (): Taken => ({ bytes: 0 }));
    const sent = bodies.map((taken, at) => {
      const content = runLog(`log ${at}`, LIMITS.runLogBytes);
      return post(
        "/api/v1/evidence",
        session,
        form(fields("runLog"), { name: `run ${at}.csv`, content }),
        taken,
      );
    });
    await vi.waitFor(() => expect(bodies.every(({ bytes }) => bytes > 0)).toBe(true), 5000);
    const ninth = await post(
      "/api/v1/evidence",
      session,
      form(fields("runLog"), { name: "ninth.csv", content: made.csvFile() }),
    );
    expect([ninth.status, (await problemOf(ninth))["code"]]).toEqual([429, "uploadTooMany"]);
    const asked = performance.now();
    expect((await ask("GET", "/api/v1/health")).status).toBe(200);
    const waitedMs = performance.now() - asked;
    const statuses = (await Promise.all(sent)).map(({ status }) => status);
    clearInterval(timer);
    expect(statuses).toEqual(Array.from({ length: 8 }, () => 200));
    const grownMb = most - before;
    process.stdout.write(
      `8 x 25 MB at once: heap and external grew by ${grownMb.toFixed(1)} MB, limit 60; health answered in ${waitedMs.toFixed(0)} ms\n`,
    );
    expect(grownMb).toBeLessThan(60);
    expect(await keysIn("quarantine/")).toEqual([]);
  }, 120_000);
});
