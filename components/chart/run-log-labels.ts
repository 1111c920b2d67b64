/** A label beside a plot: where its line ends, and where it can stand without touching another. */
export type Placed<T> = T & { readonly wantedY: number; readonly y: number };

/**
 * Moves labels apart so that two neighbours stand a line height apart, in the order of their lines and between top
 * and bottom as long as they fit there.
 */
export function spreadLabels<T extends { readonly wantedY: number }>(
  labels: readonly T[],
  { top, bottom, lineHeight }: { top: number; bottom: number; lineHeight: number },
): Placed<T>[] {
  const sorted = labels.toSorted((first, second) => first.wantedY - second.wantedY);
  const down: number[] = [];
  for (const { wantedY } of sorted)
    down.push(Math.max(wantedY, top, (down.at(-1) ?? -Infinity) + lineHeight));
  const up = [...down];
  let below = bottom + lineHeight;
  for (let place = up.length - 1; place >= 0; place -= 1) {
    below = Math.min(up[place] ?? below, below - lineHeight);
    up[place] = below;
  }
  return sorted.map((label, place) => ({ ...label, y: up[place] ?? label.wantedY }));
}

/** A text cut to a number of signs, with a mark where something was cut. */
export const cutTo = (text: string, signs: number): string =>
  text.length <= signs ? text : `${text.slice(0, signs - 1).trimEnd()}…`;

/** A heading without its own unit in brackets: what is drawn or tabled names the unit it is kept in. */
export const withoutUnit = (heading: string): string =>
  heading.replace(/\s*[([][^()[\]]*[)\]]$/u, "") || heading;
