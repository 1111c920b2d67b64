/**
 * One step of a computation that explains itself. `rule` names a sentence in `messages/*.json` under `steps`;
 * `input` fills its placeholders (plain values only, units in the names); `source` cites the Rule book
 * version or the publication the rule comes from. Pages, PDFs, mails and the API print the same steps.
 */
export type Step = {
  readonly rule: string;
  readonly input: Readonly<Record<string, string | number>>;
  readonly result: string;
  readonly source?: string;
};

export const step = (rule: string, result: string, input: Step["input"] = {}, source?: string): Step =>
  source === undefined ? { rule, input, result } : { rule, input, result, source };
