import { useTranslations } from "next-intl";
import { LinkButton } from "@/components/ui/link-button";
import { BOOK_SHEETS, type BookSheet } from "@/lib/rule-book/rule-view";

type Owner = { readonly id: string; readonly name: string };
type Place = { readonly of: string; readonly sheet: BookSheet; readonly family: string | null };
type BookNavProps = { owners: readonly Owner[]; families: readonly string[]; at: Place };

/** Whose Rule book, which sheet of it, and which family, each an address; and which day's version of it counts. */
export function BookNav({ owners, families, at }: BookNavProps) {
  const t = useTranslations("ruleBook");
  const familyWords = useTranslations("families");
  return (
    <div className="grid gap-3">
      <div className="grid gap-3 print:hidden">
        {owners.length > 1 ? (
          <LinkRow
            label={t("owners")}
            links={owners.map(({ id, name }) => ({
              words: name,
              place: { ...at, of: id },
              isHere: id === at.of,
            }))}
          />
        ) : null}
        <LinkRow
          label={t("sheetsLabel")}
          links={BOOK_SHEETS.map((sheet) => ({
            words: t(`sheets.${sheet}`),
            place: { ...at, sheet },
            isHere: sheet === at.sheet,
          }))}
        />
        {families.length > 1 ? (
          <LinkRow
            label={t("families")}
            links={families.map((family) => ({
              words: familyWords(`${family}.name`),
              place: { ...at, family },
              isHere: family === at.family,
            }))}
          />
        ) : null}
      </div>
      {at.sheet === "reasons" ? null : <p className="max-w-measure text-ink-2">{t(`applies.${at.sheet}`)}</p>}
    </div>
  );
}

type PlaceLink = { words: string; place: Place; isHere: boolean };

const LinkRow = ({ label, links }: { label: string; links: readonly PlaceLink[] }) => (
  <nav aria-label={label}>
    <ul className="flex flex-wrap gap-2">
      {links.map(({ words, place, isHere }) => (
        <li key={words}>
          <LinkButton
            href={{ pathname: "/rule-book", query: queryOf(place) }}
            kind={isHere ? "secondary" : "quiet"}
            small
            aria-current={isHere ? "page" : undefined}
          >
            {words}
          </LinkButton>
        </li>
      ))}
    </ul>
  </nav>
);

const queryOf = ({ of, sheet, family }: Place) => ({ of, sheet, ...(family ? { family } : {}) });
