import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { DecideForm } from "@/components/judging/decide-form";
import { CaseLineView } from "@/components/sheet/case-line";
import { CoverageSteps } from "@/components/sheet/coverage-steps";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { Serial } from "@/components/ui/serial";
import { restsOnNoFinding } from "@/lib/claims/deciding/finding-waits";
import { claimPath } from "@/lib/claims/paths";
import { findClaimSheet } from "@/lib/claims/reading/queries";
import { claimDigits } from "@/lib/claims/number";
import { listReturnsOfClaim } from "@/lib/returns/card-queries";
import { requireSession } from "@/lib/web/session";
import { decideAction } from "../judging-actions";
import { BenchFound, WaitsForBench } from "./found";

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
  const returns = await listReturnsOfClaim(actor, claimDigits(number));
  const findings = new Map(returns.flatMap(({ lines }) => lines.map((line) => [line.lineId, line.finding])));
  const reader = { locale: actor.locale, timeZone: actor.timeZone };
  return (
    <>
      <PageHeader
        eyebrow={
          <>
            <TextLink href={claimPath({ number: sheet.number })}>
              <span className="font-mono">{sheet.number}</span>
            </TextLink>{" "}
            · {sheet.workshopName}
          </>
        }
        title={t("title")}
        note={t("revision", { revision: sheet.revision })}
      />
      <CaseLineView sheet={sheet} {...reader} />
      <WaitsForBench sheet={sheet} />
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
          beside: (
            <div className="grid gap-6">
              <BenchFound line={line} finding={findings.get(line.lineId)} sheet={sheet} {...reader} />
              {line.coverage ? (
                <Card title={t("cover")} note={line.serial ? <Serial value={line.serial} /> : line.partName}>
                  <CoverageSteps coverage={line.coverage} locale={actor.locale} />
                </Card>
              ) : null}
            </div>
          ),
        }))}
        asksWhyNoFinding={sheet.lines.some(({ returnState }) => restsOnNoFinding(returnState))}
      />
    </>
  );
}
