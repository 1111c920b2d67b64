"use client";

import { useTranslations } from "next-intl";
import { buttonStyle } from "./button-style";
import { Card } from "./card";
import { CopyButton } from "./copy-button";

type FaultPageProps = { error: unknown; retry: () => void };

/** The reference under which the log holds what happened; what broke in the browser alone has none. */
export const referenceOf = (error: unknown): string | null =>
  error instanceof Error && "digest" in error && typeof error.digest === "string" ? error.digest : null;

/** In place of what could not be made: whose fault it is, what is safe, and the way on. */
export function FaultPage({ error, retry }: FaultPageProps) {
  const t = useTranslations("live.fault");
  const ui = useTranslations("ui");
  const reference = referenceOf(error);
  return (
    <div className="max-w-2xl">
      <Card isInCharge>
        <div role="alert" className="grid max-w-measure gap-2">
          <h1 className="text-24">{t("title")}</h1>
          <p>{t("body")}</p>
        </div>
        {reference ? (
          <p className="mt-4 flex flex-wrap items-center gap-x-3 gap-y-1 border-y border-rule py-2">
            <span className="text-small text-ink-2">{t("reference")}</span>
            <code className="font-mono">{reference}</code>
            <CopyButton value={reference} />
          </p>
        ) : null}
        <p className="mt-6">
          <button type="button" onClick={() => retry()} className={buttonStyle({ kind: "primary" })}>
            {ui("tryAgain")}
          </button>
        </p>
      </Card>
    </div>
  );
}
