import { foldLookalikes, normaliseSerial } from "@/lib/labels/serial";

/** What stands on a parcel without a number. */
export type Written = { readonly sender: string; readonly part: string; readonly serial: string };

/** A return that is still to arrive, as far as a parcel can be told by it. */
export type Expected = {
  readonly number: string;
  readonly senders: readonly string[];
  readonly parts: readonly {
    readonly number: string;
    readonly name: string;
    readonly serial: string | null;
  }[];
};

/** Why a return may be the one in the parcel; each has a sentence under `goodsIn.match.reasons`. */
export const MATCH_REASONS = ["sameSerial", "likeSerial", "samePart", "sameSender"] as const;
export type MatchReason = (typeof MATCH_REASONS)[number];

export type Match<Known extends Expected> = {
  readonly expected: Known;
  readonly reasons: readonly MatchReason[];
};

// A serial says more than everything else together; part and sender together say more than either.
const WEIGHT: Readonly<Record<MatchReason, number>> = {
  sameSerial: 8,
  likeSerial: 4,
  samePart: 2,
  sameSender: 1,
};

const plain = (text: string): string =>
  text
    .normalize("NFKD")
    .replace(/\p{M}/gu, "")
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, " ")
    .trim();

/** True where one text holds the other, both long enough to mean something. */
function sayTheSame(written: string, known: string): boolean {
  const [a, b] = [plain(written), plain(known)];
  return a.length >= 3 && b.length >= 3 && (a.includes(b) || b.includes(a));
}

function reasonsFor(written: Written, expected: Expected): MatchReason[] {
  const serial = normaliseSerial(written.serial);
  const serials = expected.parts.flatMap((part) => (part.serial ? [normaliseSerial(part.serial)] : []));
  const isSame = serial !== "" && serials.includes(serial);
  const isLike = serial !== "" && serials.some((one) => foldLookalikes(one) === foldLookalikes(serial));
  return [
    ...(isSame ? (["sameSerial"] as const) : isLike ? (["likeSerial"] as const) : []),
    ...(expected.parts.some(
      ({ number, name }) => sayTheSame(written.part, number) || sayTheSame(written.part, name),
    )
      ? (["samePart"] as const)
      : []),
    ...(expected.senders.some((sender) => sayTheSame(written.sender, sender))
      ? (["sameSender"] as const)
      : []),
  ];
}

const weightOf = (reasons: readonly MatchReason[]): number =>
  reasons.reduce((sum, reason) => sum + WEIGHT[reason], 0);

/** The returns that may be in a parcel, the likeliest first, each with its reasons; those without any are left out. */
export const bestMatches = <Known extends Expected>(
  written: Written,
  expected: readonly Known[],
): Match<Known>[] =>
  expected
    .map((one) => ({ expected: one, reasons: reasonsFor(written, one) }))
    .filter(({ reasons }) => reasons.length > 0)
    .sort(
      (a, b) => weightOf(b.reasons) - weightOf(a.reasons) || (a.expected.number < b.expected.number ? -1 : 1),
    );
