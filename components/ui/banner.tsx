import clsx from "clsx";
import type { ReactNode } from "react";
import { Glyph, type GlyphName } from "./glyph";
import { toneText, toneWash, type Tone } from "./tone";

// A caution is about safety: heavier edge, always the warning sign, never dismissed.
const KINDS = {
  info: { tone: "moving", glyph: "info" },
  wanting: { tone: "wanting", glyph: "ask" },
  refused: { tone: "refused", glyph: "stop" },
  proven: { tone: "proven", glyph: "tick" },
  caution: { tone: "wanting", glyph: "warning" },
} as const satisfies Record<string, { tone: Tone; glyph: GlyphName }>;

export type BannerKind = keyof typeof KINDS;
type BannerProps = {
  kind: BannerKind;
  title?: ReactNode;
  children?: ReactNode;
  actions?: ReactNode;
  /** Set when it appears as the answer to something just done, so that it is read out. */
  isLive?: boolean;
};

/** A message across the page: what happened, then what to do. */
export function Banner({ kind, title, children, actions, isLive = false }: BannerProps) {
  const { tone, glyph } = KINDS[kind];
  const isCaution = kind === "caution";
  return (
    <div
      role={isLive ? (kind === "refused" ? "alert" : "status") : undefined}
      className={clsx(
        "flex gap-3 rounded-sheet border-l-4 border-current p-3 sm:px-4",
        isCaution && "border-2 border-l-8",
        toneText[tone],
        toneWash[tone],
      )}
    >
      <Glyph name={glyph} className={clsx("mt-0.5", isCaution && "size-6")} />
      <div className="grid min-w-0 gap-1">
        {title ? <p className="font-semibold">{title}</p> : null}
        {children ? <div className="max-w-measure text-ink">{children}</div> : null}
        {actions ? <div className="mt-2 flex flex-wrap gap-2">{actions}</div> : null}
      </div>
    </div>
  );
}
