import clsx from "clsx";
import Link from "next/link";
import type { ComponentProps, ReactNode } from "react";
import { Glyph } from "./glyph";

// Every part names its role: in a narrow place the cells are laid out as a list of labelled lines, and a table whose
// display was changed would otherwise stop being one for a screen reader.

type TableProps = {
  /** What the table holds; read out first. */
  caption: ReactNode;
  isCaptionShown?: boolean;
  children: ReactNode;
  /** "list": a row becomes labelled lines on a phone or in a drawer. "scroll": it stays a table in its own box, for figures to compare. */
  onPhone?: "list" | "scroll";
  /** Keeps the column heads in sight on a desk. */
  isHeadSticky?: boolean;
};

/** Ruled lines, no stripes; row height follows the density. Children are TableHead, TableBody, TableFoot. */
export function Table({
  caption,
  isCaptionShown = false,
  children,
  onPhone = "list",
  isHeadSticky = false,
}: TableProps) {
  return (
    <div className="ledger-frame">
      <div
        className={clsx("ledger-box", isHeadSticky && "ledger-sticky")}
        tabIndex={onPhone === "scroll" ? 0 : undefined}
      >
        <table role="table" className={clsx("ledger", onPhone === "list" && "ledger-list")}>
          <caption className={isCaptionShown ? "pb-2 text-left text-small text-ink-2" : "sr-only"}>
            {caption}
          </caption>
          {children}
        </table>
      </div>
    </div>
  );
}

export const TableHead = ({ children }: { children: ReactNode }) => (
  <thead role="rowgroup">
    <tr role="row">{children}</tr>
  </thead>
);

export const TableBody = ({ children }: { children: ReactNode }) => <tbody role="rowgroup">{children}</tbody>;

/** Sums under a double rule. */
export const TableFoot = ({ children }: { children: ReactNode }) => <tfoot role="rowgroup">{children}</tfoot>;

type RowProps = ComponentProps<"tr"> & { isCurrent?: boolean; isAlarming?: boolean };

/** `isCurrent` marks the row being worked on; `isAlarming` the one that cannot wait, beside the words that say why. */
export const Row = ({ isCurrent = false, isAlarming = false, ...props }: RowProps) => (
  <tr
    role="row"
    aria-current={isCurrent ? "true" : undefined}
    data-alarming={isAlarming ? "" : undefined}
    {...props}
  />
);

type Sort = { href: ComponentProps<typeof Link>["href"]; direction?: "ascending" | "descending" };
type ThProps = Omit<ComponentProps<"th">, "className"> & { isNumeric?: boolean; sort?: Sort };

/** Head of a column. `sort` makes it a link to the same list in another order. */
export function Th({ isNumeric = false, sort, children, ...props }: ThProps) {
  return (
    <th
      role="columnheader"
      scope="col"
      aria-sort={sort?.direction}
      {...props}
      className={clsx(isNumeric && "ledger-number")}
    >
      {sort ? (
        <Link
          href={sort.href}
          className="inline-flex min-h-target items-end gap-1 align-bottom underline-offset-3 hover:underline"
        >
          {children}
          {sort.direction ? <Glyph name={sort.direction} className="size-4" /> : null}
        </Link>
      ) : (
        children
      )}
    </th>
  );
}

type TdProps = Omit<ComponentProps<"td">, "className"> & {
  /** The column's head in words; stands before the value on a phone. The first cell needs none: it is the row's title. */
  label?: string;
  isNumeric?: boolean;
};

/** Its value stands in a box of its own, so that a phone can set label and value side by side. */
export const Td = ({ label, isNumeric = false, children, ...props }: TdProps) => (
  <td role="cell" data-label={label} {...props} className={clsx(isNumeric && "ledger-number")}>
    {/* A nought is a value, and an empty cell would hide it. */}
    {children || children === 0 ? <div className="ledger-value">{children}</div> : null}
  </td>
);

/** The cell that names its row. `label` for one that says nothing without its column's head: a line number. */
export const RowHead = ({
  label,
  ...props
}: Omit<ComponentProps<"th">, "className"> & { label?: string }) => (
  <th role="rowheader" scope="row" data-label={label} {...props} />
);
