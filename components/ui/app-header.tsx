import Link from "next/link";
import { useTranslations } from "next-intl";
import type { ComponentProps, ReactNode } from "react";
import { MainNav, type Place } from "./main-nav";
import { MAIN_ID, SkipLink } from "./skip-link";
import { Wordmark } from "./wordmark";

type AppHeaderProps = {
  home: ComponentProps<typeof Link>["href"];
  places?: readonly Place[];
  /** Search, the person's own menu. */
  tools?: ReactNode;
  /** "Help and keys": always the last thing in the head of a page. */
  help: Place;
};

/** The head of every page: whose product it is, where one can go, help last. */
export function AppHeader({ home, places = [], tools, help }: AppHeaderProps) {
  const t = useTranslations("ui");
  return (
    <>
      <SkipLink />
      <header className="border-b border-edge bg-paper print:hidden">
        <div className="relative mx-auto flex max-w-page items-center gap-x-2 px-4 sm:px-6 md:flex-wrap md:gap-x-4">
          <Link href={home} aria-label={t("home")} className="my-2 shrink-0 rounded-sheet py-1.5">
            <Wordmark />
          </Link>
          {tools ? <div className="ml-auto flex min-w-0 items-center gap-2">{tools}</div> : null}
          <MainNav places={places} help={help} hasTools={Boolean(tools)} />
        </div>
      </header>
    </>
  );
}

/** The matter of a page, where the skip link leads. */
export function PageBody({ children }: { children: ReactNode }) {
  return (
    <main
      id={MAIN_ID}
      tabIndex={-1}
      className="mx-auto grid max-w-page content-start gap-6 px-4 py-6 outline-none sm:px-6 print:p-0"
    >
      {children}
    </main>
  );
}
