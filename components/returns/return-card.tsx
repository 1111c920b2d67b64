import { useTranslations } from "next-intl";
import { RecordForm } from "@/components/record-form/record-form";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { TextLink } from "@/components/ui/link-button";
import { LateMark } from "@/components/ui/status-mark";
import { dayInZone, daysBetween } from "@/lib/kernel/calendar-day";
import type { FormAction } from "@/lib/kernel/action-result";
import { formatDay } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { SETTLING_MOVES, type PartMove } from "@/lib/returns/lifecycle";
import { returnPath } from "@/lib/returns/paths";
import type { ReturnView } from "@/lib/returns/view";
import type { Limits } from "@/lib/rule-book/limits-shape";
import { LabelLinks, type CellsAnswer } from "./label-links";
import { ReturnLine } from "./return-line";

export type ReturnReader = { locale: Locale; timeZone: string; limits: Limits | null };
type ReturnCardProps = ReturnReader & {
  returned: ReturnView;
  claimPath: `/claims/${string}`;
  cells: CellsAnswer;
  isOfGoodsIn: boolean;
  /** Forms stand on the first card that has them: a page has each field once. */
  hasForms: boolean;
  actions: { dispatch: FormAction; settle: FormAction };
};

/** A part that was called in: its number for the parcel, where it goes and until when, and where it is now. */
export function ReturnCard({ returned, claimPath, cells, isOfGoodsIn, hasForms, ...rest }: ReturnCardProps) {
  const t = useTranslations("returns.card");
  const { locale, timeZone, limits, actions } = rest;
  const can = (move: PartMove) => returned.lines.some(({ moves }) => moves.includes(move));
  const asksForDanger = returned.lines.some((line) => line.asksForDanger);
  const settling = SETTLING_MOVES.filter(can);
  const calledInOn = formatDay(dayInZone(new Date(returned.calledInAt), timeZone), locale);
  return (
    <Card
      id={hasForms ? "called-in" : undefined}
      isInCharge={can("dispatch")}
      title={t("title")}
      note={
        can("dispatch")
          ? t("calledInDay", { day: calledInOn })
          : t("calledInOn", { printed: returned.printed, day: calledInOn })
      }
      actions={isOfGoodsIn ? <TextLink href={returnPath(returned)}>{t("goToGoodsIn")}</TextLink> : undefined}
    >
      <div className="grid gap-5">
        {can("dispatch") ? <NumberPlate printed={returned.printed} /> : null}
        <ReturnFacts returned={returned} locale={locale} timeZone={timeZone} />
        {can("dispatch") ? (
          <LabelLinks
            returnNumber={returned.number}
            claimPath={claimPath}
            asksForDanger={asksForDanger}
            cells={cells}
          />
        ) : null}
        {returned.lines.map((line) => (
          <ReturnLine key={line.lineId} line={line} limits={limits} locale={locale} timeZone={timeZone} />
        ))}
        {hasForms && can("dispatch") && !(asksForDanger && cells === "unsafe") ? (
          <DispatchForm action={actions.dispatch} number={returned.number} />
        ) : null}
        {hasForms && settling.length > 0 ? (
          <SettleForm action={actions.settle} number={returned.number} moves={settling} />
        ) : null}
      </div>
    </Card>
  );
}

/** Set like the plate it is copied onto. */
function NumberPlate({ printed }: { printed: string }) {
  const t = useTranslations("returns.card");
  return (
    <div className="grid gap-2">
      <p
        translate="no"
        className="w-fit max-w-full rounded-sheet border-2 border-ink bg-well px-4 py-2 font-mono text-30 font-semibold whitespace-nowrap sm:text-40"
      >
        {printed}
      </p>
      <p className="text-18 font-semibold">{t("write")}</p>
    </div>
  );
}

function ReturnFacts({
  returned,
  locale,
  timeZone,
}: Pick<ReturnCardProps, "returned" | "locale" | "timeZone">) {
  const t = useTranslations("returns.card");
  const isAwaited = returned.lines.some(({ state }) => state === "awaited");
  const daysOver = isAwaited ? daysBetween(returned.dueOn, dayInZone(new Date(), timeZone)) : 0;
  return (
    <Facts>
      <Fact term={t("sendTo")}>
        <span className="whitespace-pre-line">{returned.sendTo}</span>
      </Fact>
      <Fact term={t("sendBy")}>
        {formatDay(returned.dueOn, locale)} {daysOver > 0 ? <LateMark daysOver={daysOver} /> : null}
      </Fact>
      <Fact term={t("instructions")}>
        <span className="whitespace-pre-line">{returned.instructions || t("noInstructions")}</span>
      </Fact>
      <Fact term={t("sent")}>
        {returned.sentAt
          ? t("sentWith", {
              carrier: returned.carrier ?? "",
              day: formatDay(dayInZone(new Date(returned.sentAt), timeZone), locale),
            })
          : t("notSent")}
      </Fact>
      {returned.trackingNumber ? (
        <Fact term={t("tracking")}>
          <span className="font-mono">{returned.trackingNumber}</span>
        </Fact>
      ) : null}
    </Facts>
  );
}

function DispatchForm({ action, number }: { action: FormAction; number: string }) {
  const t = useTranslations("returns.dispatch");
  return (
    <RecordForm
      action={action}
      hidden={{ number }}
      submit={t("submit")}
      sections={[
        {
          title: t("title"),
          fields: [
            { kind: "line", name: "carrier", label: t("carrier"), maxLength: 120 },
            {
              kind: "line",
              name: "trackingNumber",
              label: t("trackingNumber"),
              isOptional: true,
              isSerial: true,
              maxLength: 80,
            },
            {
              kind: "line",
              name: "sentOn",
              label: t("sentOn"),
              hint: t("sentOnHint"),
              value: t("today"),
              maxLength: 40,
            },
          ],
        },
      ]}
    />
  );
}

type SettleFormProps = {
  action: FormAction;
  number: string;
  moves: readonly (typeof SETTLING_MOVES)[number][];
};

function SettleForm({ action, number, moves }: SettleFormProps) {
  const t = useTranslations("returns.settle");
  return (
    <details>
      <summary className="min-h-target cursor-pointer py-2 text-petrol underline underline-offset-4">
        {t("title")}
      </summary>
      <RecordForm
        action={action}
        hidden={{ number }}
        submit={t("submit")}
        sections={[
          {
            fields: [
              {
                kind: "oneOf",
                name: "move",
                label: t("move"),
                value: moves.length === 1 ? moves[0] : undefined,
                choices: moves.map((move) => ({ value: move, label: t(`moves.${move}`) })),
              },
              { kind: "lines", name: "why", label: t("why"), hint: t("whyHint"), rows: 3, maxLength: 1000 },
            ],
          },
        ]}
      />
    </details>
  );
}
