import { useTranslations } from "next-intl";
import { RunLogFigure } from "@/components/evidence/run-log-figure";
import type { EvidenceFileView } from "@/lib/claims/sheet/view";
import { formatBytes } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { Limits } from "@/lib/rule-book/limits-shape";

/** What a file is held against, and how its reader reads. */
export type Against = { limits: Limits | null; locale: Locale };

/** Photos as large as their place allows, logs drawn, everything else by name; each leads to the file as it was sent. */
export function EvidenceFiles({ files, limits, locale }: { files: readonly EvidenceFileView[] } & Against) {
  const t = useTranslations("sheet.evidence");
  if (files.length === 0) return null;
  const pictures = files.filter((file) => file.kind === "photo");
  const others = files.filter((file) => file.kind !== "photo");
  return (
    <>
      {pictures.length > 0 ? (
        <ul className="contents">
          {pictures.map((file) => (
            <li key={file.id} className="min-w-0">
              <a href={`/api/v1/evidence/${file.id}/view`} className="block">
                {file.viewState === "ready" ? (
                  // eslint-disable-next-line @next/next/no-img-element -- view copies come small from our own store
                  <img
                    src={`/api/v1/evidence/${file.id}/view`}
                    alt={t("photo", { name: file.originalName })}
                    loading="lazy"
                    className="aspect-4/3 w-full border border-edge object-cover print:object-contain"
                  />
                ) : (
                  <span className="grid aspect-4/3 place-items-center border border-dashed border-edge text-small text-ink-2">
                    {t(`view.${file.viewState}`)}
                  </span>
                )}
              </a>
              <FileNote file={file} locale={locale} />
            </li>
          ))}
        </ul>
      ) : null}
      {others.map((file) => (
        <div key={file.id} className="min-w-0">
          {file.kind === "runLog" ? (
            <RunLogFigure fileId={file.id} summary={file.summary} limits={limits} locale={locale} />
          ) : null}
          <FileNote file={file} locale={locale} />
        </div>
      ))}
    </>
  );
}

function FileNote({ file, locale }: { file: EvidenceFileView; locale: Locale }) {
  const t = useTranslations("sheet.evidence");
  return (
    <p className="mt-1 text-small wrap-anywhere text-ink-2">
      <a href={`/api/v1/evidence/${file.id}`} className="font-mono text-petrol underline underline-offset-4">
        {file.originalName}
      </a>{" "}
      <span className="whitespace-nowrap">{formatBytes(file.sizeBytes, locale)}</span>
      {file.isInRevision ? null : ` ${t("notInRevision")}`}
    </p>
  );
}
