import { ACCESS } from "./access.mjs";
import { FIGURES } from "./figures.mjs";
import { FILES } from "./files.mjs";
import { RECORDS } from "./records.mjs";
import { RETURNS } from "./returns.mjs";

/** Every defence that is taken away once, with the tests that must notice. */
export const MUTATIONS = [...ACCESS, ...RECORDS, ...RETURNS, ...FILES, ...FIGURES];
