"use client";

import { referenceOf } from "@/components/ui/fault-page";

// Nothing of ours may be counted on here: no style sheet, no words from the message files, no theme. The system's own
// colours follow its light or dark setting.
const PAGE = {
  margin: 0,
  padding: "3rem 1rem",
  background: "Canvas",
  color: "CanvasText",
  font: "1.125rem/1.5 system-ui, sans-serif",
} as const;
const SHEET = {
  maxWidth: "34rem",
  margin: "0 auto",
  paddingTop: "1.5rem",
  borderTop: "4px solid #0b7285",
} as const;
const BUTTON = {
  minHeight: "3rem",
  padding: "0 1.25rem",
  border: "2px solid currentColor",
  borderRadius: "4px",
  background: "Canvas",
  color: "CanvasText",
  font: "inherit",
  fontWeight: 600,
} as const;

const WORDS = [
  {
    lang: "en",
    title: "Partproof could not be shown",
    body: "That is our fault, not yours. What was sent before is safe. Try again in a moment.",
  },
  {
    lang: "de",
    title: "Partproof ließ sich nicht anzeigen",
    body: "Das liegt an uns, nicht an Ihnen. Was schon gesendet war, ist sicher. Versuchen Sie es gleich noch einmal.",
  },
] as const;

/** The last page there is: where not even the frame of all pages could be made. */
export default function GlobalFault({ error, retry }: { error: unknown; retry: () => void }) {
  const reference = referenceOf(error);
  const [english, german] = WORDS;
  return (
    <html lang="en" style={{ colorScheme: "light dark" }}>
      <body style={PAGE}>
        <title>Partproof</title>
        <main style={SHEET}>
          <h1 style={{ font: "600 1.5rem/1.2 Georgia, serif" }}>{english.title}</h1>
          <p>{english.body}</p>
          <div lang={german.lang}>
            <h2 style={{ font: "600 1.25rem/1.2 Georgia, serif" }}>{german.title}</h2>
            <p>{german.body}</p>
          </div>
          {reference ? (
            <p>
              Reference / <span lang="de">Kennung</span>: <code>{reference}</code>
            </p>
          ) : null}
          <button type="button" onClick={() => retry()} style={BUTTON}>
            Try again / <span lang="de">Noch einmal versuchen</span>
          </button>
        </main>
      </body>
    </html>
  );
}
