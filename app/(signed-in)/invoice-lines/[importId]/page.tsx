import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { ImportNotes } from "@/components/imports/import-notes";
import { ImportWritten } from "@/components/imports/import-written";
import { Preview } from "@/components/imports/preview";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { findImportSheet } from "@/lib/imports/queries";
import { formatInstant } from "@/lib/kernel/format";
import { may, requireSession } from "@/lib/web/session";
import { importLinesAction } from "./actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("imports");
  return { title: t("title") };
}

type Props = { params: Promise<{ importId: string }>; searchParams: Promise<{ again?: string }> };

/** One file: what is wrong with it line by line, what it would write, or what it wrote. */
export default async function ImportPage({ params, searchParams }: Props) {
  const [session, t, { importId }, { again }] = await Promise.all([
    requireSession(),
    getTranslations("imports.preview"),
    params,
    searchParams,
  ]);
  if (!may(session, "importInvoiceLines")) notFound();
  const { actor } = session;
  const sheet = await findImportSheet(actor, importId);
  if (!sheet) notFound();
  const { sent, preview } = sheet;
  const { locale, timeZone } = actor;
  return (
    <>
      <PageHeader
        eyebrow={t("eyebrow")}
        title={<span className="break-all">{sent.fileName}</span>}
        note={
          <>
            <span>{t("sent", { when: formatInstant(sent.sentAt, locale, timeZone) })}</span>
            <span>{t("lines", { count: sent.lineCount })}</span>
          </>
        }
        actions={<LinkButton href="/invoice-lines">{t("back")}</LinkButton>}
      />
      <ImportNotes sent={sent} wasSentBefore={again !== undefined} />
      {preview ? (
        <Preview sent={sent} preview={preview} locale={locale} action={importLinesAction} />
      ) : (
        <ImportWritten sent={sent} locale={locale} timeZone={timeZone} />
      )}
    </>
  );
}
