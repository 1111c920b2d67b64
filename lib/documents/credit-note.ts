import "server-only";
import { invoicesOf, type NoteDocument, type NoteParty } from "@/lib/credits/note-document";
import { formatDay, formatDecimal } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import {
  doubleRule,
  makeRoom,
  rule,
  skip,
  startPaper,
  writeFeet,
  writeRow,
  writeTable,
  writeText,
} from "./credit-note-paper";
import type { Column, Paper } from "./credit-note-paper";
import { amountsOf, stepInWords, wordsOf, type Words } from "./credit-note-words";
import { finishDocument, openDocument } from "./document";

type Writing = {
  readonly paper: Paper;
  readonly note: NoteDocument;
  readonly locale: Locale;
  readonly t: Words;
  readonly amount: (minor: bigint) => string;
};

const HALVES: readonly Column[] = [
  { from: 0, width: 82 },
  { from: 92, width: 82 },
];
const FACTS: readonly Column[] = [
  { from: 0, width: 38 },
  { from: 40, width: 134 },
];
const LINES: readonly Column[] = [
  { from: 0, width: 8 },
  { from: 10, width: 106 },
  { from: 118, width: 22, align: "right" },
  { from: 144, width: 30, align: "right" },
];
const SUMS: readonly Column[] = [
  { from: 74, width: 66 },
  { from: 144, width: 30, align: "right" },
];
const GROUPS: readonly Column[] = [
  { from: 0, width: 42 },
  { from: 44, width: 14, align: "right" },
  { from: 60, width: 26, align: "right" },
  { from: 88, width: 24, align: "right" },
  { from: 116, width: 58 },
];

const address = (party: NoteParty, t: Words): string =>
  [
    party.legalName,
    party.address,
    party.country,
    party.taxNumber ? t("credits.document.taxNumber", { number: party.taxNumber }) : "",
  ]
    .filter((line) => line !== "")
    .join("\n");

/**
 * A credit note as a PDF from its frozen document alone: the same note gives the same figures for ever. The terms of EN 16931
 * it carries are named at `NoteDocument`.
 */
export async function creditNotePdf(note: NoteDocument, locale: Locale): Promise<Uint8Array> {
  const t = wordsOf(locale);
  const title = `${t(`credits.document.title.${note.kind}`)} ${note.number}`;
  const document = await openDocument(title, locale, new Date(`${note.issuedOn}T00:00:00Z`));
  const writing = {
    paper: startPaper(document),
    note,
    locale,
    t,
    amount: amountsOf(note.currency, locale),
  };
  writeHead(writing, title);
  writeLines(writing);
  writeSums(writing);
  writeGroups(writing);
  writeReasons(writing);
  writeFeet(writing.paper, (page, pages) => t("credits.document.page", { number: note.number, page, pages }));
  return finishDocument(document);
}

function writeHead({ paper, note, locale, t }: Writing, title: string): void {
  const { text, bold } = paper.document.fonts;
  writeText(paper, title, { face: bold, size: 18 });
  skip(paper, 4);
  const heads = [t("credits.document.from"), t("credits.document.to")];
  writeRow(paper, { columns: HALVES, texts: heads, face: bold });
  writeRow(paper, {
    columns: HALVES,
    texts: [note.seller, note.buyer].map((party) => address(party, t)),
    face: text,
  });
  skip(paper, 3);
  for (const [term, value] of factsOf({ note, locale, t }))
    writeRow(paper, { columns: FACTS, texts: [term, value], face: text, firstFace: bold });
}

function factsOf({ note, locale, t }: Pick<Writing, "note" | "locale" | "t">): (readonly [string, string])[] {
  const day = (on: NoteDocument["issuedOn"]) => formatDay(on, locale);
  const { claim, counters } = note;
  const invoices = invoicesOf(note).map(({ invoiceNumber, invoicedOn }) =>
    t("credits.document.invoiceOf", { number: invoiceNumber, day: day(invoicedOn) }),
  );
  const filed = { number: claim.number, filedOn: day(claim.filedOn), decidedOn: day(claim.decidedOn) };
  return [
    [t("credits.document.number"), note.number],
    [t("credits.document.issuedOn"), day(note.issuedOn)],
    [t("credits.document.account"), note.accountNumber],
    ...(invoices.length > 0 ? [[t("credits.document.invoices"), invoices.join("; ")] as const] : []),
    [t("credits.document.claim"), t("credits.document.claimOf", filed)],
    ...(counters
      ? [
          [
            t("credits.document.counters"),
            t("credits.document.countersOf", { number: counters.number, day: day(counters.issuedOn) }),
          ] as const,
        ]
      : []),
    [t("credits.document.reason"), note.reason ?? verdictReasons(note, t)],
  ];
}

const verdictReasons = (note: NoteDocument, t: Words): string =>
  note.reasons
    .map(({ lineNumber, code }) =>
      t("credits.document.reasonOf", { line: lineNumber, reason: t(`verdicts.reasons.${code}.name`) }),
    )
    .join("\n");

function writeLines({ paper, note, locale, t, amount }: Writing): void {
  skip(paper, 5);
  writeTitle(paper, t(note.kind === "credit" ? "credits.document.lines" : "credits.document.linesBack"));
  const heads = ["position", "what", "taxHead", "net"].map((name) => t(`credits.document.${name}`));
  const rows = note.lines.map((line) => {
    const kind = t(`creditSteps.kinds.${line.kind}`);
    const { partName: name, partNumber: number, quantity, serial, invoice } = line;
    const what = [
      t("credits.document.whatOf", { kind, quantity, name, number }),
      serial ? t("credits.document.serial", { serial }) : "",
      invoice
        ? t("credits.document.invoiceLine", { number: invoice.invoiceNumber, line: invoice.lineNumber })
        : "",
    ];
    return [
      String(line.position),
      what.filter((one) => one !== "").join("\n"),
      t("credits.document.taxOf", taxOf(line, locale)),
      amount(line.netMinor),
    ];
  });
  writeTable(paper, { columns: LINES, heads, rows });
}

const taxOf = (line: { taxCategory: string; taxRate: string }, locale: Locale) => ({
  category: line.taxCategory,
  rate: formatDecimal(line.taxRate, locale),
});

/** A heading stays with the first lines of what it is over. */
const writeTitle = (paper: Paper, text: string): void =>
  writeText(paper, text, { face: paper.document.fonts.bold, size: 11, keep: 60 });

const SUM_ROW = 15;

function writeSums({ paper, note, locale, t, amount }: Writing): void {
  const { text, bold } = paper.document.fonts;
  const sums = [
    [t("credits.document.sumOfLines"), amount(note.linesMinor)],
    ...note.allowances.map((one) => [
      `${t("credits.document.allowance", { reason: one.reason })} (${t("credits.document.taxOf", taxOf(one, locale))})`,
      amount(-one.amountMinor),
    ]),
    [t("credits.document.netTotal"), amount(note.netMinor)],
    [t("credits.document.taxTotal"), amount(note.taxMinor)],
  ];
  makeRoom(paper, (sums.length + 3) * SUM_ROW);
  rule(paper, { thickness: 0.75 });
  for (const row of sums) writeRow(paper, { columns: SUMS, texts: row, face: text });
  rule(paper, { last: 100, over: 11 });
  const total = [t(`credits.document.total.${note.kind}`), amount(note.totalMinor)];
  writeRow(paper, { columns: SUMS, texts: total, face: bold, size: 11 });
  doubleRule(paper, { last: 100, under: 11 });
  skip(paper, 2);
  writeText(paper, t(`credits.document.direction.${note.kind}`), { face: text, size: 9 });
}

function writeGroups({ paper, note, locale, t, amount }: Writing): void {
  skip(paper, 5);
  writeTitle(paper, t("credits.document.taxGroups"));
  const heads = ["category", "rate", "base", "tax", "exemption"].map((name) => t(`credits.document.${name}`));
  const rows = note.taxGroups.map((group) => [
    t(`credits.document.categories.${group.taxCategory}`),
    t("credits.document.percent", { rate: formatDecimal(group.taxRate, locale) }),
    amount(group.baseMinor),
    amount(group.taxMinor),
    group.exemptionReason ?? "",
  ]);
  writeTable(paper, { columns: GROUPS, heads, rows });
  if (note.elsewhere.length > 0) skip(paper, 2);
  for (const { settledBy, netMinor } of note.elsewhere)
    writeText(paper, t(`credits.elsewhere.${settledBy}`, { amount: amount(netMinor) }), {
      face: paper.document.fonts.text,
      size: 9,
    });
}

function writeReasons({ paper, note, locale, t }: Writing): void {
  const { text, bold } = paper.document.fonts;
  skip(paper, 5);
  writeTitle(paper, t("credits.document.why"));
  const chains = [
    ...note.explained.map(({ lineNumber, kind, steps }) => ({
      of: t("credits.card.line", { line: lineNumber, kind: t(`creditSteps.kinds.${kind}`) }),
      steps,
    })),
    { of: t("credits.card.document"), steps: note.steps },
  ];
  for (const { of, steps } of chains) {
    skip(paper, 1);
    writeText(paper, of, { face: bold, size: 9, keep: 24 });
    for (const step of steps)
      writeText(paper, stepInWords(step, t, locale), { face: text, size: 9, indent: 4 });
  }
}
