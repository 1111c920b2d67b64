import type { FamilyCode } from "@/lib/parts/families";
import type { ReasonCode } from "@/lib/claims/verdict";
import type { FindingKind } from "@/lib/returns/kinds";

type Several = readonly [string, ...string[]];

/** What people of the story write, in one language. Braces stand for facts of the claim: {part}, {serial}, {minutes}. */
export type StoryTexts = {
  /** By family, then by symptom: what the technician notes. The symptoms named here are those that occur. */
  readonly notes: Readonly<Record<FamilyCode, Readonly<Record<string, Several>>>>;
  /** By row of the Evidence list. */
  readonly answers: Readonly<Record<string, Several>>;
  readonly otherAnswer: string;
  readonly cannotGet: Several;
  /** Why the rows of a later query were left out at first. */
  readonly leftOut: string;
  readonly ruledOut: Several;
  readonly looseNut: string;
  readonly keyOutOfSeat: string;
  readonly incident: string;
  readonly question: Several;
  readonly park: string;
  readonly parkChain: string;
  readonly putBack: string;
  readonly withdraw: string;
  readonly contest: string;
  readonly reasons: Readonly<Partial<Record<ReasonCode, string>>>;
  readonly letters: Readonly<Record<"upheld" | "upheldInPart" | "declined" | "reversed", string>>;
  readonly waived: string;
  /** What is seen at the bench before the run, by step of the bench plan. */
  readonly looks: Readonly<Record<"sameUnit" | "marksOfWork", string>>;
  readonly findings: Readonly<Record<FindingKind, string>>;
  readonly returns: {
    readonly department: string;
    readonly instructions: Readonly<Partial<Record<FamilyCode, string>>>;
    readonly carriers: Several;
    readonly wet: string;
    readonly damaged: string;
    readonly notSent: string;
    readonly missing: string;
    /** What stands on a unit that was sent in place of the claimed one. */
    readonly otherSerial: string;
  };
  readonly counterReason: string;
  readonly messages: Readonly<
    Record<
      "parcelSent" | "parcelMissing" | "parcelInside" | "thanks" | "reuseInside" | "serialInside",
      string
    >
  >;
  readonly log: Readonly<Record<"on" | "brakeFault" | "fault" | "off", string>>;
  readonly documents: { readonly capacity: Several };
};

/** Puts facts into a text. */
export const filled = (text: string, facts: Readonly<Record<string, string>>): string =>
  text.replace(/\{(\w+)\}/gu, (whole, name: string) => facts[name] ?? whole);
