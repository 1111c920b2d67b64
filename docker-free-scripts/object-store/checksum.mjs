import { createHash } from "node:crypto";
import * as zlib from "node:zlib";

// Node 20 may lack zlib.crc32; the table form is the same polynomial (IEEE 802.3).
const TABLE = Uint32Array.from({ length: 256 }, (_, n) => {
  let c = n;
  for (let k = 0; k < 8; k += 1) c = c & 1 ? 0xedb88320 ^ (c >>> 1) : c >>> 1;
  return c >>> 0;
});

const tableCrc = (data, from) => {
  let c = ~from >>> 0;
  for (const byte of data) c = TABLE[(c ^ byte) & 0xff] ^ (c >>> 8);
  return ~c >>> 0;
};

const step = typeof zlib.crc32 === "function" ? (data, from) => zlib.crc32(data, from) : tableCrc;

class Crc32 {
  value = 0;
  update(data) {
    this.value = step(data, this.value);
    return this;
  }
  digest() {
    const bytes = Buffer.alloc(4);
    bytes.writeUInt32BE(this.value);
    return bytes;
  }
}

/** Checksums this store knows, by the header that carries them; a header it does not know is refused, never ignored. */
const ALGORITHMS = {
  "x-amz-checksum-crc32": () => new Crc32(),
  "x-amz-checksum-sha256": () => createHash("sha256"),
  "x-amz-checksum-sha1": () => createHash("sha1"),
  "content-md5": () => createHash("md5"),
};

/** Running checksums of a body: MD5 for the entity tag, SHA-256 for the signed payload, and whatever was announced. */
export class Checksums {
  constructor(names) {
    this.md5 = createHash("md5");
    this.sha256 = createHash("sha256");
    this.named = new Map(names.map((name) => [name, ALGORITHMS[name]()]));
  }

  update(data) {
    this.md5.update(data);
    this.sha256.update(data);
    for (const sum of this.named.values()) sum.update(data);
  }

  digest() {
    const named = new Map([...this.named].map(([name, sum]) => [name, sum.digest().toString("base64")]));
    return { md5: this.md5.digest("hex"), sha256: this.sha256.digest("hex"), named };
  }
}

export const isKnownChecksum = (name) => name in ALGORITHMS;
export const isChecksumHeader = (name) =>
  name === "content-md5" ||
  (name.startsWith("x-amz-checksum-") &&
    !["x-amz-checksum-algorithm", "x-amz-checksum-mode", "x-amz-checksum-type"].includes(name));
