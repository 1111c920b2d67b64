export type CataloguePart = {
  readonly id: string;
  readonly partNumber: string;
  readonly name: string;
  readonly family: string;
  readonly supersededById: string | null;
  /** Claim lines received on this number. */
  readonly claims: number;
};

/** A part with every number it was sold under; it goes by the newest. */
export type RootPart = {
  readonly partIds: readonly string[];
  readonly partNumber: string;
  readonly partNumbers: readonly string[];
  readonly name: string;
  readonly family: string;
  readonly claims: number;
};

/** The end of a part's chain of successors. A ring, which the catalogue refuses, ends at its smallest number. */
function newestOf(part: CataloguePart, byId: ReadonlyMap<string, CataloguePart>): CataloguePart {
  const seen: CataloguePart[] = [];
  let at = part;
  for (;;) {
    if (seen.includes(at)) return seen.toSorted(byNumber)[0] ?? at;
    seen.push(at);
    const next = at.supersededById === null ? undefined : byId.get(at.supersededById);
    if (!next) return at;
    at = next;
  }
}

const byNumber = (a: CataloguePart, b: CataloguePart): number => (a.partNumber < b.partNumber ? -1 : 1);

/** Superseded numbers together under their newest; those with claims first, most claims first, then by number. */
export function rootPartsOf(parts: readonly CataloguePart[]): RootPart[] {
  const byId = new Map(parts.map((part) => [part.id, part]));
  const members = new Map<CataloguePart, CataloguePart[]>();
  for (const part of parts) {
    const newest = newestOf(part, byId);
    members.set(newest, [...(members.get(newest) ?? []), part]);
  }
  const roots = [...members].map(([{ partNumber, name, family }, all]) => ({
    partIds: all.map(({ id }) => id),
    partNumber,
    partNumbers: all.map((one) => one.partNumber).toSorted(),
    name,
    family,
    claims: all.reduce((sum, { claims }) => sum + claims, 0),
  }));
  return roots.toSorted((a, b) => b.claims - a.claims || (a.partNumber < b.partNumber ? -1 : 1));
}
