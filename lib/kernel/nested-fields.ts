type Tree = { [key: string]: string | readonly string[] | Tree };

const isBranch = (value: Tree[string] | undefined): value is Tree =>
  typeof value === "object" && !Array.isArray(value);

// Names come from a form and so from anybody: these would reach into every object there is.
const FORBIDDEN = new Set(["__proto__", "constructor", "prototype"]);

function place(tree: Tree, path: readonly string[], value: string | readonly string[]): void {
  const [head, ...rest] = path;
  if (head === undefined || FORBIDDEN.has(head)) return;
  if (rest.length === 0) {
    tree[head] = value;
    return;
  }
  const next = tree[head];
  const branch: Tree = isBranch(next) ? next : {};
  tree[head] = branch;
  place(branch, rest, value);
}

/**
 * Fields named with dots as nested objects: `lines.0.fittedOn`, `readings.coilResistance.raw`. The same in the browser
 * and on the server. What comes out is anybody's text: check it against a shape.
 */
export function nestedFields(fields: Readonly<Record<string, string | readonly string[]>>): unknown {
  const tree: Tree = {};
  for (const [name, value] of Object.entries(fields)) place(tree, name.split("."), value);
  return tree;
}
