import "server-only";
import { getTranslations } from "next-intl/server";
import type { Locale } from "@/lib/kernel/locale";
import type { DraftStep } from "@/lib/claims/paths";
import { isUnread } from "@/lib/claims/filing/problems";
import type { DraftProblem } from "@/lib/claims/filing/read-draft";

/** A problem ready to be shown: beside its field and, in the same words, at the top of the page. */
export type DraftSentence = { readonly fieldId: string; readonly step: DraftStep; readonly text: string };

type Translate = {
  (key: string, values?: Record<string, string | number>): string;
  has(key: string): boolean;
};

/** A row of the Evidence list goes by its name. */
const named = (detail: DraftProblem["detail"], rowNames: Translate): Record<string, string | number> =>
  detail.row === undefined ? { ...detail } : { ...detail, row: rowNames(`${detail.row}.name`) };

/**
 * The sentences of one page of a draft. What was typed and cannot be read is always told; what is only missing is told
 * once somebody wants to send.
 */
export async function draftSentences(
  problems: readonly DraftProblem[],
  step: DraftStep | "check",
  { showsAll, locale }: { showsAll: boolean; locale: Locale },
): Promise<DraftSentence[]> {
  const t: Translate = await getTranslations({ locale, namespace: "draft.problems" });
  const readings: Translate = await getTranslations({ locale, namespace: "evidence.readingRefusals" });
  const rowNames: Translate = await getTranslations({ locale, namespace: "evidence.rows" });
  return problems
    .filter((problem) => (step === "check" || problem.step === step) && (showsAll || isUnread(problem.code)))
    .map((problem) => ({
      fieldId: problem.field,
      step: problem.step,
      text: t.has(problem.code)
        ? t(problem.code, named(problem.detail, rowNames))
        : readings(problem.code, { ...problem.detail }),
    }));
}
