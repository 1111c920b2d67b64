import "server-only";
import { createTranslator, type Messages as AnyMessages } from "use-intl/core";
import { readAmountText, readableCreditValues } from "@/lib/credits/amount-text";
import { explainedCredit } from "@/lib/credits/explained-shape";
import { parseCalendarDay } from "@/lib/kernel/calendar-day";
import { formatDay, formatMoney } from "@/lib/kernel/format";
import { formatTag, type Locale } from "@/lib/kernel/locale";
import { loadMessages } from "@/lib/web/messages";

export type Letter = { readonly subject: string; readonly text: string; readonly html: string };

const escapeHtml = (text: string) => text.replace(/[&<>"']/gu, (sign) => `&#${sign.charCodeAt(0)};`);

type Values = Record<string, string | number>;

/** Params as words: days and instants in the reader's language, codes left for their own sentences. */
function valuesOf(params: Readonly<Record<string, unknown>>, locale: Locale): Values {
  const values: Values = {};
  for (const [name, value] of Object.entries(params)) {
    if (typeof value === "number") values[name] = value;
    if (typeof value !== "string") continue;
    const amount = name === "amount" ? readAmountText(value) : null;
    if (amount) {
      values[name] = formatMoney(amount, locale);
      continue;
    }
    const day = parseCalendarDay(value.slice(0, 10));
    values[name] = day && /^\d{4}-\d\d-\d\d(T.*)?$/u.test(value) ? formatDay(day, locale) : value;
  }
  return values;
}

type Words = (key: string, values?: Values) => string;

/** The chain of a credit as lines of text: what it comes to, then each step with its figure and where it is from. */
function chainOf(sent: unknown, t: Words, locale: Locale): string {
  const credit = explainedCredit.safeParse(sent).data;
  if (!credit) return "";
  const { amount = "" } = readableCreditValues({ amount: credit.total }, locale);
  const lines = credit.steps.map(({ rule, input, result, source }) => {
    const { figure = "" } = readableCreditValues({ figure: result }, locale);
    const sentence = t(`creditSteps.${rule}`, readableCreditValues(input, locale));
    return t(source ? "mails.chain.cited" : "mails.chain.step", { sentence, figure, source: source ?? "" });
  });
  return [t("mails.chain.title", { amount }), ...lines].join("\n");
}

type Page = {
  readonly locale: Locale;
  readonly subject: string;
  readonly paragraphs: readonly string[];
  readonly footer: string;
  readonly link: { readonly href: string; readonly label: string } | null;
};

// A link keeps the colour its reader's program gives it: one of ours would be too dark on a dark ground.
const htmlPage = ({ locale, subject, paragraphs, footer, link }: Page) => `<!doctype html>
<html lang="${formatTag(locale)}"><head><meta charset="utf-8"><meta name="color-scheme" content="light dark"><title>${escapeHtml(subject)}</title></head>
<body style="margin:0;padding:24px;font:16px/1.5 Georgia,serif">
<div style="max-width:36em;border-top:4px solid #0B5563;padding-top:16px">
${paragraphs.map((text) => `<p style="white-space:pre-line">${escapeHtml(text)}</p>`).join("\n")}
${link ? `<p><a href="${escapeHtml(link.href)}" style="font-weight:bold">${escapeHtml(link.label)}</a></p>` : ""}
<p style="font-size:14px">${escapeHtml(footer)}</p>
</div></body></html>`;

/**
 * The mail of a kind in the reader's language, as text and as HTML with the same words. Throws for a kind without
 * sentences: it then stays in the outbox and somebody looks.
 */
export function letterFor(
  kind: string,
  params: Readonly<Record<string, unknown>>,
  locale: Locale,
): Promise<Letter> {
  const messages: AnyMessages = loadMessages(locale);
  const t: Words = createTranslator({
    locale: formatTag(locale),
    messages,
    onError: (error) => {
      throw error;
    },
  });
  const values = valuesOf(params, locale);
  const rowIds = Array.isArray(params.rowIds) ? params.rowIds.map(String) : [];
  const wanted = rowIds.map((rowId) => `- ${t(`evidence.rows.${rowId}.name`)}`).join("\n");
  const withWords: Values = {
    ...values,
    count: rowIds.length,
    outcomeWords: typeof params.outcome === "string" ? t(`ui.mark.claim.${params.outcome}`) : "",
  };
  const subject = t(`mails.${kind}.subject`, withWords);
  const body = t(`mails.${kind}.body`, withWords);
  const paragraphs = [t("mails.greeting", withWords), body, wanted, chainOf(params.credit, t, locale)].filter(
    (text) => text !== "",
  );
  const href = typeof params.link === "string" ? params.link : null;
  const link = href ? { href, label: t(`mails.${kind}.link`) } : null;
  const text = [...paragraphs, ...(link ? [`${link.label}: ${link.href}`] : []), t("mails.footer")].join(
    "\n\n",
  );
  return Promise.resolve({
    subject,
    text,
    html: htmlPage({ locale, subject, paragraphs, footer: t("mails.footer"), link }),
  });
}
