import clsx from "clsx";
import { useTranslations } from "next-intl";
import type { ReactNode } from "react";
import { MarkShape, type MarkShapeName } from "./mark-shape";
import {
  CLAIM_MARKS,
  CREDIT_MARKS,
  EVIDENCE_MARKS,
  MATCH_MARKS,
  PART_MARKS,
  SIGNAL_MARKS,
} from "./mark-states";
import { toneText, toneWash, type Tone } from "./tone";

type MarkProps = { shape: MarkShapeName; tone: Tone; plain?: boolean; children: ReactNode };

/** A small stamp: shape, words, colour. `plain` drops the wash and the stamped edge; shape and words always stay. */
export function Mark({ shape, tone, plain = false, children }: MarkProps) {
  return (
    <span
      className={clsx(
        "mark inline-flex items-center gap-2 font-text text-14 leading-5 font-semibold",
        toneText[tone],
        !plain && ["rounded-sheet border-l-3 border-current py-0.5 pr-2 pl-1.5", toneWash[tone]],
      )}
    >
      <MarkShape name={shape} />
      <span>{children}</span>
    </span>
  );
}

type StateProps<Marks> = { state: keyof Marks & string; plain?: boolean; children?: ReactNode };

/** State of a claim. `children` replaces the words where a page has more exact ones. */
export function ClaimMark({ state, plain, children }: StateProps<typeof CLAIM_MARKS>) {
  const t = useTranslations("ui.mark.claim");
  return (
    <Mark {...CLAIM_MARKS[state]} plain={plain}>
      {children ?? t(state)}
    </Mark>
  );
}

/** Done, To do or Cannot get it. */
export function EvidenceMark({ state, plain, children }: StateProps<typeof EVIDENCE_MARKS>) {
  const t = useTranslations("ui.mark.evidence");
  return (
    <Mark {...EVIDENCE_MARKS[state]} plain={plain}>
      {children ?? t(state)}
    </Mark>
  );
}

/** Where the part of a line is; plain unless asked otherwise. */
export function PartMark({ state, plain = true, children }: StateProps<typeof PART_MARKS>) {
  const t = useTranslations("ui.mark.part");
  return (
    <Mark {...PART_MARKS[state]} plain={plain}>
      {children ?? t(state)}
    </Mark>
  );
}

/** Where the money of a line is; plain unless asked otherwise. */
export function CreditMark({ state, plain = true, children }: StateProps<typeof CREDIT_MARKS>) {
  const t = useTranslations("ui.mark.credit");
  return (
    <Mark {...CREDIT_MARKS[state]} plain={plain}>
      {children ?? t(state)}
    </Mark>
  );
}

/** Grade of a batch in Batch watch. */
export function SignalMark({ state, plain, children }: StateProps<typeof SIGNAL_MARKS>) {
  const t = useTranslations("ui.mark.signal");
  return (
    <Mark {...SIGNAL_MARKS[state]} plain={plain}>
      {children ?? t(state)}
    </Mark>
  );
}

/** Grade of a suggested match in Month close. */
export function MatchMark({ state, plain, children }: StateProps<typeof MATCH_MARKS>) {
  const t = useTranslations("ui.mark.match");
  return (
    <Mark {...MATCH_MARKS[state]} plain={plain}>
      {children ?? t(state)}
    </Mark>
  );
}

/** Being late is never a change of the state's colour: it is a clock of its own, with the days in words. */
export function LateMark({ daysOver, plain = true }: { daysOver: number; plain?: boolean }) {
  const t = useTranslations("ui");
  return (
    <Mark shape="clock" tone="wanting" plain={plain}>
      {t("daysOver", { days: daysOver })}
    </Mark>
  );
}
