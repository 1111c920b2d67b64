import type { Locale } from "@/lib/kernel/locale";

export function RunLogFigure({
  fileId,
  summary,
  locale,
}: {
  fileId: string;
  summary: unknown;
  locale: Locale;
}) {
  return <div data-file={fileId} data-locale={locale} hidden={summary === null} />;
}
