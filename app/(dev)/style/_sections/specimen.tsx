import { ChartFrame } from "@/components/chart/chart-frame";
import { SERIES } from "@/components/chart/series-style";
import { Button } from "@/components/ui/button";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { Serial } from "@/components/ui/serial";
import { ClaimMark, EvidenceMark } from "@/components/ui/status-mark";
import { Row, RowHead, Table, TableBody, TableFoot, TableHead, Td, Th } from "@/components/ui/table";

const CLAIMS = [
  { number: "4107-3826", part: "Brake 24 V 4 Nm", state: "answerNeeded", waiting: "3 days", asked: "148.20" },
  { number: "4118-0254", part: "Motor 24 V 350 W", state: "beingJudged", waiting: "1 day", asked: "412.00" },
  { number: "4120-7713", part: "Charger 24 V 5 A", state: "filed", waiting: "4 hours", asked: "76.50" },
  { number: "4092-5518", part: "Controller 70 A", state: "upheld", waiting: "", asked: "1,029.00" },
  { number: "4090-1127", part: "Battery 36 Ah", state: "upheldInPart", waiting: "", asked: "211.10" },
  { number: "4077-6342", part: "Motor 24 V 350 W", state: "declined", waiting: "", asked: "0.00" },
  { number: "4013-9905", part: "Brake 24 V 4 Nm", state: "settled", waiting: "", asked: "148.20" },
] as const;

const CURVES = [
  { label: "B2403, 812 fitted", path: "M40 20H120V22H200V24H290V34H470", y: 34 },
  { label: "B2404, 640 fitted", path: "M40 20H130V27H230V41H340V52H470", y: 54 },
  { label: "B2405, 301 fitted", path: "M40 20H85V29H140V49H190V74H265V100H360V119H470", y: 119 },
] as const;

/** The three sheets the rest of the house is measured by. */
export function Specimen() {
  return (
    <div className="grid gap-6 lg:grid-cols-[20rem_1fr] xl:grid-cols-1">
      <BenchSheet />
      <div className="grid min-w-0 gap-6">
        <JudgeSheet />
        <Card>
          <ChartFrame
            headline="Still working after fitting, by batch"
            headingLevel={3}
            counted="upheld claims, by day of failure, to 3 May 2027."
            table={<p>B2403, B2404 and B2405 by month.</p>}
            download={<TextLink href="/style">Picture (SVG)</TextLink>}
          >
            <Curves />
          </ChartFrame>
        </Card>
      </div>
    </div>
  );
}

function BenchSheet() {
  return (
    <div data-density="shop">
      <Card isInCharge>
        <p className="text-14 text-ink-2">
          Claim <Serial value="4107-3826" />
        </p>
        <h2 className="mt-1 mb-2 text-24">Brake will not hold</h2>
        <ClaimMark state="answerNeeded" />
        <ul className="mt-3">
          {(["done", "toDo", "cannotGet"] as const).map((state, index) => (
            <li key={state} className="flex min-h-row items-center gap-3 border-b border-rule">
              <EvidenceMark state={state} />
              {["Label photo", "Coil resistance, cold", "Friction face"][index]}
            </li>
          ))}
        </ul>
        <p className="my-4">
          <span className="text-small text-ink-2">Serial</span>{" "}
          <Serial value="B0O81lI7QG96" className="text-20" />
        </p>
        <div className="grid gap-2">
          <Button kind="primary" wide>
            Take next photo
          </Button>
          <Button wide>Scan label</Button>
        </div>
      </Card>
    </div>
  );
}

function JudgeSheet() {
  return (
    <Card isInCharge title="To judge" note="49 waiting, oldest 2 days">
      <Table caption="Claims waiting for a verdict" isHeadSticky>
        <TableHead>
          <Th>Claim</Th>
          <Th>Part</Th>
          <Th>State</Th>
          <Th sort={{ href: "/style", direction: "descending" }}>Waiting</Th>
          <Th isNumeric>Asked, EUR</Th>
        </TableHead>
        <TableBody>
          {CLAIMS.map(({ number, part, state, waiting, asked }, index) => (
            <Row key={number} isCurrent={index === 0}>
              <RowHead>
                <TextLink href="/style">
                  <Serial value={number} />
                </TextLink>
              </RowHead>
              <Td label="Part">{part}</Td>
              <Td label="State">
                <ClaimMark state={state} />
              </Td>
              <Td label="Waiting">{waiting}</Td>
              <Td label="Asked, EUR" isNumeric>
                {asked}
              </Td>
            </Row>
          ))}
        </TableBody>
        <TableFoot>
          <Row>
            <RowHead colSpan={4}>Total</RowHead>
            <Td label="Asked, EUR" isNumeric>
              2,025.00
            </Td>
          </Row>
        </TableFoot>
      </Table>
    </Card>
  );
}

function Curves() {
  return (
    <svg
      viewBox="0 0 580 176"
      role="img"
      aria-label="Survival of three batches"
      className="h-auto w-full min-w-140 fill-ink text-13"
    >
      <path d="M40 20V150H470" className="fill-none stroke-edge" />
      <text x="4" y="24">
        100 %
      </text>
      <text x="24" y="154">
        0
      </text>
      <text x="40" y="170">
        0 months in service
      </text>
      <text x="470" y="170" textAnchor="end">
        24
      </text>
      {CURVES.map(({ label, path, y }, index) => (
        <g key={label}>
          <path
            d={path}
            fill="none"
            stroke={SERIES[index]?.stroke}
            strokeDasharray={SERIES[index]?.dash}
            strokeWidth="2"
          />
          <text x="476" y={y + 4}>
            {label}
          </text>
        </g>
      ))}
    </svg>
  );
}
