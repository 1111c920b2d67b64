import type { ClaimDraft } from "@/lib/claims/draft";
import type { ClaimFacts } from "@/lib/claims/facts-shape";
import type { CreditState, ReturnState, VerdictOutcome } from "@/lib/claims/lifecycle";
import type { Attribution } from "@/lib/claims/verdict";
import type { Credit } from "@/lib/credits/credit";
import type { AllocationWay } from "@/lib/credits/ledger";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { MadeFile } from "../evidence/made";
import { idOf } from "../identity";
import type { Chance } from "../random";
import type { World } from "../story/world";
import type { Row, TableName } from "../tables";
import type { Case } from "./case";
import { ClaimLife } from "./claim-life";
import type { FilePlan } from "./evidence-plan";
import type { Flag } from "./flags";
import type { RowsAsked } from "./rows-asked";
import type { StoryTexts } from "./texts/texts";
import { textsFor } from "./texts/texts-for";
import type { LineVerdict } from "./verdicts";

/** Everything prepared for a claim before it is played. */
export type Prepared = {
  readonly one: Case;
  readonly world: World;
  readonly asked: RowsAsked;
  readonly plans: readonly FilePlan[];
  readonly made: ReadonlyMap<string, MadeFile>;
  readonly flags: readonly Flag[];
  readonly draftOf: (sending: 1 | 2) => ClaimDraft;
  readonly chance: Chance;
};

/** How a line stands; written into its row when the claim has been played. */
export type LineState = {
  verdict: VerdictOutcome | null;
  attribution: Attribution | null;
  returnState: ReturnState;
  returnWaivedReason: string | null;
  creditState: CreditState;
};

type Columns = Record<string, unknown>;

/** A return number with its rows, as they stand at the moment. */
export type Returning = { readonly row: Columns; readonly lines: readonly Columns[] };

type CreditGiven = {
  readonly credit: Credit;
  readonly decidedOn: CalendarDay;
  /** The verdict of each line, in their order. */
  readonly lines: readonly LineVerdict[];
};

/** A credit note as the story issues it. The numbers of its entries in the timeline are filled in later. */
export type NoteMade = {
  readonly verdictId: string;
  readonly issuedAt: Date;
  readonly details: Columns[];
  allocation: { readonly how: AllocationWay; readonly at: Date; readonly isWhole: boolean } | null;
  countered: { readonly at: Date; readonly reason: string } | null;
};

/** A claim while it is played: what was prepared, what has happened, and the rows so far. */
export type Scene = Prepared & {
  readonly life: ClaimLife;
  readonly draw: Chance;
  readonly seller: StoryTexts;
  readonly workshop: StoryTexts;
  /** Columns of the claim's own row beside those its life keeps. */
  readonly fields: Record<string, unknown>;
  readonly lines: readonly LineState[];
  readonly rows: Partial<Record<TableName, Row[]>>;
  readonly sent: { readonly facts: ClaimFacts; readonly sha256: string }[];
  verdicts: number;
  findings: number;
  /** The part on its way back, once it was called in. */
  returning: Returning | null;
  /** What the verdict that stands gives; null before there is one. */
  given: CreditGiven | null;
  /** The credit note this claim led to, and what became of it; numbered when all claims have been played. */
  note: NoteMade | null;
  /** When the rules move the claim on by themselves. */
  dueOn: string | null;
};

const untouched = (): LineState => ({
  verdict: null,
  attribution: null,
  returnState: "notNeeded",
  returnWaivedReason: null,
  creditState: "none",
});

export const sceneOf = (prepared: Prepared): Scene => {
  const { one, world, chance } = prepared;
  const draw = chance.fork(`play ${one.key}`);
  return {
    ...prepared,
    life: new ClaimLife(idOf("claim", one.key), one, { today: world.today, draw: draw.fork("clock") }),
    draw,
    seller: textsFor(one.seller),
    workshop: textsFor(one.workshop),
    fields: {},
    lines: one.lines.map(untouched),
    rows: {},
    sent: [],
    verdicts: 0,
    findings: 0,
    returning: null,
    given: null,
    note: null,
    dueOn: null,
  };
};

/** Adds a row to a table of the scene. */
export const addRow = (scene: Scene, table: TableName, row: Row): void => {
  scene.rows[table] = [...(scene.rows[table] ?? []), row];
};

export const lineId = ({ life }: Scene, place: number): string => idOf("claim line", life.claimId, place + 1);
