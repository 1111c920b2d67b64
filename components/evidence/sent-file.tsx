"use client";

import { useFormatter, useTranslations } from "next-intl";
import { Button } from "@/components/ui/button";
import { UploadRow } from "@/components/ui/upload-row";
import type { EvidenceFileItem } from "./file-item";

/** A file that has arrived: its picture when there is one, its size, and the way to take it back while it is not sent. */
export function SentFile({ file, onWithdraw }: { file: EvidenceFileItem; onWithdraw: () => void }) {
  const t = useTranslations("live.files");
  const format = useFormatter();
  return (
    <UploadRow
      fileName={file.originalName}
      state="sent"
      note={t(`view.${file.viewState}`, {
        size: format.number(file.sizeBytes / 1000, { maximumFractionDigits: 0 }),
      })}
      picture={
        file.viewState === "ready" ? (
          // The view copy is small and comes from our own store; the framework's optimiser is off for good reason.
          // eslint-disable-next-line @next/next/no-img-element
          <img
            src={`/api/v1/evidence/${file.id}/view`}
            alt=""
            className="size-28 border border-edge object-cover"
          />
        ) : undefined
      }
      action={
        <Button
          small
          kind="quiet"
          onPress={onWithdraw}
          aria-label={t("withdrawFile", { name: file.originalName })}
        >
          {t("withdraw")}
        </Button>
      }
    />
  );
}
