/** A part number and the one that took its place. */
export type Successor = { readonly partNumber: string; readonly successor: string };

/**
 * Whether a part would lead back to itself if `successor` took its place: nobody could then say which part to order.
 * A ring that is already there, elsewhere, ends the walk too.
 */
export function leadsBack(successors: readonly Successor[], { partNumber, successor }: Successor): boolean {
  const next = new Map(successors.map((one) => [one.partNumber, one.successor]));
  const seen = new Set<string>();
  for (let at: string | undefined = successor; at !== undefined && !seen.has(at); at = next.get(at)) {
    if (at === partNumber) return true;
    seen.add(at);
  }
  return false;
}
