import Link from "next/link";
import { useTranslations } from "next-intl";
import type { ComponentProps } from "react";
import { buttonStyle } from "./button-style";
import { Glyph } from "./glyph";

type Href = ComponentProps<typeof Link>["href"];
type PaginationProps = {
  page: number;
  pages: number;
  /** Absent at either end. */
  previous?: Href;
  next?: Href;
  /** What is being leafed through, when a page has more than one list. */
  label?: string;
};

/** Leafing by links: each page is an address. */
export function Pagination({ page, pages, previous, next, label }: PaginationProps) {
  const t = useTranslations("ui.pages");
  const style = buttonStyle({ kind: "quiet", small: true });
  return (
    <nav
      aria-label={label ?? t("label")}
      className="flex flex-wrap items-center gap-2 text-small print:hidden"
    >
      {previous === undefined ? null : (
        <Link href={previous} rel="prev" className={style}>
          <Glyph name="back" /> {t("previous")}
        </Link>
      )}
      <span className="px-1 text-ink-2 tabular-nums">{t("at", { page, pages })}</span>
      {next === undefined ? null : (
        <Link href={next} rel="next" className={style}>
          {t("next")} <Glyph name="onward" />
        </Link>
      )}
    </nav>
  );
}
