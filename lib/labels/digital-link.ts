import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { element, isIdentifier, type Element, type LabelFault } from "./application-identifiers";

type Read = Outcome<readonly Element[], LabelFault>;

// The key qualifiers of a GTIN in the only order they may stand in; 235 stands alone.
const QUALIFIERS = ["22", "10", "21"];

/**
 * The elements of a GS1 Digital Link (`https://host/01/{GTIN-14}[/22/..][/10/..][/21/..][?17=..]`). Rules as in GS1's
 * own syntax engine: 14 digits in full, qualifiers in order, no slash at the end, percent escapes decoded, unknown
 * words in the query passed over, unknown numbers and empty values refused. Any other address is refused too.
 */
export function parseDigitalLink(text: string): Read {
  const match = /^(?:https?|HTTPS?):\/\/[^/?#\s]+(\/[^?#]*)(?:\?([^#]*))?(?:#.*)?$/.exec(text);
  if (!match) return refuse("labelUnreadable");
  const inPath = pathElements((match[1] ?? "").split("/").slice(1));
  if (!inPath.ok) return inPath;
  const inQuery = queryElements(match[2] ?? "");
  return inQuery.ok ? ok([...inPath.value, ...inQuery.value]) : inQuery;
}

/** Looks for the key from the right: what stands before it is the site's own path. */
function pathElements(segments: readonly string[]): Read {
  let start = segments.lastIndexOf("01");
  let refusal: Read = refuse("labelUnreadable");
  while (start >= 0) {
    const read = pairs(segments.slice(start));
    if (read.ok) return read;
    refusal = read;
    start = start === 0 ? -1 : segments.lastIndexOf("01", start - 1);
  }
  return refusal;
}

function pairs(segments: readonly string[]): Read {
  if (segments.length % 2 === 1) return refuse("labelUnreadable");
  const elements: Element[] = [];
  for (let place = 0; place < segments.length; place += 2) {
    const read = elementOf(segments[place] ?? "", segments[place + 1] ?? "");
    if (!read.ok) return read;
    elements.push(read.value);
  }
  return qualifiersInOrder(elements.slice(1).map(({ ai }) => ai)) ? ok(elements) : refuse("labelUnreadable");
}

function qualifiersInOrder(identifiers: readonly string[]): boolean {
  if (identifiers.length === 1 && identifiers[0] === "235") return true;
  const places = identifiers.map((ai) => QUALIFIERS.indexOf(ai));
  return places.every((place, index) => place >= 0 && (index === 0 || place > (places[index - 1] ?? -1)));
}

function queryElements(query: string): Read {
  const elements: Element[] = [];
  for (const part of query.split(/[&;]/)) {
    const [, name, value = ""] = /^([^=]*)=(.*)$/.exec(part) ?? [];
    if (name === undefined || !/^\d+$/.test(name)) continue;
    // A plus means a space in a query, and no value of a label holds a space.
    const read = elementOf(name, value.replaceAll("+", " "));
    if (!read.ok) return read;
    elements.push(read.value);
  }
  return ok(elements);
}

function elementOf(ai: string, escaped: string): Outcome<Element, LabelFault> {
  if (!isIdentifier(ai)) return refuse("identifierUnknown", { identifier: ai.slice(0, 4) });
  try {
    return element(ai, decodeURIComponent(escaped));
  } catch {
    return refuse("valueWrong", { identifier: ai });
  }
}
