import { normaliseSerial } from "@/lib/labels/serial";
import { addDays, type CalendarDay } from "@/lib/kernel/calendar-day";
import { workingDayAgo } from "../days";
import type { Row, Tables } from "../tables";
import { makerId, MAKERS, PARTS } from "./catalogue";
import { ACCOUNTS, ORGANISATIONS } from "./organisations";
import { PEOPLE } from "./people";
import type { World } from "./world";
import { INSTALLERS } from "./workshops";

/** The rows of everything beside the claims. The password is hashed once, for everybody. */
export const worldRows = (world: World, passwordHash: string): Tables => ({
  ...houseRows(world.today),
  ...peopleRows(world.today, passwordHash),
  ...catalogueRows(world),
  ...salesRows(world),
  ...serviceRows(world),
  ruleBookVersions: ruleRows(world),
});

const YEARS_OPEN_DAYS = 1400;
const SECOND_PLACE_DAYS = 300;

function houseRows(today: CalendarDay): Tables {
  const houses = Object.values(ORGANISATIONS);
  return {
    organisations: houses.map(({ key: _key, sites: _sites, language, ...house }) => ({
      ...house,
      languages: [language],
    })),
    sites: houses.flatMap(({ id, sites }) => sites.map((site) => ({ ...site, organisationId: id }))),
    tradingAccounts: ACCOUNTS.map(({ id, seller, buyer, number, currency }) => ({
      id,
      sellerId: ORGANISATIONS[seller].id,
      buyerId: ORGANISATIONS[buyer].id,
      accountNumber: number,
      currency,
      openedOn: addDays(today, -YEARS_OPEN_DAYS),
    })),
  };
}

function peopleRows(today: CalendarDay, passwordHash: string): Tables {
  const people = Object.values(PEOPLE).map(({ id, name, email, organisation, roles }) => {
    const { id: organisationId, language } = ORGANISATIONS[organisation];
    return { id, name, email, organisationId, language, roles };
  });
  const second = Object.values(PEOPLE).flatMap(({ id, also }) =>
    also ? [{ id, organisationId: ORGANISATIONS[also.organisation].id, roles: also.roles }] : [],
  );
  const work = [
    ...people.map((one) => ({ ...one, acceptedDaysAgo: YEARS_OPEN_DAYS })),
    ...second.map((one) => ({ ...one, acceptedDaysAgo: SECOND_PLACE_DAYS })),
  ];
  return {
    users: people.map(({ id, name, email, language }) => ({
      id,
      name,
      email,
      locale: language,
      theme: "system",
      passwordHash,
      sessionVersion: 1,
    })),
    memberships: work.map(({ id, organisationId, acceptedDaysAgo }) => ({
      userId: id,
      organisationId,
      acceptedAt: addDays(today, -acceptedDaysAgo),
    })),
    membershipRoles: work.flatMap(({ id, organisationId, roles }) =>
      roles.map((role) => ({ userId: id, organisationId, role })),
    ),
  };
}

function catalogueRows({ batches, today }: World): Tables {
  const idOfPart = (number: string | null) => PARTS.find((part) => part.number === number)?.id ?? null;
  return {
    makers: (["larkmoor", "fenwright"] as const).flatMap((seller) =>
      MAKERS.map((name) => ({ id: makerId(seller, name), sellerId: ORGANISATIONS[seller].id, name })),
    ),
    parts: PARTS.map(({ id, seller, maker, number, name, family, serialTracked, rated, supersededBy }) => ({
      id,
      sellerId: ORGANISATIONS[seller].id,
      makerId: makerId(seller, maker),
      partNumber: number,
      name,
      family,
      serialTracked,
      rated,
      supersededById: idOfPart(supersededBy),
    })),
    batches: batches.map(({ id, part, code, madeDaysAgo }) => ({
      id,
      sellerId: ORGANISATIONS[part.seller].id,
      partId: part.id,
      code,
      madeOn: workingDayAgo(today, madeDaysAgo),
    })),
  };
}

function salesRows({ sales, units, chain, repairs, fittings }: World): Tables {
  const lineOf = new Map(sales.map((sale) => [sale.unitId, sale.id]));
  const unitOf = new Map(fittings.map((fitting) => [fitting.id, fitting.unit.id]));
  const replaced = new Map(
    [...repairs].map(([fittingId, { replacement }]) => [replacement?.id, unitOf.get(fittingId)]),
  );
  return {
    invoiceLines: sales.map((sale): Row => ({
      id: sale.id,
      sellerId: ORGANISATIONS[sale.account.seller].id,
      buyerId: ORGANISATIONS[sale.account.buyer].id,
      accountId: sale.account.id,
      siteId: sale.siteId,
      invoiceNumber: sale.invoiceNumber,
      lineNumber: sale.lineNumber,
      invoicedOn: sale.day,
      shippedOn: sale.day,
      partId: sale.part.id,
      quantity: sale.quantity,
      unitPriceMinor: sale.unitPriceMinor,
      currency: sale.account.currency,
      taxCategory: sale.tax.category,
      taxRate: sale.tax.rate,
      exemptionReason: sale.tax.reason,
    })),
    units: units.map((unit): Row => ({
      id: unit.id,
      sellerId: ORGANISATIONS[unit.account.seller].id,
      buyerId: ORGANISATIONS[unit.account.buyer].id,
      partId: unit.batch.part.id,
      batchId: unit.batch.id,
      invoiceLineId: lineOf.get(unit.id) ?? null,
      serial: unit.serial,
      serialNormal: normaliseSerial(unit.serial),
      replacesUnitId: replaced.get(unit.id) ?? null,
      suppliedUnderClaim: unit === chain.second.unit,
    })),
  };
}

function serviceRows({ fittings, vehicles, repairs, today }: World): Tables {
  return {
    installers: Object.values(INSTALLERS).flatMap((installers) =>
      installers.map(({ id, workshop, name, code }) => ({
        id,
        workshopId: ORGANISATIONS[workshop].id,
        name,
        code,
      })),
    ),
    vehicles: vehicles.map(({ id, workshop, frameSerial, model }) => ({
      id,
      workshopId: ORGANISATIONS[workshop].id,
      frameSerial,
      frameSerialNormal: normaliseSerial(frameSerial),
      model,
    })),
    fittings: fittings.map(({ id, unit, vehicle, installer, position, fittedDaysAgo }) => {
      const repair = repairs.get(id);
      return {
        id,
        sellerId: ORGANISATIONS[unit.account.seller].id,
        workshopId: ORGANISATIONS[unit.account.buyer].id,
        unitId: unit.id,
        vehicleId: vehicle.id,
        position,
        fittedOn: workingDayAgo(today, fittedDaysAgo),
        removedOn: repair ? workingDayAgo(today, repair.repairedDaysAgo) : null,
        installerId: installer.id,
      };
    }),
  };
}

const ruleRows = ({ ruleBook }: World): Row[] =>
  ruleBook.map(({ seller, publishedOn, publishedById, ...rule }) => ({
    ...rule,
    sellerId: ORGANISATIONS[seller].id,
    publishedAt: `${publishedOn}T09:00:00Z`,
    publishedBy: publishedById,
  }));
