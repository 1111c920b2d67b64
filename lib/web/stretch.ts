// The test locale: English, two fifths longer, to see what a wordier language does to a screen.

const STRETCH = 0.4;
const PADDING = ["with", "wordier", "phrasing", "appended", "for", "trial"];
const HAS_BRANCHES = /^\{\s*\w+\s*,\s*(plural|select|selectordinal)\s*,/;
// A doubled apostrophe is one; one before a special sign quotes up to the next.
const QUOTED = /^(?:''|'(?=[{}<>#])(?:[^']|'')*'?)/;
const TAG = /^<\/?[\w-]+\s*\/?>/;

/**
 * An ICU message, each of its texts at least 40 % longer: words without accents follow it, branch by branch.
 * Placeholders, branches and tags stay as they are, and so does a message that has no words of its own.
 */
export function stretchMessage(message: string): string {
  let stretched = "";
  let words = "";
  for (let rest = message; rest !== "";) {
    const part = firstPart(rest);
    rest = rest.slice(part.length);
    stretched += HAS_BRANCHES.test(part) ? stretchBranches(part) : part;
    if (!part.startsWith("{") && !TAG.test(part)) words += part;
  }
  return /\p{L}/u.test(words) ? stretched + padding(words.length) : stretched;
}

/** The argument in braces, the tag, the quoted piece or the plain text that a message begins with. */
function firstPart(message: string): string {
  if (message.startsWith("{")) return braced(message);
  const [part] = QUOTED.exec(message) ?? TAG.exec(message) ?? /^[^{<']+/.exec(message) ?? [message.charAt(0)];
  return part;
}

/** From an opening brace to the one that closes it. */
function braced(text: string): string {
  let depth = 0;
  for (let at = 0; at < text.length; at += 1) {
    const rest = text.slice(at);
    const [quoted] = QUOTED.exec(rest) ?? [];
    if (quoted !== undefined) at += quoted.length - 1;
    else if (rest.startsWith("{")) depth += 1;
    else if (rest.startsWith("}")) depth -= 1;
    if (depth === 0) return text.slice(0, at + 1);
  }
  return text;
}

/** A plural or a select with the text of each branch stretched. */
function stretchBranches(argument: string): string {
  let stretched = "{";
  for (let rest = argument.slice(1); rest !== "";) {
    const branch = rest.startsWith("{") ? braced(rest) : "";
    stretched += branch === "" ? rest.charAt(0) : `{${stretchMessage(branch.slice(1, -1))}}`;
    rest = rest.slice(branch.length || 1);
  }
  return stretched;
}

function padding(length: number): string {
  let text = "";
  for (let next = 0; text.length < length * STRETCH; next += 1) text += ` ${PADDING[next % PADDING.length]}`;
  return text;
}
