import type { z } from "zod";
import { creditShape } from "./credit-shape";
import { evidenceListShape } from "./evidence-list-shape";
import { limitsShape } from "./limits-shape";
import { serviceLevelsShape } from "./service-levels-shape";
import { termsShape } from "./terms-shape";

/** The shape of a version's body by its kind: a new kind of rule is one file and one line here. */
export const RULE_SHAPES = {
  terms: termsShape,
  evidenceList: evidenceListShape,
  limits: limitsShape,
  serviceLevels: serviceLevelsShape,
  credit: creditShape,
} as const;

export type RuleKind = keyof typeof RULE_SHAPES;
export type RuleBody<Kind extends RuleKind> = z.infer<(typeof RULE_SHAPES)[Kind]>;

const SHAPE_OF: { readonly [Kind in RuleKind]: z.ZodType<RuleBody<Kind>> } = RULE_SHAPES;

/** The body of a stored version, checked. Throws where it does not fit: a stored body was checked before it was kept. */
export const ruleBody = <Kind extends RuleKind>(kind: Kind, body: unknown): RuleBody<Kind> =>
  SHAPE_OF[kind].parse(body);
