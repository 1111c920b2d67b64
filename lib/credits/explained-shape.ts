import { z } from "zod";
import type { ExplainedCredit } from "./explained";
import { stepShape } from "./frozen-credit-shape";

/** A credit in short, read back from where it waited. */
export const explainedCredit: z.ZodType<ExplainedCredit> = z.object({
  total: z.string(),
  steps: z.array(stepShape),
});
