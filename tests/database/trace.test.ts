import "../support/heard-log";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { z } from "zod";
import { heardLines, heardText, type HeardLine } from "../support/heard-log";
import { adminQuery } from "../support/database";
import { runTask } from "../support/worker-round";
import type { Asked } from "./trace-requests";

const { openOffice, sampleRequests } = await import("./trace-requests");
const { sendMails } = await import("@/lib/jobs/tasks/send-mails");

const ROUNDS = 25;
const mailShape = z.object({ text: z.string(), headers: z.record(z.string(), z.string()) });

type Mail = z.infer<typeof mailShape>;
let office: Awaited<ReturnType<typeof openOffice>>;
let sample: Asked[] = [];
let mails: Mail[] = [];
let audited: { request_id: string; actor_id: string; organisation_id: string }[] = [];
let waiting: { id: string; request_id: string; sent: boolean; params: Record<string, unknown> }[] = [];

const caught = async (): Promise<Mail[]> => {
  const answer = await fetch(`${process.env["MAILBOX_URL"]}/api/mails`);
  return z.object({ mails: z.array(mailShape) }).parse(await answer.json()).mails;
};

beforeAll(async () => {
  office = await openOffice();
  sample = await sampleRequests(office, ROUNDS);
  await runTask(sendMails, ROUNDS);
  mails = await caught();
  audited = await adminQuery("select request_id, actor_id, organisation_id from audit_log");
  waiting = await adminQuery("select id, request_id, sent_at is not null as sent, params from outbox");
}, 120_000);
afterAll(() => process.stdout.write(`trace: ${sample.length} requests, ${heardLines().length} lines\n`));

const linesOf = (id: string, ...events: string[]): HeardLine[] =>
  heardLines().filter(({ requestId, event }) => requestId === id && events.includes(String(event)));

describe("200 requests by forms and by the API, with all they left behind", () => {
  it("each say once in the log who asked, for whom, what and how long it took, in UTC", () => {
    expect(new Set(sample.map(({ id }) => id)).size).toBe(200);
    for (const { id, who, what } of sample) {
      const lines = linesOf(id, "request", "action", "resetAsked");
      expect(lines, what).toHaveLength(1);
      const [line = {}] = lines;
      expect(line["time"], what).toMatch(/^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z$/u);
      if (!who) continue;
      expect(line["userId"], what).toBe(who.person.id);
      expect(line["organisationId"], what).toBe(who.organisation.id);
      expect(line["refused"], what).toBeUndefined();
      expect(String(line["route"] ?? line["verb"]), what).toMatch(/\w{4}/u);
      expect(line["durationMs"], what).toBeGreaterThanOrEqual(0);
    }
  });

  it("are named by every row of the audit, with the same person and organisation as in the log", () => {
    const wanted = sample.filter(({ isAudited }) => isAudited);
    expect(audited.map(({ request_id }) => request_id).toSorted()).toEqual(
      wanted.map(({ id }) => id).toSorted(),
    );
    for (const { request_id, actor_id, organisation_id } of audited) {
      const [line] = linesOf(request_id, "action");
      expect([line?.["userId"], line?.["organisationId"]]).toEqual([actor_id, organisation_id]);
    }
  });

  it("are named by every mail: in the outbox, in the worker's log and in the mail that arrived", () => {
    const wanted = sample.filter(({ isMailed }) => isMailed).map(({ id }) => id);
    expect(new Set(waiting.map(({ request_id }) => request_id))).toEqual(new Set(wanted));
    expect(waiting.filter(({ sent }) => !sent)).toEqual([]);
    for (const { id, request_id } of waiting) {
      expect(linesOf(request_id, "mailSent").filter(({ mail }) => mail === id)).toHaveLength(1);
      const arrived = mails.filter(({ headers }) => headers["message-id"] === `<${id}@partproof>`);
      expect(arrived.map(({ headers }) => headers["x-request-id"])).toEqual([request_id]);
    }
  });

  it("leave no line without a request to go back to", () => {
    const ids = new Set(sample.map(({ id }) => id));
    expect(heardLines().filter(({ requestId }) => !ids.has(String(requestId)))).toEqual([]);
  });

  it("tell the log no secret, no token, no cookie, no address, and nothing anybody wrote", () => {
    const text = heardText();
    const links = waiting.map(
      ({ params }) =>
        String(params["link"] ?? "")
          .split("/")
          .at(-1) ?? "",
    );
    const tokens = links.filter((end) => end.length > 30);
    expect(tokens.length).toBeGreaterThanOrEqual(2 * ROUNDS);
    const settings = Object.entries(process.env).flatMap(([name, value = ""]) =>
      /SECRET|PASSWORD|DATABASE_URL|ENCRYPTION|ACCESS_KEY/u.test(name) ? [value] : [],
    );
    expect(settings.length).toBeGreaterThan(6);
    const canaries = [
      ...tokens,
      ...settings,
      ...Object.values(office.sessions),
      ...["@example.test", "Kim Lorne", "Which air gap", "Seen on the bench", "partproof.session", "eyJ"],
    ];
    expect(canaries.filter((canary) => canary !== "" && text.includes(canary))).toEqual([]);
  });
});
