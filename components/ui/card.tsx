import clsx from "clsx";
import type { ReactNode } from "react";

type CardProps = {
  children: ReactNode;
  /** The one sheet on the page that matters now: it is held by the petrol clip. Every other sheet has only a rule. */
  isInCharge?: boolean;
  title?: ReactNode;
  /** Quiet words after the title: a count, an age. */
  note?: ReactNode;
  actions?: ReactNode;
  headingLevel?: 2 | 3 | 4;
  id?: string;
};

/** A sheet of paper: white on the page's ground, square corners, no shadow. */
export function Card({
  children,
  isInCharge = false,
  title,
  note,
  actions,
  headingLevel = 2,
  id,
}: CardProps) {
  const Heading = `h${headingLevel}` as const;
  return (
    <section
      id={id}
      aria-labelledby={id && title ? `${id}-title` : undefined}
      className={clsx(
        "min-w-0 rounded-sheet border border-rule bg-card p-4 sm:p-6 print:break-inside-avoid print:p-3",
        isInCharge && "border-t-4 border-t-petrol",
      )}
    >
      {title ? (
        <header className="mb-4 flex flex-wrap items-baseline justify-between gap-x-4 gap-y-2">
          <div className="flex flex-wrap items-baseline gap-x-2.5">
            <Heading id={id && `${id}-title`} className="text-20">
              {title}
            </Heading>
            {note ? <p className="text-small text-ink-2">{note}</p> : null}
          </div>
          {actions ? <div className="flex flex-wrap gap-2">{actions}</div> : null}
        </header>
      ) : null}
      {children}
    </section>
  );
}
