import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { RecordForm } from "@/components/record-form/record-form";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { PageHeader } from "@/components/ui/page-header";
import { findCataloguePart } from "@/lib/parts/catalogue-queries";
import { may, requireSession } from "@/lib/web/session";
import { changePartAction } from "../../actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("catalogue.form");
  return { title: t("changeTitle") };
}

// The address holds the number as it was encoded; a broken escape names no part.
function decoded(text: string): string {
  try {
    return decodeURIComponent(text);
  } catch {
    return "";
  }
}

/** Changes what may change of a part: its name, and what took its place. */
export default async function EditPartPage({ params }: { params: Promise<{ partNumber: string }> }) {
  const [session, t, families, { partNumber }] = await Promise.all([
    requireSession(),
    getTranslations("catalogue"),
    getTranslations("families"),
    params,
  ]);
  if (!may(session, "keepCatalogue")) notFound();
  const part = await findCataloguePart(session.actor, decoded(partNumber));
  if (!part) notFound();
  return (
    <div className="grid max-w-2xl gap-6">
      <PageHeader eyebrow={part.partNumber} title={t("form.changeTitle")} />
      <Card isInCharge>
        <div className="mb-6 grid gap-2">
          <Facts>
            <Fact term={t("columns.family")}>{families(`${part.family}.name`)}</Fact>
            <Fact term={t("columns.maker")}>{part.maker}</Fact>
            <Fact term={t("columns.tracking")}>{t(part.serialTracked ? "serial" : "counted")}</Fact>
          </Facts>
          <p className="text-small text-ink-2">{t("form.stays")}</p>
        </div>
        <RecordForm
          action={changePartAction}
          hidden={{ partNumber: part.partNumber }}
          sections={[
            {
              fields: [
                { kind: "line", name: "name", label: t("form.name"), maxLength: 120, value: part.name },
                {
                  kind: "line",
                  name: "supersededBy",
                  label: t("form.supersededBy"),
                  hint: t("form.supersededByHint"),
                  isOptional: true,
                  isSerial: true,
                  maxLength: 40,
                  value: part.supersededBy ?? "",
                },
              ],
            },
          ]}
          submit={t("form.keep")}
        />
      </Card>
    </div>
  );
}
