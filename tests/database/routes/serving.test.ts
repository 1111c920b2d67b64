import { createHash, randomBytes } from "node:crypto";
import { beforeAll, describe, expect, it } from "vitest";
import { originalKey, viewKey } from "@/lib/storage/keys";
import { putOnce } from "@/lib/storage/objects";
import { ask, problemOf } from "../../support/http";
import { buildClaim, buildFile, buildPerson } from "../../support/build";
import { startSession } from "../signed-in";
import { twoShops, type Shop } from "../shops";
import * as made from "../storage/material";
import { useOwnBucket } from "../storage/own-bucket";

let shop: Shop;
let session: string;
let claim: { id: string };

beforeAll(async () => {
  await useOwnBucket();
  [shop] = (await twoShops()).shops;
  session = await startSession(shop.person, shop.workshop);
  claim = await buildClaim(shop);
});

async function stored(bytes: Buffer, over: Record<string, unknown> = {}) {
  const digest = createHash("sha256").update(bytes).digest();
  const [sha256, sha256Base64] = [digest.toString("hex"), digest.toString("base64")];
  const key = originalKey(sha256);
  await putOnce(key, bytes, { sha256Base64, contentType: "application/octet-stream" });
  const file = await buildFile(shop, claim, { sha256, object_key: key, size_bytes: bytes.length, ...over });
  return { ...file, sha256 };
}

const get = (path: string, headers: Record<string, string> = {}, asker = session) =>
  ask("GET", path, { session: asker, headers });
const original = (id: string) => `/api/v1/evidence/${id}`;
const bytesOf = async (response: Response) => Buffer.from(await response.arrayBuffer());

/** Whatever the bytes are, a browser runs none of them and no cache keeps them. */
const SHUT = {
  "content-security-policy": "sandbox; default-src 'none'",
  "x-content-type-options": "nosniff",
  "cross-origin-resource-policy": "same-origin",
  "cache-control": "private, no-store",
};

describe("an original", () => {
  it("is sent byte for byte, to be kept and not shown", async () => {
    const bytes = await made.jpegPhoto(300, 200);
    const { id } = await stored(bytes);
    const answer = await get(original(id));
    expect(answer.status).toBe(200);
    expect(Object.fromEntries(answer.headers)).toMatchObject({
      ...SHUT,
      "content-type": "image/jpeg",
      "content-length": String(bytes.length),
      "content-disposition": `attachment; filename="label.jpg"; filename*=UTF-8''label.jpg`,
      "accept-ranges": "bytes",
    });
    expect((await bytesOf(answer)).equals(bytes)).toBe(true);
  });

  it("that holds mark-up is sent under the type it was taken for, in the same chains", async () => {
    const { id } = await stored(Buffer.concat([Buffer.from("ffd8ffe0", "hex"), made.HTML]));
    const answer = await get(`${original(id)}?response-content-type=text/html`, { accept: "text/html" });
    expect(Object.fromEntries(answer.headers)).toMatchObject({ ...SHUT, "content-type": "image/jpeg" });
    expect(answer.headers.get("content-disposition")).toMatch(/^attachment;/u);
    await answer.body?.cancel();
  });

  it.each([
    ['quo"te\\back%.jpg', `filename="quo_te_back_.jpg"; filename*=UTF-8''quo%22te%5Cback%25.jpg`],
    [
      "a\r\nset-cookie: x=1.jpg",
      `filename="a__set-cookie: x=1.jpg"; filename*=UTF-8''a%0D%0Aset-cookie%3A%20x%3D1.jpg`,
    ],
    [
      "Rückseite 標籤.jpg",
      `filename="R_ckseite __.jpg"; filename*=UTF-8''R%C3%BCckseite%20%E6%A8%99%E7%B1%A4.jpg`,
    ],
    ["it's (1)*.jpg", `filename="it's (1)*.jpg"; filename*=UTF-8''it%27s%20%281%29%2A.jpg`],
  ])("called %j keeps its name and breaks no header", async (name, written) => {
    const { id } = await stored(await made.jpegPhoto(), { original_name: name });
    const answer = await get(original(id));
    expect(answer.headers.get("content-disposition")).toBe(`attachment; ${written}`);
    expect(answer.headers.get("set-cookie")).toBeNull();
    await answer.body?.cancel();
  });

  it.each([
    ["bytes=0-9", 0, 10, 206],
    ["bytes=990-", 990, 1000, 206],
    ["bytes=-5", 995, 1000, 206],
    ["bytes=500-5000", 500, 1000, 206],
    ["bytes=0-", 0, 1000, 206],
  ])("is sent in the part that %s names", async (range, from, to, status) => {
    const bytes = randomBytes(1000);
    const { id } = await stored(bytes);
    const answer = await get(original(id), { range });
    expect(answer.status).toBe(status);
    expect(answer.headers.get("content-range")).toBe(`bytes ${from}-${to - 1}/1000`);
    expect(answer.headers.get("content-length")).toBe(String(to - from));
    expect(Object.fromEntries(answer.headers)).toMatchObject(SHUT);
    expect((await bytesOf(answer)).equals(bytes.subarray(from, to))).toBe(true);
  });

  it.each(["bytes=1000-", "bytes=5000-6000", "bytes=-0"])(
    "has no part that %s names: 416 with its length",
    async (range) => {
      const { id } = await stored(randomBytes(1000));
      const answer = await get(original(id), { range });
      expect(answer.status).toBe(416);
      expect(answer.headers.get("content-range")).toBe("bytes */1000");
      expect(answer.headers.get("cache-control")).toBe("private, no-store");
      expect(await bytesOf(answer)).toHaveLength(0);
    },
  );

  it.each(["bytes=-", "bytes=5-2", "bytes=0-1,5-6", "lines=0-9", "bytes=a-b", "bytes=1e3-"])(
    "is sent whole where %j names no part",
    async (range) => {
      const { id } = await stored(randomBytes(1000));
      const answer = await get(original(id), { range });
      expect(answer.status).toBe(200);
      expect(await bytesOf(answer)).toHaveLength(1000);
    },
  );

  it("whose bytes are gone from the store is a fault, not somebody else's file", async () => {
    const { id } = await buildFile(shop, claim);
    const answer = await get(original(id));
    expect(answer.status).toBe(500);
    expect(JSON.stringify(await problemOf(answer))).not.toMatch(/originals|bucket|NoSuchKey/u);
  });

  it("is seen by its distributor from the moment the claim was sent to it, and by nobody else", async () => {
    const { id } = await stored(await made.jpegPhoto());
    const { workshop } = (await twoShops()).shops[0];
    const stranger = await startSession(await buildPerson(workshop, ["technician"]), workshop);
    expect((await get(original(id), {}, stranger)).status).toBe(404);
    expect((await get(`${original(id)}/view`, {}, stranger)).status).toBe(404);
    const seller = await startSession(await buildPerson(shop.seller, ["assessor"]), shop.seller);
    expect((await get(original(id), {}, seller)).status).toBe(404);
  });

  it("that was taken back is shown to nobody any more", async () => {
    const { id } = await stored(await made.jpegPhoto());
    const taken = await ask("DELETE", original(id), { session });
    expect(taken.status).toBe(200);
    expect((await get(original(id))).status).toBe(404);
    expect((await ask("DELETE", original(id), { session })).status).toBe(404);
  });
});

describe("a view copy", () => {
  it("is shown as the JPEG it is, in the same chains", async () => {
    const bytes = await made.jpegPhoto();
    const sha256 = createHash("sha256").update(bytes).digest("hex");
    const sha256Base64 = createHash("sha256").update(bytes).digest("base64");
    await putOnce(viewKey(sha256), bytes, { sha256Base64, contentType: "image/jpeg" });
    const { id } = await buildFile(shop, claim, {
      view_state: "ready",
      view_key: viewKey(sha256),
      original_name: 'x".html',
      width_px: 64,
      height_px: 48,
    });
    const answer = await get(`${original(id)}/view`, { range: "bytes=0-3" });
    expect(answer.status).toBe(200);
    expect(Object.fromEntries(answer.headers)).toMatchObject({
      ...SHUT,
      "content-type": "image/jpeg",
      "content-disposition": `inline; filename="${id}.jpg"; filename*=UTF-8''${id}.jpg`,
    });
    expect((await bytesOf(answer)).equals(bytes)).toBe(true);
  });

  it.each(["waiting", "unreadable", "notNeeded"])("is not there while it is %s", async (state) => {
    const { id } = await buildFile(shop, claim, { view_state: state });
    expect((await get(`${original(id)}/view`)).status).toBe(404);
  });
});
