import { getTranslations } from "next-intl/server";
import type { ReactNode } from "react";
import { Wordmark } from "@/components/ui/wordmark";
import { MAIN_ID, SkipLink } from "@/components/ui/skip-link";

/** The ground of the few pages before the sign-in: the name, one sheet, and what the product is for. */
export default async function PublicLayout({ children }: { children: ReactNode }) {
  const t = await getTranslations("shell");
  return (
    <>
      <SkipLink />
      <main
        id={MAIN_ID}
        tabIndex={-1}
        className="mx-auto grid min-h-dvh max-w-lg content-center gap-6 px-4 py-12 outline-none"
      >
        <Wordmark />
        {children}
        <p className="text-small text-ink-2">{t("description")}</p>
      </main>
    </>
  );
}
