import type { ReactNode } from "react";

/** What stands on a button. While it is busy the old label keeps its room, so nothing beside the button moves. */
export function ButtonWords({ busyWith, children }: { busyWith?: string; children: ReactNode }) {
  if (!busyWith) return children;
  return (
    <>
      <span className="grid">
        <span className="invisible col-start-1 row-start-1">{children}</span>
        <span className="col-start-1 row-start-1">{busyWith}</span>
      </span>
      <span aria-hidden="true" className="progress-line absolute inset-x-0 bottom-0 h-1 bg-current" />
    </>
  );
}
