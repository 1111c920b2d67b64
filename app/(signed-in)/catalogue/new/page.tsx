import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import type { FormField } from "@/components/record-form/fields";
import { RecordForm } from "@/components/record-form/record-form";
import { Card } from "@/components/ui/card";
import { PageHeader } from "@/components/ui/page-header";
import { pathBack } from "@/lib/accounts/path-back";
import { listMakers } from "@/lib/parts/catalogue-queries";
import { FAMILY_CODES } from "@/lib/parts/families";
import { may, requireSession } from "@/lib/web/session";
import { addPartAction } from "../actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("catalogue.form");
  return { title: t("newTitle") };
}

type Props = { searchParams: Promise<{ partNumber?: string | string[]; back?: string | string[] }> };

const one = (value: string | string[] | undefined): string => [value ?? ""].flat()[0] ?? "";

/** Enters a part; opened from an import, it brings the number along and goes back there. */
export default async function NewPartPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("catalogue.form"),
    searchParams,
  ]);
  if (!may(session, "keepCatalogue")) notFound();
  const makers = await listMakers(session.actor);
  return (
    <div className="grid max-w-2xl gap-6">
      <PageHeader title={t("newTitle")} />
      <Card isInCharge>
        <RecordForm
          action={addPartAction}
          hidden={{ back: pathBack(one(search.back)) ?? "" }}
          sections={[{ fields: await newPartFields(one(search.partNumber).slice(0, 40), makers) }]}
          submit={t("add")}
        />
      </Card>
    </div>
  );
}

async function newPartFields(partNumber: string, makers: readonly string[]): Promise<FormField[]> {
  const [t, families] = await Promise.all([getTranslations("catalogue.form"), getTranslations("families")]);
  return [
    {
      kind: "line",
      name: "partNumber",
      label: t("number"),
      hint: t("numberHint"),
      isSerial: true,
      maxLength: 40,
      value: partNumber,
    },
    { kind: "line", name: "name", label: t("name"), maxLength: 120 },
    {
      kind: "choice",
      name: "family",
      label: t("family"),
      hint: t("familyHint"),
      blank: t("familyBlank"),
      options: FAMILY_CODES.map((code) => ({ value: code, label: families(`${code}.name`) })),
    },
    {
      kind: "line",
      name: "maker",
      label: t("maker"),
      hint: t("makerHint"),
      maxLength: 120,
      suggestions: makers,
    },
    {
      kind: "oneOf",
      name: "tracking",
      label: t("tracking"),
      value: "serial",
      choices: [
        { value: "serial", label: t("serial") },
        { value: "counted", label: t("counted") },
      ],
    },
    {
      kind: "line",
      name: "supersededBy",
      label: t("supersededBy"),
      hint: t("supersededByHint"),
      isOptional: true,
      isSerial: true,
      maxLength: 40,
    },
  ];
}
