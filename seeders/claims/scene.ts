import type { ClaimDraft } from "@/lib/claims/draft";
import type { ClaimFacts } from "@/lib/claims/facts-shape";
import type { CreditState, ReturnState, VerdictOutcome } from "@/lib/claims/lifecycle";
import type { Attribution } from "@/lib/claims/verdict";
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
  finding: Row | null;
  returnState: ReturnState;
  returnWaivedReason: string | null;
  creditState: CreditState;
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
  /** When the rules move the claim on by themselves. */
  dueOn: string | null;
};

const untouched = (): LineState => ({
  verdict: null,
  attribution: null,
  finding: null,
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
    dueOn: null,
  };
};

/** Adds a row to a table of the scene. */
export const addRow = (scene: Scene, table: TableName, row: Row): void => {
  scene.rows[table] = [...(scene.rows[table] ?? []), row];
};

export const lineId = ({ life }: Scene, place: number): string => idOf("claim line", life.claimId, place + 1);
