import { Card } from "@/components/ui/card";
import { CopyButton } from "@/components/ui/copy-button";
import { Fact, Facts } from "@/components/ui/facts";
import { KeyHint } from "@/components/ui/key-hint";
import { TextLink } from "@/components/ui/link-button";
import { MoneyLine, MoneyTotal } from "@/components/ui/money-total";
import { PageHeader } from "@/components/ui/page-header";
import { Pagination } from "@/components/ui/pagination";
import { Serial } from "@/components/ui/serial";
import { ClaimMark, LateMark } from "@/components/ui/status-mark";
import { StepNote } from "@/components/ui/step-note";
import { Timeline, TimelineEntry } from "@/components/ui/timeline";

/** What a claim sheet is made of. */
export function Papers() {
  return (
    <Card>
      <div className="grid gap-6">
        <PageHeader
          eyebrow={
            <>
              Claim <Serial value="4107-3826" />
            </>
          }
          title="Brake grabs when hot"
          note={
            <>
              <ClaimMark state="beingJudged" /> <LateMark daysOver={3} />
            </>
          }
          actions={<CopyButton value="4107-3826" label="Copy number" />}
        />
        <StepNote at={2} of={4} name="Evidence" />
        <Facts>
          <Fact term="Part">Brake 24 V 4 Nm, left</Fact>
          <Fact term="Serial">
            <Serial value="B0O81lI7QG96" />
          </Fact>
          <Fact term="Fitted on" action={<TextLink href="/style">Change</TextLink>}>
            3 March 2024
          </Fact>
        </Facts>
        <div>
          <MoneyLine label="Part price" amount="209.30" note="Price list of 1 January 2024" />
          <MoneyLine label="7 of 24 months used" amount="148.25" note="17/24 of 209.30" />
          <MoneyLine label="Cut to the cap" amount="−0.05" note="Rule 6.1: no more than 148.20" />
          <MoneyTotal label="Credit, EUR" amount="148.20" />
        </div>
        <Timeline label="Timeline">
          <TimelineEntry
            what="Taken for judging"
            who="Mara Veit"
            when="3 May 2027, 10:41"
            at="2027-05-03T10:41:00Z"
          />
          <TimelineEntry what="Answer sent" who="Tom Hale" when="2 May 2027, 16:20">
            Coil resistance, cold: 11.4 ohm at 21 °C.
          </TimelineEntry>
          <TimelineEntry what="Filed" who="Tom Hale" when="30 April 2027, 9:05" />
        </Timeline>
        <p className="flex flex-wrap items-center gap-3">
          <KeyHint keys={["Ctrl", "Enter"]} /> sends the verdict, <KeyHint keys={["N"]} /> goes to the next.
        </p>
        <Pagination page={2} pages={9} previous="/style" next="/style" />
      </div>
    </Card>
  );
}
