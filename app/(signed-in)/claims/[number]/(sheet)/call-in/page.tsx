import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { RecordForm } from "@/components/record-form/record-form";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { claimDigits, printClaimNumber } from "@/lib/claims/number";
import { claimPath } from "@/lib/claims/paths";
import { formatDay } from "@/lib/kernel/format";
import { findCallIn } from "@/lib/returns/call-in-queries";
import { requireSession } from "@/lib/web/session";
import { callInAction } from "../return-actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("returns.callIn");
  return { title: t("title") };
}

/** Which parts are to come, where to and until when. All of them are ticked; the address is the organisation's own. */
export default async function CallInPage({ params }: { params: Promise<{ number: string }> }) {
  const [{ actor }, { number }, t] = await Promise.all([
    requireSession(),
    params,
    getTranslations("returns.callIn"),
  ]);
  const digits = claimDigits(number);
  const callIn = digits.length === 8 ? await findCallIn(actor, digits) : null;
  if (!callIn) notFound();
  return (
    <div className="grid max-w-2xl gap-6">
      <PageHeader
        eyebrow={
          <TextLink href={claimPath({ number: digits })}>
            <span className="font-mono">{printClaimNumber(digits)}</span>
          </TextLink>
        }
        title={t("title")}
      />
      <Card isInCharge>
        <p className="mb-5 max-w-measure text-ink-2">{t("lead", { workshop: callIn.workshopName })}</p>
        <RecordForm
          action={callInAction}
          hidden={{ number: digits }}
          submit={t("submit")}
          sections={[
            {
              fields: [
                {
                  kind: "anyOf",
                  name: "lineIds",
                  label: t("lines"),
                  values: callIn.lines.map(({ lineId }) => lineId),
                  choices: callIn.lines.map(({ lineId, lineNumber, partName, serial }) => ({
                    value: lineId,
                    label: t("lineChoice", { line: lineNumber, part: partName, serial: serial ?? "none" }),
                  })),
                },
                {
                  kind: "lines",
                  name: "sendTo",
                  label: t("sendTo"),
                  value: callIn.sendTo,
                  rows: 4,
                  maxLength: 400,
                },
                {
                  kind: "line",
                  name: "dueOn",
                  label: t("dueOn"),
                  hint: t("dueOnHint"),
                  value: formatDay(callIn.dueOn, actor.locale),
                  maxLength: 40,
                },
                {
                  kind: "lines",
                  name: "instructions",
                  label: t("instructions"),
                  hint: t("instructionsHint"),
                  isOptional: true,
                  rows: 3,
                  maxLength: 1000,
                },
              ],
            },
          ]}
        />
      </Card>
    </div>
  );
}
