import type { Money } from "@/lib/kernel/money";
import type { ProblemCode } from "./line-desk";
import type { ImportResult, StoredMapping } from "./schema";

/** A problem as the preview shows it: the line, the cell, the sentence, and the page that would solve it. */
export type ProblemView = {
  readonly line: number;
  readonly heading: string | null;
  readonly given: string;
  readonly code: ProblemCode;
  readonly detail: Readonly<Record<string, string | number>>;
  readonly create: {
    readonly what: "account" | "part";
    readonly pathname: string;
    readonly query: Readonly<Record<string, string>>;
  } | null;
};

export type ResultView = Omit<ImportResult, "sums"> & { readonly sums: readonly Money[] };

export type ImportView = {
  readonly id: string;
  readonly fileName: string;
  readonly isImported: boolean;
  readonly lineCount: number;
  readonly byName: string | null;
  readonly sentAt: Date;
  readonly importedAt: Date | null;
  readonly encoding: StoredMapping["encoding"] | null;
  readonly unread: readonly string[];
  readonly result: ResultView | null;
};

export type PreviewView = {
  readonly problems: readonly ProblemView[];
  readonly shownLineCount: number;
  readonly problemLineCount: number;
  readonly result: ResultView;
};
