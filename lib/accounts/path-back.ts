// A base that no address of ours can have: what resolves to another origin is not one of our pages.
const HERE = "https://here.invalid";

/**
 * The page a form goes back to, as a path of ours, or null. Only what begins with one slash counts; the parse catches
 * what browsers read as another site (`//`, `/\`, a line end in between).
 */
export function pathBack(asked: string | undefined): `/${string}` | null {
  if (!asked?.startsWith("/") || asked.startsWith("//") || asked.length > 500) return null;
  try {
    const url = new URL(asked, HERE);
    return url.origin === HERE && !url.pathname.startsWith("//") ? withQuery(url) : null;
  } catch {
    return null;
  }
}

const withQuery = ({ pathname, search }: URL): `/${string}` => `/${pathname.slice(1)}${search}`;

/** The same path with a note about what was just done, for the status line there. */
export function withNote(path: `/${string}`, note: string): `/${string}` {
  const url = new URL(path, HERE);
  url.searchParams.set("note", note);
  return withQuery(url);
}
