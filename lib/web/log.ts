import "server-only";
import pino, { type DestinationStream, type LoggerOptions } from "pino";

const OPTIONS: LoggerOptions = {
  level: process.env.LOG_LEVEL ?? "info",
  base: { process: process.env.PROCESS_NAME ?? "web" },
  timestamp: pino.stdTimeFunctions.isoTime,
  formatters: { level: (label) => ({ level: label }) },
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
