"use client";

import { useRouter } from "next/navigation";
import { useState, type ReactNode } from "react";
import { I18nProvider, RouterProvider } from "react-aria-components";
import { ThemeProvider } from "./theme";

type UiRootProps = {
  /** BCP 47 tag; the parts in the browser speak and sort by it. */
  locale: string;
  nonce?: string;
  preferredTheme?: string;
  children: ReactNode;
};

/** What the parts in the browser share: the theme, the reader's language, and links that change pages without a reload. */
export function UiRoot({ locale, nonce, preferredTheme, children }: UiRootProps) {
  const router = useRouter();
  // A page fetched later brings the nonce of its own answer; the document still obeys the one it came with.
  const [documentNonce] = useState(nonce);
  return (
    <ThemeProvider nonce={documentNonce} preferred={preferredTheme}>
      <I18nProvider locale={locale}>
        <RouterProvider navigate={(path) => router.push(path)}>
          {documentNonce ? <meta property="csp-nonce" content={documentNonce} /> : null}
          {children}
        </RouterProvider>
      </I18nProvider>
    </ThemeProvider>
  );
}
