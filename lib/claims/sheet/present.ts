import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { Coverage } from "@/lib/coverage/coverage";
import { thawedCredit } from "@/lib/credits/frozen-credit-shape";
import { isBenchRow } from "@/lib/evidence/bench-rows";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { currencyFrom } from "@/lib/kernel/currency";
import { money, type Money } from "@/lib/kernel/money";
import type { Limits } from "@/lib/rule-book/limits-shape";
import { isContestOpen } from "../contesting/open";
import { claimFacts, type ClaimFacts, type FactLine } from "../facts-shape";
import { gaveTheVerdict, movesOpenTo } from "../lifecycle";
import { printClaimNumber } from "../number";
import type {
  SheetClaim,
  SheetEntry,
  SheetEvidence,
  SheetLine,
  SheetRows,
  SheetVerdict,
  SheetVerdictLine,
} from "./queries";
import type { CaseLine, EvidenceFileView, EvidenceRowView, LineView, SheetView, VerdictView } from "./view";

/** What is worked out beside the rows: cover of each line, the Evidence list, the case in one line. */
export type WorkedOut = {
  readonly coverage: ReadonlyMap<number, Coverage>;
  readonly rows: readonly EvidenceRowView[];
  readonly limits: Limits | null;
  readonly caseLine: CaseLine | null;
};

/** The day it is now where the reader works. */
type Today = { readonly todayOn: CalendarDay };

const amount = (minor: string, currency: string): Money => money(BigInt(minor), currencyFrom(currency));
const iso = (at: Date | null): string | null => at?.toISOString() ?? null;

/** The facts of the newest revision, or null for a claim that was never sent. */
export const factsOf = ({ revisions }: SheetRows): ClaimFacts | null => {
  const newest = revisions.at(-1);
  return newest ? claimFacts.parse(newest.facts) : null;
};

const capturedAt = (captured: unknown): string | null =>
  typeof captured === "object" &&
  captured !== null &&
  "takenAt" in captured &&
  typeof captured.takenAt === "string"
    ? captured.takenAt
    : null;

/** A file without anything that says where it was taken. */
export const presentFile = (file: SheetEvidence, facts: ClaimFacts | null): EvidenceFileView => ({
  id: file.id,
  rowId: file.rowId,
  kind: file.kind,
  originalName: file.originalName,
  sizeBytes: Number(file.sizeBytes),
  sha256: file.sha256,
  viewState: file.viewState,
  widthPx: file.widthPx,
  heightPx: file.heightPx,
  capturedAt: capturedAt(file.captured),
  receivedAt: file.receivedAt.toISOString(),
  summary: file.summary,
  isInRevision: facts?.evidence.some((one) => one.id === file.id) ?? false,
});

function presentLine(line: FactLine, row: SheetLine | undefined, context: LineContext): LineView {
  return {
    lineId: row?.id ?? "",
    lineNumber: line.lineNumber,
    partNumber: line.part.number,
    partName: line.part.name,
    serial: line.unit?.serial ?? line.serialTyped,
    isKnownUnit: line.unit !== null,
    batch: line.unit?.batch ?? null,
    quantity: line.quantity,
    position: line.position,
    invoice: line.invoiceLine && {
      number: line.invoiceLine.invoiceNumber,
      line: line.invoiceLine.lineNumber,
      invoicedOn: line.invoiceLine.invoicedOn,
      shippedOn: line.invoiceLine.shippedOn,
    },
    fittedOn: line.fittedOn,
    installer: line.installer && (context.installerNames.get(line.installer.code) ?? line.installer.code),
    replacement: line.replacement && { serial: line.replacement.serial, fittedOn: line.replacement.fittedOn },
    asked: amount(line.askedMinor, context.currency),
    coverage: context.coverage.get(line.lineNumber) ?? null,
    verdict: row?.verdict ?? null,
    returnState: row?.returnState ?? "notNeeded",
    returnWaivedReason: row?.returnWaivedReason ?? null,
    creditState: row?.creditState ?? "none",
  };
}

type LineContext = {
  readonly currency: string;
  readonly coverage: ReadonlyMap<number, Coverage>;
  readonly installerNames: ReadonlyMap<string, string>;
};

const presentVerdictLine = (line: SheetVerdictLine) => ({
  lineNumber: line.lineNumber,
  outcome: line.outcome,
  attribution: line.attribution,
  reasonCode: line.reasonCode,
  reason: line.reason,
  rule:
    line.ruleNumber && line.ruleValidFrom
      ? { number: line.ruleNumber, title: line.ruleTitle ?? "", validFrom: line.ruleValidFrom }
      : null,
  coverage: line.coverage,
  returnWaivedReason: line.returnWaivedReason,
});

const presentVerdict = (verdict: SheetVerdict): VerdictView => ({
  id: verdict.id,
  revision: verdict.revision,
  outcome: verdict.outcome,
  letter: verdict.letter,
  decidedAt: verdict.decidedAt.toISOString(),
  credit: thawedCredit(verdict.credit),
  lines: verdict.lines.map(presentVerdictLine),
});

const presentHolder = (claim: SheetClaim, actor: Actor, isSeller: boolean) => ({
  // Who holds a claim, and what colleagues ask each other, is the distributor's own business.
  holderName: isSeller ? claim.holderName : null,
  isHeldByMe: claim.holderId === actor.userId,
  heldUntil: isSeller ? iso(claim.heldUntil) : null,
  canTakeOver:
    isSeller &&
    claim.state === "beingJudged" &&
    claim.holderId !== actor.userId &&
    !gaveTheVerdict(actor, claim) &&
    actor.roles.has("assessor"),
  parked:
    isSeller && claim.parkedWithName && claim.parkedQuestion
      ? {
          withName: claim.parkedWithName,
          isMe: claim.parkedWithId === actor.userId,
          question: claim.parkedQuestion,
        }
      : null,
});

/** An entry in the name of the organisation alone. */
const withoutPerson = (entry: Omit<SheetEntry, "onlyForId" | "at">) => ({
  ...entry,
  actorName: entry.actorOrganisation ?? "",
  actorOrganisation: null,
});

const presentRecord = (sheet: SheetRows, isSeller: boolean) => ({
  queries: sheet.queries.map((query) => ({
    round: query.round,
    rowIds: Array.isArray(query.items) ? query.items.map(String) : [],
    question: query.question,
    askedAt: query.askedAt.toISOString(),
    answeredAt: iso(query.answeredAt),
    answeredRevision: query.answeredRevision,
  })),
  messages: sheet.messages.map(({ audience, at, ...message }) => ({
    ...message,
    isOwnOnly: audience === "own",
    at: at.toISOString(),
  })),
  timeline: sheet.timeline.map(({ onlyForId, at, ...entry }) => ({
    ...(entry.kind === "take" && !isSeller ? withoutPerson(entry) : entry),
    isOwnOnly: onlyForId !== null,
    at: at.toISOString(),
  })),
  revisions: sheet.revisions.map(({ revision, sentAt, sentBy, sha256 }) => ({
    revision,
    sentAt: sentAt.toISOString(),
    sentBy,
    sha256,
  })),
});

/** The moves of the table; objecting and accepting only while the days of the verdict last. */
function presentMoves(actor: Actor, claim: SheetClaim, todayOn: CalendarDay) {
  const moves = movesOpenTo(actor, claim);
  const isOpen = isContestOpen(claim, todayOn);
  const canContest = moves.includes("contest") && isOpen;
  return {
    isContestOpen: isOpen,
    moves: canContest ? moves : moves.filter((move) => move !== "contest"),
    canAccept: canContest,
  };
}

/** The sheet as one party may see it: the only way from rows to a page. */
export function presentSheet(actor: Actor, sheet: SheetRows, workedOut: WorkedOut & Today): SheetView {
  const { claim } = sheet;
  const facts = factsOf(sheet);
  const isSeller = actor.organisationId === claim.sellerId;
  const installerNames = new Map(sheet.installers.map(({ code, name }) => [code, name]));
  const context = { currency: claim.currency, coverage: workedOut.coverage, installerNames };
  const rowIds = new Set(workedOut.rows.map((row) => row.id));
  const files = sheet.evidence.map((file) => presentFile(file, facts));
  return {
    number: printClaimNumber(claim.number),
    state: claim.state,
    outcome: claim.outcome,
    side: isSeller ? "distributor" : "workshop",
    ...presentMoves(actor, claim, workedOut.todayOn),
    ...presentHolder(claim, actor, isSeller),
    sellerName: claim.sellerName,
    workshopName: claim.workshopName,
    siteName: claim.siteName,
    accountNumber: claim.accountNumber,
    family: claim.family,
    symptom: claim.symptom,
    revision: claim.revision,
    asked: amount(claim.askedMinor, claim.currency),
    safetyReported: claim.safetyReported,
    incidentKnownAt: iso(claim.incidentKnownAt),
    filedAt: iso(claim.filedAt),
    answerDueAt: iso(claim.answerDueAt),
    isClockStopped: claim.clockStoppedAt !== null,
    queryLapsesOn: claim.queryLapsesOn,
    contestUntil: claim.contestUntil,
    facts,
    lines: (facts?.lines ?? []).map((line) =>
      presentLine(
        line,
        sheet.lines.find((row) => row.lineNumber === line.lineNumber),
        context,
      ),
    ),
    rows: workedOut.rows,
    otherFiles: files.filter((file) => !rowIds.has(file.rowId) && !isBenchRow(file.rowId)),
    limits: workedOut.limits,
    caseLine: workedOut.caseLine,
    ...presentRecord(sheet, isSeller),
    verdicts: sheet.verdicts.map(presentVerdict),
    notes: sheet.notes,
    flags: sheet.flags.map(({ kind, lineNumber, detail }) => ({ kind, lineNumber, detail })),
  };
}
