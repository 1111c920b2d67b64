import { useTranslations } from "next-intl";

export const MAIN_ID = "main";

/** First stop of the Tab key: past the head of the page, straight to its matter. */
export function SkipLink() {
  const t = useTranslations("ui");
  return (
    <a
      href={`#${MAIN_ID}`}
      className="sr-only font-semibold text-petrol underline focus:not-sr-only focus:fixed focus:top-3 focus:left-3 focus:z-50 focus:rounded-control focus:border focus:border-edge focus:bg-card focus:px-4 focus:py-2"
    >
      {t("skip")}
    </a>
  );
}
