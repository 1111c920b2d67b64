"use client";

import { useTranslations } from "next-intl";
import { useState } from "react";
import { buttonStyle } from "./button-style";

/** Puts a value on the clipboard and says so where it was pressed. */
export function CopyButton({ value, label }: { value: string; label?: string }) {
  const t = useTranslations("ui");
  const [isCopied, setCopied] = useState(false);
  const copy = () => {
    void navigator.clipboard.writeText(value).then(() => setCopied(true));
  };
  return (
    <>
      <button type="button" onClick={copy} className={buttonStyle({ kind: "quiet", small: true })}>
        {label ?? t("copy")}
      </button>
      <span role="status" className="text-small text-proven">
        {isCopied ? t("copied") : null}
      </span>
    </>
  );
}
