import type { Metadata, Viewport } from "next";
import { NextIntlClientProvider } from "next-intl";
import { getLocale, getMessages, getTranslations } from "next-intl/server";
import { headers } from "next/headers";
import type { ReactNode } from "react";
import { UiRoot } from "@/components/ui/root";
import { currentSession } from "@/lib/web/session";
import { fontVariables } from "./fonts";
import "./globals.css";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("shell");
  return { title: { default: "Partproof", template: "%s · Partproof" }, description: t("description") };
}

export const viewport: Viewport = {
  width: "device-width",
  initialScale: 1,
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: "#F6F4EE" },
    { media: "(prefers-color-scheme: dark)", color: "#14181B" },
  ],
};

/** Texts that parts in the browser need. Everything else is written on the server and never sent as a catalogue. */
const BROWSER_TEXTS = ["ui", "uploads", "live"];

/** The page every other page stands in: language, theme, type and the nonce that scripts and styles need. */
export default async function RootLayout({ children }: { children: ReactNode }) {
  const [locale, messages, incoming, session] = await Promise.all([
    getLocale(),
    getMessages(),
    headers(),
    currentSession(),
  ]);
  const nonce = incoming.get("x-nonce") ?? undefined;
  const inBrowser = Object.fromEntries(
    Object.entries(messages).filter(([namespace]) => BROWSER_TEXTS.includes(namespace)),
  );
  return (
    <html
      lang={locale}
      data-density={session?.density ?? undefined}
      className={fontVariables}
      suppressHydrationWarning
    >
      <body>
        <NextIntlClientProvider messages={inBrowser}>
          <UiRoot locale={locale} nonce={nonce} preferredTheme={session?.theme}>
            {children}
          </UiRoot>
        </NextIntlClientProvider>
      </body>
    </html>
  );
}
