import clsx from "clsx";
import type { ReactNode } from "react";

// The few signs that stand in server-rendered parts. Drawn in the same stroke as the icons, so nothing has to be
// sent to the browser for them; richer screens take their icons from the icon library.
const GLYPHS = {
  warning: (
    <>
      <path d="M10 2.8 18.2 17H1.8Z" />
      <path d="M10 8v4" />
      <path d="M10 14.4v.1" />
    </>
  ),
  info: (
    <>
      <circle cx="10" cy="10" r="7.6" />
      <path d="M10 9.4v4.4" />
      <path d="M10 6.4v.1" />
    </>
  ),
  tick: <path d="m4 10.6 4 4L16.2 6" />,
  cross: <path d="m5 5 10 10M15 5 5 15" />,
  stop: (
    <>
      <path d="M6.8 2.4h6.4l4.4 4.4v6.4l-4.4 4.4H6.8l-4.4-4.4V6.8Z" />
      <path d="M6.4 10h7.2" />
    </>
  ),
  ask: <path d="M10 1.8 18.2 10 10 18.2 1.8 10Z" />,
  down: <path d="m5 7.6 5 5 5-5" />,
  back: <path d="M16.5 10h-13M8.4 5l-5 5 5 5" />,
  onward: <path d="M3.5 10h13M11.6 5l5 5-5 5" />,
  ascending: <path d="M10 16.5v-13M5.2 8.2 10 3.5l4.8 4.7" />,
  descending: <path d="M10 3.5v13M5.2 11.8l4.8 4.7 4.8-4.7" />,
  bell: (
    <>
      <path d="M4.2 14.4c1.2-1.2 1.5-2.6 1.5-5.2a4.3 4.3 0 0 1 8.6 0c0 2.6.3 4 1.5 5.2Z" />
      <path d="M8.2 17a2 2 0 0 0 3.6 0M10 4.9V3" />
    </>
  ),
  bars: <path d="M2.8 5.4h14.4M2.8 10h14.4M2.8 14.6h14.4" />,
} as const satisfies Record<string, ReactNode>;

export type GlyphName = keyof typeof GLYPHS;

/** A 20 px sign in the colour of the text beside it. Never alone: the words next to it carry the meaning. */
export function Glyph({ name, className }: { name: GlyphName; className?: string }) {
  return (
    <svg
      viewBox="0 0 20 20"
      aria-hidden="true"
      className={clsx("size-5 shrink-0 fill-none stroke-current", className)}
      strokeWidth="1.75"
      strokeLinecap="round"
      strokeLinejoin="round"
    >
      {GLYPHS[name]}
    </svg>
  );
}
