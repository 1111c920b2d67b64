import type { Metadata } from "next";
import { notFound, redirect } from "next/navigation";
import { CreditCard } from "@/components/credits/credit-card";
import { CaseLineView } from "@/components/sheet/case-line";
import { ConditionCard } from "@/components/sheet/condition-card";
import { EvidenceCard } from "@/components/sheet/evidence-card";
import { FlagList } from "@/components/sheet/flag-list";
import { LineCard } from "@/components/sheet/line-card";
import { Record } from "@/components/sheet/record";
import { SentNote } from "@/components/sheet/sent-note";
import { SheetActions } from "@/components/sheet/sheet-actions";
import { SheetHead } from "@/components/sheet/sheet-head";
import { Talk } from "@/components/sheet/talk";
import { VerdictCard } from "@/components/sheet/verdict-card";
import { listColleagues } from "@/lib/claims/judging/queries";
import { claimDigits } from "@/lib/claims/number";
import { claimPath, draftStepPath } from "@/lib/claims/paths";
import { findClaimSheet } from "@/lib/claims/reading/queries";
import { labelQuery } from "@/lib/returns/schema";
import { requireSession } from "@/lib/web/session";
import {
  acceptAction,
  contestAction,
  parkAction,
  putBackAction,
  reopenAction,
  takeAction,
  takeOverAction,
  withdrawAction,
} from "./actions";
import { CalledIn } from "./called-in";

type Search = { sent?: string; cells?: string };
type Props = { params: Promise<{ number: string }>; searchParams: Promise<Search> };

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { number } = await params;
  return { title: decodeURIComponent(number).slice(0, 12) };
}

/** The one page of a claim: facts, evidence, talk, money and record, each side seeing what is its own. */
export default async function ClaimSheetPage({ params, searchParams }: Props) {
  const [session, { number }, { sent, cells }] = await Promise.all([requireSession(), params, searchParams]);
  const { actor } = session;
  const digits = claimDigits(number);
  const sheet = digits.length === 8 ? await findClaimSheet(actor, digits) : null;
  if (!sheet) notFound();
  if (sheet.state === "draft") redirect(draftStepPath({ number: digits }, "part"));
  const colleagues = sheet.moves.includes("decide") ? await listColleagues(actor) : [];
  const actions = {
    take: takeAction,
    takeOver: takeOverAction,
    putBack: putBackAction,
    park: parkAction,
    withdraw: withdrawAction,
    contest: contestAction,
    accept: acceptAction,
    reopen: reopenAction,
  };
  const isJustSent = Boolean(sent) && sheet.side === "workshop";
  const [verdict] = sheet.verdicts;
  const shared = { sheet, locale: actor.locale, timeZone: actor.timeZone };
  return (
    <>
      {isJustSent ? <SentNote {...shared} /> : null}
      <SheetHead {...shared} />
      <SheetActions
        sheet={sheet}
        base={claimPath({ number: digits })}
        colleagues={colleagues}
        actions={actions}
      />
      <FlagList {...shared} />
      <CaseLineView {...shared} />
      <div className="grid items-start gap-6 xl:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <div className="grid min-w-0 gap-6">
          {verdict ? <VerdictCard {...shared} verdict={verdict} /> : null}
          {verdict?.credit ? <CreditCard {...shared} credit={verdict.credit} verdictId={verdict.id} /> : null}
          <CalledIn session={session} sheet={sheet} cells={labelQuery.parse({ cells }).cells} />
          {sheet.lines.map((line) => (
            <LineCard
              key={line.lineNumber}
              line={line}
              isInCharge={line.lineNumber === 1 && sheet.verdicts.length === 0 && !isJustSent}
              {...shared}
            />
          ))}
          <EvidenceCard {...shared} />
        </div>
        <div className="grid min-w-0 gap-6">
          <ConditionCard {...shared} />
          <Talk
            number={sheet.number}
            initial={sheet.messages}
            locale={actor.locale}
            timeZone={actor.timeZone}
          />
          <Record {...shared} />
        </div>
      </div>
    </>
  );
}
