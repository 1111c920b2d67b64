import "server-only";
import type { Actor } from "@/lib/access/actor";
import { todayOf } from "@/lib/access/today-queries";
import type { Coverage } from "@/lib/coverage/coverage";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { familyOf } from "@/lib/parts/families";
import { evidenceListOn, findRule } from "@/lib/rule-book/queries";
import { coverageOfLine, lineToCover } from "../cover/queries";
import type { ClaimFacts } from "../facts-shape";
import { seesClaim } from "../seeing";
import { judgeReading, type LimitsInForce } from "../sheet/judge-reading";
import { factsOf, presentFile, presentSheet, type WorkedOut } from "../sheet/present";
import { sheetRows, type SheetRows } from "../sheet/queries";
import { evidenceRows, missingRows } from "../sheet/rows";
import type { CaseLine, EvidenceRowView, SheetView } from "../sheet/view";

/** Limits of readings follow the fitting day; without one, the shipment, then the failure. */
async function limitsInForce(work: Work, sellerId: string, facts: ClaimFacts): Promise<LimitsInForce | null> {
  const [line] = facts.lines;
  if (!line) return null;
  const on = calendarDay(line.fittedOn ?? line.invoiceLine?.shippedOn ?? facts.failedOn);
  const rule = await findRule(work, "limits", { sellerId, family: facts.family, partId: line.part.id, on });
  return rule && { limits: rule.body, rule: `${rule.ruleNumber} (${rule.validFrom})` };
}

async function workOutRows(
  work: Work,
  sheet: SheetRows,
  { facts, inForce }: { facts: ClaimFacts; inForce: LimitsInForce | null },
): Promise<EvidenceRowView[]> {
  const { sellerId } = sheet.claim;
  const family = familyOf(facts.family);
  if (!family) return [];
  const list = await evidenceListOn(work, {
    sellerId,
    family: facts.family,
    symptom: facts.symptom,
    on: calendarDay(facts.filedOn),
  });
  return evidenceRows(list.rows, {
    facts,
    files: sheet.evidence.map((file) => presentFile(file, facts)),
    readings: facts.readings.map((reading) => judgeReading(reading, family, inForce)),
  });
}

async function workOutCoverage(
  work: Work,
  sheet: SheetRows,
  { facts, missing }: { facts: ClaimFacts; missing: number },
): Promise<Map<number, Coverage>> {
  const covered = new Map<number, Coverage>();
  for (const line of facts.lines) {
    const asked = lineToCover(sheet.claim, { facts, line }, missing);
    const { coverage } = await coverageOfLine(work, asked);
    covered.set(line.lineNumber, coverage);
  }
  return covered;
}

type Counts = Pick<CaseLine, "sameBatch" | "sameWorkshopThisMonth" | "sameVehicle">;

/** Other claims that a case is read against; each count stops where nobody reads further. */
async function countsAround(work: Work, claimId: string): Promise<Counts> {
  const [counts] = await rows<Counts>(
    work,
    `select
       (select count(*)::int from (select distinct o.claim_id from claim_lines l join units u on u.id = l.unit_id
          join units ou on ou.seller_id = u.seller_id and ou.batch_id = u.batch_id
          join claim_lines o on o.seller_id = ou.seller_id and o.unit_id = ou.id and o.claim_id <> l.claim_id
        where l.claim_id = c.id limit 100) b) as "sameBatch",
       (select count(*)::int from (select 1 from claims o where o.seller_id = c.seller_id and o.workshop_id = c.workshop_id
          and o.id <> c.id and o.filed_at > c.filed_at - interval '30 days' and o.state <> 'draft' limit 100) w) as "sameWorkshopThisMonth",
       (select count(*)::int from (select 1 from claims o where o.workshop_id = c.workshop_id and o.vehicle_id = c.vehicle_id
          and o.seller_id = c.seller_id and o.id <> c.id and o.state <> 'draft' limit 100) v) as "sameVehicle"
     from claims c where c.id = $1`,
    [claimId],
  );
  return counts ?? { sameBatch: 0, sameWorkshopThisMonth: 0, sameVehicle: 0 };
}

const NOTHING: WorkedOut = { coverage: new Map(), rows: [], limits: null, caseLine: null };

async function workOut(work: Work, sheet: SheetRows): Promise<WorkedOut> {
  const facts = factsOf(sheet);
  if (!facts) return NOTHING;
  const inForce = await limitsInForce(work, sheet.claim.sellerId, facts);
  const limits = inForce?.limits ?? null;
  const list = await workOutRows(work, sheet, { facts, inForce });
  const coverage = await workOutCoverage(work, sheet, { facts, missing: missingRows(list) });
  if (work.actor.organisationId !== sheet.claim.sellerId)
    return { coverage, rows: list, limits, caseLine: null };
  const first = coverage.get(1);
  return {
    coverage,
    rows: list,
    limits,
    caseLine: {
      monthsUsed: first?.monthsUsed ?? null,
      daysLeft: first?.daysLeft ?? null,
      evidenceDone: list.filter((row) => row.state === "done").length,
      evidenceAll: list.length,
      ...(await countsAround(work, sheet.claim.id)),
    },
  };
}

/** The Claim sheet as the asking organisation may see it; null where it has no such claim. */
export const findClaimSheet = (actor: Actor, number: string): Promise<SheetView | null> =>
  unitOfWork(actor, async (work) => {
    const sheet = await sheetRows(work, number);
    if (!sheet || !seesClaim(actor, sheet.claim)) return null;
    return presentSheet(actor, sheet, {
      ...(await workOut(work, sheet)),
      todayOn: todayOf(actor),
    });
  });
