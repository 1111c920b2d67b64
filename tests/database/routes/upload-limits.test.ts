import { beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { LIMITS } from "@/lib/kernel/limits";
import { ask, problemOf } from "../../support/http";
import { buildClaim, buildFile, FILED } from "../../support/build";
import { adminQuery } from "../../support/database";
import { startSession } from "../signed-in";
import { twoShops, type Shop } from "../shops";
import * as made from "../storage/material";
import { keysIn, openUploads, useOwnBucket } from "../storage/own-bucket";
import { bodyOf, form, post, type Taken } from "./multipart";

let shop: Shop;
let session: string;
let claim: { id: string; number: string };

beforeAll(async () => {
  await useOwnBucket();
  [shop] = (await twoShops()).shops;
  session = await startSession(shop.person, shop.workshop);
});
beforeEach(async () => {
  claim = await buildClaim(shop);
});

const fields = (kind: string) => ({ claimId: claim.id, rowId: "label", kind });
const send = (kind: string, name: string, content: Uint8Array | AsyncIterable<Uint8Array>, taken?: Taken) =>
  post("/api/v1/evidence", session, form(fields(kind), { name, content }), taken);
const said = async (answer: Response) => [answer.status, (await problemOf(answer))["code"]];
const rowsOfClaim = () => adminQuery("select id from evidence_files where claim_id = $1", [claim.id]);

/** Nothing of a refused or broken upload lies anywhere. */
async function expectNothingLeft() {
  expect(await keysIn("quarantine/")).toEqual([]);
  expect(await openUploads()).toBe(0);
  expect(await rowsOfClaim()).toEqual([]);
}

/** A beginning that is taken, and then as many bytes as wanted. */
async function* endless(head: Uint8Array, bytes: number): AsyncGenerator<Uint8Array> {
  yield head;
  const piece = Buffer.alloc(64 * 1024, "1,2.5\n");
  for (let sent = head.length; sent < bytes; sent += piece.length) yield piece.subarray(0, bytes - sent);
}

describe("a file over its limit", () => {
  it.each([
    ["photo", "label.jpg", made.jpegPhoto, LIMITS.photoBytes],
    ["document", "sheet.pdf", made.pdfFile, LIMITS.documentBytes],
    ["runLog", "run.csv", made.csvFile, LIMITS.runLogBytes],
  ])("as %s is refused while it comes in, long before its end", async (kind, name, make, limit) => {
    const taken = { bytes: 0 };
    const answer = await send(kind, name, endless(await make(), 120_000_000), taken);
    const takenBytes = taken.bytes;
    const problem = await problemOf(answer);
    expect([answer.status, problem["code"]]).toEqual([413, "fileTooBig"]);
    expect(problem["title"]).toContain(`${name} is over the limit of ${limit / 1e6} MB`);
    expect(takenBytes).toBeLessThan(limit + 2_000_000);
    await expectNothingLeft();
    process.stdout.write(`${kind} of 120 MB: refused after ${takenBytes} bytes, limit ${limit}\n`);
  });

  it("is let go of as it comes, never cancelled: that would cut the line before the answer", async () => {
    const sent = form(fields("photo"), { name: "label.jpg", content: [] }, false);
    const head = await made.jpegPhoto();
    const said = { pieces: 0, isCancelled: false, isRead: false };
    const piece = new Uint8Array(1_000_000);
    // Pushes whatever comes in, whether or not somebody reads, and sees whether it is told to stop.
    const pushing = new ReadableStream<Uint8Array<ArrayBuffer>>({
      async start(controller) {
        for await (const one of sent.pieces) controller.enqueue(one);
        controller.enqueue(new Uint8Array(head));
        for (; said.pieces < 60; said.pieces += 1) {
          controller.enqueue(piece);
          await new Promise((resolve) => setTimeout(resolve, 5));
        }
        controller.close();
        await vi.waitFor(() => expect(controller.desiredSize).toBe(0));
        said.isRead = true;
      },
      cancel() {
        said.isCancelled = true;
      },
    });
    const headers = {
      origin: new URL(process.env["PUBLIC_URL"] ?? "").origin,
      "content-type": sent.contentType,
    };
    const answer = await ask("POST", "/api/v1/evidence", { session, headers, body: pushing });
    expect(answer.status).toBe(413);
    expect(said.pieces).toBeLessThan(60);
    await vi.waitFor(() => expect(said).toEqual({ pieces: 60, isCancelled: false, isRead: true }), 5000);
    await expectNothingLeft();
  });

  it("by one byte is refused, and of exactly that size is taken", async () => {
    const head = await made.jpegPhoto();
    const over = await send("photo", "label.jpg", endless(head, LIMITS.photoBytes + 1));
    expect(await said(over)).toEqual([413, "fileTooBig"]);
    await expectNothingLeft();
    const exact = await send("photo", "label.jpg", endless(head, LIMITS.photoBytes));
    expect((await problemOf(exact))["sizeBytes"]).toBe(LIMITS.photoBytes);
  });

  it("is not believed about its length", async () => {
    for (const length of ["10", "1", "999999999999"]) {
      const sent = form(fields("photo"), {
        name: "label.jpg",
        content: endless(await made.jpegPhoto(), 20e6),
      });
      const answer = await ask("POST", "/api/v1/evidence", {
        session,
        headers: {
          origin: new URL(process.env["PUBLIC_URL"] ?? "").origin,
          "content-type": sent.contentType,
          "content-length": length,
        },
        body: bodyOf(sent),
      });
      expect(answer.status, length).toBeGreaterThanOrEqual(400);
      expect(answer.status, length).toBeLessThan(500);
      await expectNothingLeft();
    }
  });
});

describe("a claim that is full", () => {
  it("refuses the 41st file before a byte of it is kept", async () => {
    for (let at = 0; at < LIMITS.filesPerClaim - 1; at += 1) await buildFile(shop, claim);
    expect((await send("photo", "last.jpg", await made.jpegPhoto())).status).toBe(200);
    const taken = { bytes: 0 };
    const answer = await send("photo", "more.jpg", endless(await made.jpegPhoto(), 10_000_000), taken);
    const takenBytes = taken.bytes;
    expect(await said(answer)).toEqual([413, "filesTooMany"]);
    expect(takenBytes).toBeLessThan(2_000_000);
    expect(await rowsOfClaim()).toHaveLength(LIMITS.filesPerClaim);
    process.stdout.write(`41st file of 10 MB: refused after ${takenBytes} bytes\n`);
  });

  it("refuses the byte over 200 MB, and takes the last one within", async () => {
    const photo = await made.jpegPhoto();
    const free = LIMITS.bytesPerClaim - photo.length;
    for (const size of [free - 190_000_000 + 1, ...Array.from({ length: 19 }, () => 10_000_000)])
      await buildFile(shop, claim, { size_bytes: size });
    expect(await said(await send("photo", "more.jpg", photo))).toEqual([413, "bytesTooMany"]);
    expect(await keysIn("quarantine/")).toEqual([]);
    const [one] = await rowsOfClaim();
    await adminQuery("update evidence_files set withdrawn_at = now() where id = $1", [one?.["id"]]);
    expect((await send("photo", "more.jpg", photo)).status).toBe(200);
  });

  it("takes no more than there is room for, however many come at once", async () => {
    for (let at = 0; at < LIMITS.filesPerClaim - 2; at += 1) await buildFile(shop, claim);
    const sent = Array.from({ length: 6 }, async () => send("photo", "label.jpg", await made.jpegPhoto()));
    const statuses = (await Promise.all(sent)).map(({ status }) => status).toSorted();
    expect(statuses).toEqual([200, 200, 413, 413, 413, 413]);
    expect(await keysIn("quarantine/")).toEqual([]);
  });

  it("that is out of the workshop's hands takes nothing", async () => {
    claim = await buildClaim(shop, { ...FILED, state: "filed" });
    expect(await said(await send("photo", "late.jpg", await made.jpegPhoto()))).toEqual([409, "moveNotOpen"]);
    await expectNothingLeft();
  });
});

describe("the same bytes", () => {
  it("sent twice are one file with one object, at once or one after the other", async () => {
    const photo = await made.jpegPhoto();
    const sendIt = () => send("photo", "label.jpg", photo);
    const answers = [...(await Promise.all([sendIt(), sendIt(), sendIt()])), await sendIt()];
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200, 200]);
    const ids = await Promise.all(answers.map(async (answer) => (await problemOf(answer))["id"]));
    expect(new Set(ids).size).toBe(1);
    expect(await rowsOfClaim()).toHaveLength(1);
    const [row] = await adminQuery("select sha256 from evidence_files where id = $1", [ids[0]]);
    expect((await keysIn("evidence/")).filter((key) => key.endsWith(String(row?.["sha256"])))).toHaveLength(
      1,
    );
    const tasks = await adminQuery("select 1 from graphile_worker.jobs where key = $1", [
      `viewCopy:${String(ids[0])}`,
    ]);
    expect(tasks).toHaveLength(1);
  });
});
