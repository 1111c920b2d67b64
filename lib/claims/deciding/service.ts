import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { Credit } from "@/lib/credits/credit";
import { frozenText } from "@/lib/credits/frozen-credit-shape";
import { rows, type Work } from "@/lib/db/unit-of-work";
import { addDays } from "@/lib/kernel/calendar-day";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { creditInMail } from "@/lib/credits/explained";
import { mailClaimPeople } from "@/lib/mail/outbox";
import { publicUrl } from "@/lib/web/settings";
import type { Claim } from "@/models/claim";
import { coverageForBoth, lineToCover, type CoveredLine } from "../cover/queries";
import { claimFacts, type ClaimFacts } from "../facts-shape";
import { nameOf } from "../parties/queries";
import { todayOf } from "@/lib/access/today-queries";
import { moveClaim } from "../moves/service";
import { printClaimNumber } from "../number";
import { claimPath } from "../paths";
import type { ReturnState } from "../lifecycle";
import { creditedShare, outcomeOfLines, REASONS, type Attribution } from "../verdict";
import { creditOfVerdict, setCreditStates } from "./credit-service";
import { checkReturns, restsOnNoFinding } from "./finding-waits";
import type { DecideInput } from "./schema";

type LineRefusal =
  | "sharesUnread"
  | "sharesNotOne"
  | "upheldNotWhole"
  | "partNotShared"
  | "reasonOfOtherOutcome"
  | "linesIncomplete"
  | "findingAwaited"
  | "returnReasonMissing";
type Seen = { facts: ClaimFacts; sha256: string };
type LineIds = { id: string; lineNumber: number; returnState: ReturnState };

const attributionOf = (shares: DecideInput["lines"][number]["shares"]): Attribution =>
  Object.fromEntries(Object.entries(shares).filter(([, share]) => share !== ""));

/** Every line answered once, shares that add to one, a reason that belongs to the outcome. */
function checkLines(input: DecideInput, lines: readonly LineIds[]): Outcome<true, LineRefusal> {
  const answered = new Set(input.lines.map((line) => line.lineId));
  if (answered.size !== lines.length || lines.some(({ id }) => !answered.has(id)))
    return refuse("linesIncomplete");
  for (const [index, line] of input.lines.entries()) {
    const share = creditedShare(line.outcome, attributionOf(line.shares));
    if (!share.ok) return { ...share, field: `lines.${index}.shares` };
    const allowed: readonly string[] = REASONS[line.outcome];
    if (!allowed.includes(line.reasonCode))
      return refuse("reasonOfOtherOutcome", {}, `lines.${index}.reasonCode`);
  }
  return checkReturns(lines, input.returnWaivedReason);
}

/** Why a line was decided without a finding; null where its part was examined. */
const waivedFor = ({ returnWaivedReason }: DecideInput, line: LineIds | undefined): string | null =>
  line && restsOnNoFinding(line.returnState) ? returnWaivedReason : null;

async function findSeen(work: Work, claim: Claim): Promise<Seen> {
  const [revision] = await rows<{ facts: unknown; sha256: string }>(
    work,
    "select facts, sha256 from claim_revisions where claim_id = $1 and revision = $2",
    [claim.id, claim.revision],
  );
  if (!revision) throw new Error(`claim ${claim.number} has no revision ${claim.revision}`);
  return { facts: claimFacts.parse(revision.facts), sha256: revision.sha256 };
}

async function coverLine(
  work: Work,
  claim: Claim,
  { facts, lineNumber }: { facts: ClaimFacts; lineNumber: number },
): Promise<CoveredLine> {
  const line = facts.lines.find((one) => one.lineNumber === lineNumber);
  if (!line) throw new Error(`claim ${claim.number} has no line ${lineNumber} in its facts`);
  return coverageForBoth(work, lineToCover(claim, { facts, line }, 0));
}

type Given = { input: DecideInput; lines: readonly LineIds[]; seen: Seen };
type Written = { verdictId: string; contestDays: number; credit: Credit };
type AnsweredLine = DecideInput["lines"][number] &
  CoveredLine & { lineNumber: number; attribution: Attribution; waived: string | null };

async function coverLines(work: Work, claim: Claim, { input, lines, seen }: Given): Promise<AnsweredLine[]> {
  const answered: AnsweredLine[] = [];
  for (const line of input.lines) {
    const decided = lines.find(({ id }) => id === line.lineId);
    const lineNumber = decided?.lineNumber ?? 0;
    const cover = await coverLine(work, claim, { facts: seen.facts, lineNumber });
    const attribution = attributionOf(line.shares);
    answered.push({ ...line, ...cover, lineNumber, attribution, waived: waivedFor(input, decided) });
  }
  return answered;
}

async function insertVerdict(work: Work, claim: Claim, given: Given & { credit: Credit }): Promise<string> {
  const { input, seen, credit } = given;
  const outcome = outcomeOfLines(input.lines.map((line) => line.outcome));
  const [verdict] = await rows<{ id: string }>(
    work,
    `insert into verdicts (claim_id, seller_id, workshop_id, revision, revision_sha256, outcome, letter, decided_by_id, reverses_id,
       credit, credit_net_minor, credit_total_minor)
     values ($1, $2, $3, $4, $5, $6, $7, $8,
       (select v.id from verdicts v where v.claim_id = $1 order by v.decided_at desc limit 1), $9, $10, $11) returning id`,
    [
      claim.id,
      claim.sellerId,
      claim.workshopId,
      input.revision,
      seen.sha256,
      outcome,
      input.letter,
      work.actor.userId,
      frozenText(credit),
      String(credit.netMinor),
      String(credit.totalMinor),
    ],
  );
  if (!verdict) throw new Error(`the verdict on claim ${claim.number} was not kept`);
  return verdict.id;
}

/** The verdict with its lines: what was seen, what rule, what cover and credit were, word for word and for good. */
async function writeVerdict(work: Work, claim: Claim, given: Given): Promise<Written> {
  const answered = await coverLines(work, claim, given);
  const toCredit = { facts: given.seen.facts, lines: answered, on: todayOf(work.actor) };
  const credit = await creditOfVerdict(work, claim, toCredit);
  const verdictId = await insertVerdict(work, claim, { ...given, credit });
  let contestDays = 0;
  for (const line of answered) {
    contestDays = Math.max(contestDays, line.terms?.body.contestDays ?? DAYS_TO_CONTEST);
    await writeLine(work, claim, { ...line, verdictId });
  }
  await setCreditStates(work, claim, credit);
  return { verdictId, contestDays, credit };
}

async function writeLine(work: Work, claim: Claim, line: AnsweredLine & { verdictId: string }) {
  const attribution = JSON.stringify(line.attribution);
  await rows(
    work,
    `insert into verdict_lines (verdict_id, line_id, seller_id, workshop_id, outcome, attribution, reason_code, reason,
       rule_version_id, coverage, return_waived_reason)
     values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11)`,
    [
      line.verdictId,
      line.lineId,
      claim.sellerId,
      claim.workshopId,
      line.outcome,
      attribution,
      line.reasonCode,
      line.reason,
      line.terms?.id ?? null,
      JSON.stringify(line.coverage),
      line.waived,
    ],
  );
  await rows(
    work,
    `update claim_lines set verdict = $2, attribution = $3, return_waived_reason = $4 where id = $1 returning id`,
    [line.lineId, line.outcome, attribution, line.waived],
  );
}

/** Where no terms were in force there still is a time to object. */
const DAYS_TO_CONTEST = 14;

/**
 * Decides a claim line by line. The verdict binds to the revision that was on the screen: where the workshop has sent
 * another since, it refuses `staleVersion` and nothing is written.
 */
export const decideClaim = (actor: Actor, input: DecideInput) =>
  moveClaim<LineRefusal | "staleVersion">(
    actor,
    { number: input.number, move: "decide" },
    async (claim, work) => {
      if (claim.revision !== input.revision) return refuse("staleVersion");
      const lines = await rows<LineIds>(
        work,
        `select id, line_number as "lineNumber", return_state as "returnState" from claim_lines
         where claim_id = $1 order by line_number`,
        [claim.id],
      );
      const checked = checkLines(input, lines);
      if (!checked.ok) return checked;

      const seen = await findSeen(work, claim);
      const { verdictId, contestDays, credit } = await writeVerdict(work, claim, { input, lines, seen });
      const outcome = outcomeOfLines(input.lines.map((line) => line.outcome));
      const contestUntil = addDays(todayOf(actor), contestDays);
      await mailClaimPeople(
        work,
        { claimId: claim.id, to: "workshop" },
        {
          kind: "claimDecided",
          dedupeKey: `claimDecided:${verdictId}`,
          params: {
            link: publicUrl(claimPath(claim)),
            number: printClaimNumber(input.number),
            distributor: await nameOf(work, claim.sellerId),
            outcome,
            letter: input.letter,
            contestUntil,
            credit: creditInMail(credit),
          },
        },
      );
      return ok({
        changes: {
          outcome,
          decidedAt: new Date(),
          decidedById: actor.userId,
          contestUntil,
          holderId: null,
          heldUntil: null,
          parkedWithId: null,
          parkedQuestion: null,
        },
        detail: { outcome, revision: input.revision, contestUntil },
      });
    },
  );
