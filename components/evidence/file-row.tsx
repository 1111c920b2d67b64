"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useTranslations } from "next-intl";
import { useEffect, useId, useRef } from "react";
import { useDropzone } from "react-dropzone";
import { fetchJson } from "@/components/live/fetch-json";
import { Button } from "@/components/ui/button";
import { buttonStyle } from "@/components/ui/button-style";
import { UploadRow } from "@/components/ui/upload-row";
import type { EvidenceFileItem } from "./file-item";
import { SentFile } from "./sent-file";
import { useSending, type Sending } from "./use-sending";

type FileRowProps = {
  claimId: string;
  number: string;
  rowId: string;
  kind: "photo" | "runLog" | "document";
  files: readonly EvidenceFileItem[];
};

const ACCEPT = {
  photo: "image/jpeg,image/png,image/webp",
  runLog: ".csv,.txt,text/csv,text/plain",
  document: "application/pdf,.pdf",
} as const;

/** The files of one row of the Evidence list: drop, choose or take a photo; each with its progress, its fault and its way out. */
export function FileRow({ claimId, number, rowId, kind, files }: FileRowProps) {
  const t = useTranslations("live.files");
  const client = useQueryClient();
  const inputId = useId();
  const key = ["evidence", number];
  const onSent = () => client.invalidateQueries({ queryKey: key });
  const { sending, take, retry, drop } = useSending({ claimId, rowId, kind }, onSent);
  const live = useQuery({
    queryKey: key,
    queryFn: () => fetchJson(`/api/v1/claims/${number}/evidence`),
    select: listedFiles,
    // Until every picture has its view copy, ask again now and then.
    refetchInterval: (query) =>
      listedFiles(query.state.data).some((file) => file.viewState === "waiting") ? 2_000 : false,
    enabled: sending.length > 0 || files.some((file) => file.viewState === "waiting"),
  });
  const shown = live.data ? live.data.filter((file) => file.rowId === rowId) : files;
  const withdraw = useMutation({
    mutationFn: (id: string) => fetchJson(`/api/v1/evidence/${id}`, { method: "DELETE" }),
    onSuccess: onSent,
  });

  const { getRootProps, isDragActive } = useDropzone({ onDrop: take, noClick: true, noKeyboard: true });

  return (
    <div
      {...getRootProps()}
      className={
        isDragActive ? "grid gap-2 outline-2 outline-offset-4 outline-petrol outline-dashed" : "grid gap-2"
      }
    >
      {shown.length + sending.length > 0 ? (
        <ul>
          {shown.map((file) => (
            <SentFile key={file.id} file={file} onWithdraw={() => withdraw.mutate(file.id)} />
          ))}
          {sending.map((one) => (
            <UploadRow
              key={one.id}
              fileName={one.file.name}
              state={one.fault ? "failed" : one.upload ? "sending" : "waiting"}
              percent={one.percent}
              note={one.fault ? (one.fault.sentence ?? t("interrupted")) : undefined}
              action={<RowAction sending={one} onRetry={() => retry(one)} onDrop={() => drop(one)} />}
            />
          ))}
        </ul>
      ) : null}
      <p className="flex flex-wrap gap-2 *:grow sm:*:grow-0">
        {kind === "photo" ? (
          <FilePick
            id={`${inputId}-camera`}
            label={t("takePhoto")}
            accept={ACCEPT.photo}
            isCamera
            onTake={take}
          />
        ) : null}
        <FilePick id={`${inputId}-files`} label={t(`choose.${kind}`)} accept={ACCEPT[kind]} onTake={take} />
      </p>
    </div>
  );
}

function RowAction({
  sending,
  onRetry,
  onDrop,
}: {
  sending: Sending;
  onRetry: () => void;
  onDrop: () => void;
}) {
  const t = useTranslations("live.files");
  return (
    <span className="flex gap-2">
      {sending.fault?.canRetry ? (
        <Button small kind="secondary" onPress={onRetry}>
          {t("retry")}
        </Button>
      ) : null}
      <Button small kind="quiet" onPress={onDrop}>
        {t(sending.fault ? "drop" : "cancel")}
      </Button>
    </span>
  );
}

type FilePickProps = {
  id: string;
  label: string;
  accept: string;
  isCamera?: boolean;
  onTake: (files: readonly File[]) => void;
};

/** A native picker under a label that looks like a button: a phone offers its camera, a desk its folders. It has no name: the form never carries the bytes. */
function FilePick({ id, label, accept, isCamera = false, onTake }: FilePickProps) {
  const picker = useRef<HTMLInputElement>(null);
  const takeFrom = (input: HTMLInputElement) => {
    const chosen = [...(input.files ?? [])];
    input.value = "";
    if (chosen.length > 0) onTake(chosen);
  };
  // What was chosen before the page could listen is still in the picker, and nobody would ask for it again.
  useEffect(() => {
    if (picker.current?.files?.length) takeFrom(picker.current);
  });
  return (
    <span className="relative grid">
      <input
        ref={picker}
        id={id}
        type="file"
        accept={accept}
        multiple={!isCamera}
        capture={isCamera ? "environment" : undefined}
        onChange={(event) => takeFrom(event.target)}
        className="peer absolute inset-0 size-full cursor-pointer opacity-0"
      />
      <label
        htmlFor={id}
        className={`${buttonStyle({ kind: "secondary" })} peer-focus-visible:outline-3 peer-focus-visible:outline-offset-3 peer-focus-visible:outline-focus`}
      >
        {label}
      </label>
    </span>
  );
}

const isFile = (value: unknown): value is EvidenceFileItem =>
  typeof value === "object" && value !== null && "id" in value && "rowId" in value && "viewState" in value;

/** The files in an answer of the list route; anything else is none. */
function listedFiles(answer: unknown): EvidenceFileItem[] {
  if (typeof answer !== "object" || answer === null || !("files" in answer) || !Array.isArray(answer.files))
    return [];
  return answer.files.filter(isFile);
}
