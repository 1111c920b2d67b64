import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { Cautions } from "@/components/claims/cautions";
import { FileRow } from "@/components/evidence/file-row";
import { BenchPlan } from "@/components/goods-in/bench-plan";
import { RunNeeded } from "@/components/goods-in/run-needed";
import { RecordForm } from "@/components/record-form/record-form";
import { ReturnLine } from "@/components/returns/return-line";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { listEvidenceOfClaim } from "@/lib/evidence-files/queries";
import { BENCH_FILES, benchRowId } from "@/lib/evidence/bench-rows";
import type { Locale } from "@/lib/kernel/locale";
import { familyOf } from "@/lib/parts/families";
import { findBench } from "@/lib/returns/bench-queries";
import { DISPOSALS } from "@/lib/returns/kinds";
import { normaliseReturnNumber } from "@/lib/returns/number";
import { returnPath } from "@/lib/returns/paths";
import type { BenchView } from "@/lib/returns/view";
import { may, requireSession } from "@/lib/web/session";
import { disposeAction, examineAction } from "../../../../actions";
import { findingSections } from "./finding-sections";

type Props = { params: Promise<{ number: string; line: string }> };

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const [t, { line }] = await Promise.all([getTranslations("goodsIn.bench"), params]);
  return { title: t("title", { line: line.slice(0, 1) }) };
}

/** The bench of one part: its plan, its log, the finding, and where the part goes. */
export default async function BenchPage({ params }: Props) {
  const [session, t, { number, line }] = await Promise.all([
    requireSession(),
    getTranslations("goodsIn.bench"),
    params,
  ]);
  if (!may(session, "receiveParts")) notFound();
  const { actor } = session;
  const asked = {
    number: normaliseReturnNumber(number) ?? "",
    lineNumber: /^[1-8]$/.test(line) ? Number(line) : 0,
  };
  const bench = await findBench(actor, asked);
  if (!bench) notFound();
  const family = familyOf(bench.line.family);
  const canExamine = bench.line.moves.includes("examine");
  const canDispose = bench.line.moves.includes("dispose");
  return (
    <div className="grid gap-6">
      <PageHeader
        eyebrow={
          <TextLink href={returnPath(bench.returned)}>
            <span className="font-mono">{bench.returned.printed}</span>
          </TextLink>
        }
        title={t("title", { line: bench.line.lineNumber })}
        note={bench.returned.workshopName}
      />
      {family ? <Cautions family={family} isFolded={!bench.line.isQuarantined} /> : null}
      {/* What the claim says comes first; on a desk it stands beside the form that answers it. */}
      <div className="grid max-w-3xl items-start gap-6 xl:max-w-none xl:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <div className="grid gap-6 xl:col-start-2 xl:row-start-1">
          <Card>
            <ReturnLine line={bench.line} limits={null} locale={actor.locale} timeZone={actor.timeZone} />
          </Card>
          <BenchPlan bench={bench} locale={actor.locale} />
        </div>
        <div className="grid gap-6">
          {canDispose ? <DisposeCard bench={bench} /> : null}
          {canExamine ? (
            <>
              <BenchFiles
                bench={bench}
                files={(await listEvidenceOfClaim(actor, bench.returned.claimNumber)) ?? []}
              />
              <FindingCard bench={bench} locale={actor.locale} />
            </>
          ) : null}
          {canExamine || canDispose ? null : <p className="text-ink-2">{t("closed")}</p>}
        </div>
      </div>
    </div>
  );
}

type Files = NonNullable<Awaited<ReturnType<typeof listEvidenceOfClaim>>>;

async function BenchFiles({ bench, files }: { bench: BenchView; files: Files }) {
  const t = await getTranslations("goodsIn.bench");
  const { returned, line } = bench;
  const titles = { runLog: t("log"), photo: t("photos") };
  return (
    <Card title={t("log")}>
      <div className="grid gap-4">
        {BENCH_FILES.map((kind) => {
          const rowId = benchRowId(kind, line.lineNumber);
          return (
            <section key={kind} aria-label={titles[kind]}>
              {kind === "photo" ? <h3 className="mb-2 text-16">{titles[kind]}</h3> : null}
              <FileRow
                claimId={returned.claimId}
                number={returned.claimNumber}
                rowId={rowId}
                kind={kind}
                files={files.filter((file) => file.rowId === rowId)}
              />
            </section>
          );
        })}
      </div>
    </Card>
  );
}

async function FindingCard({ bench, locale }: { bench: BenchView; locale: Locale }) {
  const [t, danger] = await Promise.all([
    getTranslations("goodsIn.bench"),
    getTranslations("goodsIn.danger"),
  ]);
  const { returned, line } = bench;
  return (
    <Card isInCharge title={t("form")}>
      <div className="grid gap-5">
        {line.isQuarantined ? (
          <Banner kind="caution">{danger("noTest")}</Banner>
        ) : (
          <RunNeeded bench={bench} />
        )}
        <RecordForm
          action={examineAction}
          hidden={{ number: returned.number, lineNumber: String(line.lineNumber) }}
          submit={t(line.finding ? "submitAgain" : "submit")}
          sections={await findingSections(bench, locale)}
        />
      </div>
    </Card>
  );
}

async function DisposeCard({ bench }: { bench: BenchView }) {
  const [t, words] = await Promise.all([
    getTranslations("goodsIn.bench"),
    getTranslations("returns.disposals"),
  ]);
  return (
    <Card title={t("dispose")}>
      <RecordForm
        action={disposeAction}
        hidden={{ number: bench.returned.number, lineNumber: String(bench.line.lineNumber) }}
        submit={t("submitDispose")}
        sections={[
          {
            fields: [
              {
                kind: "oneOf",
                name: "as",
                label: t("as"),
                choices: DISPOSALS.map((value) => ({ value, label: words(value) })),
              },
            ],
          },
        ]}
      />
    </Card>
  );
}
