"use client";

import clsx from "clsx";
import Link from "next/link";
import { usePathname } from "next/navigation";
import { useTranslations } from "next-intl";
import type { ComponentProps, ReactNode } from "react";
import { buttonStyle } from "./button-style";
import { closeOnEscape } from "./close-on-escape";
import { Glyph } from "./glyph";
import { LinkPending } from "./link-pending";

export type Place = { href: ComponentProps<typeof Link>["href"]; label: ReactNode; count?: number };
type MainNavProps = { places: readonly Place[]; help: Place; hasTools: boolean };

const addressOf = (href: Place["href"]) => (typeof href === "string" ? href : (href.pathname ?? ""));

/** A place is the current one on its own page and on every page below it. */
const isHere = (href: Place["href"], pathname: string) =>
  pathname === addressOf(href) || pathname.startsWith(`${addressOf(href)}/`);

/** A ruled bar at the desk; behind one button on a phone, where it opens without script too. */
export function MainNav({ places, help, hasTools }: MainNavProps) {
  const t = useTranslations("ui");
  const pathname = usePathname();
  return (
    <>
      <nav aria-label={t("mainNav")} className="-mx-2 hidden basis-full md:block">
        <ul className="flex flex-wrap">
          {[...places, help].map((place) => (
            <li key={addressOf(place.href)} className="last:ml-auto">
              <BarLink place={place} isCurrent={isHere(place.href, pathname)} />
            </li>
          ))}
        </ul>
      </nav>
      {/* A new key on each page closes the menu after it has led somewhere. */}
      <details
        key={pathname}
        onKeyDown={closeOnEscape}
        className={clsx("group shrink-0 md:hidden", !hasTools && "ml-auto")}
      >
        <summary
          className={clsx(
            buttonStyle({ kind: "quiet" }),
            "-mr-2 list-none px-2! [&::-webkit-details-marker]:hidden",
          )}
        >
          <Glyph name="bars" className="group-open:hidden" />
          <Glyph name="cross" className="hidden group-open:block" />
          {t("menu")}
        </summary>
        <nav
          aria-label={t("mainNav")}
          className="absolute inset-x-0 top-full z-30 border-y border-edge bg-card shadow-panel"
        >
          <ul>
            {[...places, help].map((place) => (
              <li key={addressOf(place.href)} className="border-b border-rule last:border-b-0">
                <ListLink place={place} isCurrent={isHere(place.href, pathname)} />
              </li>
            ))}
          </ul>
        </nav>
      </details>
    </>
  );
}

type PlaceLinkProps = { place: Place; isCurrent: boolean };

function BarLink({ place, isCurrent }: PlaceLinkProps) {
  return (
    <Link
      href={place.href}
      aria-current={isCurrent ? "page" : undefined}
      className={clsx(
        "relative flex min-h-target items-center gap-1.5 border-b-3 px-2 pt-1 pb-1.5 hover:border-edge focus-visible:-outline-offset-3",
        isCurrent
          ? "border-ink font-semibold text-ink hover:border-ink"
          : "border-transparent text-ink-2 hover:text-ink forced-colors:border-[Canvas]",
      )}
    >
      {place.label} <Count value={place.count} />
      <LinkPending />
    </Link>
  );
}

function ListLink({ place, isCurrent }: PlaceLinkProps) {
  return (
    <Link
      href={place.href}
      aria-current={isCurrent ? "page" : undefined}
      className={clsx(
        "relative flex min-h-14 items-center justify-between gap-4 border-l-4 px-4 focus-visible:-outline-offset-3",
        isCurrent
          ? "border-petrol bg-well font-semibold"
          : "border-transparent forced-colors:border-[Canvas]",
      )}
    >
      {place.label} <Count value={place.count} />
      <LinkPending />
    </Link>
  );
}

/** A count that is not known is not shown; it is never a zero. */
function Count({ value }: { value: number | undefined }) {
  if (value === undefined) return null;
  return (
    <span className="rounded-sheet bg-well px-1.5 text-14 leading-5 text-ink-2 tabular-nums">{value}</span>
  );
}
