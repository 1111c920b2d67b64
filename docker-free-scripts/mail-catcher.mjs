import { mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { createServer } from "node:http";
import { join } from "node:path";
import { simpleParser } from "mailparser";
import { SMTPServer } from "smtp-server";

const { SMTP_PORT, MAILBOX_PORT, MAIL_FOLDER } = process.env;
const MOST_KEPT = 500;
const escape = (text) => String(text ?? "").replace(/[<>&'"]/g, (sign) => `&#${sign.charCodeAt(0)};`);

mkdirSync(MAIL_FOLDER, { recursive: true });
const files = () =>
  readdirSync(MAIL_FOLDER)
    .filter((name) => name.endsWith(".json"))
    .sort();
const mails = new Map(
  files()
    .slice(-MOST_KEPT)
    .map((name) => [name.slice(0, -5), JSON.parse(readFileSync(join(MAIL_FOLDER, name), "utf8"))]),
);
let count = 0;

function keep(parsed, envelope) {
  const id = `${Date.now()}-${String((count += 1)).padStart(6, "0")}`;
  const mail = {
    id,
    at: new Date().toISOString(),
    from: parsed.from?.text ?? "",
    to: envelope.rcptTo.map((recipient) => recipient.address.toLowerCase()),
    subject: parsed.subject ?? "",
    text: parsed.text ?? "",
    html: parsed.html || "",
    attachments: parsed.attachments.map(({ filename, contentType, content }) => ({
      filename: filename ?? "",
      contentType,
      base64: content.toString("base64"),
    })),
    headers: Object.fromEntries(
      [...parsed.headers].map(([name, value]) => [
        name,
        typeof value === "string" ? value : JSON.stringify(value),
      ]),
    ),
  };
  mails.set(id, mail);
  writeFileSync(join(MAIL_FOLDER, `${id}.json`), JSON.stringify(mail));
  for (const old of [...mails.keys()].slice(0, -MOST_KEPT)) {
    mails.delete(old);
    rmSync(join(MAIL_FOLDER, `${old}.json`), { force: true });
  }
}

const smtp = new SMTPServer({
  authOptional: true,
  disabledCommands: ["STARTTLS", "AUTH"],
  size: 5_000_000,
  onData: (stream, session, done) =>
    simpleParser(stream)
      .then((parsed) => keep(parsed, session.envelope))
      .then(() => done(), done),
});

const page = (
  title,
  body,
) => `<!doctype html><html lang="en"><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escape(title)}</title>
<style>body{font:16px/1.5 system-ui,sans-serif;max-width:60rem;margin:2rem auto;padding:0 1rem;background:#f6f4ee;color:#1c2024}a{color:#0b5563}li{margin:.4rem 0}pre{white-space:pre-wrap;background:#fff;padding:1rem;border-top:4px solid #0b5563}iframe{width:100%;height:30rem;border:1px solid #857d6b;background:#fff}</style>${body}`;

const newest = () => [...mails.values()].reverse();
const list = () =>
  page(
    "Mails",
    `<h1>Mails</h1><ul>${
      newest()
        .map(
          (mail) =>
            `<li><a href="/mails/${mail.id}">${escape(mail.subject)}</a><br>to ${escape(mail.to.join(", "))}, ${escape(mail.at)}</li>`,
        )
        .join("") || "<li>Nothing was sent yet.</li>"
    }</ul>`,
  );
// The HTML part stands in a frame without scripts, forms or our own origin.
const one = (mail) =>
  page(
    mail.subject,
    `<p><a href="/">All mails</a></p><h1>${escape(mail.subject)}</h1><p>To ${escape(mail.to.join(", "))}</p>${(mail.attachments ?? []).map((file, place) => `<p><a href="/mails/${mail.id}/${place}">${escape(file.filename)}</a></p>`).join("")}<pre>${escape(mail.text)}</pre><iframe sandbox title="HTML part" srcdoc="${escape(mail.html)}"></iframe>`,
  );

function answer(request, response) {
  const url = new URL(request.url, "http://mailbox");
  const json = (value, status = 200) => {
    response.writeHead(status, { "content-type": "application/json" });
    response.end(JSON.stringify(value));
  };
  const html = (text, status = 200) => {
    response.writeHead(status, {
      "content-type": "text/html; charset=utf-8",
      "content-security-policy": "default-src 'none'; style-src 'unsafe-inline'; frame-src 'self'",
    });
    response.end(text);
  };
  const [, fileOf = "", place = ""] = /^\/mails\/([\w-]+)\/(\d{1,2})$/.exec(url.pathname) ?? [];
  const file = mails.get(fileOf)?.attachments?.[Number(place)];
  if (file) {
    // Saved, never shown here: what somebody sent must not run as a page of ours.
    const name = encodeURIComponent(file.filename);
    response.writeHead(200, {
      "content-type": "application/octet-stream",
      "content-disposition": `attachment; filename*=UTF-8''${name}`,
    });
    return response.end(Buffer.from(file.base64, "base64"));
  }
  const id = /^(?:\/api)?\/mails\/([\w-]+)$/.exec(url.pathname)?.[1];
  if (url.pathname === "/api/mails" && request.method === "DELETE") {
    for (const old of mails.keys()) rmSync(join(MAIL_FOLDER, `${old}.json`), { force: true });
    mails.clear();
    return json({ mails: [] });
  }
  if (url.pathname === "/api/mails") {
    const to = url.searchParams.get("to")?.toLowerCase();
    return json({ mails: newest().filter((mail) => !to || mail.to.includes(to)) });
  }
  if (id && mails.has(id))
    return url.pathname.startsWith("/api") ? json(mails.get(id)) : html(one(mails.get(id)));
  if (url.pathname === "/") return html(list());
  return url.pathname.startsWith("/api")
    ? json({}, 404)
    : html(page("Not here", "<p>No such mail. <a href='/'>All mails</a></p>"), 404);
}

const web = createServer(answer);
smtp.listen(Number(SMTP_PORT), "127.0.0.1");
web.listen(Number(MAILBOX_PORT), "127.0.0.1", () =>
  process.stdout.write(`mail catcher on 127.0.0.1:${SMTP_PORT}, read at http://127.0.0.1:${MAILBOX_PORT}\n`),
);
for (const signal of ["SIGINT", "SIGTERM"])
  process.on(signal, () => {
    web.closeAllConnections();
    smtp.close(() => process.exit(0));
    setTimeout(() => process.exit(0), 500).unref();
  });
