import "server-only";
import { fn, Op } from "sequelize";
import type { Actor } from "@/lib/access/actor";
import { printClaimNumber } from "@/lib/claims/number";
import { claimPath } from "@/lib/claims/paths";
import { rows, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { mailClaimPeople } from "@/lib/mail/outbox";
import { publicUrl } from "@/lib/web/settings";
import type { Claim } from "@/models/claim";
import { Finding } from "@/models/finding";
import { Parcel } from "@/models/parcel";
import { ReturnLine } from "@/models/return-line";
import { benchLogOf, claimTimeToFault, factsAsSent, type BenchLog } from "./bench-facts-queries";
import { readBenchReadings, readRunMinutes, type BenchReading } from "./bench-readings";
import { findingAllowed } from "./bench-run";
import { changeReturn, type Found, type PartRow } from "./change-service";
import { isQuarantined } from "./danger";
import type { ParcelCondition } from "./kinds";
import type { DisposeInput, FindingInput } from "./schema";

type Refused =
  "readingUnread" | "runLogBeingRead" | "noFaultTooShort" | "noFaultInQuarantine" | "familyUnknown";

const MINUTE_MS = 60_000;

type Measured = {
  readonly runMinutes: number | null;
  readonly readings: readonly BenchReading[];
  readonly log: BenchLog | null;
};

async function conditionOf({ transaction }: Work, { parcelId }: PartRow): Promise<ParcelCondition | null> {
  const parcel = parcelId === null ? null : await Parcel.findByPk(parcelId, { transaction });
  return parcel?.condition ?? null;
}

/** What was measured, once it is clear that the finding may be written. */
async function measure(
  work: Work,
  { claim, line }: { claim: Claim; line: PartRow },
  input: FindingInput,
): Promise<Outcome<Measured, Refused>> {
  if (!line.family) return refuse("familyUnknown");
  const run = readRunMinutes(input.runMinutes);
  if (!run.ok) return run;
  const readings = readBenchReadings(input.readings, line.family);
  if (!readings.ok) return readings;
  const log = await benchLogOf(work, { claimId: claim.id, lineNumber: line.lineNumber });
  if (log && log.summary === null && input.kind === "noFaultFound")
    return refuse("runLogBeingRead", {}, "kind");
  const allowed = findingAllowed({
    kind: input.kind,
    run: { minutes: run.value, logSummary: log?.summary ?? null },
    claimSeconds: await claimTimeToFault(work, claim.id, await factsAsSent(work, claim.id)),
    isQuarantined: isQuarantined(line.family, await conditionOf(work, line)),
  });
  return allowed.ok ? ok({ runMinutes: run.value, readings: readings.value, log }) : allowed;
}

type Written = { readonly claim: Claim; readonly line: PartRow; readonly input: FindingInput };

async function writeFinding(
  work: Work,
  { claim, line, input }: Written,
  measured: Measured,
): Promise<string> {
  const looks = Object.entries(input.looks).filter(([, text]) => text !== "");
  const { id: claimId, sellerId, workshopId } = claim;
  const made = await Finding.create(
    {
      claimId,
      sellerId,
      workshopId,
      lineId: line.lineId,
      kind: input.kind,
      note: input.note,
      runMinutes: measured.runMinutes === null ? null : String(measured.runMinutes),
      evidenceId: measured.log?.id ?? null,
      bench: looks.map(([step, text]) => ({ step, text })),
      foundById: work.actor.userId,
    },
    { transaction: work.transaction },
  );
  await rows(
    work,
    `insert into readings (claim_id, seller_id, workshop_id, revision, line_number, kind, raw_text, unit, canonical_value,
       temperature_celsius, instrument, taken_by, finding_id)
     select $1, $2, $3, $4, $5, r.kind, r."rawText", r.unit, r."canonicalValue", r."temperatureCelsius", r.instrument,
       'goodsIn', $6
     from jsonb_to_recordset($7::jsonb) as r (kind text, "rawText" text, unit text, "canonicalValue" numeric,
       "temperatureCelsius" numeric, instrument text)`,
    [
      claimId,
      sellerId,
      workshopId,
      claim.revision,
      line.lineNumber,
      made.id,
      JSON.stringify(measured.readings),
    ],
  );
  return made.id;
}

/** Tells whoever holds the claim that the bench is done with it. */
const mailHolder = (work: Work, { claim, input }: Written, findingId: string) =>
  mailClaimPeople(
    work,
    { claimId: claim.id, to: "holder" },
    {
      kind: "partExamined",
      dedupeKey: `partExamined:${findingId}`,
      params: {
        link: publicUrl(claimPath(claim)),
        number: printClaimNumber(claim.number),
        finding: input.kind,
        note: input.note,
      },
    },
  );

/** The same finding by the same person within the last minute: the button was pressed twice. */
const isJustFound =
  ({ kind, note }: FindingInput) =>
  async (work: Work, lines: readonly PartRow[]): Promise<boolean> => {
    const same = await Finding.findOne({
      where: {
        lineId: lines.map(({ lineId }) => lineId),
        foundById: work.actor.userId,
        kind,
        note,
        foundAt: { [Op.gt]: new Date(Date.now() - MINUTE_MS) },
      },
      transaction: work.transaction,
    });
    return same !== null;
  };

const onlyLine = ({ lines }: Found): PartRow => {
  const [line] = lines;
  if (!line) throw new RangeError("a change of one line has that line");
  return line;
};

/**
 * What the bench found on one part. A second look is a second finding; the newest counts. Refuses `noFaultTooShort`
 * while the part has not run as long as the workshop's run to the fault, 45 minutes where the claim states none.
 */
export const recordFinding = (actor: Actor, input: FindingInput) =>
  changeReturn<Refused>(actor, {
    number: input.number,
    move: "examine",
    lineNumber: input.lineNumber,
    isDone: isJustFound(input),
    decide: async (found, work) => {
      const written = { claim: found.claim, line: onlyLine(found), input };
      const measured = await measure(work, written, input);
      if (!measured.ok) return measured;
      const id = await writeFinding(work, written, measured.value);
      await mailHolder(work, written, id);
      const { lineId, lineNumber } = written.line;
      return ok({
        lineIds: [lineId],
        detail: {
          returnNumber: input.number,
          lines: [lineNumber],
          finding: input.kind,
          reason: input.note,
        },
      });
    },
  });

/** Where the part ends: kept, scrapped, sent to the maker, or sent back. */
export const disposePart = (actor: Actor, { number, lineNumber, as }: DisposeInput) =>
  changeReturn<never>(actor, {
    number,
    move: "dispose",
    lineNumber,
    decide: async (found, work) => {
      const line = onlyLine(found);
      await ReturnLine.update(
        { disposedAs: as, disposedAt: fn("now"), disposedById: actor.userId },
        { where: { returnId: found.returned.id, lineId: line.lineId }, transaction: work.transaction },
      );
      return ok({
        lineIds: [line.lineId],
        detail: { returnNumber: number, lines: [line.lineNumber], disposedAs: as },
      });
    },
  });
