import type { ReactNode } from "react";

/**
 * A line that is always on the page, so that what appears in it is read out: "Safe with us, 14:02."
 * Messages are put into it; it is never inserted together with its message.
 */
export function StatusLine({ children }: { children?: ReactNode }) {
  return (
    <p role="status" className="min-h-[1.5em] text-small text-ink-2">
      {children}
    </p>
  );
}
