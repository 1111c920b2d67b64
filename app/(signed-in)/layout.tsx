import { getTranslations } from "next-intl/server";
import type { ReactNode } from "react";
import { AlertsLink } from "@/components/alerts/alerts-link";
import { LiveProvider } from "@/components/live/query-provider";
import { AppHeader, PageBody } from "@/components/ui/app-header";
import { LinkButton } from "@/components/ui/link-button";
import { countUnread } from "@/lib/alerts/queries";
import { PLACES } from "@/lib/web/navigation";
import { may, requireSession } from "@/lib/web/session";

// Nothing behind the sign-in is ever made in advance or kept by a shared cache.
export const dynamic = "force-dynamic";

/** "LT" for "Lou Tanner": all of a name that a phone has room for beside the alerts. */
const initialsOf = (name: string): string =>
  name
    .split(/\s+/u)
    .flatMap((word) => [...word].slice(0, 1))
    .filter((_letter, at, letters) => at === 0 || at === letters.length - 1)
    .join("");

/** The head and the ground of every page behind the sign-in. */
export default async function SignedInLayout({ children }: { children: ReactNode }) {
  const [session, t, shell] = await Promise.all([
    requireSession(),
    getTranslations("navigation"),
    getTranslations("shell"),
  ]);
  const unread = await countUnread(session.actor);
  const places = PLACES.filter(({ right }) => may(session, right)).map(({ key, href }) => ({
    href,
    label: t(key),
  }));
  return (
    <LiveProvider>
      <AppHeader
        home="/"
        places={places}
        help={{ href: "/help", label: shell("help") }}
        tools={
          <>
            <AlertsLink unread={unread} />
            {/* On a phone the alerts give way, not the initials: those are pressed with a thumb. */}
            <span className="flex min-w-0 max-sm:shrink-0">
              <LinkButton href="/account" kind="quiet" small>
                <span className="truncate max-sm:sr-only">{session.actor.name}</span>
                <span aria-hidden="true" className="min-w-8 text-center sm:hidden">
                  {initialsOf(session.actor.name)}
                </span>
              </LinkButton>
            </span>
          </>
        }
      />
      <PageBody>{children}</PageBody>
    </LiveProvider>
  );
}
