import { randomUUID } from "node:crypto";
import { createReadStream } from "node:fs";
import { link, mkdir, open, readdir, readFile, rename, rm, stat } from "node:fs/promises";
import { dirname, join } from "node:path";
import { StoreError } from "./body.mjs";

// A key is one file name: encoded so that it can never leave its bucket's folder.
const fileOf = (key) => Buffer.from(key, "utf8").toString("base64url");
const keyOf = (file) => Buffer.from(file, "base64url").toString("utf8");

const isMissing = (fault) => fault.code === "ENOENT";

/** Objects on disk: bytes and what is known of them in two files, put in place by rename after they are flushed. */
export class Disk {
  constructor(root) {
    this.root = root;
  }

  bucket = (name) => join(this.root, name);
  data = (bucket, key) => join(this.bucket(bucket), "data", fileOf(key));
  meta = (bucket, key) => join(this.bucket(bucket), "meta", `${fileOf(key)}.json`);

  async makeBucket(name) {
    if (!/^[a-z0-9][a-z0-9.-]{2,62}$/.test(name)) throw new StoreError("InvalidBucketName", 400);
    for (const folder of ["data", "meta", "temp", "parts"])
      await mkdir(join(this.bucket(name), folder), { recursive: true });
  }

  hasBucket = (name) =>
    stat(join(this.bucket(name), "data")).then(
      () => true,
      () => false,
    );

  /** A new file to write into; `keep` flushes and names it, `drop` forgets it. */
  async sink(bucket) {
    const path = join(this.bucket(bucket), "temp", randomUUID());
    const file = await open(path, "wx");
    return {
      path,
      write: (data) => file.write(data),
      flush: async () => {
        await file.sync();
        await file.close();
      },
      drop: async () => {
        await file.close().catch(() => undefined);
        await rm(path, { force: true });
      },
    };
  }

  /** Puts a flushed file in its place. `onlyNew` refuses to replace what is there, however many ask at once. */
  async keep(bucket, key, path, meta, onlyNew) {
    const place = this.data(bucket, key);
    await mkdir(dirname(place), { recursive: true });
    const held = await this.head(bucket, key).catch(() => null);
    if (held?.retainUntil && new Date(held.retainUntil) > new Date())
      throw new StoreError("AccessDenied", 403, "the object is locked");
    if (onlyNew) {
      await link(path, place).catch((fault) => {
        throw fault.code === "EEXIST" ? new StoreError("PreconditionFailed", 412) : fault;
      });
      await rm(path);
    } else await rename(path, place);
    const temporary = `${this.meta(bucket, key)}.${randomUUID()}`;
    const file = await open(temporary, "wx");
    await file.write(JSON.stringify(meta));
    await file.sync();
    await file.close();
    await rename(temporary, this.meta(bucket, key));
  }

  async head(bucket, key) {
    try {
      return JSON.parse(await readFile(this.meta(bucket, key), "utf8"));
    } catch (fault) {
      throw isMissing(fault) ? new StoreError("NoSuchKey", 404) : fault;
    }
  }

  read = (bucket, key, range) => createReadStream(this.data(bucket, key), range ?? {});

  async remove(bucket, key) {
    const meta = await this.head(bucket, key).catch(() => null);
    if (meta?.retainUntil && new Date(meta.retainUntil) > new Date())
      throw new StoreError("AccessDenied", 403, "the object is locked");
    await rm(this.data(bucket, key), { force: true });
    await rm(this.meta(bucket, key), { force: true });
  }

  /** Keys with a prefix, in order. */
  async list(bucket, prefix) {
    const files = await readdir(join(this.bucket(bucket), "meta"));
    return files
      .filter((name) => name.endsWith(".json"))
      .map((name) => keyOf(name.slice(0, -5)))
      .filter((key) => key.startsWith(prefix))
      .sort();
  }

  parts = (bucket, upload) => join(this.bucket(bucket), "parts", upload);

  async startUpload(bucket, key, meta) {
    const upload = randomUUID();
    await mkdir(this.parts(bucket, upload), { recursive: true });
    const file = await open(join(this.parts(bucket, upload), "upload.json"), "wx");
    await file.write(JSON.stringify({ key, meta }));
    await file.close();
    return upload;
  }

  /** What is known of an upload that was begun for this key and has not ended. */
  async upload(bucket, upload, key) {
    if (!/^[0-9a-f-]{36}$/.test(upload)) throw new StoreError("NoSuchUpload", 404);
    const text = await readFile(join(this.parts(bucket, upload), "upload.json"), "utf8").catch(() => null);
    const begun = text === null ? null : JSON.parse(text);
    if (begun?.key !== key) throw new StoreError("NoSuchUpload", 404);
    return begun;
  }

  keepPart = async (bucket, upload, number, path, meta) => {
    await rename(path, join(this.parts(bucket, upload), `${number}.part`));
    const file = await open(join(this.parts(bucket, upload), `${number}.json`), "w");
    await file.write(JSON.stringify(meta));
    await file.close();
  };

  partMeta = async (bucket, upload, number) =>
    JSON.parse(
      await readFile(join(this.parts(bucket, upload), `${number}.json`), "utf8").catch(() => {
        throw new StoreError("InvalidPart", 400);
      }),
    );

  readPart = (bucket, upload, number) => createReadStream(join(this.parts(bucket, upload), `${number}.part`));

  dropUpload = (bucket, upload) => rm(this.parts(bucket, upload), { recursive: true, force: true });

  listUploads = (bucket) => readdir(join(this.bucket(bucket), "parts"));
}
