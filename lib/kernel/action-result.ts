/** What was typed, by field: given back with a refusal, so that nothing is lost. */
export type Typed = Readonly<Record<string, string | readonly string[]>>;

/** What a form gets back: the value, or the sentences at their fields with everything that was typed. */
export type ActionResult<T = unknown> =
  | { readonly ok: true; readonly value: T }
  | {
      readonly ok: false;
      readonly message?: string;
      readonly fields: Readonly<Record<string, string>>;
      readonly typed: Typed;
    };

/** A server action as a form uses it. */
export type FormAction<T = unknown> = (previous: unknown, form: FormData) => Promise<ActionResult<T>>;
