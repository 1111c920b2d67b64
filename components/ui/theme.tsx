"use client";

import { ThemeProvider as NextThemes, useTheme } from "next-themes";
import { useEffect, useEffectEvent, type ReactNode } from "react";

type ThemeProviderProps = { nonce?: string; preferred?: string; children: ReactNode };

/**
 * Follows the system unless a person chose otherwise; set on `<html data-theme>` before the first paint.
 * `preferred` is what the server keeps for the person ("system", "light", "dark") and wins over what this browser
 * remembers. `nonce` lets the one small script through the page's security policy.
 */
export function ThemeProvider({ nonce, preferred, children }: ThemeProviderProps) {
  return (
    <NextThemes
      attribute="data-theme"
      defaultTheme={preferred ?? "system"}
      enableSystem
      enableColorScheme={false}
      disableTransitionOnChange
      storageKey="partproof-theme"
      nonce={nonce}
    >
      {preferred ? <AdoptTheme preferred={preferred} /> : null}
      {children}
    </NextThemes>
  );
}

/** Another device, or somebody else at this one: what the server keeps is taken over, once for each answer of it. */
function AdoptTheme({ preferred }: { preferred: string }) {
  const { setTheme } = useTheme();
  const adopt = useEffectEvent(() => setTheme(preferred));
  useEffect(() => adopt(), [preferred]);
  return null;
}
