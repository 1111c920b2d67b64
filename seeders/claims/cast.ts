import type { FamilyCode } from "@/lib/parts/families";
import type { Chance } from "../random";
import type { BuyerKey, SellerKey } from "../story/organisations";
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
  { plot: "draft", at: "quayhead", family: "gearbox", failed: [10, 25] },
  { plot: "draft", ...bad, at: "saltmarsh", failed: [1, 9] },
  { plot: "draft", at: "hollin", family: "brake", role: "usual", failed: [5, 9] },
  { plot: "draft", ...bad, at: "tworivers", failed: [1, 12] },
  { plot: "discarded", at: "tworivers", family: "battery", failed: [20, 40] },
  { plot: "filed", twist: "incident", at: "saltmarsh", family: "brake", role: "usual", failed: [6, 20] },
  { plot: "held", twist: "incident", at: "hollin", family: "brake", role: "usual", failed: [8, 60] },
  { plot: "filed", twist: "photoReused", at: "hollin", family: "brake", role: "bad", failed: [3, 10] },
  { plot: "filed", at: "quayhead", family: "brake", failed: [7, 7] },
  { plot: "filed", at: "larkmoor", family: "controller", failed: [9, 9] },
  { plot: "filed", twist: "serialDoubtful", at: "saltmarsh", family: "throttle", failed: [5, 5] },
  { plot: "held", ...bad, at: "tworivers", failed: [13, 22] },
  { plot: "held", at: "quayhead", family: "motor", failed: [6, 6] },
  { plot: "parked", at: "hollin", family: "controller", failed: [12, 12] },
  { plot: "putBack", at: "tworivers", family: "gearbox", failed: [8, 8] },
  { plot: "answered", ...bad, at: "tworivers", failed: [14, 25] },
  { plot: "answered", at: "saltmarsh", family: "charger", failed: [17, 17] },
  { plot: "asked", ...bad, at: "saltmarsh", failed: [18, 28] },
  { plot: "asked", ...bad, at: "hollin", failed: [18, 28] },
  { plot: "asked", at: "quayhead", family: "charger", failed: [19, 38] },
  { plot: "decided", twist: "pair", at: "saltmarsh", family: "battery", failed: [24, 24] },
  { plot: "decided", at: "quayhead", family: "battery", failed: [30, 30] },
  { plot: "refused", ...bad, at: "saltmarsh", failed: [27, 31] },
  { plot: "contested", ...bad, at: "tworivers", failed: [29, 40] },
  { plot: "contestTaken", ...bad, at: "hollin", failed: [45, 58] },
  { plot: "reversed", ...bad, at: "saltmarsh", failed: [29, 40] },
  { plot: "lost", twist: "parcelLost", at: "saltmarsh", family: "brake", role: "bad", failed: [40, 56] },
  { plot: "examined", twist: "otherUnitSent", at: "tworivers", family: "brake", failed: [24, 60] },
  { plot: "examined", twist: "parcelWet", at: "hollin", family: "brake", failed: [24, 60] },
  { plot: "notSentInTime", at: "saltmarsh", family: "brake", failed: [40, 60] },
  { plot: "notSentInTime", at: "quayhead", family: "gearbox", failed: [60, 110] },
  { plot: "awaited", ...bad, at: "hollin", failed: [16, 19] },
  { plot: "awaited", at: "tworivers", family: "brake", role: "usual", failed: [14, 40] },
  { plot: "awaited", ...bad, at: "hollin", failed: [37, 60] },
  { plot: "awaited", at: "saltmarsh", family: "controller", failed: [18, 60] },
  { plot: "awaited", at: "quayhead", family: "controller", failed: [15, 40] },
  { plot: "awaited", at: "larkmoor", family: "throttle", failed: [20, 40] },
  { plot: "sent", ...bad, at: "saltmarsh", failed: [28, 60] },
  { plot: "sent", ...bad, at: "hollin", failed: [38, 60] },
  { plot: "sent", at: "saltmarsh", family: "throttle", failed: [20, 60] },
  { plot: "sent", at: "quayhead", family: "gearbox", failed: [20, 40] },
  { plot: "received", ...bad, at: "saltmarsh", failed: [34, 60] },
  { plot: "received", ...bad, at: "tworivers", failed: [36, 66] },
  { plot: "received", at: "saltmarsh", family: "motor", failed: [27, 60] },
  { plot: "received", at: "quayhead", family: "battery", failed: [31, 60] },
  { plot: "received", at: "quayhead", family: "throttle", failed: [51, 70] },
  { plot: "examined", ...bad, at: "saltmarsh", failed: [34, 60] },
  { plot: "examined", at: "tworivers", family: "brake", role: "usual", failed: [28, 40] },
  { plot: "examined", at: "quayhead", family: "charger", failed: [26, 60] },
  { plot: "settledUnproven", at: "tworivers", family: "brake", role: "usual", failed: [70, 400] },
  { plot: "settledUnproven", at: "saltmarsh", family: "motor", failed: [70, 400] },
  { plot: "partAllocated", ...bad, at: "hollin", failed: [45, 85] },
  { plot: "countered", ...bad, at: "saltmarsh", failed: [57, 75] },
  { plot: "onSite", at: "hollin", family: "brake", failed: [20, 80] },
  { plot: "settledReversed", ...bad, at: "hollin", failed: [75, 100] },
  { plot: "settledQueried", ...bad, at: "saltmarsh", failed: [75, 95] },
  { plot: "withdrawn", at: "saltmarsh", family: "motor", failed: [40, 130] },
  { plot: "withdrawnWhenAsked", at: "quayhead", family: "charger", failed: [41, 200] },
  { plot: "lapsed", at: "tworivers", family: "throttle", failed: [60, 200] },
  { plot: "lapsed", at: "quayhead", family: "controller", failed: [60, 300] },
];

export type Played = {
  readonly failure: Failure;
  readonly plot: PlotName;
  readonly twist: Twist | null;
  /** One of the many that have no part of their own. */
  readonly isMinor: boolean;
};

/** Gives every failure its place in the story: first the named parts, then by age. Throws where nobody can play one. */
export function castOf(world: World, chance: Chance): Played[] {
  const draw = chance.fork("cast");
  const left = [...world.failures].reverse();
  const played = chainOf(world.chain).map(({ failure, ...rest }) => ({
    failure: taken(left, (one) => one.id === failure.id, "the chain"),
    ...rest,
  }));
  for (const { plot, twist = null, ...wanted } of PARTS_TO_PLAY) {
    const part = `${plot} ${wanted.family} at ${wanted.at}`;
    played.push({
      failure: taken(left, (failure) => suits(failure, wanted), part),
      plot,
      twist,
      isMinor: isMinor(plot, twist),
    });
  }
  return [
    ...played,
    ...left.map((failure) => ({ failure, isMinor: true, ...restOf(failure, { world, draw }) })),
  ];
}

/** What a tour looks at closely: claims with something special about them, and those in somebody's hands. */
const IN_FRONT: readonly PlotName[] = [
  "draft",
  "held",
  "parked",
  "putBack",
  "asked",
  "answered",
  "refused",
  "contested",
  "contestTaken",
  "reversed",
];
const isMinor = (plot: PlotName, twist: Twist | null): boolean =>
  !IN_FRONT.includes(plot) && (twist === null || twist === "badCoil");

const chainOf = ({ first, second }: Chain): Played[] => [
  { failure: first, plot: "settledReplaced", twist: "chainFirst", isMinor: false },
  { failure: second, plot: "parked", twist: "chainSecond", isMinor: false },
];

function taken(left: Failure[], fits: (failure: Failure) => boolean, part: string): Failure {
  const at = left.findIndex(fits);
  const [found] = at < 0 ? [] : left.splice(at, 1);
  if (!found) throw new RangeError(`No failure of the story can play this part: ${part}`);
  return found;
}

const suits = ({ unit, failedDaysAgo }: Failure, wanted: Omit<Wanted, "plot" | "twist">): boolean =>
  unit.account.buyer === wanted.at &&
  unit.batch.part.family === wanted.family &&
  (wanted.role === undefined || unit.batch.role === wanted.role) &&
  failedDaysAgo >= wanted.failed[0] &&
  failedDaysAgo <= wanted.failed[1];

/** What became of the claims nobody asked for by name, by how long ago the part failed; weights beside the plots. */
type Age = { readonly upToDaysAgo: number; readonly plots: readonly (readonly [PlotName, number])[] };

const WAITING: Age["plots"] = [["filed", 1]];
const ON_THE_WAY: Age["plots"] = [
  ["decided", 7],
  ["tested", 6],
  ["noted", 4],
  ["testedNoted", 2],
  ["allocated", 3],
  ["paidOut", 1],
  ["onSite", 1],
];
const LONG_AGO: Age["plots"] = [
  ["settled", 10],
  ["settledTested", 9],
  ["settledPaidOut", 4],
  ["settledWaived", 2],
  ["settledOnSite", 2],
  ["settledQueried", 4],
  ["noted", 2],
  ["tested", 1],
  ["withdrawn", 1],
  ["lapsed", 1],
];

const AGES: Readonly<Record<SellerKey, readonly Age[]>> = {
  larkmoor: [
    { upToDaysAgo: 33, plots: WAITING },
    { upToDaysAgo: 72, plots: ON_THE_WAY },
  ],
  fenwright: [
    { upToDaysAgo: 38, plots: WAITING },
    { upToDaysAgo: 115, plots: ON_THE_WAY },
  ],
};

/** The first brakes of the bad batch were run cold, and nothing was seen: their claims were declined. */
const COLD_RUNS_UNTIL_DAYS_AGO = 138;
const SHARE_UNPROVEN = 0.05;

function restOf(
  failure: Failure,
  { world, draw }: { world: World; draw: Chance },
): Pick<Played, "plot" | "twist"> {
  const twist = twistOf(failure, world);
  const { failedDaysAgo, unit } = failure;
  const age = AGES[unit.account.seller].find(({ upToDaysAgo }) => failedDaysAgo <= upToDaysAgo);
  const drawn = draw.fork(failure.id);
  if (age) return { plot: drawn.weighted(age.plots), twist };
  if (twist === "fittingFault") return { plot: "settledTested", twist };
  if (twist === "badCoil" && failedDaysAgo > COLD_RUNS_UNTIL_DAYS_AGO)
    return { plot: "settledUnproven", twist };
  if (twist === "zeroRated") return { plot: "settledTested", twist };
  const isHeat = HEAT_FAMILIES.includes(unit.batch.part.family) && twist === null;
  if (isHeat && drawn.happens(SHARE_UNPROVEN)) return { plot: "settledUnproven", twist };
  return { plot: drawn.weighted(LONG_AGO), twist };
}

const HEAT_FAMILIES: readonly FamilyCode[] = ["brake", "motor", "controller"];

function twistOf({ id, cause, unit }: Failure, world: World): Twist | null {
  if (id === world.zeroRated.id) return "zeroRated";
  if (cause === "fitting") return "fittingFault";
  return unit.batch.role === "bad" ? "badCoil" : null;
}
