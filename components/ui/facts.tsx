import type { ReactNode } from "react";

/** Facts side by side: what it is called, what it is. Children are Fact. */
export function Facts({ children, columns = 1 }: { children: ReactNode; columns?: 1 | 2 }) {
  return (
    <dl
      className={
        columns === 2 ? "facts-short group/facts grid gap-x-8 lg:grid-cols-2 print:grid-cols-2" : "grid"
      }
    >
      {children}
    </dl>
  );
}

/** `action` is the way to change this one fact, as on a check page. */
export function Fact({
  term,
  children,
  action,
}: {
  term: ReactNode;
  children: ReactNode;
  action?: ReactNode;
}) {
  return (
    <div className="grid-cols-[minmax(6rem,2fr)_minmax(0,3fr)] items-baseline gap-x-4 border-b border-rule py-2 group-[.facts-short]/facts:grid sm:grid">
      <dt className="text-small text-ink-2">{term}</dt>
      <dd className="flex min-w-0 items-baseline justify-between gap-4">
        <div className="min-w-0 wrap-break-word">{children}</div>
        {action}
      </dd>
    </div>
  );
}
