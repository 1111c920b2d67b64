import { getTranslations } from "next-intl/server";
import type { ReactNode } from "react";
import { LiveProvider } from "@/components/live/query-provider";
import { AppHeader, PageBody } from "@/components/ui/app-header";
import { LinkButton } from "@/components/ui/link-button";
import { PLACES } from "@/lib/web/navigation";
import { may, requireSession } from "@/lib/web/session";

// Nothing behind the sign-in is ever made in advance or kept by a shared cache.
export const dynamic = "force-dynamic";

/** The head and the ground of every page behind the sign-in. */
export default async function SignedInLayout({ children }: { children: ReactNode }) {
  const [session, t, shell] = await Promise.all([
    requireSession(),
    getTranslations("navigation"),
    getTranslations("shell"),
  ]);
  const places = PLACES.filter(({ right }) => may(session, right)).map(({ key, href }) => ({
    href,
    label: t(key),
  }));
  return (
    <>
      <AppHeader
        home="/"
        places={places}
        help={{ href: "/help", label: shell("help") }}
        tools={
          <LinkButton href="/account" kind="quiet" small>
            <span className="truncate">{session.actor.name}</span>
          </LinkButton>
        }
      />
      <PageBody>
        <LiveProvider>{children}</LiveProvider>
      </PageBody>
    </>
  );
}
