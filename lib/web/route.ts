import "server-only";
import { getTranslations } from "next-intl/server";
import type { z } from "zod";
import type { Locale } from "@/lib/kernel/locale";
import type { Outcome } from "@/lib/kernel/outcome";
import { storableText } from "@/lib/kernel/storable-text";
import { withIdempotency } from "./idempotency";
import { log } from "./log";
import { isFromOurPages } from "./origin";
import { problemResponse, type FieldProblem } from "./problem";
import { sha256Of } from "./sha256";
import { requestIdOf } from "./request-id";
import { currentSession, type Session } from "./session";
import { wordingFor, type RefusalCode } from "./wording";

const STATUS: Partial<Record<RefusalCode, number>> = {
  notFound: 404,
  notAllowed: 403,
  staleVersion: 412,
  tooLarge: 413,
  fileTooBig: 413,
  filesTooMany: 413,
  bytesTooMany: 413,
  uploadTooMany: 429,
  fileTypeNotAllowed: 415,
  fileTypeHeic: 415,
  fileNameDisagrees: 415,
  fileNotText: 415,
};

/** The HTTP status of a refusal: not found 404, not allowed 403, stale 412, everything else the domain refuses 409. */
const statusOf = (code: RefusalCode): number => STATUS[code] ?? 409;

export type Asked<Body, Params> = {
  readonly session: Session;
  readonly request: Request;
  readonly params: Params;
  readonly body: Body;
};

type Options = {
  readonly name: string;
  /** A POST that must take effect once: needs an Idempotency-Key. */
  readonly idempotent?: boolean;
  /** Most bytes of a JSON body. */
  readonly maxBytes?: number;
};

/** The shape of a JSON body; without one the handler reads the request itself. */
type WithBody<Shape extends z.ZodType> = Options & { readonly body: Shape };
type WithoutBody = Options & { readonly body?: undefined };
type Handler<Body, Params> = (
  asked: Asked<Body, Params>,
) => Promise<Outcome<unknown, RefusalCode> | Response>;

type Route<Params> = (request: Request, context: { params: Promise<Params> }) => Promise<Response>;

const MAX_JSON_BYTES = 256 * 1024;

const words = (locale: Locale) => getTranslations({ locale, namespace: "problems" });

const json = (value: unknown, requestId: string, status = 200) =>
  new Response(JSON.stringify(value), {
    status,
    headers: {
      "content-type": "application/json",
      "cache-control": "private, no-store",
      "x-request-id": requestId,
    },
  });

/** Who a refusal is written for, and the number it can be asked about by. */
type Asker = { readonly locale: Locale; readonly requestId: string };

async function refusal(
  code: "signedOut" | "crossSite" | "tooLarge" | "notJson" | "fault",
  status: number,
  { locale, requestId }: Asker,
) {
  const t = await words(locale);
  return problemResponse({ status, code, title: t(code, { id: requestId }) }, requestId);
}

/** A JSON Pointer (RFC 6901): in a name, `~` and `/` would mean something else. */
const pointerTo = (place: readonly PropertyKey[]): string =>
  place.map((name) => `/${String(name).replaceAll("~", "~0").replaceAll("/", "~1")}`).join("");

/** Where an issue is: a field nobody knows is named itself, not the object it stands in. */
const placesOf = (issue: z.core.$ZodIssue): PropertyKey[][] =>
  issue.code === "unrecognized_keys" ? issue.keys.map((key) => [...issue.path, key]) : [issue.path];

/** More than any form has fields: a body of nothing but faults is not answered by a larger one. */
const MOST_PROBLEMS = 100;

async function fieldProblems(error: z.ZodError, locale: Locale): Promise<FieldProblem[]> {
  const t = await words(locale);
  return error.issues
    .flatMap(placesOf)
    .slice(0, MOST_PROBLEMS)
    .map((place) => ({ pointer: pointerTo(place), detail: t("fieldShape") }));
}

/** What still comes of a refused body is let go as it comes: to cancel it would cut the line before the answer. */
async function throwAway(reader: ReadableStreamDefaultReader<Uint8Array>): Promise<void> {
  try {
    while (!(await reader.read()).done);
  } catch {
    // It broke off; nobody waits for it any more.
  }
}

/** Keeps at most `maxBytes`, whatever the sender says about the length. */
async function readText(request: Request, maxBytes: number): Promise<string | null> {
  const reader = request.body?.getReader();
  if (!reader) return "";
  const chunks: Uint8Array[] = [];
  let size = 0;
  for (let part = await reader.read(); !part.done; part = await reader.read()) {
    size += part.value.byteLength;
    if (size > maxBytes) {
      void throwAway(reader);
      return null;
    }
    chunks.push(part.value);
  }
  return Buffer.concat(chunks).toString("utf8");
}

/** Every text of a body, and every name: a map keyed by what somebody sent is kept as well. */
const storable = (_key: string, value: unknown): unknown => {
  if (typeof value === "string") return storableText(value);
  if (typeof value !== "object" || value === null || Array.isArray(value)) return value;
  const members = Object.entries(value);
  const isKept = members.every(([name]) => storableText(name) === name);
  return isKept ? value : Object.fromEntries(members.map(([name, one]) => [storableText(name), one]));
};

const parseJson = (text: string): unknown => {
  try {
    const read: unknown = JSON.parse(text, storable);
    return read;
  } catch {
    return undefined;
  }
};

async function answer(
  outcome: Outcome<unknown, RefusalCode> | Response,
  session: Session,
): Promise<Response> {
  const { requestId, locale } = session.actor;
  if (outcome instanceof Response) {
    outcome.headers.set("x-request-id", requestId);
    if (!outcome.headers.has("cache-control")) outcome.headers.set("cache-control", "private, no-store");
    return outcome;
  }
  if (outcome.ok) return json(outcome.value, requestId);
  const sentence = await wordingFor(outcome, locale);
  const errors = outcome.field ? [{ pointer: `/${outcome.field}`, detail: sentence }] : undefined;
  return problemResponse(
    { status: statusOf(outcome.code), code: outcome.code, title: sentence, errors },
    requestId,
  );
}

/**
 * Every route of the API is one call of this: session, origin, shape, the domain's verb, the wording. Answers problem
 * documents for everything that is not a success, and never says more about a foreign thing than about one that is not there.
 */
export function route<Params = Record<string, never>>(
  options: WithoutBody,
  handler: Handler<undefined, Params>,
): Route<Params>;
/** The same with a JSON body: the handler is given it as its shape reads it. */
export function route<Params = Record<string, never>, Shape extends z.ZodType = z.ZodType>(
  options: WithBody<Shape>,
  handler: Handler<z.infer<Shape>, Params>,
): Route<Params>;
/** Both in one: without a shape the handler is given no body. */
export function route<Params, Body>(
  options: WithoutBody | WithBody<z.ZodType<Body>>,
  handler: Handler<Body | undefined, Params>,
): Route<Params> {
  return async (request, context) => {
    const started = performance.now();
    let requestId = requestIdOf(request.headers);
    let session: Session | null = null;
    let response: Response;
    try {
      session = await currentSession();
      requestId = session?.actor.requestId ?? requestId;
      response = session
        ? await serve(options, handler, { session, request, params: await context.params })
        : await refusal("signedOut", 401, { locale: "en", requestId });
    } catch (fault) {
      log.error({
        event: "fault",
        requestId,
        route: options.name,
        fault: fault instanceof Error ? fault.stack : String(fault),
      });
      response = await refusal("fault", 500, session?.actor ?? { locale: "en", requestId });
    }
    log.info({
      event: "request",
      requestId,
      route: options.name,
      method: request.method,
      status: response.status,
      userId: session?.actor.userId,
      organisationId: session?.actor.organisationId,
      durationMs: Math.round(performance.now() - started),
    });
    return response;
  };
}

async function serve<Params, Body>(
  options: WithoutBody | WithBody<z.ZodType<Body>>,
  handler: Handler<Body | undefined, Params>,
  asked: Omit<Asked<undefined, Params>, "body">,
): Promise<Response> {
  const { session, request } = asked;
  const { locale, requestId } = session.actor;
  const writes = request.method !== "GET" && request.method !== "HEAD";
  if (writes && !isFromOurPages(request.headers)) return refusal("crossSite", 403, session.actor);
  if (!options.body) return answer(await handler({ ...asked, body: undefined }), session);

  const text = await readText(request, options.maxBytes ?? MAX_JSON_BYTES);
  if (text === null) return refusal("tooLarge", 413, session.actor);
  const sent = parseJson(text);
  if (sent === undefined) return refusal("notJson", 400, session.actor);
  const body = options.body.safeParse(sent);
  if (!body.success) {
    const t = await words(locale);
    const errors = await fieldProblems(body.error, locale);
    return problemResponse({ status: 422, code: "shape", title: t("shape"), errors }, requestId);
  }
  const act = async () => answer(await handler({ ...asked, body: body.data }), session);
  if (!options.idempotent) return act();
  const fingerprint = sha256Of(text);
  return withIdempotency(
    { actor: session.actor, route: options.name, key: request.headers.get("idempotency-key"), fingerprint },
    act,
  );
}
