import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { batchKeysOf } from "./batch-keys";
import { comparisonOf, monthLines, riskStep, seriesOf } from "./curves";
import { observe, type Observation } from "./observations";
import { NO_BATCH, type AgeGroup } from "./outcomes";
import type { RootPart } from "./root-parts";
import { MOST_DRAWN, type LifeCurvesQuery } from "./schema";
import { judgeBatches, louder, ratePerThousand, type Judged } from "./screen";
import { MONTH_DAYS } from "@/lib/reliability/months";
import type { BatchLine, LifeCurvesView, Starts } from "./view";

export type Batch = {
  readonly id: string;
  readonly code: string;
  readonly partNumber: string;
  readonly madeOn: CalendarDay | null;
};

export type LifeCurvesInput = {
  readonly roots: readonly RootPart[];
  readonly root: RootPart;
  readonly query: LifeCurvesQuery & { readonly part: string; readonly cut: CalendarDay };
  readonly batches: readonly Batch[];
  readonly groups: readonly AgeGroup[];
  /** The same counts as they were known a month before. */
  readonly groupsBefore: readonly AgeGroup[];
  readonly basis: Omit<Starts, "assumed" | "units">;
  readonly withoutUnit: number;
  readonly largest: { readonly name: string; readonly claims: number } | null;
};

type Named = Batch & { readonly key: string };

/** The batches that have units, each with the name it goes by; "?" for units whose batch nobody knows. */
function namedBatches({ batches, groups, root }: LifeCurvesInput): Named[] {
  const keys = batchKeysOf(batches);
  const ids = new Set(groups.map(({ batchId }) => batchId));
  const named = batches.flatMap((batch) =>
    ids.has(batch.id) ? [{ ...batch, key: keys.get(batch.id) ?? batch.code }] : [],
  );
  const nameless = { id: NO_BATCH, code: "?", key: "?", partNumber: root.partNumber, madeOn: null };
  return ids.has(NO_BATCH) ? [...named, nameless] : named;
}

type Line = Omit<BatchLine, "style"> & { readonly id: string };

/** Every batch judged, the loudest first. */
function batchLines(input: LifeCurvesInput, named: readonly Named[]): Line[] {
  const { query, groups, groupsBefore } = input;
  const of = (all: readonly AgeGroup[], id: string) =>
    observe(
      all.filter(({ batchId }) => batchId === id),
      query.count,
    );
  const judge = (now: readonly AgeGroup[], before: readonly AgeGroup[]) =>
    judgeBatches(named.map(({ id }) => ({ id, now: of(now, id), before: of(before, id) })));
  const shown = shopOf(query, groups);
  const judged = judge(shown, shopOf(query, groupsBefore));
  const without = new Map(
    judge(withoutLargest(groups), withoutLargest(groupsBefore)).map((one) => [one.id, one.ratio]),
  );
  const lines = named.flatMap((batch, place) => {
    const one = judged[place];
    return one
      ? [lineOf(batch, of(shown, batch.id), { ...one, ratioWithout: without.get(batch.id) ?? null })]
      : [];
  });
  return lines.toSorted((a, b) => louder(a, b) || (a.key < b.key ? -1 : 1));
}

type Verdict = Judged & Pick<BatchLine, "ratioWithout">;

const lineOf = ({ id, key, partNumber, madeOn }: Named, observed: Observation, verdict: Verdict): Line => ({
  ...verdict,
  id,
  key,
  partNumber,
  madeOn,
  units: observed.units,
  failed: observed.failed,
  deadOnArrival: observed.leftOut.deadOnArrival,
  undecided: observed.ended.undecided,
  oldestDays: observed.oldestDays,
  unitMonths: observed.unitDays / MONTH_DAYS,
  rate: ratePerThousand(observed.failed, observed.unitDays),
});

const withoutLargest = (groups: readonly AgeGroup[]) => groups.filter(({ atLargest }) => !atLargest);
const shopOf = ({ shop }: LifeCurvesQuery, groups: readonly AgeGroup[]) =>
  shop === "without" ? withoutLargest(groups) : groups;

/** Drawn where the address names none: the loud ones, two at most, else the one in front. */
const DRAWN_BY_ITSELF = 2;

function drawnOf(lines: readonly Line[], wanted: readonly string[]): Line[] {
  const inService = lines.filter(({ units }) => units > 0);
  const asked = wanted.flatMap((key) => inService.filter((line) => line.key === key));
  if (asked.length > 0) return [...new Set(asked)].slice(0, MOST_DRAWN);
  const loud = inService.filter(({ grade }) => grade === "act" || grade === "lookInto");
  return loud.length > 0 ? loud.slice(0, DRAWN_BY_ITSELF) : inService.slice(0, 1);
}

/** The whole screen from counts: who stands out, the curves of the batches drawn and of the others pooled. */
export function lifeCurvesView(input: LifeCurvesInput): LifeCurvesView {
  const { query, root, roots, basis, largest } = input;
  const groups = shopOf(query, input.groups);
  const lines = batchLines(input, namedBatches(input));
  const drawn = drawnOf(lines, query.batch);
  const total = observe(groups, query.count);
  const options = { count: query.count, riskMonths: riskStep(total.oldestDays) };
  const groupsOf = (id: string) => groups.filter(({ batchId }) => batchId === id);
  const restGroups = groups.filter(({ batchId }) => !drawn.some(({ id }) => id === batchId));
  const rest = observe(restGroups, query.count);
  const series = drawn.map(({ id, key }) => seriesOf(key, groupsOf(id), options));
  const restSeries = rest.units > 0 ? seriesOf(null, restGroups, options) : null;
  const rowsOf = drawn.map(({ id }) => observe(groupsOf(id), query.count));
  const first = drawn[0];
  return {
    parts: roots.map(({ partNumber, name, family, claims }) => ({ partNumber, name, family, claims })),
    part: root,
    query,
    batches: lines.map(({ id, ...line }) => ({ ...line, style: placeIn(drawn, id) })),
    comparisons: lines.filter(({ adjustedP }) => adjustedP !== null).length,
    series,
    rest: restSeries,
    compared: comparisonOf(
      first && { key: first.key, rows: rowsOf[0]?.rows ?? [], curve: series[0]?.curve ?? [] },
      restSeries && { rows: rest.rows, curve: restSeries.curve },
      [...rowsOf, ...(rest.units > 0 ? [rest] : [])].map(({ rows }) => rows),
    ),
    months: rowsOf[0] ? monthLines(rowsOf[0], rest.units > 0 ? rest : null) : [],
    starts: { ...basis, assumed: total.assumed, units: total.units },
    leftOut: { ...total.leftOut, withoutUnit: input.withoutUnit },
    counts: { ...total.ended, units: total.units, failed: total.failed },
    largest,
  };
}

const placeIn = (drawn: readonly Line[], id: string): number | null => {
  const place = drawn.findIndex((line) => line.id === id);
  return place < 0 ? null : place;
};
