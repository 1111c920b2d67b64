import clsx from "clsx";
import Link from "next/link";
import { useTranslations } from "next-intl";
import type { ReactNode } from "react";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { printClaimNumber } from "@/lib/claims/number";
import { formatDay, formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { Money } from "@/lib/kernel/money";
import type { WorkshopToday } from "@/lib/reports/workshop-today/view";
import { AgeBars } from "./age-bars";

type Reader = { readonly locale: Locale };
type TodayProps = Reader & {
  today: WorkshopToday;
  onUs: number;
  onThem: number;
  /** Where the credit notes are, for a person who may see them. */
  notesPath: "/credit-notes" | null;
};

/** A workshop's day in four numbers, each a link, and how old what is open has become. */
export function TodayCard({ today, onUs, onThem, notesPath, locale }: TodayProps) {
  const t = useTranslations("workshopToday");
  const sums = (amounts: readonly Money[]) =>
    amounts.length === 0
      ? t("nothing")
      : amounts.map((amount) => (
          <span key={amount.currency} className="block">
            {formatMoney(amount, locale)}
          </span>
        ));
  const asked = today.asked.map((amount) => formatMoney(amount, locale)).join(" + ");
  return (
    <Card title={t("title")} note={t("asked", { count: today.openCount, amount: asked || "none" })}>
      <ul className="grid grid-cols-2 gap-px border-y border-rule bg-rule xl:grid-cols-4">
        <Figure label={t("onUs")} href="/workshop-today?view=onUs" value={onUs} />
        <Figure label={t("onThem")} href="/workshop-today?view=onThem" value={onThem} />
        <Figure label={t("promised")} href="/workshop-today?view=decided" value={sums(today.promised)} />
        <Figure label={t("credited")} href={notesPath} value={sums(today.creditedThisMonth)} />
      </ul>
      <div className="mt-5 grid gap-6 lg:grid-cols-2">
        <AgeBars ages={today.ages} />
        <Deadlines today={today} locale={locale} />
      </div>
    </Card>
  );
}

type FigureProps = { label: string; value: ReactNode; href: `/${string}` | null };

function Figure({ label, value, href }: FigureProps) {
  const words = (
    <>
      <span className="block text-small text-ink-2">{label}</span>
      <span
        className={clsx(
          "block font-heading text-20 tabular-nums sm:text-24",
          href && "text-petrol underline decoration-1 underline-offset-4 group-hover:text-petrol-deep",
        )}
      >
        {value}
      </span>
    </>
  );
  return (
    <li className="bg-card">
      {href ? (
        <Link
          href={href}
          className="group flex h-full flex-col justify-between p-3 hover:bg-well focus-visible:-outline-offset-3"
        >
          {words}
        </Link>
      ) : (
        <div className="flex h-full flex-col justify-between p-3">{words}</div>
      )}
    </li>
  );
}

function Deadlines({ today, locale }: Reader & { today: WorkshopToday }) {
  const t = useTranslations("workshopToday");
  const due = [
    ...today.toSend.map(({ number, dueOn }) => ({ number, on: dueOn, what: "toSend" as const })),
    ...today.contestSoon.map(({ number, until }) => ({ number, on: until, what: "contest" as const })),
  ].toSorted((a, b) => (a.on < b.on ? -1 : 1));
  return (
    <div>
      <h3 className="mb-2 text-18">{t("deadlines")}</h3>
      {due.length === 0 ? <p className="text-ink-2">{t("noDeadlines")}</p> : null}
      <ul className="grid gap-2">
        {due.map(({ number, on, what }) => (
          <li
            key={`${what} ${number}`}
            className="grid grid-cols-[auto_minmax(0,1fr)] items-baseline gap-x-4"
          >
            <TextLink href={`/claims/${printClaimNumber(number)}`}>
              <span className="font-mono">{printClaimNumber(number)}</span>
            </TextLink>
            <span>{t(`due.${what}`, { day: formatDay(on, locale) })}</span>
          </li>
        ))}
      </ul>
    </div>
  );
}
