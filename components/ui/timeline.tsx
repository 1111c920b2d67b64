import type { ReactNode } from "react";

/** What happened, in order. Entries never change; a correction is a later entry. */
export function Timeline({ children, label }: { children: ReactNode; label: string }) {
  return (
    <ol aria-label={label} className="grid">
      {children}
    </ol>
  );
}

type TimelineEntryProps = {
  what: ReactNode;
  who: ReactNode;
  when: ReactNode;
  /** The machine-readable instant for `<time>`. */
  at?: string;
  children?: ReactNode;
};

/** One line of the record: an ink dot on the ruled line, what, then who and when. */
export function TimelineEntry({ what, who, when, at, children }: TimelineEntryProps) {
  return (
    <li className="relative pb-5 pl-5 before:absolute before:top-[0.75em] before:bottom-[-0.75em] before:left-1 before:border-l before:border-edge last:pb-0 last:before:hidden">
      <span
        aria-hidden="true"
        className="absolute top-[0.5em] left-0 size-2.25 border-2 border-ink-2 bg-card"
      />
      <div className="font-semibold">{what}</div>
      <p className="text-small text-ink-2">
        {who} · <time dateTime={at}>{when}</time>
      </p>
      {children ? <div className="mt-1.5 max-w-measure">{children}</div> : null}
    </li>
  );
}
