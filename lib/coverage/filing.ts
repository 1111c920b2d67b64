import { daysBetween } from "@/lib/kernel/calendar-day";
import type { Step } from "@/lib/kernel/explanation";
import type { CoverageFacts, TermsInForce } from "./facts";
import { reason, type CoverageReason } from "./reasons";
import { cited, coverageStep } from "./steps";

type Filing = { readonly reasons: readonly CoverageReason[]; readonly steps: readonly Step[] };

/**
 * Days from failure to filing against the limit of the terms. The filing day is the distributor's; where zones make it
 * seem to lie before the failure, no day has passed. Late: the terms say refuse, reduce, or accept with a reason.
 */
export function filingOf({ failedOn, filing }: CoverageFacts, { terms, version }: TermsInForce): Filing {
  const { filedOn, timeZone } = filing;
  const { filingLimitDays, lateFiling } = terms;
  const daysToFiling = Math.max(0, daysBetween(failedOn, filedOn));
  const steps = [
    cited(
      version,
      coverageStep("filingDays", String(daysToFiling), { failedOn, filedOn, timeZone, filingLimitDays }),
    ),
  ];
  if (daysToFiling <= filingLimitDays) return { reasons: [], steps };

  const late = { daysToFiling, filingLimitDays };
  switch (lateFiling.policy) {
    case "refuse":
      return { reasons: [reason("filedLate", late)], steps };
    case "reduce":
      return { reasons: [reason("filedLateReduced", { ...late, fraction: lateFiling.fraction })], steps };
    case "accept":
      return {
        reasons: [reason(filing.lateReasonGiven ? "filedLateAccepted" : "lateReasonMissing", late)],
        steps,
      };
  }
}
