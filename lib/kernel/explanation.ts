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

/** A step whose rule rests on nothing that has to be named. */
export const step = (rule: string, result: string, input: Step["input"] = {}): Step => ({
  rule,
  input,
  result,
});

/** The same step with what its rule comes from; as it was where nothing is named. */
export const citing = (source: string | undefined, uncited: Step): Step =>
  source === undefined ? uncited : { ...uncited, source };
