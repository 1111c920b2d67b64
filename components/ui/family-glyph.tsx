import clsx from "clsx";
import type { ReactNode } from "react";

// One drawing per family of parts, in the stroke of the icons: what the part looks like on the bench.
const FAMILY_GLYPHS = {
  brake: (
    <>
      <circle cx="10" cy="10" r="7.6" />
      <circle cx="10" cy="10" r="4.4" />
      <path d="M8.6 8.6h2.8v2.8H8.6Z" />
    </>
  ),
  motor: (
    <>
      <path d="M4 5.2h9v9.6H4Z" />
      <path d="M13 10h5.2M15.6 8v4" />
      <path d="M6.8 5.2v9.6M10 5.2v9.6" />
      <path d="M1.8 7.6v4.8" />
    </>
  ),
  controller: (
    <>
      <path d="M2.6 7h14.8v8H2.6Z" />
      <path d="M5 7V3.6M8.4 7V3.6M11.6 7V3.6M15 7V3.6" />
      <path d="M6 11.6h.1M9 11.6h.1" />
      <path d="M12.2 11.6H15" />
    </>
  ),
  charger: (
    <>
      <path d="M2.4 8.4h9.4v8.2H2.4Z" />
      <path d="m7.6 9.9-1.8 2.8h2.6l-1.8 2.6" />
      <path d="M11.8 12.4h2.4a2.2 2.2 0 0 0 2.2-2.2V8.4" />
      <path d="M14.2 4.8h4.4v2.4a2.2 1.4 0 0 1-4.4 0ZM15.2 4.6V2.4M17.6 4.6V2.4" />
    </>
  ),
  battery: (
    <>
      <path d="M2.2 6.4h15.6v10H2.2Z" />
      <path d="M4.6 6.4V3.8h3v2.6M12.4 6.4V3.8h3v2.6" />
      <path d="M4.8 11.2h3.4M11.8 11.2h3.4M13.5 9.5v3.4" />
    </>
  ),
  gearbox: (
    <>
      <circle cx="7.4" cy="7.6" r="3.6" />
      <circle cx="7.4" cy="7.6" r=".6" />
      <path d="M7.4 2.2v1.8M7.4 11.2V13M2 7.6h1.8M3.6 3.8l1.2 1.2M11.2 3.8 10 5M3.6 11.4l1.2-1.2" />
      <circle cx="14" cy="13.2" r="2.6" />
      <path d="M14 9v1.6M14 15.8v1.8M10 14.2l1.6-.4M18 14.2l-1.6-.4M17 10l-1.2 1.2" />
    </>
  ),
  throttle: (
    <>
      <path d="M3 16.8h14" />
      <path d="M5.6 16.8a4.4 4.4 0 0 1 8.8 0" />
      <path d="m10.6 12.4 2-6.4" />
      <circle cx="13.2" cy="4.2" r="2" />
      <path d="M2.4 11.4a8 8 0 0 1 3.8-4.6M3.4 6.8h2.9v2.8" />
    </>
  ),
} as const satisfies Record<string, ReactNode>;

// A family that was added before its drawing: a part, no more.
const ANY_PART = <path d="M3.4 3.4h13.2v13.2H3.4Z" />;

const drawings: ReadonlyMap<string, ReactNode> = new Map(Object.entries(FAMILY_GLYPHS));

/** The picture of a part family, by its code. Decorative: the family's name stands beside it. */
export function FamilyGlyph({ family, className = "size-5" }: { family: string; className?: string }) {
  return (
    <svg
      viewBox="0 0 20 20"
      aria-hidden="true"
      className={clsx("shrink-0 fill-none stroke-current *:[vector-effect:non-scaling-stroke]", className)}
      strokeWidth="1.75"
      strokeLinecap="round"
      strokeLinejoin="round"
    >
      {drawings.get(family) ?? ANY_PART}
    </svg>
  );
}
