import { idOf } from "../identity";
import type { World } from "../story/world";
import { INSTALLERS } from "../story/workshops";
import type { Case } from "./case";

type Unnumbered = Omit<Case, "number">;

/** Claims that follow from no failure of a known unit: chargers without serial, and a unit another workshop holds. */
export const extraCases = (world: World, cases: readonly Case[]): Unnumbered[] => [
  chargersWithoutSerial(world),
  secondClaimOn(cases, world),
];

const CHARGERS_FILED_DAYS_AGO = 7;

function chargersWithoutSerial(world: World): Unnumbered {
  const sale = world.sales
    .filter((line) => line.unitId === null && line.account.buyer === "tworivers" && line.quantity >= 3)
    .at(-5);
  const vehicle = world.vehicles.find((one) => one.workshop === "tworivers");
  if (!sale || !vehicle) throw new RangeError("Two Rivers Repairs has bought no chargers without serial");
  return {
    key: idOf("case", "chargers without serial"),
    seller: "larkmoor",
    workshop: "tworivers",
    family: sale.part.family,
    symptom: "dead",
    plot: "filed",
    twist: "noSerial",
    isMinor: false,
    vehicle,
    failedDaysAgo: 10,
    repairedDaysAgo: 9,
    filedDaysAgo: CHARGERS_FILED_DAYS_AGO,
    faultAfterMinutes: 20,
    lines: [
      {
        part: sale.part,
        unit: null,
        serialTyped: "",
        sale,
        quantity: 2,
        position: "single",
        fittingId: null,
        fittedDaysAgo: null,
        installer: null,
        replacement: null,
      },
    ],
  };
}

/** Two Rivers Repairs claims a brake that Saltmarsh Mobility bought and has a claim on: stored, flagged, told to nobody else. */
function secondClaimOn(cases: readonly Case[], world: World): Unnumbered {
  const held = cases.find(
    (one) => one.workshop === "saltmarsh" && one.plot === "asked" && one.twist === "badCoil",
  );
  const vehicle = world.vehicles.findLast((one) => one.workshop === "tworivers");
  if (!held || !vehicle) throw new RangeError("There is no claim to come second to");
  const [line] = held.lines;
  return {
    ...held,
    key: idOf("case", "second claim", held.key),
    workshop: "tworivers",
    plot: "filed",
    twist: "heldElsewhere",
    isMinor: false,
    vehicle,
    failedDaysAgo: 6,
    repairedDaysAgo: 5,
    filedDaysAgo: 4,
    lines: [
      {
        ...line,
        unit: null,
        sale: null,
        fittingId: null,
        fittedDaysAgo: 60,
        installer: INSTALLERS.tworivers[1] ?? null,
        replacement: null,
      },
    ],
  };
}
