import "server-only";
import { createHash, randomBytes } from "node:crypto";

/** The SHA-256 of a text, in hexadecimal: how secrets, facts and requests are known again without being kept. */
export const sha256Of = (text: string): string => createHash("sha256").update(text).digest("hex");

/** A secret for a link, used once; only its hash is stored. */
export const newToken = (): string => randomBytes(32).toString("base64url");
