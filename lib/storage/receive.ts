import "server-only";
import { createHash, randomUUID, type Hash } from "node:crypto";
import { Writable } from "node:stream";
import formidable from "formidable";
import { mostBytes, type FileKind } from "@/lib/kernel/limits";
import { ok, refuse, type Outcome, type Refusal } from "@/lib/kernel/outcome";
import { typeOf, type MediaType, type TypeRefusal } from "./file-type";
import { incoming, watch, type Incoming } from "./incoming";
import { quarantineKey } from "./keys";
import { remove } from "./objects";
import { PartUpload } from "./part-upload";

/** Bytes that arrived whole, still in quarantine under a key of their own. */
export type Received = {
  readonly quarantine: string;
  readonly name: string;
  readonly sizeBytes: number;
  readonly sha256: string;
  readonly mediaType: MediaType;
};

export type ReceiveRefusal =
  TypeRefusal | "fileMissing" | "fileEmpty" | "fileTooBig" | "uploadBroken" | "uploadTooMany";

type Decide<Code extends string> = (
  fields: Readonly<Record<string, string>>,
) => Promise<Outcome<FileKind, Code>>;

const HEAD_BYTES = 8192;
const BACKLOG_BYTES = 256 * 1024;
const MOST_AT_ONCE = 8;

let running = 0;

/** A name for people to read: no path, no control or direction marks, at most 200 characters. */
const readableName = (name: string): string =>
  (name.split(/[\\/]/u).at(-1) ?? "")
    .replace(/[\p{Cc}\p{Cf}]/gu, "")
    .trim()
    .slice(-200) || "file";

/** Takes a file as it comes in: its head decides the type, everything is hashed, and it goes on to the store at once. */
class Intake extends Writable {
  readonly key = quarantineKey(randomUUID());
  private readonly hash: Hash = createHash("sha256");
  private readonly upload = new PartUpload(this.key);
  private head = Buffer.alloc(0);
  type: Outcome<MediaType, TypeRefusal> | undefined;
  sizeBytes = 0;
  private settle: { whole: () => void; broken: (fault: unknown) => void } | undefined;
  /** Settles when the last byte is kept, or with the reason why it is not: the parser does not wait for that. */
  readonly whole = new Promise<void>((resolve, reject) => {
    this.settle = { whole: resolve, broken: reject };
  });

  constructor(
    readonly name: string,
    private readonly kind: FileKind,
  ) {
    super({ highWaterMark: BACKLOG_BYTES });
    this.whole.catch(() => undefined);
    this.once("error", (fault) => this.settle?.broken(fault));
    this.once("close", () => this.settle?.broken(new Error("closed early")));
  }

  private async decide(): Promise<void> {
    this.type = await typeOf(this.head, this.name, this.kind);
    if (!this.type.ok) throw new Refused(this.type);
    await this.upload.write(this.head);
  }

  private async take(data: Buffer): Promise<void> {
    this.sizeBytes += data.length;
    const most = mostBytes(this.kind);
    if (this.sizeBytes > most)
      throw new Refused(refuse("fileTooBig", { name: this.name, limitMb: most / 1e6 }));
    this.hash.update(data);
    if (this.type) return this.upload.write(data);
    this.head = Buffer.concat([this.head, data]);
    return this.head.length >= HEAD_BYTES ? this.decide() : undefined;
  }

  override _write(data: Buffer, _encoding: string, done: (fault?: Error | null) => void): void {
    this.take(data).then(() => done(), done);
  }

  private async finish(): Promise<void> {
    if (this.sizeBytes === 0) throw new Refused(refuse("fileEmpty", { name: this.name }));
    if (!this.type) await this.decide();
    await this.upload.end();
  }

  override _final(done: (fault?: Error | null) => void): void {
    this.finish().then(() => {
      this.settle?.whole();
      done();
    }, done);
  }

  /** Settles when there is room for more, or nothing more will be taken. */
  async room(): Promise<void> {
    if (!this.writableNeedDrain || this.destroyed) return;
    await new Promise<void>((resolve) => {
      for (const event of ["drain", "close", "error"]) this.once(event, () => resolve());
    });
  }

  get sha256(): string {
    return this.hash.digest("hex");
  }

  /** Leaves nothing in the store, whatever had arrived. */
  async drop(): Promise<void> {
    await this.upload.abort().catch(() => undefined);
    await remove(this.key).catch(() => undefined);
  }
}

/** A refusal found in the middle of a stream. */
class Refused extends Error {
  constructor(readonly refusal: Refusal<ReceiveRefusal>) {
    super(refusal.code);
  }
}

/** Ends the parser where the decision was no; what it was is kept beside it, with its own code. */
class NotWanted extends Error {}

type Parser = { parse(request: Incoming): Promise<unknown> };
type PartHook = { onPart(part: formidable.Part): void | Promise<void> };

const refusalOf = (fault: unknown, intake: Intake | undefined): Refusal<ReceiveRefusal> =>
  fault instanceof Refused ? fault.refusal : refuse("uploadBroken", { name: intake?.name ?? "" });

/**
 * Receives one file of a form while it streams, memory flat whatever its size. The text fields come first; `decide` says
 * from them what kind of file is expected, or refuses before a byte of it is kept. What is refused leaves nothing behind.
 */
export async function receiveFile<Code extends string>(
  request: Request,
  decide: Decide<Code>,
): Promise<Outcome<Received & { fields: Readonly<Record<string, string>> }, Code | ReceiveRefusal>> {
  if (running >= MOST_AT_ONCE) return refuse("uploadTooMany");
  running += 1;
  try {
    return await receive(request, decide);
  } finally {
    running -= 1;
  }
}

/** The parser, with our intake in place of its temporary files and our decision before a file's first byte. */
function parserFor<Code extends string>(
  fields: Record<string, string>,
  decide: Decide<Code>,
  hooks: {
    onIntake: (intake: Intake) => void;
    onRefusal: (refusal: Refusal<Code>) => void;
    onFault: (fault: unknown) => null;
    onHeld: (held: Promise<void>) => void;
  },
): Parser {
  let kind: FileKind = "photo";
  const form = formidable({
    maxFiles: 1,
    maxFields: 20,
    maxFieldsSize: 64 * 1024,
    maxFileSize: 30_000_000,
    maxTotalFileSize: 30_000_000,
    allowEmptyFiles: true,
    minFileSize: 0,
    fileWriteStreamHandler: (file) => {
      const intake = new Intake(readableName(nameOf(file)), kind);
      hooks.onIntake(intake);
      return intake;
    },
  });
  const usual = form.onPart.bind(form);
  let isDecided = false;
  form.on("field", (name, value) => {
    // What comes behind the file comes too late: the file was taken for what the fields before it say.
    if (!isDecided) fields[name] = value;
  });
  const begin = async (part: formidable.Part): Promise<void> => {
    if (typeof part.originalFilename === "string") {
      isDecided = true;
      const decided = await decide(fields).catch((fault: unknown) => hooks.onFault(fault));
      if (!decided?.ok) {
        if (decided) hooks.onRefusal(decided);
        form.emit("error", new NotWanted(decided?.code ?? "fault"));
        return;
      }
      kind = decided.value;
    }
    await usual(part);
  };
  // Parts come one after the other, and the next waits for this: the fields before the file say what it may be.
  const hooked: PartHook = form;
  hooked.onPart = (part) => {
    const begun = begin(part);
    hooks.onHeld(begun.catch(() => undefined));
    return begun;
  };
  return form;
}

async function receive<Code extends string>(
  request: Request,
  decide: Decide<Code>,
): Promise<Outcome<Received & { fields: Readonly<Record<string, string>> }, Code | ReceiveRefusal>> {
  const fields: Record<string, string> = {};
  const intakes: Intake[] = [];
  let held: Promise<void> = Promise.resolve();
  const { body, halt, letGo } = watch(request, async () => {
    await held;
    await intakes.at(-1)?.room();
  });
  const refusals: Refusal<Code>[] = [];
  const faults: unknown[] = [];
  const hooks = {
    onIntake: (intake: Intake) => void intakes.push(intake),
    onRefusal: (refusal: Refusal<Code>) => void refusals.push(refusal),
    onFault: (fault: unknown) => {
      faults.push(fault);
      return null;
    },
    onHeld: (until: Promise<void>) => {
      held = until;
    },
  };
  try {
    await parserFor(fields, decide, hooks).parse(incoming(request, body));
    const [intake] = intakes;
    await intake?.whole;
    if (!intake?.type?.ok) return refuse("fileMissing");
    const { key: quarantine, name, sizeBytes, sha256 } = intake;
    return ok({ quarantine, name, sizeBytes, sha256, mediaType: intake.type.value, fields });
  } catch (fault) {
    halt();
    for (const intake of intakes) await intake.drop();
    // A fault of ours is no refusal: it goes up as it is.
    if (faults.length > 0) throw faults[0];
    const [refused] = refusals;
    return fault instanceof NotWanted && refused ? refused : refusalOf(fault, intakes[0]);
  } finally {
    letGo();
  }
}

const nameOf = (file: unknown): string =>
  typeof file === "object" &&
  file !== null &&
  "originalFilename" in file &&
  typeof file.originalFilename === "string"
    ? file.originalFilename
    : "";
