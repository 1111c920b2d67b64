import type { ReactNode } from "react";

/** A sum under its column: one line above, a double line below, as in a ledger. Amounts come ready formatted. */
export function MoneyTotal({
  label,
  amount,
  note,
}: {
  label: ReactNode;
  amount: ReactNode;
  note?: ReactNode;
}) {
  return (
    <div className="border-t border-b-4 border-double [border-top-style:solid] border-ink border-t-ink py-2">
      <p className="flex items-baseline justify-between gap-4 font-semibold">
        <span>{label}</span>
        <span className="font-heading text-20 tabular-nums">{amount}</span>
      </p>
      {note ? <p className="text-small text-ink-2">{note}</p> : null}
    </div>
  );
}

/** A line above the total: what it is, and what it comes to. */
export function MoneyLine({
  label,
  amount,
  note,
}: {
  label: ReactNode;
  amount: ReactNode;
  note?: ReactNode;
}) {
  return (
    <div className="border-t border-rule py-2 first:border-t-0">
      <p className="flex items-baseline justify-between gap-4">
        <span>{label}</span>
        <span className="shrink-0 tabular-nums">{amount}</span>
      </p>
      {note ? <p className="max-w-measure text-small text-ink-2">{note}</p> : null}
    </div>
  );
}
