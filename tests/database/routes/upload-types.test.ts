import { createHash } from "node:crypto";
import { beforeAll, describe, expect, it } from "vitest";
import { LIMITS } from "@/lib/kernel/limits";
import { originalKey } from "@/lib/storage/keys";
import { readAll } from "@/lib/storage/objects";
import { problemOf } from "../../support/http";
import { buildClaim } from "../../support/build";
import { adminQuery } from "../../support/database";
import { startSession } from "../signed-in";
import { twoShops } from "../shops";
import * as made from "../storage/material";
import { keysIn, openUploads, useOwnBucket } from "../storage/own-bucket";
import { form, post } from "./multipart";

let session: string;
let claimId: string;

beforeAll(async () => {
  await useOwnBucket();
  const [shop] = (await twoShops()).shops;
  session = await startSession(shop.person, shop.workshop);
  claimId = (await buildClaim(shop)).id;
});

const send = (kind: string, name: string, content: Uint8Array, over: Record<string, string> = {}) =>
  post("/api/v1/evidence", session, form({ claimId, rowId: "label", kind, ...over }, { name, content }));

const sha256 = (bytes: Uint8Array): string => createHash("sha256").update(bytes).digest("hex");
const atLeast = (bytes: Buffer, size: number) =>
  Buffer.concat([bytes, Buffer.alloc(Math.max(0, size - bytes.length), 0x20)]);

/** What the store and the database hold of this file's claim. */
const holds = async () => ({
  quarantine: await keysIn("quarantine/"),
  uploads: await openUploads(),
  originals: (await keysIn("evidence/")).length,
  rows: (await adminQuery("select 1 from evidence_files where claim_id = $1", [claimId])).length,
});

describe("a file of a kind that is taken", () => {
  it.each([
    ["photo", "label.jpg", "image/jpeg", made.jpegPhoto],
    ["photo", "LABEL.JPEG", "image/jpeg", made.jpegPhoto],
    ["photo", "label.png", "image/png", made.pngPhoto],
    ["photo", "label.webp", "image/webp", made.webpPhoto],
    ["document", "sheet.pdf", "application/pdf", made.pdfFile],
    ["runLog", "run.csv", "text/csv", made.csvFile],
    ["runLog", "run.txt", "text/plain", made.csvFile],
    ["runLog", "run.csv", "text/csv", () => Buffer.from("\ufefftime_s\n1\n", "utf16le")],
  ])("as %s %s is kept byte for byte under its hash", async (kind, name, mediaType, make) => {
    const bytes = await make();
    const answer = await send(kind, name, bytes);
    expect(answer.status).toBe(200);
    const view = await problemOf(answer);
    expect(view).toMatchObject({ kind, originalName: name, sizeBytes: bytes.length, sha256: sha256(bytes) });
    const rows = await adminQuery("select media_type, object_key from evidence_files where id = $1", [
      view["id"],
    ]);
    expect(rows).toEqual([{ media_type: mediaType, object_key: originalKey(sha256(bytes)) }]);
    const kept = await readAll(originalKey(sha256(bytes)), LIMITS.photoBytes);
    expect(sha256(kept)).toBe(sha256(bytes));
    expect((await holds()).quarantine).toEqual([]);
  });

  it("is told about without where it lies", async () => {
    const answer = await send("document", "sheet.pdf", made.pdfFile());
    expect(Object.keys(await problemOf(answer)).toSorted()).toEqual(
      ["id", "kind", "originalName", "receivedAt", "rowId", "sha256", "sizeBytes", "viewState"].toSorted(),
    );
  });
});

const NOT_ALLOWED = [415, "fileTypeNotAllowed"] as const;
const REFUSED: readonly (readonly [string, string, string, Buffer, readonly [number, string]])[] = [
  ["HTML", "photo", "label.jpg", made.HTML, NOT_ALLOWED],
  ["HTML", "runLog", "run.csv", made.HTML, [415, "fileNotText"]],
  ["HTML", "document", "sheet.pdf", made.HTML, NOT_ALLOWED],
  [
    "HTML after blank lines",
    "runLog",
    "run.csv",
    Buffer.from(`\r\n\t ${String(made.HTML)}`),
    [415, "fileNotText"],
  ],
  [
    "HTML after a byte order mark",
    "runLog",
    "run.csv",
    Buffer.from(`\ufeff${String(made.HTML)}`),
    [415, "fileNotText"],
  ],
  [
    "HTML in UTF-16",
    "runLog",
    "run.csv",
    Buffer.from(`\ufeff${String(made.HTML)}`, "utf16le"),
    [415, "fileNotText"],
  ],
  ["HTML in UTF-16, the other way round", "runLog", "run.csv", made.HTML_BIG_ENDIAN, [415, "fileNotText"]],
  ["SVG", "photo", "label.jpg", made.SVG, NOT_ALLOWED],
  ["SVG", "photo", "label.svg", made.SVG, NOT_ALLOWED],
  [
    "SVG with a declaration",
    "photo",
    "label.png",
    Buffer.concat([Buffer.from("<?xml version='1.0'?>"), made.SVG]),
    NOT_ALLOWED,
  ],
  ["SVG", "runLog", "run.txt", made.SVG, [415, "fileNotText"]],
  ["GIF", "photo", "label.gif", made.GIF, NOT_ALLOWED],
  ["GIF", "photo", "label.jpg", made.GIF, NOT_ALLOWED],
  ["GIF", "runLog", "run.csv", made.GIF, NOT_ALLOWED],
  ["ZIP", "document", "sheet.pdf", made.ZIP, NOT_ALLOWED],
  ["ZIP", "runLog", "run.csv", made.ZIP, NOT_ALLOWED],
  ["a program", "photo", "label.jpg", made.EXE, NOT_ALLOWED],
  ["a program", "runLog", "run.csv", made.EXE, NOT_ALLOWED],
  ["a shell script", "runLog", "run.txt", Buffer.from("#!/bin/sh\necho\n"), [415, "fileNotText"]],
  ["HEIC", "photo", "label.jpg", made.HEIC, [415, "fileTypeHeic"]],
  ["PDF", "photo", "label.jpg", made.pdfFile(), NOT_ALLOWED],
  ["PDF", "photo", "label.pdf", made.pdfFile(), NOT_ALLOWED],
  ["CSV", "photo", "run.csv", made.csvFile(), NOT_ALLOWED],
  ["CSV", "document", "sheet.pdf", made.csvFile(), NOT_ALLOWED],
  ["CSV with NUL bytes", "runLog", "run.csv", Buffer.from("time_s\0,a\n1,2\n"), [415, "fileNotText"]],
  ["PDF called JPEG", "document", "sheet.jpg", made.pdfFile(), [415, "fileNameDisagrees"]],
  ["PDF with two endings", "document", "sheet.pdf.html", made.pdfFile(), [415, "fileNameDisagrees"]],
  ["PDF without an ending", "document", "sheet", made.pdfFile(), [415, "fileNameDisagrees"]],
  ["CSV called HTML", "runLog", "run.html", made.csvFile(), [415, "fileNameDisagrees"]],
  ["one byte", "photo", "label.jpg", Buffer.from("x"), NOT_ALLOWED],
  ["nothing", "photo", "label.jpg", Buffer.alloc(0), [409, "fileEmpty"]],
  ["nothing", "runLog", "run.csv", Buffer.alloc(0), [409, "fileEmpty"]],
];

describe("a file of a kind that is not taken", () => {
  it.each(REFUSED)("%s as %s %s is refused by what it holds, and leaves nothing", async (...row) => {
    const [, kind, name, bytes, [status, code]] = row;
    const before = await holds();
    // Files shorter and longer than the first bytes that decide: the refusal is the same.
    const sizes = bytes.length === 0 ? [0] : [bytes.length, 300_000];
    for (const size of sizes) {
      const answer = await send(kind, name, atLeast(bytes, size));
      const problem = await problemOf(answer);
      expect([answer.status, problem["code"]], `${size} bytes`).toEqual([status, code]);
      expect(String(problem["title"]), `${size} bytes`).toContain(name);
    }
    expect(await holds()).toEqual(before);
  });

  it("a picture's ending that says another picture is refused, and says which it is", async () => {
    const answer = await send("photo", "label.png", await made.jpegPhoto());
    expect(answer.status).toBe(415);
    expect((await problemOf(answer))["title"]).toBe(
      "label.png holds jpg, and its name says something else. Save it under its right ending.",
    );
  });

  it("is counted", () => {
    process.stdout.write(`upload types: ${REFUSED.length} hostile files, short and long, 0 kept\n`);
  });
});

describe("the name of a file", () => {
  const RIGHT_TO_LEFT = "\u202e";
  it.each([
    ["../../etc/passwd.jpg", "passwd.jpg"],
    ["C:\\temp\\label.jpg", "label.jpg"],
    ["/absolute/label.jpg", "label.jpg"],
    [`gpj.${RIGHT_TO_LEFT}label.jpg`, "gpj.label.jpg"],
    ["gpj.&#8238;label.jpg", "gpj.label.jpg"],
    ["la\tb\u0007el\u007f.jpg", "label.jpg"],
    ["la\u200bb\u2066el\ufeff.jpg", "label.jpg"],
    ["Typenschild Rückseite é 標籤 😀.jpg", "Typenschild Rückseite é 標籤 😀.jpg"],
    ["'; drop table claims; --.jpg", "'; drop table claims; --.jpg"],
    ["<img src=x onerror=1>.jpg", "<img src=x onerror=1>.jpg"],
    [`${"x".repeat(300)}.jpg`, `${"x".repeat(196)}.jpg`],
    [`${"😀".repeat(120)}.jpg`, expect.stringMatching(/^(😀)+\.jpg$/u)],
  ])("%j is kept as people may read it", async (sent, kept) => {
    const answer = await send("photo", sent, await made.jpegPhoto());
    expect(answer.status).toBe(200);
    expect((await problemOf(answer))["originalName"]).toEqual(kept);
  });
});

describe("a form that is not what it should be", () => {
  it("without a file, or without any part, is refused as missing", async () => {
    const answer = await post("/api/v1/evidence", session, form({ claimId, rowId: "label", kind: "photo" }));
    expect([answer.status, (await problemOf(answer))["code"]]).toEqual([409, "fileMissing"]);
  });

  it.each([
    ["of no claim", { claimId: "00000000-0000-4000-8000-000000000000" }],
    ["of text that is no claim", { claimId: "x" }],
    ["for a row that cannot be", { rowId: "../label" }],
    ["of an unknown kind", { kind: "program" }],
  ])("%s is refused like one that is not there", async (_said, over) => {
    const before = await holds();
    const answer = await send("photo", "label.jpg", await made.jpegPhoto(), over);
    expect([answer.status, (await problemOf(answer))["code"]]).toEqual([404, "notFound"]);
    expect(await holds()).toEqual(before);
  });

  it.each([
    ["JSON", "application/json", "{}"],
    ["a form without boundary", "multipart/form-data", "x"],
    ["text", "text/plain", "x"],
    ["nothing", "multipart/form-data; boundary=x", ""],
  ])("%s is a refusal and no fault", async (_said, contentType, text) => {
    const pieces = text === "" ? [] : [new Uint8Array(Buffer.from(text))];
    const answer = await post("/api/v1/evidence", session, { contentType, pieces });
    expect(answer.status).toBeGreaterThanOrEqual(400);
    expect(answer.status).toBeLessThan(500);
  });

  it("with a thousand fields, or one of megabytes, is refused", async () => {
    const many = Object.fromEntries(Array.from({ length: 1001 }, (_one, at) => [`f${at}`, "x"]));
    for (const over of [many, { note: "x".repeat(5_000_000) }]) {
      const answer = await send("photo", "label.jpg", await made.jpegPhoto(), over);
      expect(answer.status).toBeGreaterThanOrEqual(400);
      expect(answer.status).toBeLessThan(500);
    }
  });

  it("has what a phone said of the picture ignored where it is not of that shape", async () => {
    for (const captured of ["{", "null", '{"takenAt":"yesterday"}', '{"by":"phone","lat":1}']) {
      const answer = await send("photo", "label.jpg", await made.jpegPhoto(), { captured });
      const { id } = await problemOf(answer);
      const [row] = await adminQuery("select captured from evidence_files where id = $1", [id]);
      expect(row?.["captured"], captured).toEqual(captured.includes("lat") ? { by: "phone" } : {});
    }
  });
});
