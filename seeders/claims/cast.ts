import type { FamilyCode } from "@/lib/parts/families";
import type { BuyerKey } from "../story/organisations";
import type { Failure } from "../story/replacements";
import type { Chain, World } from "../story/world";
import type { Twist } from "./case";
import type { PlotName } from "./plots";

/** Who may play a part: at which workshop, with what, failed how many days ago. */
type Wanted = {
  readonly plot: PlotName;
  readonly twist?: Twist;
  readonly at: BuyerKey;
  readonly family: FamilyCode;
  readonly role?: "bad" | "usual";
  readonly failed: readonly [from: number, to: number];
};

const bad = { family: "brake", role: "bad", twist: "badCoil" } as const;

/** The parts of the story in the order they are given out; each takes the latest failure that fits. */
const PARTS_TO_PLAY: readonly Wanted[] = [
  { plot: "draft", at: "quayhead", family: "gearbox", failed: [10, 20] },
  { plot: "draft", ...bad, at: "saltmarsh", failed: [3, 8] },
  { plot: "draft", at: "hollin", family: "motor", failed: [1, 3] },
  { plot: "draft", at: "tworivers", family: "charger", failed: [1, 2] },
  { plot: "discarded", at: "tworivers", family: "charger", failed: [2, 6] },
  { plot: "filed", twist: "incident", at: "saltmarsh", family: "brake", role: "usual", failed: [8, 14] },
  { plot: "filed", twist: "photoReused", at: "hollin", family: "brake", role: "bad", failed: [4, 9] },
  { plot: "filed", at: "quayhead", family: "brake", failed: [7, 7] },
  { plot: "filed", at: "larkmoor", family: "controller", failed: [9, 9] },
  { plot: "filed", twist: "serialDoubtful", at: "saltmarsh", family: "throttle", failed: [5, 5] },
  { plot: "held", ...bad, at: "tworivers", failed: [15, 22] },
  { plot: "held", at: "quayhead", family: "motor", failed: [6, 6] },
  { plot: "parked", at: "hollin", family: "controller", failed: [12, 12] },
  { plot: "putBack", at: "tworivers", family: "gearbox", failed: [8, 8] },
  { plot: "answered", ...bad, at: "tworivers", failed: [23, 25] },
  { plot: "answered", at: "saltmarsh", family: "charger", failed: [17, 17] },
  { plot: "asked", ...bad, at: "saltmarsh", failed: [20, 28] },
  { plot: "asked", at: "tworivers", family: "battery", failed: [26, 31] },
  { plot: "asked", at: "quayhead", family: "charger", failed: [30, 38] },
  { plot: "decided", twist: "pair", at: "saltmarsh", family: "battery", failed: [25, 28] },
  { plot: "decided", at: "quayhead", family: "battery", failed: [30, 30] },
  { plot: "refused", ...bad, at: "saltmarsh", failed: [29, 30] },
  { plot: "contested", ...bad, at: "tworivers", failed: [31, 38] },
  { plot: "contestTaken", ...bad, at: "hollin", failed: [50, 58] },
  { plot: "reversed", ...bad, at: "saltmarsh", failed: [31, 34] },
  { plot: "judging", twist: "parcelLost", at: "saltmarsh", family: "brake", role: "bad", failed: [50, 56] },
  { plot: "settledReversed", ...bad, at: "hollin", failed: [80, 92] },
  { plot: "settledQueried", ...bad, at: "saltmarsh", failed: [80, 88] },
  { plot: "withdrawn", at: "saltmarsh", family: "motor", failed: [50, 53] },
  { plot: "withdrawnWhenAsked", at: "quayhead", family: "charger", failed: [85, 92] },
  { plot: "lapsed", at: "tworivers", family: "charger", failed: [70, 80] },
  { plot: "lapsed", at: "quayhead", family: "controller", failed: [62, 70] },
];

export type Played = { readonly failure: Failure; readonly plot: PlotName; readonly twist: Twist | null };

/** Gives every failure its place in the story: first the named parts, then by age. Throws where nobody can play one. */
export function castOf(world: World): Played[] {
  const left = [...world.failures].reverse();
  const played = chainOf(world.chain).map(({ failure, ...rest }) => ({
    failure: taken(left, (one) => one.id === failure.id),
    ...rest,
  }));
  for (const { plot, twist = null, ...wanted } of PARTS_TO_PLAY) {
    played.push({ failure: taken(left, (failure) => suits(failure, wanted)), plot, twist });
  }
  return [...played, ...left.map((failure) => ({ failure, ...restOf(failure, world) }))];
}

const chainOf = ({ first, second }: Chain): Played[] => [
  { failure: first, plot: "settled", twist: "chainFirst" },
  { failure: second, plot: "parked", twist: "chainSecond" },
];

function taken(left: Failure[], fits: (failure: Failure) => boolean): Failure {
  const at = left.findIndex(fits);
  const [found] = at < 0 ? [] : left.splice(at, 1);
  if (!found) throw new RangeError("The story has a part that no failure can play");
  return found;
}

const suits = ({ unit, failedDaysAgo }: Failure, wanted: Omit<Wanted, "plot" | "twist">): boolean =>
  unit.account.buyer === wanted.at &&
  unit.batch.part.family === wanted.family &&
  (wanted.role === undefined || unit.batch.role === wanted.role) &&
  failedDaysAgo >= wanted.failed[0] &&
  failedDaysAgo <= wanted.failed[1];

const DAYS_UNTIL_SETTLED = 56;
const DAYS_UNTIL_DECIDED = 18;

function restOf(failure: Failure, world: World): Pick<Played, "plot" | "twist"> {
  const { failedDaysAgo, cause, unit } = failure;
  const twist =
    failure.id === world.zeroRated.id
      ? "zeroRated"
      : cause === "fitting"
        ? "fittingFault"
        : unit.batch.role === "bad"
          ? "badCoil"
          : null;
  if (failedDaysAgo > DAYS_UNTIL_SETTLED) return { plot: "settled", twist };
  return { plot: failedDaysAgo > DAYS_UNTIL_DECIDED ? "decided" : "filed", twist };
}
