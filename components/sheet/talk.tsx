"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useTranslations } from "next-intl";
import { useRef, useState, type FormEvent } from "react";
import { fetchJson, Refused } from "@/components/live/fetch-json";
import { Button } from "@/components/ui/button";
import { Card } from "@/components/ui/card";
import { RadioGroup } from "@/components/ui/choice-group";
import { TextArea } from "@/components/ui/text-area";
import type { MessageView } from "@/lib/claims/sheet/view";
import { formatInstant } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";

type TalkProps = { number: string; initial: readonly MessageView[]; locale: Locale; timeZone: string };

const isMessage = (value: unknown): value is MessageView =>
  typeof value === "object" && value !== null && "id" in value && "body" in value && "isOwnOnly" in value;

const messagesIn = (answer: unknown): MessageView[] =>
  typeof answer === "object" && answer !== null && "messages" in answer && Array.isArray(answer.messages)
    ? answer.messages.filter(isMessage)
    : [];

/** Talk on the claim: to the other side, or a note that stays inside. New words of others come in by themselves. */
export function Talk({ number, initial, locale, timeZone }: TalkProps) {
  const t = useTranslations("live.talk");
  const client = useQueryClient();
  const form = useRef<HTMLFormElement>(null);
  const [error, setError] = useState<string>();
  const path = `/api/v1/claims/${number}/messages`;
  const { data } = useQuery({
    queryKey: ["talk", number],
    queryFn: () => fetchJson(path),
    refetchInterval: 15_000,
  });
  const messages = data === undefined ? initial : messagesIn(data);
  const say = useMutation({
    mutationFn: (said: { body: string; audience: string }) =>
      fetchJson(path, { method: "POST", body: JSON.stringify(said) }),
    onSuccess: async () => {
      form.current?.reset();
      await client.invalidateQueries({ queryKey: ["talk", number] });
    },
    onError: (fault) => setError(fault instanceof Refused ? fault.sentence : t("notSent")),
  });
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const given = new FormData(event.currentTarget);
    const body = String(given.get("body") ?? "").trim();
    setError(body === "" ? t("empty") : undefined);
    if (body !== "") say.mutate({ body, audience: String(given.get("audience") ?? "both") });
  };
  return (
    <Card id="talk" title={t("title")}>
      {messages.length === 0 ? <p className="text-ink-2">{t("nothingYet")}</p> : null}
      <ol aria-live="polite" className="grid gap-3">
        {messages.map((message) => (
          <li
            key={message.id}
            className={message.isOwnOnly ? "rounded-sheet bg-well p-3" : "border-l-4 border-l-petrol pl-3"}
          >
            <p className="text-small text-ink-2">
              {t("who", { name: message.authorName, organisation: message.authorOrganisation })} ·{" "}
              <time dateTime={message.at}>{formatInstant(new Date(message.at), locale, timeZone)}</time>
            </p>
            <p className="whitespace-pre-wrap">{message.body}</p>
            {message.isOwnOnly ? <p className="text-small text-ink-2">{t("ownOnly")}</p> : null}
          </li>
        ))}
      </ol>
      <form ref={form} onSubmit={submit} className="mt-5 grid gap-3 border-t border-rule pt-4 print:hidden">
        <TextArea name="body" label={t("write")} rows={3} limit={4000} error={error} />
        <RadioGroup
          isInline
          name="audience"
          label={t("for")}
          chosen="both"
          choices={[
            { value: "both", label: t("both") },
            { value: "own", label: t("own") },
          ]}
        />
        <div className="grid sm:flex">
          <Button type="submit" kind="secondary" isPending={say.isPending}>
            {t("send")}
          </Button>
        </div>
      </form>
    </Card>
  );
}
