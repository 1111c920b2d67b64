import { storableText } from "@/lib/kernel/storable-text";

/** The fields of a form as text; a name ending in `[]` is a list. Files are not read here: they go to a route. */
export function formValues(form: FormData): Record<string, string | string[]> {
  // One walk, and a map: a form of many thousand fields made to hurt costs no more than reading it.
  const values = new Map<string, string | string[]>();
  for (const [name, value] of form) {
    if (name.startsWith("$ACTION")) continue;
    const isList = name.endsWith("[]");
    const key = isList ? name.slice(0, -2) : name;
    const earlier = values.get(key);
    const list = Array.isArray(earlier) ? earlier : [];
    if (typeof value === "string" && isList) list.push(storableText(value));
    if (isList) values.set(key, list);
    else values.set(key, typeof value === "string" ? storableText(value) : (earlier ?? ""));
  }
  return Object.fromEntries(values);
}
