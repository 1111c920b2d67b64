import { z } from "zod";
import { BOOK_SHEETS } from "./rule-view";

/** Which sheet of whose Rule book, for which family where a sheet has several; what the address does not say is the first. */
export const bookQuery = z.object({
  of: z
    .union([z.uuid(), z.literal("")])
    .default("")
    .catch(""),
  family: z.string().max(40).default("").catch(""),
  sheet: z.enum(BOOK_SHEETS).default("terms").catch("terms"),
});
