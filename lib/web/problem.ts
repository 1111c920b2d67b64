import "server-only";

/** One field that was refused: a JSON Pointer into what was sent, and the sentence the form shows. */
export type FieldProblem = { readonly pointer: string; readonly detail: string };

export type Problem = {
  readonly status: number;
  readonly code: string;
  readonly title: string;
  readonly detail?: string;
  readonly errors?: readonly FieldProblem[];
};

/** What an answer of the API is written in: a problem document for everything that is not a success. */
export const mediaTypeFor = (status: number): string =>
  status < 400 ? "application/json" : "application/problem+json";

/** A problem document (RFC 9457). `type` is a relative reference that names the problem, not a page to fetch. */
export const problemResponse = (problem: Problem, requestId: string): Response => {
  const { status, code, title, detail, errors } = problem;
  return new Response(
    JSON.stringify({
      type: `/problems/${code}`,
      title,
      status,
      detail,
      instance: `urn:uuid:${requestId}`,
      code,
      errors,
    }),
    {
      status,
      headers: {
        "content-type": mediaTypeFor(status),
        "cache-control": "private, no-store",
        "x-request-id": requestId,
      },
    },
  );
};
