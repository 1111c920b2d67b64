import clsx from "clsx";
import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { EvidenceMark, Mark } from "@/components/ui/status-mark";
import type { EvidenceRowView, ReadingView } from "@/lib/claims/sheet/view";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { EvidenceFiles, type Against } from "./evidence-files";
import type { SheetProps } from "./shared";

const hasPhoto = (row: EvidenceRowView): boolean => row.files.some((file) => file.kind === "photo");

/** All that was given as proof: the photos first and large, side by side; then readings beside their limits, logs drawn. */
export function EvidenceCard({ sheet, locale }: SheetProps) {
  const t = useTranslations("sheet.evidence");
  const done = sheet.rows.filter((row) => row.state !== "toDo").length;
  const pictured = sheet.rows.filter(hasPhoto);
  const others = sheet.rows.filter((row) => !hasPhoto(row));
  return (
    <Card id="evidence" title={t("title")} note={t("count", { done, all: sheet.rows.length })}>
      {sheet.rows.length === 0 && sheet.otherFiles.length === 0 ? (
        <EmptyState kind="nothingYet" title={t("none")} />
      ) : null}
      {pictured.length > 0 ? (
        <ul className="mb-2 grid gap-x-4 gap-y-6 border-b border-rule pb-6 sm:grid-cols-2 print:grid-cols-2">
          {pictured.map((row) => (
            <PicturedRow key={row.id} row={row} limits={sheet.limits} locale={locale} />
          ))}
        </ul>
      ) : null}
      <ul className="grid">
        {others.map((row) => (
          <EvidenceRow key={row.id} row={row} limits={sheet.limits} locale={locale} />
        ))}
      </ul>
      {sheet.otherFiles.length > 0 ? (
        <div className="mt-4">
          <h3 className="mb-2 text-18">{t("others")}</h3>
          <div className="grid gap-4 sm:grid-cols-2">
            <EvidenceFiles files={sheet.otherFiles} limits={sheet.limits} locale={locale} />
          </div>
        </div>
      ) : null}
    </Card>
  );
}

function PicturedRow({ row, limits, locale }: { row: EvidenceRowView } & Against) {
  return (
    <li className="grid min-w-0 content-start gap-2 print:break-inside-avoid">
      <RowName row={row} />
      <EvidenceFiles files={row.files} limits={limits} locale={locale} />
      <Said row={row} locale={locale} />
    </li>
  );
}

function EvidenceRow({ row, limits, locale }: { row: EvidenceRowView } & Against) {
  const log = row.files.find((file) => file.kind === "runLog");
  return (
    <li className="grid gap-x-6 gap-y-2 border-b border-rule py-4 last:border-b-0 lg:grid-cols-[minmax(14rem,1fr)_2fr] print:break-inside-avoid">
      <RowName row={row} isBeside={!log} />
      {/* A drawing needs the whole width; everything else stands beside its name. */}
      <div className={log ? "grid min-w-0 gap-2 lg:col-span-2" : "grid min-w-0 content-start gap-2"}>
        <Said row={row} locale={locale} />
        <EvidenceFiles files={row.files} limits={limits} locale={locale} />
      </div>
    </li>
  );
}

/** The name on the left edge, its state on the right, or under it where the answer stands beside: both can be run down with the eye. */
function RowName({ row, isBeside = false }: { row: EvidenceRowView; isBeside?: boolean }) {
  const t = useTranslations("sheet.evidence");
  const words = useTranslations("evidence.rows");
  return (
    <div
      className={clsx(
        "flex items-baseline justify-between gap-x-3 gap-y-1 self-start",
        isBeside && "lg:flex-col lg:justify-start",
      )}
    >
      <div className="min-w-0">
        <h3 className="text-16 wrap-break-word hyphens-auto">{words(`${row.id}.name`)}</h3>
        {row.need === "useful" ? <p className="text-small text-ink-2">{t("useful")}</p> : null}
      </div>
      <span className="shrink-0">
        <EvidenceMark state={row.state} plain={row.state === "done"} />
      </span>
    </div>
  );
}

function Said({ row, locale }: { row: EvidenceRowView; locale: Locale }) {
  const t = useTranslations("sheet.evidence");
  return (
    <>
      {row.answer ? <p className="max-w-measure whitespace-pre-wrap">{row.answer}</p> : null}
      {row.reason ? (
        <p className="max-w-measure text-ink-2">{t("cannotGet", { reason: row.reason })}</p>
      ) : null}
      {row.reading ? <ReadingLine reading={row.reading} locale={locale} /> : null}
      {isSaidElsewhere(row) ? (
        <a href="#seen" className="min-h-target content-center text-petrol underline underline-offset-4">
          {t("saidElsewhere")}
        </a>
      ) : null}
    </>
  );
}

/** Rows answered by questions of their own on the draft: their answers stand in a card of their own. */
const isSaidElsewhere = (row: EvidenceRowView): boolean =>
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
        {reading.rawText.trim().replace(",", ".") === String(reading.value)
          ? null
          : ` ${t("typed", { raw: reading.rawText })}`}
        {reading.instrument ? ` ${t("instrument", { instrument: reading.instrument })}` : null}
      </p>
    </div>
  );
}
