import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { NotHere } from "@/components/people/not-here";
import { MAIN_ID } from "@/components/ui/skip-link";
import { Wordmark } from "@/components/ui/wordmark";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("boundaries.notHere.page");
  return { title: t("title") };
}

/** An address that leads nowhere, for whoever asks. */
export default function NotFound() {
  return (
    <main id={MAIN_ID} className="mx-auto grid min-h-dvh max-w-lg content-center gap-6 px-4 py-12">
      <Wordmark />
      <NotHere />
    </main>
  );
}
