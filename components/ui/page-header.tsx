import type { ReactNode } from "react";

type PageHeaderProps = {
  title: ReactNode;
  /** Small line above the title: the claim's number, the month, the batch. */
  eyebrow?: ReactNode;
  /** Marks and quiet facts under the title. */
  note?: ReactNode;
  actions?: ReactNode;
};

/** The head of a page: its one first-level heading, and what can be done from here. */
export function PageHeader({ title, eyebrow, note, actions }: PageHeaderProps) {
  return (
    <header className="flex flex-wrap items-end justify-between gap-x-6 gap-y-4">
      <div className="grid min-w-0 gap-1">
        {eyebrow ? <p className="text-small text-ink-2">{eyebrow}</p> : null}
        <h1 className="text-24 sm:text-30">{title}</h1>
        {note ? (
          <div className="mt-1 flex flex-wrap items-center gap-x-3 gap-y-2 text-ink-2">{note}</div>
        ) : null}
      </div>
      {actions ? <div className="flex flex-wrap gap-2">{actions}</div> : null}
    </header>
  );
}
