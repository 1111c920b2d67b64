import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { DangerCaution, DangerQuestions } from "@/components/goods-in/danger-questions";
import { ReturnLines } from "@/components/goods-in/return-lines";
import { RecordForm } from "@/components/record-form/record-form";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { printClaimNumber } from "@/lib/claims/number";
import { claimOfReturnPath, GOODS_IN, returnPath } from "@/lib/returns/paths";
import { findReturn } from "@/lib/returns/card-queries";
import { normaliseReturnNumber } from "@/lib/returns/number";
import { returnQuery } from "@/lib/returns/schema";
import { may, requireSession } from "@/lib/web/session";
import { receiveAction } from "../../actions";
import { receiveSections } from "./receive-sections";

type Props = {
  params: Promise<{ number: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
};

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("goodsIn.receive");
  return { title: t("title") };
}

/** A return at goods-in: what is still to come in, with its questions, and where everything else of it is. */
export default async function ReturnPage({ params, searchParams }: Props) {
  const [session, t, { number }, search] = await Promise.all([
    requireSession(),
    getTranslations("goodsIn"),
    params,
    searchParams,
  ]);
  if (!may(session, "receiveParts")) notFound();
  const { actor } = session;
  const returned = await findReturn(actor, normaliseReturnNumber(number) ?? "");
  if (returned?.side !== "distributor") notFound();
  const { parcel, looked, signs, note } = returnQuery.parse(search);
  const open = returned.lines.filter(({ moves }) => moves.includes("receive"));
  const asksFirst = looked !== "yes" && open.some(({ asksForDanger }) => asksForDanger);
  const unpacking = parcel ?? returned.lines.find(({ state }) => state === "received")?.parcelId ?? undefined;
  const hidden = {
    number: returned.number,
    parcelId: parcel ?? "",
    looked: looked ?? "",
    signs: signs.join(","),
    ...Object.fromEntries(open.map(({ lineId }, place) => [`lines.${place}.lineId`, lineId])),
  };
  return (
    <div className="grid max-w-3xl gap-6">
      <PageHeader
        eyebrow={<TextLink href={GOODS_IN}>{t("title")}</TextLink>}
        title={<span className="font-mono">{returned.printed}</span>}
        note={
          <TextLink href={claimOfReturnPath(returned)}>
            {t("receive.from", {
              workshop: returned.workshopName,
              claim: printClaimNumber(returned.claimNumber),
            })}
          </TextLink>
        }
      />
      {note ? (
        <Banner kind="proven" isLive>
          {t(`notes.${note}`)}
        </Banner>
      ) : null}
      {signs.length > 0 && open.length > 0 ? <DangerCaution /> : null}
      {open.length === 0 ? null : asksFirst ? (
        <DangerQuestions path={returnPath(returned)} parcelId={parcel} />
      ) : (
        <Card isInCharge title={t("receive.title")}>
          <RecordForm
            action={receiveAction}
            hidden={hidden}
            submit={t(signs.length > 0 ? "receive.submitQuarantine" : "receive.submit")}
            sections={await receiveSections({
              lines: open,
              isQuarantine: signs.length > 0,
              isKnownParcel: parcel !== undefined,
            })}
          />
        </Card>
      )}
      {unpacking === undefined ? null : (
        <p>
          <TextLink href={`${GOODS_IN}?parcel=${unpacking}`}>{t("receive.another")}</TextLink>
        </p>
      )}
      <ReturnLines returned={returned} locale={actor.locale} timeZone={actor.timeZone} />
    </div>
  );
}
