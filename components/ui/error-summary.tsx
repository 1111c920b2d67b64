"use client";

import { useTranslations } from "next-intl";
import { useEffect, useRef } from "react";

export type Problem = { fieldId: string; text: string };

/**
 * What stopped a form, at the top of it: takes the focus after a failed send, names each field in the same words
 * as beside the field, and leads there. Rendered by the server too, so it stands without script.
 */
export function ErrorSummary({ problems, title }: { problems: readonly Problem[]; title?: string }) {
  const t = useTranslations("ui");
  const box = useRef<HTMLElement>(null);
  const mark = t("problemMark");

  useEffect(() => {
    if (problems.length === 0) return;
    const before = document.title;
    document.title = `${mark} ${before}`;
    box.current?.focus();
    return () => {
      document.title = before;
    };
  }, [problems, mark]);

  if (problems.length === 0) return null;
  return (
    <section
      ref={box}
      tabIndex={-1}
      role="alert"
      className="grid gap-2 rounded-sheet border-2 border-l-8 border-refused bg-card p-4"
    >
      <h2 className="text-20">{title ?? t("problemTitle", { count: problems.length })}</h2>
      <ul className="grid gap-1">
        {problems.map(({ fieldId, text }) => (
          <li key={fieldId}>
            <a
              href={`#${fieldId}`}
              className="font-semibold text-refused underline underline-offset-3 hover:decoration-2"
            >
              {text}
            </a>
          </li>
        ))}
      </ul>
    </section>
  );
}
