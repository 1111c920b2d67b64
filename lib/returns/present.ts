import "server-only";
import type { Actor } from "@/lib/access/actor";
import { todayOf } from "@/lib/access/today-queries";
import { normaliseSerial } from "@/lib/labels/serial";
import { familyOf } from "@/lib/parts/families";
import type { FindingRow, ReturnLineRow, ReturnRow } from "./card-queries";
import { asksForDanger, isQuarantined } from "./danger";
import { partMovesOpenTo } from "./lifecycle";
import { printReturnNumber } from "./number";
import type { FindingReading, FindingView, ReturnLineView, ReturnView } from "./view";

type Stored = {
  readonly returns: readonly ReturnRow[];
  readonly lines: readonly ReturnLineRow[];
  readonly findings: readonly FindingRow[];
};

const iso = (at: Date | null): string | null => at?.toISOString() ?? null;

const looksIn = (bench: unknown): FindingView["looks"] =>
  Array.isArray(bench)
    ? bench.flatMap((one: unknown) =>
        typeof one === "object" &&
        one !== null &&
        "step" in one &&
        "text" in one &&
        typeof one.step === "string" &&
        typeof one.text === "string"
          ? [{ step: one.step, text: one.text }]
          : [],
      )
    : [];

const presentReading = (one: FindingRow["readings"][number]): FindingReading => ({
  ...one,
  instrument: one.instrument ?? "",
});

/** The bench signs with its name; the other side, which sees no names of people there, with that of the distributor. */
const presentFinding = (finding: FindingRow, sellerName: string): FindingView => ({
  kind: finding.kind,
  note: finding.note,
  runMinutes: finding.runMinutes === null ? null : Number(finding.runMinutes),
  foundAt: finding.foundAt.toISOString(),
  foundBy: finding.foundBy ?? sellerName,
  looks: looksIn(finding.bench),
  readings: finding.readings.map(presentReading),
  log: finding.logId === null ? null : { id: finding.logId, summary: finding.logSummary },
});

const isOtherSerial = (seen: string | null, claimed: string | null): boolean =>
  seen !== null && claimed !== null && normaliseSerial(seen) !== normaliseSerial(claimed);

function presentLine(
  actor: Actor,
  { returned, line, finding }: { returned: ReturnRow; line: ReturnLineRow; finding: FindingRow | undefined },
): ReturnLineView {
  const family = familyOf(line.family);
  const isSeller = actor.organisationId === returned.sellerId;
  const today = todayOf(actor);
  return {
    lineId: line.lineId,
    lineNumber: line.lineNumber,
    partName: line.partName,
    partNumber: line.partNumber,
    family: line.family,
    serial: line.serial,
    state: line.state,
    moves: partMovesOpenTo(actor, { ...returned, returnState: line.state }, today),
    serialSeen: line.serialSeen,
    isOtherSerial: isOtherSerial(line.serialSeen, line.serial),
    asksForDanger: asksForDanger(family),
    isQuarantined: isQuarantined(family, line.condition),
    // Where a part lies and how its parcel looked is the distributor's own.
    place: isSeller ? line.place : null,
    condition: isSeller ? line.condition : null,
    parcelId: isSeller ? line.parcelId : null,
    receivedAt: iso(line.receivedAt),
    disposedAs: line.disposedAs,
    finding: finding ? presentFinding(finding, returned.sellerName) : null,
  };
}

/** Returns as one party may see them; those whose lines all went on to a newer return are left out. */
export const presentReturns = (actor: Actor, { returns, lines, findings }: Stored): ReturnView[] =>
  returns.flatMap((returned) => {
    const own = lines.filter(({ returnId }) => returnId === returned.id);
    if (own.length === 0) return [];
    const {
      id: _id,
      holderId: _holder,
      claimState: _state,
      sellerId,
      workshopId: _workshop,
      ...plain
    } = returned;
    const { dispatchedAt, calledInAt, ...rest } = plain;
    return [
      {
        ...rest,
        printed: printReturnNumber(returned.number),
        side: actor.organisationId === sellerId ? "distributor" : "workshop",
        calledInAt: calledInAt.toISOString(),
        sentAt: iso(dispatchedAt),
        lines: own.map((line) =>
          presentLine(actor, {
            returned,
            line,
            finding: findings.find(({ lineId }) => lineId === line.lineId),
          }),
        ),
      },
    ];
  });
