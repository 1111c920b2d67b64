import "server-only";
import { fn } from "sequelize";
import type { Actor } from "@/lib/access/actor";
import { rows, type Work } from "@/lib/db/unit-of-work";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { mailClaimPeople } from "@/lib/mail/outbox";
import { familyOf } from "@/lib/parts/families";
import { symptomOf } from "@/lib/parts/family";
import { answerDueAt } from "@/lib/rule-book/queries";
import { publicUrl } from "@/lib/web/settings";
import { sha256Of } from "@/lib/web/sha256";
import type { Claim } from "@/models/claim";
import { ClaimDraft as DraftRow } from "@/models/claim-draft";
import { ClaimLine } from "@/models/claim-line";
import { ClaimQuery } from "@/models/claim-query";
import { ClaimRevision } from "@/models/claim-revision";
import { clockRunning, type DistributorClock } from "../clock/distributor-clock";
import { storedDraft } from "../draft-shape";
import { canonicalText, type ClaimFacts } from "../facts-shape";
import { draftContext } from "../filing/queries";
import { besidesMinor } from "../filing/read-asked";
import { readDraft } from "../filing/read-draft";
import { nameOf } from "../parties/queries";
import { moveClaim } from "../moves/service";
import { printClaimNumber } from "../number";
import { claimPath } from "../paths";
import { flagDoubts } from "./doubts-queries";
import { recordService, writeLines } from "./records-service";

/** Freezes what the draft says into the next revision of the claim, with its lines, readings and evidence. */
async function sendRevision(
  claim: Claim,
  work: Work,
  now: Date,
): Promise<Outcome<ClaimFacts, "draftIncomplete">> {
  const kept = await DraftRow.findOne({
    where: { claimId: claim.id },
    transaction: work.transaction,
    rejectOnEmpty: true,
  });
  const draft = storedDraft(kept.body);
  const { facts, problems } = readDraft(draft, await draftContext(work, claim, { draft, now }));
  if (!facts) return refuse("draftIncomplete", { count: problems.length });

  await recordService(work, claim, { facts, draft });
  await writeLines(work, claim, facts);
  await writeRevision(work, claim, facts);
  return ok(facts);
}

async function writeRevision(work: Work, claim: Claim, facts: ClaimFacts) {
  const text = canonicalText(facts);
  const revision = claim.revision + 1;
  const { id: claimId, sellerId, workshopId } = claim;
  const made = await ClaimRevision.create(
    { claimId, sellerId, workshopId, revision, facts, sha256: sha256Of(text), sentById: work.actor.userId },
    { transaction: work.transaction },
  );
  await rows(
    work,
    `insert into revision_evidence (revision_id, evidence_id, seller_id, workshop_id)
     select $1, e.id, e.seller_id, e.workshop_id from evidence_files e where e.id = any ($2::uuid[]) and e.claim_id = $3`,
    [made.id, facts.evidence.map((file) => file.id), claimId],
  );
  await rows(
    work,
    `insert into readings (claim_id, seller_id, workshop_id, revision, kind, raw_text, unit, canonical_value,
       temperature_celsius, instrument, taken_by)
     select $1, $2, $3, $4, r.kind, r."rawText", r.unit, r."canonicalValue", r."temperatureCelsius", r.instrument, 'workshop'
     from jsonb_to_recordset($5::jsonb) as r (kind text, "rawText" text, unit text, "canonicalValue" numeric,
       "temperatureCelsius" numeric, instrument text)`,
    [claimId, sellerId, workshopId, revision, JSON.stringify(facts.readings)],
  );
}

/** A claim somebody may be hurt by is told apart from the first moment it is known. */
const safetyOf = (claim: Claim, facts: ClaimFacts, now: Date) => {
  const family = familyOf(facts.family);
  const symptom = family && symptomOf(family, facts.symptom);
  const isReported = facts.incident !== null || symptom?.mayBeReportable === true;
  return { safetyReported: isReported, incidentKnownAt: isReported ? (claim.incidentKnownAt ?? now) : null };
};

const sumOf = (facts: ClaimFacts): string =>
  facts.lines.reduce((sum, line) => sum + BigInt(line.askedMinor), besidesMinor(facts)).toString();

/** What every sending writes on the claim's row. */
const changesOf = (claim: Claim, facts: ClaimFacts, now: Date) => ({
  revision: claim.revision + 1,
  symptom: facts.symptom,
  failedOn: calendarDay(facts.failedOn),
  askedMinor: sumOf(facts),
  ...safetyOf(claim, facts, now),
});

/** Sends a draft as revision 1. Refuses `draftIncomplete` with the number of things still to do. */
export const fileClaim = (actor: Actor, { number }: { number: string }) =>
  moveClaim<"draftIncomplete">(actor, { number, move: "file" }, async (claim, work) => {
    const now = new Date();
    const sent = await sendRevision(claim, work, now);
    if (!sent.ok) return sent;
    const dueAt = await answerDueAt(work, claim.sellerId, now);
    await flagDoubts(work, claim, sent.value);
    await mailClaimPeople(
      work,
      { claimId: claim.id, to: "workshop" },
      {
        kind: "claimFiled",
        dedupeKey: `claimFiled:${claim.id}`,
        params: {
          link: publicUrl(claimPath(claim)),
          number: printClaimNumber(number),
          distributor: await nameOf(work, claim.sellerId),
          part: sent.value.lines[0]?.part.name ?? "",
          answerBy: dueAt?.toISOString() ?? "",
        },
      },
    );
    return ok({
      changes: {
        ...changesOf(claim, sent.value, now),
        filedAt: now,
        filedOn: calendarDay(sent.value.filedOn),
        answerDueAt: dueAt,
      },
      detail: { revision: claim.revision + 1, incident: sent.value.incident !== null },
    });
  });

/** The clock after an answer: it runs again, unless a part that was called in is still with the workshop. */
async function clockAfterAnswer(work: Work, claim: Claim, now: Date): Promise<DistributorClock> {
  const awaited = await ClaimLine.findOne({
    where: { claimId: claim.id, returnState: "awaited" },
    transaction: work.transaction,
  });
  const running = clockRunning(claim, now);
  return awaited ? { ...running, clockStoppedAt: now } : running;
}

/** Answers a query by sending the next revision; the distributor's clock runs again, later by as long as it stood. */
export const answerQuery = (actor: Actor, { number }: { number: string }) =>
  moveClaim<"draftIncomplete">(actor, { number, move: "answer" }, async (claim, work) => {
    const now = new Date();
    const sent = await sendRevision(claim, work, now);
    if (!sent.ok) return sent;
    const revision = claim.revision + 1;
    await ClaimQuery.update(
      { answeredAt: fn("now"), answeredRevision: revision },
      { where: { claimId: claim.id, answeredAt: null }, transaction: work.transaction },
    );
    await flagDoubts(work, claim, sent.value);
    await mailClaimPeople(
      work,
      { claimId: claim.id, to: "holder" },
      {
        kind: "queryAnswered",
        dedupeKey: `queryAnswered:${claim.id}:${revision}`,
        params: {
          link: publicUrl(claimPath(claim)),
          number: printClaimNumber(number),
          workshop: await nameOf(work, claim.workshopId),
          revision,
        },
      },
    );
    return ok({
      changes: {
        ...changesOf(claim, sent.value, now),
        holderId: null,
        heldUntil: null,
        ...(await clockAfterAnswer(work, claim, now)),
        queryLapsesOn: null,
      },
      detail: { revision },
    });
  });
