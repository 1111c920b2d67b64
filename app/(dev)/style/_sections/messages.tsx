import { Banner } from "@/components/ui/banner";
import { Button } from "@/components/ui/button";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { Skeleton } from "@/components/ui/skeleton";
import { StatusLine } from "@/components/ui/status-line";
import { UploadRow } from "@/components/ui/upload-row";

/** What the product says when something happened, is under way, or is not there. */
export function Messages() {
  return (
    <Card title="Messages">
      <div className="grid gap-4">
        <Banner kind="info" title="Mara has held this since 10:41">
          Read along, or take it over.
        </Banner>
        <Banner kind="wanting" title="2 things are needed from you" actions={<Button small>Answer</Button>}>
          We stopped our clock on 3 May 2027.
        </Banner>
        <Banner kind="refused" title="Declined">
          Rule 4.2 (1 January 2024): no cover when the brake shows oil. You can object until 28 March.
        </Banner>
        <Banner kind="proven" title="Filed as 4107-3826">
          Write the number on the part. We answer by Thursday 14 March.
        </Banner>
        <Banner kind="caution" title="Take the vehicle out of use">
          A brake that lets go can let it roll. Surfaces are hot after the run.
        </Banner>
        <EmptyState
          kind="nothingYet"
          title="No claims yet"
          action={
            <LinkButton href="/style" kind="primary">
              Start a claim
            </LinkButton>
          }
        >
          Scan the label of a failed part to begin.
        </EmptyState>
        <EmptyState kind="allDone" title="Everything is judged" />
        <EmptyState
          kind="nothingFound"
          title="No claim is declined and older than 30 days"
          action={<Button>Clear the filter</Button>}
        />
        <EmptyState
          kind="couldNotLoad"
          title="The life curve did not load"
          action={<Button>Try again</Button>}
        >
          That is our fault. The figures above are still right.
        </EmptyState>
        <ul>
          <UploadRow
            fileName="face-0312.jpg"
            state="sending"
            percent={64}
            note="2.1 MB"
            action={
              <Button small kind="quiet">
                Cancel
              </Button>
            }
          />
          <UploadRow fileName="label-0312.jpg" state="sent" note="1.4 MB" />
          <UploadRow
            fileName="log-0312.csv"
            state="failed"
            note="log-0312.csv is 31 MB. The limit is 25 MB. Cut it to the hours around the fault."
            action={<Button small>Choose another</Button>}
          />
        </ul>
        <StatusLine>Safe with us, 14:02.</StatusLine>
        <Skeleton rows={3} />
        <Skeleton rows={2} kind="table" />
      </div>
    </Card>
  );
}
