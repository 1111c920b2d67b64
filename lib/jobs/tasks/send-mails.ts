import type { PoolClient } from "pg";
import { noteAttachment, type Attachment } from "@/lib/documents/note-attachment";
import { isLocale, type Locale } from "@/lib/kernel/locale";
import { letterFor } from "@/lib/mail/letter";
import { sendLetter } from "@/lib/mail/transport";
import { log } from "@/lib/web/log";
import type { Connections } from "../connections";

type Waiting = {
  id: string;
  kind: string;
  recipient: string;
  locale: string;
  params: Record<string, unknown>;
  request_id: string | null;
  tries: number;
};

const AT_ONCE = 20;
const MOST_TRIES = 8;

const take = async (client: PoolClient): Promise<Waiting | undefined> => {
  const { rows } = await client.query<Waiting>(
    `select id, kind, recipient, locale, params, request_id, tries from outbox
     where sent_at is null and parked_at is null and not_before <= now()
     order by created_at limit 1 for update skip locked`,
  );
  return rows[0];
};

/** A mail about a credit note carries the note, made anew from its frozen document. */
async function attachmentsOf(client: PoolClient, { params }: Waiting, locale: Locale): Promise<Attachment[]> {
  if (typeof params.noteId !== "string") return [];
  const { rows } = await client.query<{ document: unknown }>(
    "select document from credit_notes where id = $1",
    [params.noteId],
  );
  return Promise.all(rows.map(({ document }) => noteAttachment(document, locale)));
}

async function sendOne(client: PoolClient, mail: Waiting): Promise<void> {
  try {
    const locale = isLocale(mail.locale) ? mail.locale : "en";
    const letter = await letterFor(mail.kind, mail.params, locale);
    const attachments = await attachmentsOf(client, mail, locale);
    await sendLetter({
      ...letter,
      attachments,
      to: mail.recipient,
      requestId: mail.request_id,
      id: mail.id,
    });
    await client.query("update outbox set sent_at = now(), tries = tries + 1 where id = $1", [mail.id]);
    log.info({ event: "mailSent", mail: mail.id, kind: mail.kind, requestId: mail.request_id });
  } catch (fault) {
    // Later each time; after the eighth try a person has to look.
    await client.query(
      `update outbox set tries = tries + 1, last_fault = $2, not_before = now() + make_interval(secs => 2 ^ least(tries + 1, 12)),
         parked_at = case when tries + 1 >= $3 then now() end where id = $1`,
      [mail.id, String(fault).slice(0, 500), MOST_TRIES],
    );
    log.warn({
      event: "mailNotSent",
      mail: mail.id,
      kind: mail.kind,
      requestId: mail.request_id,
      fault: String(fault),
    });
  }
}

/** Sends what waits in the outbox, each under its own lock: two workers never send the same mail. */
export const sendMails = async (_payload: unknown, { withPgClient }: Connections): Promise<void> => {
  for (let sent = 0; sent < AT_ONCE; sent += 1) {
    const isMore = await withPgClient(async (client) => {
      await client.query("begin");
      try {
        const mail = await take(client);
        if (mail) await sendOne(client, mail);
        await client.query("commit");
        return mail !== undefined;
      } catch (fault) {
        await client.query("rollback");
        throw fault;
      }
    });
    if (!isMore) return;
  }
};
