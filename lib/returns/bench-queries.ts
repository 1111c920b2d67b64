import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { ClaimFacts } from "@/lib/claims/facts-shape";
import { unitOfWork } from "@/lib/db/unit-of-work";
import { isFamilyCode } from "@/lib/parts/families";
import { BENCH_PLANS, type BenchStep } from "./bench-plan";
import { benchLogOf, claimTimeToFault, factsAsSent } from "./bench-facts-queries";
import { loggedRunSeconds, neededRunSeconds } from "./bench-run";
import { returnIn } from "./card-queries";
import { receivesParts } from "./parcel-service";
import type { BenchStepView, BenchView, FindingReading } from "./view";

/** What the workshop measured of the same thing; the run's own is its time to the fault. */
const kindOf = (step: BenchStep): string | null =>
  step.does === "read" ? step.reading : step.does === "run" ? "timeToFault" : null;

const theirs = (facts: ClaimFacts | null, kind: string | null): FindingReading[] =>
  (facts?.readings ?? []).flatMap((one) =>
    one.kind === kind
      ? [
          {
            kind: one.kind,
            rawText: one.rawText,
            unit: one.unit,
            value: one.canonicalValue,
            temperatureCelsius: one.temperatureCelsius,
            instrument: one.instrument,
          },
        ]
      : [],
  );

const stepsOf = (family: string, facts: ClaimFacts | null): BenchStepView[] =>
  isFamilyCode(family)
    ? BENCH_PLANS[family].map((step) => ({ ...step, theirs: theirs(facts, kindOf(step)) }))
    : [];

type Asked = { readonly number: string; readonly lineNumber: number };

/** The bench of one line: the plan with the workshop's figures beside it, and how long the part must run. Null where there is none. */
export const findBench = (actor: Actor, { number, lineNumber }: Asked): Promise<BenchView | null> =>
  unitOfWork(actor, async (work) => {
    const returned = await returnIn(work, number);
    const line = returned?.lines.find((one) => one.lineNumber === lineNumber);
    if (!returned || !line || returned.side !== "distributor" || !receivesParts(actor)) return null;
    const facts = await factsAsSent(work, returned.claimId);
    const claimSeconds = await claimTimeToFault(work, returned.claimId, facts);
    const log = await benchLogOf(work, { claimId: returned.claimId, lineNumber });
    return {
      returned,
      line,
      steps: stepsOf(line.family, facts),
      symptom: facts?.symptom ?? null,
      workshopNote: facts?.note ?? "",
      claimSeconds,
      neededSeconds: neededRunSeconds(claimSeconds),
      log,
      loggedSeconds: loggedRunSeconds(log?.summary ?? null),
    };
  });
