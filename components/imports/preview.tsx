import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { LinkButton } from "@/components/ui/link-button";
import { importPath } from "@/lib/imports/paths";
import type { ImportView, PreviewView } from "@/lib/imports/view";
import type { FormAction } from "@/lib/kernel/action-result";
import type { Locale } from "@/lib/kernel/locale";
import { ImportButton } from "./import-button";
import { ImportFigures } from "./import-figures";
import { ProblemTable } from "./problem-table";

type PreviewProps = { sent: ImportView; preview: PreviewView; locale: Locale; action: FormAction };

/** What stands in the way, or the one button that imports the file whole. */
export function Preview({ sent, preview, locale, action }: PreviewProps) {
  const t = useTranslations("imports.preview");
  const { problemLineCount, shownLineCount, result } = preview;
  const isReady = problemLineCount === 0;
  const isNothingNew = isReady && result.invoiceLines === 0;
  return (
    <>
      {isReady ? null : (
        <Card
          isInCharge
          title={t("problemsTitle", { count: problemLineCount })}
          actions={
            <LinkButton small href={importPath({ importId: sent.id })}>
              {t("checkAgain")}
            </LinkButton>
          }
        >
          <div className="mb-4 grid max-w-measure gap-1">
            <p>{t("problemsNote")}</p>
            {shownLineCount < problemLineCount ? (
              <p className="text-ink-2">
                {t("problemsShown", { shown: shownLineCount, count: problemLineCount })}
              </p>
            ) : null}
          </div>
          <ProblemTable problems={preview.problems} locale={locale} />
        </Card>
      )}
      {isReady ? (
        <Card isInCharge title={t(isNothingNew ? "nothingNewTitle" : "readyTitle")}>
          <div className="grid gap-6">
            {isNothingNew ? <p>{t("nothingNew")}</p> : null}
            <ImportFigures result={result} locale={locale} />
            <ImportButton
              action={action}
              importId={sent.id}
              label={t("import", { count: sent.lineCount })}
              pendingLabel={t("importing")}
            />
          </div>
        </Card>
      ) : null}
    </>
  );
}
