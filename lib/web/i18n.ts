import "server-only";
import { cookies, headers } from "next/headers";
import { getRequestConfig } from "next-intl/server";
import { formatTag } from "@/lib/kernel/locale";
import { chosenLocale, LOCALE_COOKIE } from "./chosen-locale";
import { log } from "./log";
import { loadMessages } from "./messages";
import { currentSession } from "./session";

const DEFAULT_TIME_ZONE = "Europe/London";

// The browser tests run on a production build: they, too, want the test locale and no forgiven gap.
const isTrial = () => process.env.NODE_ENV !== "production" || process.env.TEST_LOCALES === "1";

/**
 * Language, sentences and wall clock of a request. Code that names the locale itself (a route, an action) needs no
 * session for it. The framework wants a language tag, so `long` goes as British English with longer sentences.
 */
export default getRequestConfig(async ({ locale: named }) => {
  const [jar, incoming] = await Promise.all([cookies(), headers()]);
  const session = named === undefined ? await currentSession() : null;
  const locale = chosenLocale({
    named,
    chosen: [jar.get(LOCALE_COOKIE)?.value, session?.actor.locale],
    acceptLanguage: incoming.get("accept-language"),
    hasTestLocales: isTrial(),
  });
  return {
    locale: formatTag(locale),
    messages: loadMessages(locale),
    timeZone: session?.actor.timeZone ?? DEFAULT_TIME_ZONE,
    onError: (error) => {
      if (isTrial()) throw error;
      log.error({ event: "messageUnusable", code: error.code, detail: error.message });
    },
  };
});
