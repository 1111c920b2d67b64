import { useTranslations } from "next-intl";
import { RunLogFigure } from "@/components/evidence/run-log-figure";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { EvidenceMark, Mark } from "@/components/ui/status-mark";
import type { EvidenceFileView, EvidenceRowView, ReadingView } from "@/lib/claims/sheet/view";
import { formatBytes, formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { Limits } from "@/lib/rule-book/limits-shape";
import type { SheetProps } from "./shared";

/** All that was given as proof, in the order of the Evidence list; readings beside their limits, logs drawn at once. */
export function EvidenceCard({ sheet, locale }: SheetProps) {
  const t = useTranslations("sheet.evidence");
  const done = sheet.rows.filter((row) => row.state !== "toDo").length;
  return (
    <Card id="evidence" title={t("title")} note={t("count", { done, all: sheet.rows.length })}>
      {sheet.rows.length === 0 && sheet.otherFiles.length === 0 ? (
        <EmptyState kind="nothingYet" title={t("none")} />
      ) : null}
      <ol className="grid">
        {sheet.rows.map((row) => (
          <EvidenceRow key={row.id} row={row} limits={sheet.limits} locale={locale} />
        ))}
      </ol>
      {sheet.otherFiles.length > 0 ? (
        <div className="mt-4">
          <h3 className="mb-2 text-18">{t("others")}</h3>
          <Files files={sheet.otherFiles} limits={sheet.limits} locale={locale} />
        </div>
      ) : null}
    </Card>
  );
}

type Against = { limits: Limits | null; locale: Locale };

function EvidenceRow({ row, limits, locale }: { row: EvidenceRowView } & Against) {
  const t = useTranslations("sheet.evidence");
  const words = useTranslations("evidence.rows");
  const log = row.files.find((file) => file.kind === "runLog");
  return (
    <li className="grid gap-x-6 gap-y-2 border-b border-rule py-4 first:pt-0 last:border-b-0 lg:grid-cols-[minmax(12rem,1fr)_2fr]">
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1 self-start">
        <EvidenceMark state={row.state} plain={row.state === "done"} />
        <h3 className="text-16">{words(`${row.id}.name`)}</h3>
        {row.need === "useful" ? <span className="text-small text-ink-2">{t("useful")}</span> : null}
      </div>
      {/* A drawing needs the whole width; everything else stands beside its name. */}
      <div className={log ? "min-w-0 lg:col-span-2" : "grid min-w-0 gap-2"}>
        {row.answer ? <p className="max-w-measure whitespace-pre-wrap">{row.answer}</p> : null}
        {row.reason ? (
          <p className="max-w-measure text-ink-2">{t("cannotGet", { reason: row.reason })}</p>
        ) : null}
        {row.reading ? <ReadingLine reading={row.reading} locale={locale} /> : null}
        {isSaidBelow(row) ? (
          <a href="#seen" className="text-petrol underline underline-offset-4">
            {t("saidBelow")}
          </a>
        ) : null}
        <Files files={row.files} limits={limits} locale={locale} />
      </div>
    </li>
  );
}

/** Rows answered by questions of their own on the draft: their answers stand in the card below. */
const isSaidBelow = (row: EvidenceRowView): boolean =>
  row.state === "done" && !row.answer && !row.reading && row.files.length === 0;

const JUDGEMENT = {
  within: { shape: "tickSquare", tone: "proven" },
  below: { shape: "openTriangle", tone: "wanting" },
  above: { shape: "openTriangle", tone: "wanting" },
  openCircuit: { shape: "openTriangle", tone: "wanting" },
  noTemperature: { shape: "openDiamond", tone: "wanting" },
  noLimit: { shape: "dot", tone: "quiet" },
} as const;

/** What the meter said, what it comes to at 20 °C, and the limits of the part with where they come from. */
function ReadingLine({ reading, locale }: { reading: ReadingView; locale: Locale }) {
  const t = useTranslations("sheet.reading");
  const number = (value: number | null) =>
    value === null ? t("noEnd") : formatNumber(value, locale, { most: 2 });
  return (
    <div className="grid gap-1">
      <p className="flex flex-wrap items-baseline gap-x-4 gap-y-1">
        <span className="text-18 tabular-nums">
          {reading.value === null ? t("openCircuit") : `${number(reading.value)} ${reading.unit}`}
        </span>
        {reading.temperatureCelsius === null ? null : (
          <span>{t("at", { celsius: number(reading.temperatureCelsius) })}</span>
        )}
        {reading.isCorrectedTo20 ? (
          <strong className="tabular-nums">
            {t("at20", { value: number(reading.judgedValue), unit: reading.unit })}
          </strong>
        ) : null}
        <Mark {...JUDGEMENT[reading.judgement]} plain>
          {t(`judgement.${reading.judgement}`)}
        </Mark>
      </p>
      <p className="text-small text-ink-2">
        {reading.limit
          ? t("limit", {
              low: number(reading.limit.low),
              high: number(reading.limit.high),
              unit: reading.unit,
              rule: reading.limit.rule,
              source: reading.limit.source,
            })
          : t("noLimit")}
        {reading.rawText.trim() === String(reading.value) ? null : ` ${t("typed", { raw: reading.rawText })}`}
        {reading.instrument ? ` ${t("instrument", { instrument: reading.instrument })}` : null}
      </p>
    </div>
  );
}

function Files({ files, limits, locale }: { files: readonly EvidenceFileView[] } & Against) {
  const t = useTranslations("sheet.evidence");
  if (files.length === 0) return null;
  const pictures = files.filter((file) => file.kind === "photo");
  const others = files.filter((file) => file.kind !== "photo");
  return (
    <div className="grid gap-4">
      {pictures.length > 0 ? (
        <ul className="grid grid-cols-2 gap-3 sm:grid-cols-3">
          {pictures.map((file) => (
            <li key={file.id} className="min-w-0">
              <a href={`/api/v1/evidence/${file.id}/view`} className="block">
                {file.viewState === "ready" ? (
                  // eslint-disable-next-line @next/next/no-img-element -- view copies come small from our own store
                  <img
                    src={`/api/v1/evidence/${file.id}/view`}
                    alt={t("photo", { name: file.originalName })}
                    loading="lazy"
                    className="aspect-4/3 w-full border border-edge object-cover"
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
    </div>
  );
}

function FileNote({ file, locale }: { file: EvidenceFileView; locale: Locale }) {
  const t = useTranslations("sheet.evidence");
  return (
    <p className="text-small break-all text-ink-2">
      <a href={`/api/v1/evidence/${file.id}`} className="font-mono text-petrol underline underline-offset-4">
        {file.originalName}
      </a>{" "}
      {formatBytes(file.sizeBytes, locale)}
      {file.isInRevision ? null : ` ${t("notInRevision")}`}
    </p>
  );
}
