import { createHash } from "node:crypto";
import { summariseRunLog, type RunLogSummary } from "@/lib/evidence/run-log-summary";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { FilePlan } from "../claims/evidence-plan";
import { instantOn, wallTime, workingDayAgo } from "../days";
import { DIALECTS, logFile } from "./logs";
import { pdfPage } from "./pdf";
import type { PhotoRenderer } from "./photo/render";
import { runOf } from "./thermal";

/** A file of the story as bytes, with what the product would have found in it. */
export type MadeFile = {
  readonly bytes: Buffer;
  readonly view: Buffer | null;
  readonly sha256: string;
  readonly kind: "photo" | "runLog" | "document";
  readonly mediaType: "image/jpeg" | "text/csv" | "application/pdf";
  readonly widthPx: number | null;
  readonly heightPx: number | null;
  readonly takenAt: Date | null;
  readonly summary: RunLogSummary | null;
};

const plain = (bytes: Buffer, kind: "runLog" | "document", summary: RunLogSummary | null): MadeFile => ({
  bytes,
  view: null,
  sha256: createHash("sha256").update(bytes).digest("hex"),
  kind,
  mediaType: kind === "runLog" ? "text/csv" : "application/pdf",
  widthPx: null,
  heightPx: null,
  takenAt: null,
  summary,
});

const AT_ONCE = 4;

/** Makes every planned file, a few at a time; a photo sent twice is made once. By the plan's key, in the order of the plans. */
export async function filesMade(
  plans: readonly FilePlan[],
  render: PhotoRenderer,
  today: CalendarDay,
): Promise<Map<string, MadeFile>> {
  const done = new Map<string, MadeFile>();
  const waiting = plans.filter(({ content }) => content.is !== "sameAs").values();
  // All take from one queue, so that a large photo holds up none of the others.
  const maker = async (): Promise<void> => {
    for (const plan of waiting) {
      const file = await fileMade(plan, render, today);
      if (file) done.set(plan.key, file);
    }
  };
  await Promise.all(Array.from({ length: AT_ONCE }, maker));
  return new Map(
    plans.flatMap(({ key, content }) => {
      const file = done.get(content.is === "sameAs" ? content.key : key);
      return file ? [[key, file] as const] : [];
    }),
  );
}

async function fileMade(plan: FilePlan, render: PhotoRenderer, today: CalendarDay): Promise<MadeFile | null> {
  const { content } = plan;
  if (content.is === "document") return plain(pdfPage(content.lines), "document", null);
  if (content.is === "runLog") {
    const bytes = logFile(runOf(content.run), DIALECTS[content.dialect]);
    return plain(bytes, "runLog", summariseRunLog(bytes));
  }
  if (content.is === "sameAs") return null;
  const takenAt = instantOn(
    workingDayAgo(today, plan.takenDaysAgo),
    wallTime(plan.takenAtMinutes),
    plan.timeZone,
  );
  const photo = await render(content.scene, takenAt);
  const { original, view, sha256, widthPx, heightPx } = photo;
  return {
    bytes: original,
    view,
    sha256,
    kind: "photo",
    mediaType: "image/jpeg",
    widthPx,
    heightPx,
    takenAt,
    summary: null,
  };
}
