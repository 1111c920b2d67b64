import type { ReactNode } from "react";
import { Card } from "./card";
import { Table, TableBody, TableHead, Th } from "./table";

type SheetTableProps = {
  caption: ReactNode;
  /** The words over the columns, in their order. */
  heads: readonly string[];
  /** Rows of the table. */
  children: ReactNode;
};

/** The one table a page is about, on the sheet in charge, its heads kept in sight. */
export function SheetTable({ caption, heads, children }: SheetTableProps) {
  return (
    <Card isInCharge>
      <Table caption={caption} isHeadSticky>
        <TableHead>
          {heads.map((head) => (
            <Th key={head}>{head}</Th>
          ))}
        </TableHead>
        <TableBody>{children}</TableBody>
      </Table>
    </Card>
  );
}
