import { z } from "zod";
import { VERDICT_OUTCOMES } from "../lifecycle";
import { claimNumberInput } from "../schema";
import { REASONS, type Cause } from "../verdict";

const REASON_CODES = Object.values(REASONS).flat();
const share = z.string().trim().max(20).default("");
const SHARES = {
  maker: share,
  carrier: share,
  fitter: share,
  user: share,
  wear: share,
} satisfies Record<Cause, typeof share>;

const lineVerdict = z.strictObject({
  lineId: z.uuid(),
  outcome: z.enum(VERDICT_OUTCOMES, "outcomeMissing"),
  shares: z.strictObject(SHARES),
  reasonCode: z.enum(REASON_CODES, "reasonCodeMissing"),
  reason: z.string().trim().min(1, "missing").max(4000, "tooLong"),
});

/** A verdict as the assessor gives it: the revision that was on the screen, each line, and the letter. */
export const decideInput = z.strictObject({
  number: claimNumberInput,
  revision: z.coerce.number().int().min(1),
  // Fields named `lines.0.outcome` come as a record by place.
  lines: z
    .record(z.string().regex(/^[0-7]$/u), lineVerdict)
    .transform((byPlace) =>
      Object.entries(byPlace)
        .sort(([a], [b]) => Number(a) - Number(b))
        .map(([, line]) => line),
    )
    .refine((lines) => lines.length > 0),
  letter: z.string().trim().min(1, "missing").max(4000, "tooLong"),
  /** Why no finding is needed; empty where every part was examined. */
  returnWaivedReason: z.string().trim().max(1000, "tooLong").default(""),
});

export type DecideInput = z.infer<typeof decideInput>;
