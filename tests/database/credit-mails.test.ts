import pg from "pg";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { z } from "zod";
import { counterCredit } from "@/lib/day-book/issuing/counter-service";
import { sendMails } from "@/lib/jobs/tasks/send-mails";
import { letterFor } from "@/lib/mail/letter";
import { buildPerson } from "../support/build";
import { adminQuery } from "../support/database";
import { pdfText } from "../support/pdf-text";
import { creditWorld, decidedClaim, issued, type CreditWorld } from "./credit-world";

const mailbox = z.object({
  mails: z.array(
    z.object({
      subject: z.string(),
      text: z.string(),
      attachments: z.array(z.object({ filename: z.string(), contentType: z.string(), base64: z.string() })),
    }),
  ),
});
type Mail = z.infer<typeof mailbox>["mails"][number];

let world: CreditWorld;
let pool: pg.Pool;
let books: { email: string };
beforeAll(async () => {
  world = await creditWorld();
  books = await buildPerson(world.shops[0].workshop, ["accounts"], { locale: "en" });
  pool = new pg.Pool({ connectionString: process.env["DATABASE_URL_WORKER"], max: 2 });
});
afterAll(() => pool.end());

const withPgClient = async <T>(act: (client: pg.PoolClient) => Promise<T>): Promise<T> => {
  const client = await pool.connect();
  try {
    return await act(client);
  } finally {
    client.release();
  }
};
const sendAll = () => sendMails({}, { withPgClient });

const mailsTo = async (email: string): Promise<Mail[]> => {
  const answer = await fetch(`${process.env["MAILBOX_URL"] ?? ""}/api/mails?to=${encodeURIComponent(email)}`);
  return mailbox.parse(await answer.json()).mails;
};

describe("mails about money", () => {
  it("bring the note as a PDF to those who keep the workshop's books, in their language, once", async () => {
    const claim = await decidedClaim(world);
    const number = await issued(world, claim);
    await adminQuery("update outbox set sent_at = now() where kind <> 'creditNoteIssued'");
    await Promise.all([sendAll(), sendAll()]);
    const [english, ...more] = await mailsTo(books.email);
    expect(more).toEqual([]);
    expect(english?.subject).toContain(number);
    expect(english?.text).toContain("€192.11");
    const [file] = english?.attachments ?? [];
    expect([file?.filename, file?.contentType]).toEqual([`${number}.pdf`, "application/pdf"]);
    const text = await pdfText(Buffer.from(file?.base64 ?? "", "base64"));
    for (const figure of ["Credit note", "€161.44", "€30.67", "Total credited €192.11"])
      expect(text).toContain(figure);

    // The manager reads German; the technician who started the claim keeps no books.
    const [manager] = await adminQuery<{ email: string }>("select email from users where id = $1", [
      world.managers[0].userId,
    ]);
    const [german] = await mailsTo(manager?.email ?? "");
    expect(german?.subject).toContain("Rechnungskorrektur");
    expect(`${german?.subject} ${german?.text}`).not.toContain("Gutschrift");
    const [recipients] = await adminQuery(
      "select count(*)::integer as count from outbox where kind = 'creditNoteIssued' and params ->> 'noteNumber' = $1",
      [number],
    );
    expect(recipients).toEqual({ count: 2 });

    expect(await counterCredit(world.clerk, { number, reason: "Wrong account." })).toMatchObject({
      ok: true,
    });
    await sendAll();
    const [countered] = await mailsTo(books.email);
    expect(countered?.subject).toContain("is taken back");
    expect(countered?.text).toContain("Wrong account.");
    expect(await pdfText(Buffer.from(countered?.attachments[0]?.base64 ?? "", "base64"))).toContain(
      "Counter note",
    );
  });

  it("say with the verdict what it gives and how it comes about", async () => {
    const claim = await decidedClaim(world, { at: 1 });
    const [mail] = await adminQuery<{ params: Record<string, unknown> }>(
      "select params from outbox where kind = 'claimDecided' and params ->> 'number' = $1",
      [`${claim.number.slice(0, 4)}-${claim.number.slice(4)}`],
    );
    const { text } = await letterFor("claimDecided", mail?.params ?? {}, "en");
    for (const words of [
      "Credit promised: €192.11",
      "24 months of term less 3 completed",
      "€161.44",
      "(rule G 1 (2024-01-01))",
    ])
      expect(text).toContain(words);
    const german = await letterFor("claimDecided", mail?.params ?? {}, "de");
    expect(german.text.replaceAll("\u00a0", " ")).toContain("Zugesagte Erstattung: 192,11 €");
    const declined = await decidedClaim(world, { outcome: "declined", at: 1 });
    const [other] = await adminQuery<{ params: Record<string, unknown> }>(
      "select params from outbox where kind = 'claimDecided' and params ->> 'number' = $1",
      [`${declined.number.slice(0, 4)}-${declined.number.slice(4)}`],
    );
    expect((await letterFor("claimDecided", other?.params ?? {}, "en")).text).not.toContain(
      "Credit promised",
    );
  });
});
