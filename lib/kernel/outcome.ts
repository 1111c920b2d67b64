/**
 * An expected "no" is a value, never an exception. `Refusal.code` names a sentence in `messages/*.json`
 * under `refusals`; `detail` fills its placeholders; `field` names the input it belongs to, if any.
 */
export type Refusal<Code extends string = string> = {
  readonly ok: false;
  readonly code: Code;
  readonly detail: Readonly<Record<string, string | number>>;
  readonly field?: string;
};

export type Outcome<T, Code extends string = string> =
  { readonly ok: true; readonly value: T } | Refusal<Code>;

export const ok = <T>(value: T): { readonly ok: true; readonly value: T } => ({ ok: true, value });

export const refuse = <Code extends string>(
  code: Code,
  detail: Refusal["detail"] = {},
  field?: string,
): Refusal<Code> => (field === undefined ? { ok: false, code, detail } : { ok: false, code, detail, field });
