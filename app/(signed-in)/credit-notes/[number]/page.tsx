import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { AllocationsCard } from "@/components/credits/allocations-card";
import { NotePaper } from "@/components/credits/note-paper";
import { RecordForm } from "@/components/record-form/record-form";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { LinkButton, TextLink } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { ALLOCATION_WAYS } from "@/lib/credits/ledger";
import { findNote, type FoundNote } from "@/lib/day-book/notes/queries";
import { notePath, notePdfPath } from "@/lib/day-book/paths";
import { noteQuery } from "@/lib/day-book/schema";
import { formatDay, formatMoney } from "@/lib/kernel/format";
import { money, toDecimalString } from "@/lib/kernel/money";
import { may, requireSession } from "@/lib/web/session";
import { allocateAction, counterAction, takeBackAction } from "./actions";

type Props = {
  params: Promise<{ number: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
};

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { number } = await params;
  return { title: number.slice(0, 24) };
}

/** A credit note for both of its sides; who makes out notes allocates and counters it here. */
export default async function CreditNotePage({ params, searchParams }: Props) {
  const [session, { number }, search] = await Promise.all([requireSession(), params, searchParams]);
  if (!may(session, "seeCreditNotes")) notFound();
  const { actor } = session;
  const note = await findNote(actor, { number, of: noteQuery.parse(search).of });
  if (!note) notFound();
  const t = await getTranslations("credits.page");
  const { document } = note;
  const isKeeper = note.side === "distributor" && may(session, "issueCredits");
  const canChange = isKeeper && document.kind === "credit" && !note.counteredBy && !note.isSettled;
  const total = money(document.totalMinor, document.currency);
  return (
    <>
      <PageHeader
        title={document.number}
        eyebrow={note.side === "distributor" ? document.buyer.name : document.seller.name}
        note={<NoteStanding note={note} locale={actor.locale} />}
        actions={
          <LinkButton
            href={notePdfPath({ number: document.number, sellerId: note.sellerId })}
            prefetch={false}
          >
            {t("pdf")}
          </LinkButton>
        }
      />
      {isKeeper && note.isReversed ? <Banner kind="wanting">{t("reversed")}</Banner> : null}
      <NotePaper note={document} locale={actor.locale} />
      {document.kind === "credit" ? (
        <AllocationsCard
          number={document.number}
          allocations={note.allocations}
          total={total}
          open={note.open}
          takeBack={canChange ? takeBackAction : undefined}
          locale={actor.locale}
        >
          {canChange && note.open.minor > 0n && !note.isReversed ? <AllocateForm note={note} /> : null}
        </AllocationsCard>
      ) : null}
      {canChange ? <CounterForm note={note} /> : null}
    </>
  );
}

async function NoteStanding({ note, locale }: { note: FoundNote; locale: Parameters<typeof formatDay>[1] }) {
  const t = await getTranslations("credits.page");
  const { document, counteredBy, sellerId } = note;
  return (
    <>
      {document.kind === "credit" && !counteredBy ? (
        <span>{t("open", { amount: formatMoney(note.open, locale) })}</span>
      ) : null}
      {counteredBy ? (
        <TextLink href={notePath({ number: counteredBy.number, sellerId })}>
          {t("countered", { number: counteredBy.number, day: formatDay(counteredBy.issuedOn, locale) })}
        </TextLink>
      ) : null}
      {document.counters ? (
        <TextLink href={notePath({ number: document.counters.number, sellerId })}>
          {t("isCounter", { number: document.counters.number })}
        </TextLink>
      ) : null}
      <TextLink href={`/claims/${document.claim.number}`}>
        {t("toClaim", { number: document.claim.number })}
      </TextLink>
    </>
  );
}

async function AllocateForm({ note }: { note: FoundNote }) {
  const t = await getTranslations("credits.allocations");
  return (
    <RecordForm
      action={allocateAction}
      hidden={{ number: note.document.number, rowsBefore: String(note.allocations.length) }}
      submit={t("submit")}
      sections={[
        {
          title: t("form"),
          note: t("formNote"),
          fields: [
            {
              kind: "oneOf",
              name: "how",
              label: t("how"),
              choices: ALLOCATION_WAYS.map((how) => ({ value: how, label: t(`hows.${how}`) })),
              value: "invoice",
            },
            {
              kind: "line",
              name: "amount",
              label: `${t("amount")} (${note.open.currency})`,
              value: toDecimalString(note.open),
              maxLength: 24,
            },
            {
              kind: "line",
              name: "reference",
              label: t("reference"),
              hint: t("referenceHint"),
              maxLength: 80,
            },
          ],
        },
      ]}
    />
  );
}

async function CounterForm({ note }: { note: FoundNote }) {
  const t = await getTranslations("credits.counter");
  const isAllocated = note.open.minor < note.document.totalMinor;
  return (
    <Card id="counter" title={t("title")}>
      <p className="mb-4 max-w-measure text-ink-2">{t("note")}</p>
      {isAllocated ? (
        <p>{t("first")}</p>
      ) : (
        <RecordForm
          action={counterAction}
          hidden={{ number: note.document.number }}
          submit={t("submit")}
          sections={[
            { fields: [{ kind: "lines", name: "reason", label: t("reason"), rows: 3, maxLength: 1000 }] },
          ]}
        />
      )}
    </Card>
  );
}
