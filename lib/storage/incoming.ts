import "server-only";
import type { IncomingMessage } from "node:http";
import { Readable, Transform } from "node:stream";
import { ReadableStream as WebStream } from "node:stream/web";
import { setImmediate as nextTurn } from "node:timers/promises";

const SILENCE_MS = 30_000;
const BACKLOG_BYTES = 256 * 1024;

/** What the parser uses of a request. */
export type Incoming = Readable & Pick<IncomingMessage, "headers" | "method">;

/** The request as the parser wants it: without a length it would take the body for empty. */
export function incoming(request: Request, watched: Readable): Incoming {
  const headers: Record<string, string> = Object.fromEntries(request.headers);
  if (!headers["content-length"] && !headers["transfer-encoding"]) headers["transfer-encoding"] = "chunked";
  return Object.assign(watched, { headers, method: request.method });
}

type Watched = { readonly body: Readable; readonly halt: () => void; readonly letGo: () => void };

/**
 * A request's body, piece by piece: the parser itself does not wait, so the next piece is given to it when there is
 * room. Ends a request that sends nothing for too long. Halted, nothing more is read; let go, what still comes is thrown
 * away as it comes: to cancel the stream would cut the line before the answer has gone out.
 */
export function watch(request: Request, room: () => Promise<void>): Watched {
  const source = request.body instanceof WebStream ? Readable.fromWeb(request.body) : Readable.from([]);
  const body = new Transform({
    highWaterMark: BACKLOG_BYTES,
    transform: (piece: Buffer, _encoding, done) => {
      nextTurn()
        .then(room)
        .then(() => done(null, piece), done);
    },
  });
  let timer: NodeJS.Timeout | undefined;
  let isHalted = false;
  const rearm = () => {
    clearTimeout(timer);
    if (!isHalted) timer = setTimeout(() => body.destroy(new Error("silence")), SILENCE_MS);
  };
  const halt = () => {
    isHalted = true;
    clearTimeout(timer);
    source.unpipe(body);
    source.pause();
    body.destroy();
  };
  const letGo = () => {
    halt();
    source.resume();
  };
  rearm();
  source
    .on("data", rearm)
    .on("end", () => clearTimeout(timer))
    .on("error", (fault) => body.destroy(fault));
  source.pipe(body);
  return { body, halt, letGo };
}
