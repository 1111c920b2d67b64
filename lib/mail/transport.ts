import "server-only";
import { createTransport } from "nodemailer";
import { setting } from "@/lib/web/settings";

export type Outgoing = {
  readonly id: string;
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly requestId: string | null;
  readonly attachments?: readonly { filename: string; content: Uint8Array; contentType: string }[];
};

let transport: ReturnType<typeof createTransport> | undefined;

const open = () =>
  createTransport({
    host: setting("SMTP_HOST"),
    port: setting("SMTP_PORT"),
    secure: false,
    ignoreTLS: setting("SMTP_HOST") === "127.0.0.1",
    // A mail is text we made; nothing in it may make this process read a file or fetch an address.
    disableFileAccess: true,
    disableUrlAccess: true,
    connectionTimeout: 10_000,
    socketTimeout: 20_000,
  });

const oneLine = (text: string) =>
  text
    .replace(/[\p{Cc}\u2028\u2029]+/gu, " ")
    .trim()
    .slice(0, 200);

/** Hands one mail to the mail server. Throws where it is not taken. */
export async function sendLetter({
  id,
  to,
  subject,
  text,
  html,
  requestId,
  attachments = [],
}: Outgoing): Promise<void> {
  transport ??= open();
  await transport.sendMail({
    from: setting("MAIL_FROM"),
    to: { name: "", address: to },
    subject: oneLine(subject),
    text,
    html,
    attachments: attachments.map(({ content, ...file }) => ({ ...file, content: Buffer.from(content) })),
    messageId: `<${id}@partproof>`,
    headers: requestId ? { "X-Request-Id": requestId } : {},
  });
}
