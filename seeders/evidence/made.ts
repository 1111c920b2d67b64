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

/** Makes every planned file, a few at a time; a photo sent twice is made once. By the plan's key. */
export async function filesMade(
  plans: readonly FilePlan[],
  render: PhotoRenderer,
  today: CalendarDay,
): Promise<Map<string, MadeFile>> {
  const made = new Map<string, MadeFile>();
  const own = plans.filter(({ content }) => content.is !== "sameAs");
  for (let at = 0; at < own.length; at += AT_ONCE) {
    const some = own.slice(at, at + AT_ONCE);
    const files = await Promise.all(some.map((plan) => fileMade(plan, render, today)));
    some.forEach((plan, index) => {
      const file = files[index];
      if (file) made.set(plan.key, file);
    });
  }
  for (const { key, content } of plans) {
    const same = content.is === "sameAs" ? made.get(content.key) : undefined;
    if (same) made.set(key, same);
  }
  return made;
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
