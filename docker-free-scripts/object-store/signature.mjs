import { createHash, createHmac, timingSafeEqual } from "node:crypto";

// AWS Signature Version 4, from the published description of the algorithm: header form and query form.

const sha256Hex = (data) => createHash("sha256").update(data).digest("hex");
const hmac = (key, text) => createHmac("sha256", key).update(text).digest();

/** Percent-encoding as the signature wants it: everything but unreserved characters. */
const encodeStrict = (text) =>
  encodeURIComponent(text).replace(/[!'()*]/g, (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`);

const CLOCK_SKEW_MS = 15 * 60_000;

const signingKey = (secret, date, region) =>
  hmac(hmac(hmac(hmac(`AWS4${secret}`, date), region), "s3"), "aws4_request");

const same = (a, b) => a.length === b.length && timingSafeEqual(Buffer.from(a), Buffer.from(b));

const instantOf = (stamp) => {
  const parts = /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/.exec(stamp ?? "");
  return parts ? Date.UTC(parts[1], parts[2] - 1, parts[3], parts[4], parts[5], parts[6]) : NaN;
};

const canonicalQuery = (params) =>
  [...params.entries()]
    .filter(([name]) => name !== "X-Amz-Signature")
    .map(([name, value]) => [encodeStrict(name), encodeStrict(value)])
    .sort(([a, x], [b, y]) => (a === b ? (x < y ? -1 : 1) : a < b ? -1 : 1))
    .map(([name, value]) => `${name}=${value}`)
    .join("&");

const canonicalPath = (rawPath) =>
  rawPath
    .split("/")
    .map((part) => encodeStrict(decodeURIComponent(part)))
    .join("/");

function canonicalRequest({ method, rawPath, params, headers, signedHeaders, payloadHash }) {
  const lines = signedHeaders.map(
    (name) =>
      `${name}:${String(headers[name] ?? "")
        .trim()
        .replace(/\s+/g, " ")}`,
  );
  return [
    method,
    canonicalPath(rawPath),
    canonicalQuery(params),
    ...lines,
    "",
    signedHeaders.join(";"),
    payloadHash,
  ].join("\n");
}

function check(given, request, credentials, payloadHash, stamp) {
  const [accessKey, date, region, service, end] = given.credential.split("/");
  if (accessKey !== credentials.accessKeyId || service !== "s3" || end !== "aws4_request")
    return "InvalidAccessKeyId";
  if (!given.signedHeaders.includes("host") || date !== stamp.slice(0, 8)) return "SignatureDoesNotMatch";
  const text = canonicalRequest({ ...request, signedHeaders: given.signedHeaders, payloadHash });
  const scope = [date, region, "s3", "aws4_request"].join("/");
  const key = signingKey(credentials.secretAccessKey, date, region);
  const expected = hmac(key, ["AWS4-HMAC-SHA256", stamp, scope, sha256Hex(text)].join("\n")).toString("hex");
  return same(expected, given.signature)
    ? { key, scope, stamp, signature: expected }
    : "SignatureDoesNotMatch";
}

/**
 * Verifies a request. Returns the chain that signed chunks continue from, or the code of the error to answer:
 * AccessDenied (unsigned, expired), RequestTimeTooSkewed, InvalidAccessKeyId, SignatureDoesNotMatch.
 */
export function verify(request, credentials, now = Date.now()) {
  const { headers, params } = request;
  if (params.has("X-Amz-Signature")) {
    const stamp = params.get("X-Amz-Date") ?? "";
    const age = now - instantOf(stamp);
    const lifeMs = Number(params.get("X-Amz-Expires") ?? 0) * 1000;
    if (!(age >= -CLOCK_SKEW_MS) || age > lifeMs) return "AccessDenied";
    const given = {
      credential: params.get("X-Amz-Credential") ?? "",
      signedHeaders: (params.get("X-Amz-SignedHeaders") ?? "").split(";"),
      signature: params.get("X-Amz-Signature") ?? "",
    };
    return check(
      given,
      request,
      credentials,
      params.get("X-Amz-Content-Sha256") ?? "UNSIGNED-PAYLOAD",
      stamp,
    );
  }
  const parts =
    /^AWS4-HMAC-SHA256 Credential=([^,]+),\s*SignedHeaders=([^,]+),\s*Signature=([0-9a-f]{64})$/.exec(
      headers.authorization ?? "",
    );
  if (!parts) return "AccessDenied";
  const stamp = headers["x-amz-date"] ?? "";
  if (!(Math.abs(now - instantOf(stamp)) <= CLOCK_SKEW_MS)) return "RequestTimeTooSkewed";
  const payloadHash = headers["x-amz-content-sha256"];
  if (!payloadHash) return "AccessDenied";
  return check(
    { credential: parts[1], signedHeaders: parts[2].split(";"), signature: parts[3] },
    request,
    credentials,
    payloadHash,
    stamp,
  );
}

/** The signature of one chunk, which continues that of the chunk before it. */
export const chunkSignature = ({ key, scope, stamp }, previous, data) =>
  hmac(
    key,
    ["AWS4-HMAC-SHA256-PAYLOAD", stamp, scope, previous, sha256Hex(""), sha256Hex(data)].join("\n"),
  ).toString("hex");
