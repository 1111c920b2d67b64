import { randomBytes } from "node:crypto";
import { ask, FROM_OUR_PAGES } from "../../support/http";

type Bytes = Uint8Array<ArrayBuffer>;
export type Form = { readonly contentType: string; readonly pieces: AsyncIterable<Bytes> | Iterable<Bytes> };

type SentFile = {
  /** Exactly as it stands between the quotes of the header. */
  readonly name: string;
  readonly content: Uint8Array | AsyncIterable<Uint8Array> | Iterable<Uint8Array>;
  readonly type?: string;
};

const PIECE_BYTES = 64 * 1024;

/** Bytes with a memory of their own, as a stream of the web hands them on. */
const owned = (bytes: Uint8Array): Bytes => new Uint8Array(bytes);

async function* piecesOf(content: SentFile["content"]): AsyncGenerator<Bytes> {
  if (!(content instanceof Uint8Array)) {
    for await (const piece of content) yield owned(piece);
    return;
  }
  for (let at = 0; at < content.length; at += PIECE_BYTES)
    yield owned(content.subarray(at, at + PIECE_BYTES));
}

/** A form as a browser writes it: the text fields in their order, then the file. */
export function form(fields: Readonly<Record<string, string>>, file?: SentFile, isWhole = true): Form {
  const boundary = `----form${randomBytes(12).toString("hex")}`;
  const text = (lines: readonly string[]) => owned(Buffer.from(lines.join("\r\n"), "utf8"));
  async function* pieces() {
    for (const [name, value] of Object.entries(fields))
      yield text([`--${boundary}`, `Content-Disposition: form-data; name="${name}"`, "", value, ""]);
    if (file) {
      const disposition = `Content-Disposition: form-data; name="file"; filename="${file.name}"`;
      const type = `Content-Type: ${file.type ?? "application/octet-stream"}`;
      yield text([`--${boundary}`, disposition, type, "", ""]);
      yield* piecesOf(file.content);
      if (isWhole) yield text(["", ""]);
    }
    if (isWhole) yield text([`--${boundary}--`, ""]);
  }
  return { contentType: `multipart/form-data; boundary=${boundary}`, pieces: pieces() };
}

export type Taken = { bytes: number };

/** A body that hands out one piece when it is asked for one, and counts. */
export function bodyOf({ pieces }: Form, taken: Taken = { bytes: 0 }): ReadableStream<Bytes> {
  const rest = (async function* () {
    yield* pieces;
  })();
  return new ReadableStream<Bytes>(
    {
      async pull(controller) {
        const { value, done } = await rest.next();
        if (done) return controller.close();
        taken.bytes += value.length;
        controller.enqueue(value);
      },
      async cancel() {
        await rest.return(undefined);
      },
    },
    { highWaterMark: 0 },
  );
}

/** Sends a form to a route. */
export const post = (path: string, session: string, sent: Form, taken?: Taken): Promise<Response> =>
  ask("POST", path, {
    session,
    headers: { ...FROM_OUR_PAGES(), "content-type": sent.contentType },
    body: bodyOf(sent, taken),
  });
