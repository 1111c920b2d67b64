import type { ReactNode } from "react";

// Fourteen units wide, in the colour of the words. Filled: decided. Open: waiting for someone. Half: partly.
// Ticks and bars inside filled shapes are holes, so they show whatever ground lies beneath.
const fill = (path: string) => <path d={path} fill="currentColor" fillRule="evenodd" stroke="none" />;
const RING = <circle cx="7" cy="7" r="5.4" />;
const SQUARE = <path d="M1.9 1.9h10.2v10.2H1.9Z" />;
const DIAMOND = <path d="M7 .9 13.1 7 7 13.1.9 7Z" />;
const TICK_HOLE = "M3.2 7.1 4.4 5.9 6.2 7.7 9.7 3.9 11 5.1 6.2 10.2Z";

export const MARK_SHAPES = {
  dashedRing: <circle cx="7" cy="7" r="5.4" strokeDasharray="2.5 1.74" strokeLinecap="butt" />,
  arrowPlate: fill("M1.4 1.4h6.8L13.4 7 8.2 12.6H1.4Z"),
  halfFilledSquare: (
    <>
      {SQUARE}
      {fill("M1.9 7h10.2v5.1H1.9Z")}
    </>
  ),
  openDiamond: DIAMOND,
  tickSquare: fill(`M1 1h12v12H1Z${TICK_HOLE}`),
  uprightHalfSquare: (
    <>
      {SQUARE}
      {fill("M1.9 1.9H7v10.2H1.9Z")}
    </>
  ),
  barOctagon: fill("M4.4.8h5.2l3.6 3.6v5.2l-3.6 3.6H4.4L.8 9.6V4.4ZM3.2 6v2h7.6V6Z"),
  linedDiamond: (
    <>
      {DIAMOND}
      <path d="M4.2 7h5.6" />
    </>
  ),
  doubleRule: fill("M1 3.6h12v2H1ZM1 8.4h12v2H1Z"),
  slashedRing: (
    <>
      {RING}
      <path d="m3.2 10.8 7.6-7.6" />
    </>
  ),
  barredRing: (
    <>
      {RING}
      <path d="M4.4 7h5.2" />
    </>
  ),
  clock: (
    <>
      {RING}
      <path d="M7 3.8V7l2.2 1.6" />
    </>
  ),
  shortBar: <path d="M3 7h8" />,
  dashedSquare: <path d="M1.9 1.9h10.2v10.2H1.9Z" strokeDasharray="2.6 2.5" strokeDashoffset="1.3" />,
  arrow: <path d="M1.2 7h11M8.4 3l4 4-4 4" />,
  tray: <path d="M1.6 8.2v4.2h10.8V8.2M7 1.2v7M4.2 5.6 7 8.4l2.8-2.8" />,
  lens: <path d="M9.2 9.2 13 13M10.2 5.8a4.4 4.4 0 1 1-8.8 0 4.4 4.4 0 0 1 8.8 0Z" />,
  filledSquare: fill("M1.4 1.4h11.2v11.2H1.4Z"),
  crossedSquare: (
    <>
      {SQUARE}
      <path d="m4.6 4.6 4.8 4.8M9.4 4.6 4.6 9.4" />
    </>
  ),
  slashedSquare: (
    <>
      {SQUARE}
      <path d="m1.9 12.1 10.2-10.2" />
    </>
  ),
  corners: <path d="M1.4 4.6V1.4h3.2M9.4 1.4h3.2v3.2M12.6 9.4v3.2H9.4M4.6 12.6H1.4V9.4" />,
  dot: fill("M7 4.6a2.4 2.4 0 1 1 0 4.8 2.4 2.4 0 0 1 0-4.8Z"),
  ring: RING,
  foldedSheet: <path d="M2.4 1.2h6l3.2 3.2v8.4H2.4ZM8.2 1.4v3.2h3.2" />,
  halfFilledRing: (
    <>
      {RING}
      {fill("M7 1.6a5.4 5.4 0 0 1 0 10.8Z")}
    </>
  ),
  tickDisc: fill(`M7 .6a6.4 6.4 0 1 1 0 12.8A6.4 6.4 0 0 1 7 .6Z${TICK_HOLE}`),
  swap: <path d="M1.4 4.4h10.4M9 1.4l3 3-3 3M12.6 9.8H2.2M5 6.8l-3 3 3 3" />,
  turnedArrow: <path d="M2.2 5h6a3.8 3.8 0 0 1 0 7.6H4.4M5.2 1.8 2 5l3.2 3.2" />,
  triangle: fill("M7 1 13.4 12.6H.6Z"),
  openTriangle: <path d="M7 2.2 12.4 12H1.6Z" />,
  baseline: <path d="M1.2 9.6h11.6M4 9.6V7M10 9.6V7" />,
} as const satisfies Record<string, ReactNode>;

export type MarkShapeName = keyof typeof MARK_SHAPES;

/** One shape at 14 px. Hidden from screen readers: the words beside it are the state. */
export function MarkShape({ name }: { name: MarkShapeName }) {
  return (
    <svg
      viewBox="0 0 14 14"
      aria-hidden="true"
      className="size-3.5 shrink-0 fill-none stroke-current"
      strokeWidth="1.75"
      strokeLinejoin="round"
    >
      {MARK_SHAPES[name]}
    </svg>
  );
}
