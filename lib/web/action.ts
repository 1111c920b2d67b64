import "server-only";
import { revalidatePath } from "next/cache";
import { headers } from "next/headers";
import { getTranslations } from "next-intl/server";
import type { z } from "zod";
import type { Actor } from "@/lib/access/actor";
import type { ActionResult, FormAction } from "@/lib/kernel/action-result";
import type { Outcome } from "@/lib/kernel/outcome";
import { formValues } from "./form-values";
import { log } from "./log";
import { isFromOurPages } from "./origin";
import { requireActor } from "./session";
import { wordingFor, type RefusalCode } from "./wording";

type Sentences = { (key: string): string; has(key: string): boolean };

/** A shape names its sentence in its message (`forms` in the message files); one that names none says what any field says. */
const fieldSentences = (error: z.ZodError, t: Sentences): Record<string, string> => {
  const fields: Record<string, string> = {};
  for (const issue of error.issues) {
    const name = issue.path.join(".") || "form";
    fields[name] ??= t.has(issue.message) ? t(issue.message) : t("missing");
  }
  return fields;
};

type After<T> = {
  /** The path to draw anew once the verb has done its work. */
  readonly toPath?: (value: T) => string;
  /** Makes nested input of fields named with dots. Field errors then carry the same dotted names. */
  readonly shapeFields?: (typed: Readonly<Record<string, string | readonly string[]>>) => unknown;
};

/** What every line about an action says: who, for whom, how long; the id is the one in the outbox and the audit. */
const lineOf = ({ requestId, userId, organisationId }: Actor, startedAt: number) => ({
  event: "action",
  requestId,
  userId,
  organisationId,
  durationMs: Math.round(performance.now() - startedAt),
});

/** Does what a person asked for and says in the log that it was done, or why not. */
export async function told<T, Code extends string>(
  actor: Actor,
  verb: string,
  act: () => Promise<Outcome<T, Code>>,
): Promise<Outcome<T, Code>> {
  const startedAt = performance.now();
  try {
    const outcome = await act();
    log.info({ ...lineOf(actor, startedAt), verb, refused: outcome.ok ? undefined : outcome.code });
    return outcome;
  } catch (fault) {
    log.error({
      ...lineOf(actor, startedAt),
      event: "fault",
      verb,
      fault: fault instanceof Error ? fault.stack : String(fault),
    });
    throw fault;
  }
}

/** Every server action is one call of this: origin, session, shape, the domain's verb, the wording. */
export function action<Shape extends z.ZodType, T>(
  shape: Shape,
  verb: (actor: Actor, input: z.infer<Shape>) => Promise<Outcome<T, RefusalCode>>,
  after: ((value: T) => string) | After<T> = {},
): FormAction<T> {
  const { toPath, shapeFields } =
    typeof after === "function" ? { toPath: after, shapeFields: undefined } : after;
  return async (_previous: unknown, form: FormData): Promise<ActionResult<T>> => {
    const typed = formValues(form);
    const actor = await requireActor();
    const problems = await getTranslations({ locale: actor.locale, namespace: "problems" });
    if (!isFromOurPages(await headers()))
      return { ok: false, message: problems("crossSite"), fields: {}, typed };

    const input = shape.safeParse(shapeFields ? shapeFields(typed) : typed);
    if (!input.success) {
      const t: Sentences = await getTranslations({ locale: actor.locale, namespace: "forms" });
      return { ok: false, fields: fieldSentences(input.error, t), typed };
    }
    let outcome: Outcome<T, RefusalCode>;
    try {
      outcome = await told(actor, verb.name, () => verb(actor, input.data));
    } catch {
      return { ok: false, message: problems("fault", { id: actor.requestId }), fields: {}, typed };
    }
    if (!outcome.ok) {
      const message = await wordingFor(outcome, actor.locale);
      return outcome.field
        ? { ok: false, fields: { [outcome.field]: message }, typed }
        : { ok: false, message, fields: {}, typed };
    }
    if (toPath) revalidatePath(toPath(outcome.value));
    return outcome;
  };
}

/** Stops a form action that did not come from a page of ours; nothing has been read or written then. */
export async function guardOrigin(): Promise<void> {
  if (!isFromOurPages(await headers())) throw new Error("a form action came from another site");
}
