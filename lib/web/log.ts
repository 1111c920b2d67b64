import "server-only";
import pino, { type DestinationStream, type LoggerOptions } from "pino";

// JSON leaves these as they are: marks that some screens take for a new line, an order to the terminal or another
// direction of writing. They can only stand inside a text, where their escape is the same text.
const TREACHEROUS = /[\u007f-\u009f\u061c\u200e\u200f\u2028-\u202e\u2066-\u2069]/gu;
const escaped = (sign: string) => `\\u${sign.charCodeAt(0).toString(16).padStart(4, "0")}`;

const OPTIONS: LoggerOptions = {
  level: process.env.LOG_LEVEL ?? "info",
  base: { process: process.env.PROCESS_NAME ?? "web" },
  timestamp: pino.stdTimeFunctions.isoTime,
  formatters: { level: (label) => ({ level: label }) },
  hooks: { streamWrite: (line) => line.replace(TREACHEROUS, escaped) },
  redact: [
    "password",
    "*.password",
    "token",
    "*.token",
    "cookie",
    "*.cookie",
    "authorization",
    "*.authorization",
  ],
};

/** A log into a stream; without one, into the output of the process. */
export const logTo = (stream?: DestinationStream) => (stream ? pino(OPTIONS, stream) : pino(OPTIONS));

/** One JSON line an event, in UTC. What a person typed is a value in it, so it can never forge a line of its own. */
export const log = logTo();
