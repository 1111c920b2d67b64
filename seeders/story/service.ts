import type { Chance } from "../random";
import { idOf } from "../identity";
import type { BuyerKey } from "./organisations";
import type { Unit } from "./units";
import { CARELESS_INSTALLER_CODE, INSTALLERS, vehicleYard, type Installer, type Vehicle } from "./workshops";

export type Position = "left" | "right" | "single";

/** A unit in a vehicle, and how its life there ends if it has ended. Days are counted back from today. */
export type Fitting = {
  readonly id: string;
  readonly unit: Unit;
  readonly vehicle: Vehicle;
  readonly installer: Installer;
  readonly position: Position;
  readonly fittedDaysAgo: number;
  readonly failedDaysAgo: number | null;
  readonly cause: "part" | "fitting";
};

export type Service = {
  readonly fittings: readonly Fitting[];
  readonly vehicles: readonly Vehicle[];
  /** Units never fitted: what stands on the workshops' shelves, oldest first. */
  readonly shelf: readonly Unit[];
};

const SHARE_NEVER_FITTED = 0.22;
const MEAN_SHELF_DAYS = 34;
/** A failure of yesterday at the latest: today's have not been written down yet. */
const LAST_FAILURE_DAYS_AGO = 1;
const EARLY_FAULT_SHARE = 0.4;

/** Fits the units that were fitted, workshop by workshop, and lets each live its hidden life. */
export function serviceOf(units: readonly Unit[], buyers: readonly BuyerKey[], chance: Chance): Service {
  const parts = buyers.map((buyer) =>
    workshopService(
      buyer,
      units.filter((unit) => unit.account.buyer === buyer),
      chance,
    ),
  );
  return {
    fittings: parts.flatMap((part) => part.fittings),
    vehicles: parts.flatMap((part) => part.vehicles),
    shelf: parts.flatMap((part) => part.shelf),
  };
}

function workshopService(buyer: BuyerKey, bought: readonly Unit[], chance: Chance): Service {
  const draw = chance.fork(`service ${buyer}`);
  const yard = vehicleYard(buyer, chance);
  const fittings: Fitting[] = [];
  const shelf: Unit[] = [];
  for (const jobs of jobsOf(bought)) {
    const shipped = Math.min(...jobs.map((unit) => unit.shippedDaysAgo));
    const fittedDaysAgo = shipped - Math.floor(draw.exponential(MEAN_SHELF_DAYS));
    if (draw.happens(SHARE_NEVER_FITTED) || fittedDaysAgo < LAST_FAILURE_DAYS_AGO) {
      shelf.push(...jobs);
      continue;
    }
    const vehicle = yard.next();
    const installer = draw.weighted(INSTALLERS[buyer].map((one, place) => [one, 5 - place] as const));
    jobs.forEach((unit, place) => {
      const position = jobs.length === 2 ? (place === 0 ? "left" : "right") : sideOf(unit, draw);
      const id = idOf("fitting", unit.id);
      const job = { id, unit, vehicle, installer, position, fittedDaysAgo };
      fittings.push({ ...job, ...lifeOf(job, draw) });
    });
  }
  return { fittings, vehicles: yard.known, shelf: shelf.sort((a, b) => b.shippedDaysAgo - a.shippedDaysAgo) };
}

/** What is fitted in one go: lead blocks in pairs, everything else alone. */
function jobsOf(bought: readonly Unit[]): Unit[][] {
  const inOrder = [...bought].sort((a, b) => b.shippedDaysAgo - a.shippedDaysAgo);
  const waiting = new Map<string, Unit>();
  return inOrder.flatMap((unit) => {
    if (unit.batch.part.family !== "battery" || unit.batch.part.rated["voltageV"] !== 12) return [[unit]];
    const other = waiting.get(unit.batch.id);
    if (!other) {
      waiting.set(unit.batch.id, unit);
      return [];
    }
    waiting.delete(unit.batch.id);
    return [[other, unit]];
  });
}

const sideOf = (unit: Unit, draw: Chance): Position =>
  unit.batch.part.family === "brake" || unit.batch.part.family === "motor"
    ? draw.pick(["left", "right"])
    : "single";

function lifeOf(
  { unit, installer, fittedDaysAgo }: Pick<Fitting, "unit" | "installer" | "fittedDaysAgo">,
  draw: Chance,
): Pick<Fitting, "failedDaysAgo" | "cause"> {
  const { truth, part } = unit.batch;
  const ownLifeDays = Math.max(1, Math.round(draw.weibull(truth.shape, truth.scaleDays)));
  const careless = installer.code === CARELESS_INSTALLER_CODE && part.family === "gearbox";
  const early = careless && draw.happens(EARLY_FAULT_SHARE);
  const lifeDays = early ? draw.whole(9, 80) : ownLifeDays;
  const failedDaysAgo = fittedDaysAgo - lifeDays;
  if (failedDaysAgo < LAST_FAILURE_DAYS_AGO) return { failedDaysAgo: null, cause: "part" };
  return { failedDaysAgo, cause: early ? "fitting" : "part" };
}
