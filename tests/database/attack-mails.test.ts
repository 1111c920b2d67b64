import { describe, expect, it } from "vitest";
import { letterFor } from "@/lib/mail/letter";

const HOSTILE = [
  "<script>alert(1)</script>",
  '"><img src=x onerror=alert(1)>',
  "{link}",
  "'{name, plural, other {#}}'",
  "<b>bold</b>",
  "line\r\nBcc: everybody@example.test",
  "\u202eexe.gpj",
  "\u2028\u2029",
  "x".repeat(2000),
];
const LINK = "https://partproof.example/claims/4107-3826";

const MAILS = {
  invitation: (text: string) => ({ link: LINK, organisation: text, inviter: text, name: text, days: 7 }),
  queryAsked: (text: string) => ({
    link: LINK,
    number: "4107-3826",
    distributor: text,
    question: text,
    name: text,
    rowIds: ["label"],
    answerBy: "2026-06-01",
  }),
  claimDecided: (text: string) => ({
    link: LINK,
    number: "4107-3826",
    distributor: text,
    letter: text,
    name: text,
    outcome: "declined",
    contestUntil: "2026-06-01",
  }),
  claimFiled: (text: string) => ({
    link: LINK,
    number: "4107-3826",
    distributor: text,
    part: text,
    name: text,
    answerBy: "2026-06-01T10:00:00Z",
  }),
};

describe.each(Object.entries(MAILS))("a mail %s", (kind, params) => {
  it.each(["en", "de"] as const)(
    "in %s shows what people wrote as text, and has one link: ours",
    async (locale) => {
      for (const text of HOSTILE) {
        const { html, text: plain } = await letterFor(kind, params(text), locale);
        const tags = new Set([...html.matchAll(/<\/?([a-z0-9]+)/gu)].map(([, tag]) => tag));
        expect([...tags].toSorted()).toEqual(["a", "body", "div", "head", "html", "meta", "p", "title"]);
        expect([...html.matchAll(/href="([^"]*)"/gu)].map(([, href]) => href)).toEqual([LINK]);
        expect(html).not.toMatch(/<[^>]*\son\w+=/u);
        expect(plain).toContain(LINK);
      }
    },
  );
});
