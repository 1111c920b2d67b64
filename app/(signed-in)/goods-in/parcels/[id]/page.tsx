import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { MatchCard } from "@/components/goods-in/match-card";
import { WrittenOn } from "@/components/goods-in/parcel-table";
import { RecordForm } from "@/components/record-form/record-form";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { TextLink } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { formatInstant } from "@/lib/kernel/format";
import { GOODS_IN } from "@/lib/returns/paths";
import { findParcel } from "@/lib/returns/search-queries";
import { may, requireSession } from "@/lib/web/session";
import { matchAction } from "../../actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("goodsIn.match");
  return { title: t("title") };
}

/** Whose parcel it is: the returns that fit what stands on it, the likeliest first, each with its reason. */
export default async function ParcelPage({ params }: { params: Promise<{ id: string }> }) {
  const [session, t, { id }] = await Promise.all([requireSession(), getTranslations("goodsIn"), params]);
  if (!may(session, "receiveParts")) notFound();
  const { actor } = session;
  const found = await findParcel(actor, id);
  if (!found) notFound();
  const { parcel, matches } = found;
  const arrivedAt = formatInstant(new Date(parcel.arrivedAt), actor.locale, actor.timeZone);
  return (
    <div className="grid max-w-3xl gap-6">
      <PageHeader
        title={t("match.title")}
        note={t("match.arrived", { at: arrivedAt })}
        actions={<TextLink href={GOODS_IN}>{t("match.later")}</TextLink>}
      />
      <p className="border-l-4 border-l-petrol pl-3">
        <WrittenOn parcel={parcel} />
        <span className="block text-small text-ink-2">
          {t(`conditions.${parcel.condition}`)} {parcel.note}
        </span>
      </p>
      {matches.length === 0 ? <EmptyState kind="nothingFound" title={t("match.none")} /> : null}
      {matches.slice(0, 8).map((match, place) => (
        <MatchCard
          key={match.number}
          match={match}
          parcelId={parcel.id}
          isInCharge={place === 0}
          action={matchAction}
        />
      ))}
      <Card title={t("match.byNumber")}>
        <RecordForm
          action={matchAction}
          hidden={{ parcelId: parcel.id }}
          submit={t("match.submitNumber")}
          sections={[
            {
              fields: [
                { kind: "line", name: "number", label: t("match.number"), isSerial: true, maxLength: 20 },
              ],
            },
          ]}
        />
      </Card>
    </div>
  );
}
