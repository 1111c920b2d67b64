import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { HandPicker } from "@/components/claims/hand-picker";
import { SerialResults } from "@/components/claims/serial-results";
import { SerialSearch } from "@/components/claims/serial-search";
import { Card } from "@/components/ui/card";
import { PageHeader } from "@/components/ui/page-header";
import { previewCover } from "@/lib/claims/cover/queries";
import { listAccountsWithParts, listLinesWithoutSerial, lookUpSerial } from "@/lib/parts/queries";
import { may, requireSession } from "@/lib/web/session";
import { startClaimAction } from "./actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("start");
  return { title: t("title") };
}

type Search = { searchParams: Promise<{ serial?: string; way?: string }> };

/** Starts with the serial: it answers most of what a claim would otherwise ask. */
export default async function StartClaimPage({ searchParams }: Search) {
  const [session, t, { serial = "", way }] = await Promise.all([
    requireSession(),
    getTranslations("start"),
    searchParams,
  ]);
  if (!may(session, "startClaim")) notFound();
  const { actor } = session;
  const typed = serial.slice(0, 80);
  const answer = typed.trim() ? await lookUpSerial(actor, typed) : null;
  const units = answer && answer.kind !== "unknown" ? answer.units : [];
  const found = await Promise.all(
    units.map(async (unit) => ({ unit, coverage: await previewCover(actor, unit) })),
  );
  const isByHand = way === "hand" || answer?.kind === "unknown";
  const [accounts, purchases] = isByHand
    ? await Promise.all([listAccountsWithParts(actor), listLinesWithoutSerial(actor)])
    : [[], []];
  return (
    <>
      <PageHeader title={t("title")} />
      <div className="grid max-w-2xl gap-6">
        <Card isInCharge>
          <SerialSearch serial={typed} />
        </Card>
        {answer ? (
          <SerialResults
            kind={answer.kind}
            typed={typed}
            found={found}
            locale={actor.locale}
            start={startClaimAction}
          />
        ) : null}
        {isByHand ? (
          <HandPicker
            serial={typed}
            accounts={accounts}
            purchases={purchases}
            locale={actor.locale}
            start={startClaimAction}
          />
        ) : null}
      </div>
    </>
  );
}
