import type { Metadata } from "next";
import { notFound, redirect } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { ExpectedTable } from "@/components/goods-in/expected-table";
import { ParcelTable } from "@/components/goods-in/parcel-table";
import { ScanField } from "@/components/goods-in/scan-field";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { GOODS_IN } from "@/lib/returns/paths";
import { goodsInLists } from "@/lib/returns/lists-queries";
import { goodsInQuery } from "@/lib/returns/schema";
import { findPlace } from "@/lib/returns/search-queries";
import { may, requireSession } from "@/lib/web/session";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("goodsIn");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** The day of goods-in: one field for everything that can be scanned, and three lists. */
export default async function GoodsInPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("goodsIn"),
    searchParams,
  ]);
  if (!may(session, "receiveParts")) notFound();
  const { actor } = session;
  const { find, parcel } = goodsInQuery.parse(search);
  const place = find === "" ? null : await findPlace(actor, find);
  if (place !== null)
    redirect(parcel !== undefined && place.startsWith(GOODS_IN) ? `${place}?parcel=${parcel}` : place);
  const lists = await goodsInLists(actor);
  if (!lists) notFound();
  const { counts } = lists;
  const reader = { locale: actor.locale, timeZone: actor.timeZone };
  const newParcel = (
    <LinkButton href="/goods-in/parcels/new" kind="secondary">
      {t("newParcel")}
    </LinkButton>
  );
  return (
    <>
      <PageHeader
        title={t("title")}
        note={t("clearDesk", { overdue: counts.overdue, unmatched: counts.unmatched })}
        actions={newParcel}
      />
      <Card isInCharge>
        {parcel === undefined ? null : <p className="mb-3 font-semibold">{t("inParcel")}</p>}
        <ScanField text={find} parcelId={parcel} />
      </Card>
      {find === "" ? null : (
        <Banner kind="wanting" title={t("nothingFound", { text: find })} isLive actions={newParcel}>
          {t("nothingFoundBody")}
        </Banner>
      )}
      <ExpectedTable list="due" items={lists.due} count={counts.due} locale={actor.locale} />
      <ParcelTable parcels={lists.unmatched} count={counts.unmatched} {...reader} />
      <ExpectedTable
        list="toExamine"
        items={lists.toExamine}
        count={counts.toExamine}
        locale={actor.locale}
      />
    </>
  );
}
