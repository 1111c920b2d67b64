import { Button } from "@/components/ui/button";
import { Card } from "@/components/ui/card";
import { DENSITIES, densityAttribute } from "@/components/ui/density";
import { Serial } from "@/components/ui/serial";
import { ClaimMark } from "@/components/ui/status-mark";
import { Row, RowHead, Table, TableBody, TableFoot, TableHead, Td, Th } from "@/components/ui/table";
import { TextField } from "@/components/ui/text-field";

/** The same sheet at the bench, in the office and in the books. */
export function Densities() {
  return DENSITIES.map((density) => (
    <div key={density} {...densityAttribute(density)}>
      <Card title={density} headingLevel={3}>
        <Table caption={density} onPhone="scroll">
          <TableHead>
            <Th>Claim</Th>
            <Th>State</Th>
            <Th isNumeric>Credit, EUR</Th>
          </TableHead>
          <TableBody>
            <Row>
              <RowHead>
                <Serial value="4092-5518" />
              </RowHead>
              <Td>
                <ClaimMark state="upheld" plain={density === "ledger"} />
              </Td>
              <Td isNumeric>1,029.00</Td>
            </Row>
            <Row>
              <RowHead>
                <Serial value="4090-1127" />
              </RowHead>
              <Td>
                <ClaimMark state="upheldInPart" plain={density === "ledger"} />
              </Td>
              <Td isNumeric>211.10</Td>
            </Row>
          </TableBody>
          <TableFoot>
            <Row>
              <RowHead colSpan={2}>Total</RowHead>
              <Td isNumeric>1,240.10</Td>
            </Row>
          </TableFoot>
        </Table>
        <div className="mt-4 flex flex-wrap items-end gap-2">
          <TextField name={`find-${density}`} label="Find" />
          <Button kind="primary">Post credits</Button>
          <Button small>Clear</Button>
        </div>
      </Card>
    </div>
  ));
}
