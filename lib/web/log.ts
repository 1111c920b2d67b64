import "server-only";
import pino from "pino";

/** One JSON line an event, in UTC. What a person typed is a value in it, so it can never forge a line of its own. */
export const log = pino({
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
});
