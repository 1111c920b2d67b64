import { storableText } from "@/lib/kernel/storable-text";

/** The fields of a form as text; a name ending in `[]` is a list. Files are not read here: they go to a route. */
export function formValues(form: FormData): Record<string, string | string[]> {
  const values: Record<string, string | string[]> = {};
  for (const name of new Set(form.keys())) {
    if (name.startsWith("$ACTION")) continue;
    const texts = form
      .getAll(name)
      .flatMap((value) => (typeof value === "string" ? [storableText(value)] : []));
    if (name.endsWith("[]")) values[name.slice(0, -2)] = texts;
    else values[name] = texts.at(-1) ?? "";
  }
  return values;
}
