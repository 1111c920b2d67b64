import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { ColumnTable } from "@/components/imports/column-table";
import { ImportList } from "@/components/imports/import-list";
import { SendFile } from "@/components/imports/send-file";
import { PageHeader } from "@/components/ui/page-header";
import { listImports } from "@/lib/imports/queries";
import { refusedQuery } from "@/lib/imports/schema";
import { mostBytes } from "@/lib/kernel/limits";
import { refuse } from "@/lib/kernel/outcome";
import { may, requireSession } from "@/lib/web/session";
import { wordingFor } from "@/lib/web/wording";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("imports");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

const MOST_CHARACTERS = 80;

/** Words out of the page's address, as far as a file name or a heading needs them: anybody can write a link to here. */
const plain = (words: string) => words.replace(/[^\p{L}\p{N} .,_()-]/gu, "");
const short = (words: string) => plain(words).slice(0, MOST_CHARACTERS);

/** Where an administrator sends what was sold and shipped, and sees what was sent before. */
export default async function InvoiceLinesPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("imports"),
    searchParams,
  ]);
  if (!may(session, "importInvoiceLines")) notFound();
  const { locale, timeZone } = session.actor;
  const { refused, ...given } = refusedQuery.parse(search);
  const { name, first, second, columns } = given;
  const words = { name: short(name), first: short(first), second: short(second), columns: plain(columns) };
  const detail = { ...given, ...words };
  const [imports, refusal] = await Promise.all([
    listImports(session.actor),
    refused ? wordingFor(refuse(refused, detail), locale) : undefined,
  ]);
  return (
    <>
      <PageHeader title={t("title")} note={t("note")} />
      <SendFile limitMb={mostBytes("runLog") / 1e6} refusal={refusal} />
      <ImportList imports={imports} locale={locale} timeZone={timeZone} />
      <ColumnTable locale={locale} />
    </>
  );
}
