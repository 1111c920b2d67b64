import { claimNumberFrom } from "@/lib/labels/check-digit";
import type { FamilyCode } from "@/lib/parts/families";
import type { Chance } from "../random";
import { ORGANISATIONS } from "../story/organisations";
import type { Failure } from "../story/replacements";
import type { Fitting } from "../story/service";
import type { World } from "../story/world";
import { castOf, type Played } from "./cast";
import type { Case, CaseLine, Twist } from "./case";
import { extraCases } from "./extra-cases";
import { lookAlikeOf } from "./look-alike";

const LONGEST_DAYS_TO_FILE = 6;

/** Every claim of the story, the oldest first. */
export function casesOf(world: World, chance: Chance): Case[] {
  const numbers = numbersFrom(chance.fork("numbers"));
  const fromFailures = castOf(world, chance).map((played) =>
    caseOf(played, { world, chance, number: numbers() }),
  );
  const extra = extraCases(world, fromFailures).map((one): Case => ({ ...one, number: numbers() }));
  return [...fromFailures, ...extra].sort(
    (a, b) => b.filedDaysAgo - a.filedDaysAgo || (a.key < b.key ? -1 : 1),
  );
}

const LOWEST_NUMBER = 1_000_000;
const HIGHEST_NUMBER = 9_999_999;

function numbersFrom(draw: Chance): () => string {
  const taken = new Set<string>();
  return () => {
    for (;;) {
      const number = claimNumberFrom(draw.whole(LOWEST_NUMBER, HIGHEST_NUMBER)).replace("-", "");
      if (taken.has(number)) continue;
      taken.add(number);
      return number;
    }
  };
}

type Making = { readonly world: World; readonly chance: Chance; readonly number: string };

function caseOf({ failure, plot, twist, isMinor }: Played, { world, chance, number }: Making): Case {
  const draw = chance.fork(`case ${failure.id}`);
  const { part, role } = failure.unit.batch;
  const repair = world.repairs.get(failure.id);
  // A claim is not held up for a replacement that the distributor sends under it.
  const repairedDaysAgo =
    twist === "chainFirst" ? failure.failedDaysAgo - 1 : (repair?.repairedDaysAgo ?? failure.failedDaysAgo);
  const first = lineOf(failure, world, twist);
  return {
    key: failure.id,
    number,
    seller: failure.unit.account.seller,
    workshop: failure.unit.account.buyer,
    family: part.family,
    symptom: symptomFor(part.family, { plot, twist }, draw),
    plot,
    twist,
    isMinor,
    vehicle: failure.vehicle,
    failedDaysAgo: failure.failedDaysAgo,
    repairedDaysAgo,
    filedDaysAgo: Math.max(1, repairedDaysAgo - draw.whole(0, LONGEST_DAYS_TO_FILE)),
    faultAfterMinutes: role === "bad" ? draw.whole(6, 25) : draw.whole(11, 38),
    lines: twist === "pair" ? [first, otherOfPair(failure, world)] : [first],
  };
}

function lineOf(failure: Fitting, world: World, twist: Twist | null): CaseLine {
  const { unit, installer, position, fittedDaysAgo, id } = failure;
  const isDoubtful = twist === "serialDoubtful";
  const replacement = twist === "chainFirst" ? null : (world.repairs.get(id)?.replacement ?? null);
  return {
    part: unit.batch.part,
    unit: isDoubtful ? null : unit,
    serialTyped: isDoubtful ? lookAlikeOf(unit, world.units) : unit.serial,
    sale: isDoubtful ? null : (world.saleOfUnit.get(unit.id) ?? null),
    quantity: 1,
    position,
    fittingId: isDoubtful ? null : id,
    fittedDaysAgo,
    installer,
    replacement,
  };
}

/** The block beside the one that failed: they are replaced in pairs and claimed on one claim. */
function otherOfPair(failure: Failure, world: World): CaseLine {
  const other = world.fittings.find(
    ({ vehicle, fittedDaysAgo, position, unit }) =>
      vehicle === failure.vehicle &&
      fittedDaysAgo === failure.fittedDaysAgo &&
      position !== failure.position &&
      unit.batch === failure.unit.batch,
  );
  if (!other) throw new RangeError(`${ORGANISATIONS[failure.unit.account.buyer].name} has no pair to claim`);
  return lineOf(other, world, null);
}

const SYMPTOMS: Readonly<Record<FamilyCode, readonly string[]>> = {
  brake: ["drags", "noise", "grabsWhenWarm"],
  motor: ["weakWhenWarm", "runsRough"],
  controller: ["cutsOutWhenWarm", "faultShown"],
  charger: ["dead", "chargesTooLittle"],
  battery: ["shortRange", "willNotCharge"],
  gearbox: ["noise"],
  throttle: ["jumps", "dead"],
};

const HOT: Readonly<Partial<Record<FamilyCode, string>>> = {
  brake: "grabsWhenWarm",
  motor: "weakWhenWarm",
  controller: "cutsOutWhenWarm",
};
const SHOWN_HOT: readonly (Twist | null)[] = [
  "badCoil",
  "photoReused",
  "parcelLost",
  "otherUnitSent",
  "parcelWet",
];

function symptomFor(
  family: FamilyCode,
  { plot, twist }: Pick<Played, "plot" | "twist">,
  draw: Chance,
): string {
  if (twist === "incident") return "willNotHold";
  if (twist === "fittingFault") return "wheelNotDriven";
  const drawn = draw.pick(SYMPTOMS[family]);
  const isHot = SHOWN_HOT.includes(twist) || plot === "settledUnproven";
  return (isHot ? HOT[family] : undefined) ?? drawn;
}
