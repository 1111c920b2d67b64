import type { CurveStart, TimedCelsius } from "./first-order-profile";
import type { ThermalCurve } from "./thermal-curve";

/**
 * Standard errors of a fitted curve from the inverse of J'J, in (final, log tau, start). Null where the samples
 * cannot tell the parameters apart.
 */
export function standardErrors(
  { curve, variance }: { curve: ThermalCurve; variance: number },
  samples: readonly TimedCelsius[],
  from: CurveStart,
): { finalCelsius: number; logTau: number; startCelsius: number | null } | null {
  const rise = curve.finalCelsius - curve.startCelsius;
  const slopes = samples.map(({ timeS }) => {
    const taus = (timeS - from.atS) / curve.tauS;
    const left = Math.exp(-taus);
    return from.celsius !== null ? [1 - left, -rise * left * taus] : [1 - left, -rise * left * taus, left];
  });
  const inverse = inverted(crossProducts(slopes));
  const error = (place: number): number => Math.sqrt(variance * (inverse?.[place]?.[place] ?? Number.NaN));
  if (inverse === null || Number.isNaN(error(0)) || Number.isNaN(error(1))) return null;
  return { finalCelsius: error(0), logTau: error(1), startCelsius: from.celsius === null ? error(2) : null };
}

function crossProducts(rows: readonly (readonly number[])[]): number[][] {
  const width = rows[0]?.length ?? 0;
  const places = Array.from({ length: width }, (_, place) => place);
  const sum = (place: number, other: number): number =>
    rows.reduce((total, row) => total + (row[place] ?? 0) * (row[other] ?? 0), 0);
  return places.map((place) => places.map((other) => sum(place, other)));
}

/** Gauss-Jordan with the largest pivot; null for a matrix that is singular to working precision. */
function inverted(matrix: readonly (readonly number[])[]): number[][] | null {
  const size = matrix.length;
  const work = matrix.map((row, place) => [...row, ...row.map((_, other) => (other === place ? 1 : 0))]);
  for (let column = 0; column < size; column += 1) {
    const pivotAt = largestFrom(work, column);
    const pivot = work[pivotAt];
    const size0 = Math.abs(pivot?.[column] ?? 0);
    if (!pivot || !(size0 > 1e-13 * Math.abs(matrix[column]?.[column] ?? 0)) || size0 === 0) return null;
    [work[pivotAt], work[column]] = [work[column] ?? [], pivot];
    const scaled = pivot.map((value) => value / (pivot[column] ?? 1));
    for (const [place, row] of work.entries())
      work[place] =
        place === column
          ? scaled
          : row.map((value, other) => value - (row[column] ?? 0) * (scaled[other] ?? 0));
  }
  return work.map((row) => row.slice(size));
}

const largestFrom = (work: readonly (readonly number[])[], column: number): number =>
  work.reduce(
    (best, row, place) =>
      place > column && Math.abs(row[column] ?? 0) > Math.abs(work[best]?.[column] ?? 0) ? place : best,
    column,
  );
