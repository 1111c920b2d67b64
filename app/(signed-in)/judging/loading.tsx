import { Card } from "@/components/ui/card";
import { Skeleton } from "@/components/ui/skeleton";

/** Room for the list that is still coming. It shows after a second: a quicker answer should not flicker. */
export default function Loading() {
  return (
    <div className="grid gap-6 transition-[visibility] delay-1000 duration-0 starting:invisible">
      <div className="max-w-sm">
        <Skeleton rows={2} />
      </div>
      <Card>
        <Skeleton rows={10} kind="table" />
      </Card>
    </div>
  );
}
