import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { AskForm } from "@/components/judging/ask-form";
import { Card } from "@/components/ui/card";
import { PageHeader } from "@/components/ui/page-header";
import { findClaimSheet } from "@/lib/claims/reading/queries";
import { claimDigits } from "@/lib/claims/number";
import { requireSession } from "@/lib/web/session";
import { askAction } from "../judging-actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("judging.ask");
  return { title: t("title") };
}

/** One query for all that is missing; what is not given yet is ticked already. */
export default async function AskPage({ params }: { params: Promise<{ number: string }> }) {
  const [{ actor }, { number }, t] = await Promise.all([
    requireSession(),
    params,
    getTranslations("judging.ask"),
  ]);
  const sheet = await findClaimSheet(actor, claimDigits(number));
  if (!sheet?.moves.includes("ask")) notFound();
  const words = await getTranslations("evidence.rows");
  return (
    <div className="grid max-w-2xl gap-6">
      <PageHeader eyebrow={sheet.number} title={t("title")} />
      <Card isInCharge>
        <AskForm
          action={askAction}
          number={sheet.number}
          rows={sheet.rows.map((row) => ({
            id: row.id,
            name: words(`${row.id}.name`),
            isMissing: row.state === "toDo",
          }))}
          round={sheet.queries.length + 1}
          workshop={sheet.workshopName}
        />
      </Card>
    </div>
  );
}
