"use client";

import { useMutation } from "@tanstack/react-query";
import { useLocale, useTimeZone, useTranslations } from "next-intl";
import { useEffect, useRef, useState, type ReactNode } from "react";
import { fetchJson } from "@/components/live/fetch-json";
import { StatusLine } from "@/components/ui/status-line";
import { changeFromFields } from "@/lib/claims/draft";
import { formatTime } from "@/lib/kernel/format";

type DraftFormProps = {
  number: string;
  /** Saves and goes on; the way of the form before any script has loaded, and of its own button. */
  action: (form: FormData) => void | Promise<void>;
  /** When the draft was last kept, as an ISO text. */
  savedAt: string;
  children: ReactNode;
};

const WAIT_MS = 600;

const fieldsOf = (form: HTMLFormElement) => {
  const fields: Record<string, string | string[]> = {};
  const data = new FormData(form);
  for (const name of new Set(data.keys())) {
    if (name.startsWith("$ACTION")) continue;
    const texts = data.getAll(name).filter((value) => typeof value === "string");
    if (name.endsWith("[]")) fields[name.slice(0, -2)] = texts;
    else fields[name] = texts.at(-1) ?? "";
  }
  return fields;
};

type Note = { key: "saving" | "notSaved" } | { key: "safe"; at: string };

/** A page of a draft that saves itself while it is filled in: a moment after each change, and when the page is left. */
export function DraftForm({ number, action, savedAt, children }: DraftFormProps) {
  const t = useTranslations("live.draft");
  const timeZone = useTimeZone() ?? "UTC";
  const locale = useLocale().startsWith("de") ? "de" : "en";
  const form = useRef<HTMLFormElement>(null);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const [note, setNote] = useState<Note>({ key: "safe", at: savedAt });
  const { mutate } = useMutation({
    mutationFn: (change: unknown) =>
      fetchJson(`/api/v1/claims/${number}/draft`, {
        method: "PUT",
        body: JSON.stringify(change),
        keepalive: true,
      }),
    onMutate: () => setNote({ key: "saving" }),
    onSuccess: () => setNote({ key: "safe", at: new Date().toISOString() }),
    onError: () => setNote({ key: "notSaved" }),
  });

  const save = () => {
    clearTimeout(timer.current);
    timer.current = undefined;
    if (form.current) mutate(changeFromFields(fieldsOf(form.current)));
  };
  const saveSoon = () => {
    clearTimeout(timer.current);
    timer.current = setTimeout(save, WAIT_MS);
  };

  useEffect(() => {
    const onLeave = () => {
      if (document.visibilityState === "hidden" && timer.current !== undefined) save();
    };
    document.addEventListener("visibilitychange", onLeave);
    return () => document.removeEventListener("visibilitychange", onLeave);
  });

  return (
    <form ref={form} action={action} onInput={saveSoon} noValidate className="grid gap-6">
      <input type="hidden" name="number" value={number} />
      {children}
      <StatusLine>
        {note.key === "safe"
          ? t("safe", { time: formatTime(new Date(note.at), locale, timeZone) })
          : t(note.key)}
      </StatusLine>
    </form>
  );
}
