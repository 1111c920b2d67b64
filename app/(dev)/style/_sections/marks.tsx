import { Card } from "@/components/ui/card";
import {
  ClaimMark,
  CreditMark,
  EvidenceMark,
  LateMark,
  MatchMark,
  PartMark,
  SignalMark,
} from "@/components/ui/status-mark";

const CLAIM = [
  "draft",
  "filed",
  "beingJudged",
  "answerNeeded",
  "upheld",
  "upheldInPart",
  "declined",
  "contested",
  "settled",
  "withdrawn",
  "lapsed",
  "discarded",
] as const;
const PART = [
  "notNeeded",
  "awaited",
  "sent",
  "received",
  "examined",
  "disposed",
  "scrapOnSite",
  "notSent",
  "missing",
] as const;
const CREDIT = ["none", "due", "noteIssued", "allocated", "paidOut", "replaced", "countered"] as const;

/** Every state of every track. */
export function Marks() {
  return (
    <Card title="Marks">
      <div className="grid gap-5">
        <p className="flex flex-wrap gap-3">
          {CLAIM.map((state) => (
            <ClaimMark key={state} state={state} />
          ))}
        </p>
        <p className="flex flex-wrap gap-x-5 gap-y-2">
          {CLAIM.map((state) => (
            <ClaimMark key={state} state={state} plain />
          ))}
        </p>
        <p className="flex flex-wrap gap-3">
          <EvidenceMark state="done" />
          <EvidenceMark state="toDo" />
          <EvidenceMark state="cannotGet" />
          <LateMark daysOver={3} />
        </p>
        <p className="flex flex-wrap gap-x-5 gap-y-2">
          {PART.map((state) => (
            <PartMark key={state} state={state} />
          ))}
        </p>
        <p className="flex flex-wrap gap-x-5 gap-y-2">
          {CREDIT.map((state) => (
            <CreditMark key={state} state={state} />
          ))}
        </p>
        <p className="flex flex-wrap gap-3">
          <SignalMark state="quiet" />
          <SignalMark state="lookInto" />
          <SignalMark state="act" />
          <SignalMark state="notYetKnown" />
        </p>
        <p className="flex flex-wrap gap-3">
          <MatchMark state="sure" />
          <MatchMark state="likely" />
          <MatchMark state="check" />
        </p>
      </div>
    </Card>
  );
}
