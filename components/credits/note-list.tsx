import { useTranslations } from "next-intl";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import type { Locale } from "@/lib/kernel/locale";
import { NOTE_VIEWS, type NoteView } from "@/lib/day-book/views";
import { NoteTable, type NoteRow } from "./note-table";

type NoteListProps = {
  path: "/credits" | "/credit-notes";
  view: NoteView;
  /** Where this page begins, and where the next one does; both are part of an address. */
  before: string | undefined;
  nextBefore: string | null;
  notes: readonly NoteRow[];
  locale: Locale;
};

/** Notes with their views as addresses, leafed through from one to the next. */
export function NoteList({ path, view, before, nextBefore, notes, locale }: NoteListProps) {
  const t = useTranslations("credits.issued");
  return (
    <div className="grid gap-4">
      <nav aria-label={t("views")}>
        <ul className="flex flex-wrap gap-2">
          {NOTE_VIEWS.map((one) => (
            <li key={one}>
              <LinkButton
                href={`${path}?view=${one}`}
                kind={one === view ? "secondary" : "quiet"}
                small
                aria-current={one === view ? "true" : undefined}
              >
                {t(`view.${one}`)}
              </LinkButton>
            </li>
          ))}
        </ul>
      </nav>
      {notes.length > 0 ? (
        <NoteTable notes={notes} locale={locale} />
      ) : (
        <EmptyState kind={view === "open" ? "allDone" : "nothingYet"} title={t(`nothing.${view}`)} />
      )}
      {before || nextBefore ? (
        <p className="flex flex-wrap gap-2">
          {before ? (
            <LinkButton href={`${path}?view=${view}`} kind="quiet" small>
              {t("newest")}
            </LinkButton>
          ) : null}
          {nextBefore ? (
            <LinkButton href={`${path}?view=${view}&before=${nextBefore}`} kind="quiet" small>
              {t("older")}
            </LinkButton>
          ) : null}
        </p>
      ) : null}
    </div>
  );
}
