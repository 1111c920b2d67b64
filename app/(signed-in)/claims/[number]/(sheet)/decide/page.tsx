import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { DecideForm } from "@/components/judging/decide-form";
import { CaseLineView } from "@/components/sheet/case-line";
import { CoverageSteps } from "@/components/sheet/coverage-steps";
import { Card } from "@/components/ui/card";
import { PageHeader } from "@/components/ui/page-header";
import { findClaimSheet } from "@/lib/claims/reading/queries";
import { claimDigits } from "@/lib/claims/number";
import { requireSession } from "@/lib/web/session";
import { decideAction } from "../judging-actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("judging.decide");
  return { title: t("title") };
}

/** The verdict, line by line, with the cover of each beside it. It binds to the revision shown here. */
export default async function DecidePage({ params }: { params: Promise<{ number: string }> }) {
  const [{ actor }, { number }, t] = await Promise.all([
    requireSession(),
    params,
    getTranslations("judging.decide"),
  ]);
  const sheet = await findClaimSheet(actor, claimDigits(number));
  if (!sheet?.moves.includes("decide")) notFound();
  return (
    <>
      <PageHeader
        eyebrow={`${sheet.number} · ${sheet.workshopName}`}
        title={t("title")}
        note={t("revision", { revision: sheet.revision })}
      />
      <CaseLineView sheet={sheet} locale={actor.locale} timeZone={actor.timeZone} />
      <div className="grid items-start gap-6 xl:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <DecideForm
          action={decideAction}
          number={sheet.number}
          revision={sheet.revision}
          lines={sheet.lines.map((line) => ({
            lineId: line.lineId,
            lineNumber: line.lineNumber,
            name: line.partName,
            serial: line.serial,
            suggestion: line.coverage?.answer === "covered" ? "upheld" : null,
          }))}
        />
        <div className="grid gap-6">
          {sheet.lines.map((line) =>
            line.coverage ? (
              <Card key={line.lineNumber} title={line.partName} note={t("cover")}>
                <CoverageSteps coverage={line.coverage} locale={actor.locale} />
              </Card>
            ) : null,
          )}
        </div>
      </div>
    </>
  );
}
