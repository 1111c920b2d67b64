import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import type { FormField } from "@/components/record-form/fields";
import { RecordForm } from "@/components/record-form/record-form";
import { Card } from "@/components/ui/card";
import { PageHeader } from "@/components/ui/page-header";
import { may, requireSession } from "@/lib/web/session";
import { noteAction } from "../../actions";
import { conditionField } from "../../condition-field";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("goodsIn.parcel");
  return { title: t("title") };
}

/** What stands on a parcel that came without a number of ours. */
export default async function NewParcelPage() {
  const [session, t] = await Promise.all([requireSession(), getTranslations("goodsIn.parcel")]);
  if (!may(session, "receiveParts")) notFound();
  const fields: FormField[] = [
    { kind: "line", name: "sender", label: t("sender"), isOptional: true, maxLength: 200 },
    { kind: "line", name: "part", label: t("part"), isOptional: true, maxLength: 200 },
    { kind: "line", name: "serial", label: t("serial"), isOptional: true, isSerial: true, maxLength: 80 },
    {
      kind: "line",
      name: "numberWritten",
      label: t("numberWritten"),
      isOptional: true,
      isSerial: true,
      maxLength: 80,
    },
    await conditionField(t("condition")),
    { kind: "lines", name: "note", label: t("note"), isOptional: true, rows: 2, maxLength: 1000 },
  ];
  return (
    <div className="grid max-w-2xl gap-6">
      <PageHeader title={t("title")} />
      <Card isInCharge>
        <p className="mb-5 max-w-measure text-ink-2">{t("lead")}</p>
        <RecordForm action={noteAction} submit={t("submit")} sections={[{ fields }]} />
      </Card>
    </div>
  );
}
