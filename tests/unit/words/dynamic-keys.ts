import {
  CLAIM_MARKS,
  CREDIT_MARKS,
  EVIDENCE_MARKS,
  MATCH_MARKS,
  PART_MARKS,
  SIGNAL_MARKS,
} from "@/components/ui/mark-states";
import { ROLES } from "@/lib/access/roles";
import type { UploadState } from "@/components/ui/upload-row";
import type { ThemeChoice } from "@/components/ui/theme-switch";
import { CLAIM_STATES, CREDIT_STATES, MOVES, RETURN_STATES, VERDICT_OUTCOMES } from "@/lib/claims/lifecycle";
import { JUDGING_VIEWS, WORKSHOP_VIEWS } from "@/lib/claims/lists/schema";
import { DRAFT_STEPS } from "@/lib/claims/paths";
import type { EvidenceFileView, Judgement, LineView, Side } from "@/lib/claims/sheet/view";
import { ALERT_KINDS } from "@/lib/alerts/kinds";
import { CAUSES, REASONS } from "@/lib/claims/verdict";
import { COVERAGE_STEPS } from "@/lib/coverage/steps";
import { REASONS as COVERAGE_REASONS } from "@/lib/coverage/reasons";
import type { Coverage } from "@/lib/coverage/coverage";
import { CREDIT_KINDS, SETTLEMENTS } from "@/lib/credits/credit-input";
import { CREDIT_STEPS, NOT_GIVEN_REASONS } from "@/lib/credits/steps";
import { ACCOUNTS, ALLOCATION_WAYS } from "@/lib/credits/ledger";
import type { NoteDocument } from "@/lib/credits/note-document";
import { TAX_CATEGORIES } from "@/lib/credits/tax";
import type { Proof } from "@/lib/day-book/book/proof";
import type { BookEntry } from "@/lib/day-book/book/running";
import { ISSUE_REFUSALS, NOTE_VIEWS } from "@/lib/day-book/views";
import { DEFAULT_EVIDENCE_LISTS } from "@/lib/evidence/default-lists";
import type { ReadingRefusal } from "@/lib/evidence/reading";
import { SCAN_WARNINGS } from "@/lib/labels/scan";
import type { MailKind } from "@/lib/mail/outbox";
import { FAMILY_LIST } from "@/lib/parts/families";
import type { Grade, GradeReason } from "@/lib/reliability/batch-grade";
import { CSV_COLUMNS } from "@/lib/reports/life-curves/csv";
import { COUNTINGS, START_CHOICES } from "@/lib/reports/life-curves/schema";
import { NO_WEIBULL, type Weibull } from "@/lib/reports/life-curves/view";
import type { LinkPurpose } from "@/lib/people/account/view";
import { PREFERRED_DENSITIES, PREFERRED_LANGUAGES, PREFERRED_THEMES } from "@/lib/people/schema";
import type { PasswordFault } from "@/lib/people/schema";
import { BENCH_PLANS } from "@/lib/returns/bench-plan";
import { DANGER_SIGNS, DISPOSALS, FINDING_KINDS, PARCEL_CONDITIONS } from "@/lib/returns/kinds";
import { PART_ENTRIES, SETTLING_MOVES } from "@/lib/returns/lifecycle";
import { MATCH_REASONS } from "@/lib/returns/match";
import { RETURN_NOTES } from "@/lib/returns/schema";
import { PLACES } from "@/lib/web/navigation";

type Dynamic = { readonly before: string; readonly members: readonly string[]; readonly after: string };

const each = (before: string, members: readonly string[], after = ""): Dynamic => ({
  before,
  members,
  after,
});
const keysOf = (record: Readonly<Record<string, unknown>>): string[] => Object.keys(record);

/** Members of a type that has no list of its own: the compiler asks for every one of them, and for no other. */
const membersOf = <Member extends string>(members: Readonly<Record<Member, true>>): string[] =>
  Object.keys(members);

const SIDES = membersOf<Side>({ workshop: true, distributor: true });
const POSITIONS = membersOf<LineView["position"]>({ left: true, right: true, single: true });
const VIEW_STATES = membersOf<EvidenceFileView["viewState"]>({
  waiting: true,
  ready: true,
  unreadable: true,
  notNeeded: true,
});
const FILE_KINDS = membersOf<EvidenceFileView["kind"]>({ photo: true, runLog: true, document: true });
const JUDGEMENTS = membersOf<Judgement>({
  within: true,
  below: true,
  above: true,
  openCircuit: true,
  noTemperature: true,
  noLimit: true,
});
const ANSWERS = membersOf<Coverage["answer"]>({ covered: true, outside: true, open: true });
const READING_REFUSALS = membersOf<ReadingRefusal>({
  readingEmpty: true,
  readingTooLong: true,
  readingNotANumber: true,
  readingAmbiguous: true,
  readingUnitUnknown: true,
  readingUnitUnclear: true,
  readingUnitOtherKind: true,
  readingImpossible: true,
});

const THEMES = membersOf<ThemeChoice>({ system: true, light: true, dark: true });
const UPLOAD_STATES = membersOf<UploadState>({ waiting: true, sending: true, sent: true, failed: true });
const PURPOSES = membersOf<LinkPurpose>({ reset: true, invitation: true });
const PASSWORD_FAULTS = membersOf<PasswordFault>({ tooShort: true, tooLong: true });
const MAILS = membersOf<MailKind>({
  passwordReset: true,
  invitation: true,
  claimFiled: true,
  queryAsked: true,
  queryReminder: true,
  claimLapsed: true,
  queryAnswered: true,
  claimDecided: true,
  creditNoteIssued: true,
  creditNoteCountered: true,
  partCalledIn: true,
  partExamined: true,
});

/** What the distributor alone is told; most of it is written by functions of the database. */
export const FLAG_KINDS = [
  "serialUnknown",
  "soldToOther",
  "unitHeld",
  "shippedAfterFailure",
  "fittedBeforeShipment",
  "photoSeenBefore",
  "logSeenBefore",
  "documentSeenBefore",
] as const;

const LEDGER_KINDS = membersOf<BookEntry["kind"]>({
  noteIssued: true,
  noteCountered: true,
  allocated: true,
  allocationTakenBack: true,
});
const PROOFS = membersOf<Proof>({
  notesDiffer: true,
  openDiffers: true,
  owedDiffers: true,
  postingsDiffer: true,
});
const NOTE_KINDS = membersOf<NoteDocument["kind"]>({ credit: true, counter: true });

const GRADES = membersOf<Grade>({ act: true, lookInto: true, quiet: true, notYetKnown: true });
const GRADE_REASONS = membersOf<GradeReason>({
  alone: true,
  expectedLow: true,
  tooYoung: true,
  strong: true,
  firstLook: true,
  fewFailures: true,
  raised: true,
  within: true,
});
const WEIBULL_SAYS = membersOf<Extract<Weibull, { kind: "fit" }>["says"]>({
  early: true,
  steady: true,
  wearing: true,
  unclear: true,
});

/** Entries of the timeline that are no move. */
const OTHER_ENTRIES = [
  "takenOver",
  "parked",
  "reminded",
  "accepted",
  "noteIssued",
  "noteCountered",
  "noteAllocated",
  "allocationTakenBack",
];

/** Each state of a claim as its mark says it: a decided one by its outcome. */
const MARKED_STATES = [...CLAIM_STATES.filter((state) => state !== "decided"), ...VERDICT_OUTCOMES];
const MARKED_RETURNS = RETURN_STATES.map((state) => (state === "notSentInTime" ? "notSent" : state));

const REASON_CODES = Object.values(REASONS).flat();
const LISTS = Object.values(DEFAULT_EVIDENCE_LISTS);
const ROWS = LISTS.flatMap(({ rows, bySymptom }) => [...rows, ...bySymptom.flatMap((list) => list.rows)]);

/** Words of one family under its own code. */
const FAMILY_KEYS = FAMILY_LIST.flatMap((family) => [
  each(
    `families.${family.code}.symptoms.`,
    family.symptoms.map(({ code }) => code),
  ),
  each(`families.${family.code}.ruledOut.`, family.ruledOut),
  each(`families.${family.code}.conditionAsFound.`, family.conditionAsFound),
  each("families.cautions.", family.cautions),
]);

/** Keys that are put together at run time, with the registry each takes its members from. */
export const DYNAMIC_KEYS: readonly Dynamic[] = [
  each("ui.mark.claim.", [...keysOf(CLAIM_MARKS), ...MARKED_STATES]),
  each("ui.mark.evidence.", keysOf(EVIDENCE_MARKS)),
  each("ui.mark.part.", [...keysOf(PART_MARKS), ...MARKED_RETURNS]),
  each("ui.mark.credit.", [...keysOf(CREDIT_MARKS), ...CREDIT_STATES]),
  each("ui.mark.signal.", keysOf(SIGNAL_MARKS)),
  each("ui.mark.match.", keysOf(MATCH_MARKS)),
  each("ui.mark.signal.", GRADES),
  each("lifeCurves.reasons.", GRADE_REASONS),
  each("lifeCurves.weibull.says.", WEIBULL_SAYS),
  each("lifeCurves.weibull.none.", NO_WEIBULL),
  each("lifeCurves.switches.counts.", COUNTINGS),
  each("lifeCurves.switches.starts.", START_CHOICES),
  each("lifeCurves.counted.", COUNTINGS),
  each("lifeCurves.csv.", CSV_COLUMNS),
  each("sheet.record.kinds.", [...keysOf(MOVES), ...OTHER_ENTRIES, ...Object.values(PART_ENTRIES)]),
  each("sheet.flags.", FLAG_KINDS),
  each("sheet.line.positions.", POSITIONS),
  each("draft.line.positions.", POSITIONS),
  each("sheet.evidence.view.", VIEW_STATES),
  each("live.files.view.", VIEW_STATES),
  each("live.files.choose.", FILE_KINDS),
  each("sheet.reading.judgement.", JUDGEMENTS),
  each("verdicts.reasons.", REASON_CODES, ".name"),
  each("live.decide.reasons.", REASON_CODES),
  each("verdicts.causes.", CAUSES),
  each("live.decide.causes.", CAUSES),
  each("live.decide.outcomes.", VERDICT_OUTCOMES),
  each("live.lists.distributor.", JUDGING_VIEWS),
  each("live.lists.workshop.", WORKSHOP_VIEWS),
  each("live.lists.empty.", SIDES),
  each("live.lists.columns.", SIDES),
  each("alerts.kinds.", [...ALERT_KINDS, "other"]),
  each("alerts.", ["allRead"]),
  each("coverage.answers.", [...ANSWERS, "outsideWithGoodwill"]),
  each("coverage.reasons.", keysOf(COVERAGE_REASONS)),
  each("steps.", keysOf(COVERAGE_STEPS)),
  each("creditSteps.", keysOf(CREDIT_STEPS)),
  each("creditSteps.kinds.", CREDIT_KINDS),
  each("creditSteps.settledBy.", SETTLEMENTS),
  each("creditSteps.notGiven.", NOT_GIVEN_REASONS),
  each("dayBook.kinds.", LEDGER_KINDS),
  each("dayBook.accounts.", ACCOUNTS),
  each("dayBook.proof.fails.", PROOFS),
  each("credits.issued.view.", NOTE_VIEWS),
  each("credits.issued.nothing.", NOTE_VIEWS),
  each("credits.allocations.hows.", ALLOCATION_WAYS),
  each("credits.document.categories.", TAX_CATEGORIES),
  ...["title", "total", "direction"].map((name) => each(`credits.document.${name}.`, NOTE_KINDS)),
  each(
    "credits.elsewhere.",
    SETTLEMENTS.filter((settledBy) => settledBy !== "creditNote"),
  ),
  each(
    "credits.invoiceUs.",
    SETTLEMENTS.filter((settledBy) => settledBy !== "creditNote"),
  ),
  each("refusals.", ISSUE_REFUSALS),
  each("draft.steps.", DRAFT_STEPS),
  each("draft.titles.", DRAFT_STEPS),
  each("evidence.readingRefusals.", READING_REFUSALS),
  each(
    "evidence.rows.",
    ROWS.map(({ id }) => id),
    ".name",
  ),
  each(
    "evidence.rows.",
    ROWS.map(({ why }) => why),
    ".why",
  ),
  each("labels.warnings.", SCAN_WARNINGS),
  each("draft.line.", ["today", "yesterday"]),
  each("ui.theme.", THEMES),
  each("ui.upload.", UPLOAD_STATES),
  each("links.faults.", PASSWORD_FAULTS),
  ...["spentTitle", "spent"].map((name) => each("links.", PURPOSES, `.${name}`)),
  ...["subject", "body", "link"].map((name) => each("mails.", MAILS, `.${name}`)),
  each("account.who.role.", ROLES),
  each("account.preferences.language.", PREFERRED_LANGUAGES),
  each("account.preferences.theme.", PREFERRED_THEMES),
  ...["label", "hint"].map((name) => each("account.preferences.density.", PREFERRED_DENSITIES, `.${name}`)),
  each(
    "navigation.",
    PLACES.map(({ key }) => key),
  ),
  each(
    "families.",
    FAMILY_LIST.map(({ code }) => code),
    ".name",
  ),
  ...FAMILY_KEYS,
  each("returns.findings.", FINDING_KINDS),
  each("returns.disposals.", DISPOSALS),
  each("returns.settle.moves.", SETTLING_MOVES),
  each(
    "returns.steps.",
    Object.values(BENCH_PLANS).flatMap((plan) =>
      plan.flatMap((step) => (step.does === "read" ? [] : [step.id])),
    ),
  ),
  each("goodsIn.conditions.", PARCEL_CONDITIONS),
  each("goodsIn.signs.", DANGER_SIGNS),
  each("goodsIn.match.reasons.", MATCH_REASONS),
  each("goodsIn.notes.", RETURN_NOTES),
  each("goodsIn.columns.", ["due", "place"]),
  ...["title", "none"].map((name) => each("goodsIn.", ["due", "toExamine"], `.${name}`)),
  each(
    "ruleBook.readings.",
    FAMILY_LIST.flatMap(({ readings }) => readings.map(({ code }) => code)),
  ),
];
