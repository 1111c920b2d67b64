import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { MoneyLine, MoneyTotal } from "@/components/ui/money-total";
import { invoicesOf, type NoteDocument, type NoteParty } from "@/lib/credits/note-document";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { formatDay, formatDecimal, formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { money } from "@/lib/kernel/money";
import { NoteLines, TaxGroups } from "./note-lines";
import { NotGivenList, Why } from "./why";

export type NotePaperProps = { note: NoteDocument; locale: Locale };

/** A note as it was issued, the same words and figures as on its PDF. */
export function NotePaper({ note, locale }: NotePaperProps) {
  const t = useTranslations("credits.document");
  const elsewhere = useTranslations("credits.elsewhere");
  const amount = (minor: bigint) => formatMoney(money(minor, note.currency), locale);
  return (
    <Card isInCharge id="note" title={`${t(`title.${note.kind}`)} ${note.number}`}>
      <div className="grid gap-6">
        <div className="grid gap-6 sm:grid-cols-2">
          <Party label={t("from")} party={note.seller} />
          <Party label={t("to")} party={note.buyer} />
        </div>
        <NoteFacts note={note} locale={locale} />
        <div>
          <h3 className="mb-2 text-18">{t(note.kind === "credit" ? "lines" : "linesBack")}</h3>
          <NoteLines note={note} locale={locale} />
        </div>
        <div className="ml-auto w-full max-w-md">
          <MoneyLine label={t("sumOfLines")} amount={amount(note.linesMinor)} />
          {note.allowances.map((one) => (
            <MoneyLine
              key={`${one.taxCategory} ${one.taxRate}`}
              label={t("allowance", { reason: one.reason })}
              note={t("taxOf", { category: one.taxCategory, rate: formatDecimal(one.taxRate, locale) })}
              amount={amount(-one.amountMinor)}
            />
          ))}
          <MoneyLine label={t("netTotal")} amount={amount(note.netMinor)} />
          <MoneyLine label={t("taxTotal")} amount={amount(note.taxMinor)} />
          <MoneyTotal
            label={t(`total.${note.kind}`)}
            amount={amount(note.totalMinor)}
            note={t(`direction.${note.kind}`)}
          />
        </div>
        <div>
          <h3 className="mb-2 text-18">{t("taxGroups")}</h3>
          <TaxGroups note={note} locale={locale} />
        </div>
        {note.elsewhere.map(({ settledBy, netMinor }) =>
          settledBy === "creditNote" ? null : (
            <p key={settledBy}>{elsewhere(settledBy, { amount: amount(netMinor) })}</p>
          ),
        )}
        <NotGivenList notGiven={note.notGiven} currency={note.currency} locale={locale} />
        <Why explained={note.explained} steps={note.steps} locale={locale} />
      </div>
    </Card>
  );
}

function Party({ label, party }: { label: string; party: NoteParty }) {
  const t = useTranslations("credits.document");
  return (
    <div>
      <h3 className="font-text text-small font-normal text-ink-2">{label}</h3>
      <p className="font-semibold">{party.legalName}</p>
      <p className="whitespace-pre-line">{party.address}</p>
      <p>{party.country}</p>
      {party.taxNumber ? <p className="text-small">{t("taxNumber", { number: party.taxNumber })}</p> : null}
    </div>
  );
}

function NoteFacts({ note, locale }: NotePaperProps) {
  const t = useTranslations("credits.document");
  const verdicts = useTranslations("verdicts");
  const day = (on: CalendarDay) => formatDay(on, locale);
  const { claim, counters } = note;
  const reasons = note.reasons.map(({ lineNumber, code }) =>
    t("reasonOf", { line: lineNumber, reason: verdicts(`reasons.${code}.name`) }),
  );
  return (
    <Facts>
      <Fact term={t("number")}>
        <span className="font-mono">{note.number}</span>
      </Fact>
      <Fact term={t("issuedOn")}>{day(note.issuedOn)}</Fact>
      <Fact term={t("account")}>{note.accountNumber}</Fact>
      {invoicesOf(note).map(({ invoiceNumber, invoicedOn }) => (
        <Fact key={invoiceNumber} term={t("invoices")}>
          {t("invoiceOf", { number: invoiceNumber, day: day(invoicedOn) })}
        </Fact>
      ))}
      <Fact term={t("claim")}>
        {t("claimOf", {
          number: claim.number,
          filedOn: day(claim.filedOn),
          decidedOn: day(claim.decidedOn),
        })}
      </Fact>
      {counters ? (
        <Fact term={t("counters")}>
          {t("countersOf", { number: counters.number, day: day(counters.issuedOn) })}
        </Fact>
      ) : null}
      <Fact term={t("reason")}>
        <span className="whitespace-pre-line">{note.reason ?? reasons.join("\n")}</span>
      </Fact>
    </Facts>
  );
}
