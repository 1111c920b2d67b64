import clsx from "clsx";
import { useTranslations } from "next-intl";
import type { ReactNode } from "react";
import { Glyph } from "./glyph";

export type UploadState = "waiting" | "sending" | "sent" | "failed";
type UploadRowProps = {
  fileName: string;
  state: UploadState;
  /** 0 to 100, whole. */
  percent?: number;
  /** Size, or the sentence that says what went wrong and the way out. */
  note?: ReactNode;
  picture?: ReactNode;
  /** Cancel while it runs, retry after it failed. */
  action?: ReactNode;
};

/** One file on its way: name, how far, and the one thing that can be done about it. */
export function UploadRow({ fileName, state, percent = 0, note, picture, action }: UploadRowProps) {
  const t = useTranslations("ui.upload");
  return (
    <li
      className={clsx(
        "flex min-h-row flex-wrap items-center gap-x-4 gap-y-1 border-b border-rule py-2",
        picture && "max-sm:grid max-sm:grid-cols-[auto_minmax(0,1fr)]",
      )}
    >
      {picture ? <div className="max-sm:row-span-2 max-sm:self-start">{picture}</div> : null}
      <div className="min-w-0 flex-1 basis-48">
        <p className="flex flex-wrap justify-between gap-x-4">
          <span className="font-mono break-all">{fileName}</span>
          <span
            className={clsx("inline-flex items-center gap-1.5 text-small tabular-nums", STATE_TEXT[state])}
          >
            {state === "sent" ? <Glyph name="tick" className="size-4" /> : null}
            {state === "failed" ? <Glyph name="stop" className="size-4" /> : null}
            {t(state, { percent })}
          </span>
        </p>
        {state === "sending" || state === "waiting" ? (
          <progress
            value={state === "sending" ? percent : 0}
            max={100}
            aria-label={fileName}
            className="progress"
          />
        ) : null}
        {note ? (
          <p className={clsx("text-small", state === "failed" ? "text-refused" : "text-ink-2")}>{note}</p>
        ) : null}
      </div>
      {action ? <div className={clsx(picture && "max-sm:-ml-3 max-sm:self-start")}>{action}</div> : null}
    </li>
  );
}

const STATE_TEXT = {
  waiting: "text-ink-2",
  sending: "text-moving",
  sent: "text-proven",
  failed: "font-semibold text-refused",
} as const satisfies Record<UploadState, string>;
