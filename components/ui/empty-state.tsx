import type { ReactNode } from "react";
import { Glyph, type GlyphName } from "./glyph";

// Four ways of being empty that must never be taken for one another.
const KINDS = {
  nothingYet: null,
  allDone: "tick",
  nothingFound: null,
  couldNotLoad: "warning",
} as const satisfies Record<string, GlyphName | null>;

export type EmptyKind = keyof typeof KINDS;
type EmptyStateProps = { kind: EmptyKind; title: ReactNode; children?: ReactNode; action?: ReactNode };

/**
 * Nothing yet: what to do, one button. All done: say so. Nothing found: the filter in words and the way to clear it.
 * Could not load: it is our fault, what is still there, Try again.
 */
export function EmptyState({ kind, title, children, action }: EmptyStateProps) {
  const glyph = KINDS[kind];
  return (
    <div
      role={kind === "couldNotLoad" ? "alert" : undefined}
      className="grid justify-items-start gap-2 border-y border-dashed border-edge px-4 py-8"
    >
      <p className="flex items-center gap-2 font-heading text-18 font-semibold">
        {glyph ? (
          <Glyph name={glyph} className={kind === "allDone" ? "text-proven" : "text-wanting"} />
        ) : null}
        {title}
      </p>
      {children ? <div className="max-w-measure text-ink-2">{children}</div> : null}
      {action ? <div className="mt-2">{action}</div> : null}
    </div>
  );
}
