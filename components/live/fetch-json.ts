/** What a route answers when it is not a success: the sentence to show, already in the person's language. */
export class Refused extends Error {
  constructor(
    readonly status: number,
    readonly sentence: string,
  ) {
    super(sentence);
  }
}

const isProblem = (body: unknown): body is { title: string } =>
  typeof body === "object" && body !== null && "title" in body && typeof body.title === "string";

/** Asks a route of ours for JSON. Throws `Refused` with the route's own sentence. */
export async function fetchJson(path: string, init: RequestInit = {}): Promise<unknown> {
  const response = await fetch(path, {
    ...init,
    headers: {
      accept: "application/json",
      ...(init.body ? { "content-type": "application/json" } : {}),
      ...init.headers,
    },
  });
  const body: unknown = await response.json().catch(() => null);
  if (response.ok) return body;
  throw new Refused(response.status, isProblem(body) ? body.title : response.statusText);
}
