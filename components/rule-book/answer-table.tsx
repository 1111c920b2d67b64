import type { ReactNode } from "react";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";

export type Answer = { readonly question: string; readonly answer: ReactNode };
type AnswerTableProps = { caption: string; heads: readonly [string, string]; answers: readonly Answer[] };

/** Question and answer, line by line. */
export function AnswerTable({ caption, heads, answers }: AnswerTableProps) {
  const [question, answer] = heads;
  return (
    <Table caption={caption}>
      <TableHead>
        <Th>{question}</Th>
        <Th>{answer}</Th>
      </TableHead>
      <TableBody>
        {answers.map((one) => (
          <Row key={one.question}>
            <RowHead>{one.question}</RowHead>
            {/* On a phone the answer stands under its question: the head would only say "Answer" on every line. */}
            <Td>{one.answer}</Td>
          </Row>
        ))}
      </TableBody>
    </Table>
  );
}
