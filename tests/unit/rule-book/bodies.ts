import { calendarDay } from "@/lib/kernel/calendar-day";
import type { RuleBody, RuleKind } from "@/lib/rule-book/shapes";

const office = [{ opens: "08:00", closes: "17:00" }];

/** One body of each kind, as a distributor might write it. */
export const bodies: { readonly [Kind in RuleKind]: RuleBody<Kind> } = {
  terms: {
    coverMonths: 24,
    shelfLimitMonths: 6,
    startsWithoutFitting: "shipment",
    transfer: "refused",
    coverFraction: { kind: "straightLine" },
    filingLimitDays: 30,
    lateFiling: { policy: "reduce", fraction: "1/2" },
    replacementMinimumDays: 90,
    grace: { kind: "days", days: 14 },
    contestDays: 28,
    queryLapseDays: 30,
    currency: "GBP",
    labour: { months: 12, standardMinutes: 45, hourlyRateMinor: 48_00 },
    caps: { diagnosisMinor: 20_00, consumablesMinor: 5_00, carriageMinor: 12_00, claimMinor: null },
  },
  evidenceList: {
    rows: [{ id: "label", need: "required", accepts: "photo", readingKind: null, why: "labelNamesTheUnit" }],
    bySymptom: [
      {
        symptom: "gripsHot",
        rows: [
          { id: "runLog", need: "required", accepts: "runLog", readingKind: null, why: "faultShowsOnlyHot" },
          {
            id: "coilCold",
            need: "required",
            accepts: "reading",
            readingKind: "coilOhm",
            why: "coilOrMechanics",
          },
        ],
      },
    ],
  },
  limits: {
    readings: [
      {
        readingKind: "coilOhm",
        low: 52.99,
        high: 62.21,
        unit: "ohm",
        source: "Maker's data sheet, 8 % at 20 °C",
      },
    ],
    surfaceCautions: [
      { grade: "warn", fromCelsius: 48, source: "Touch threshold for ten minutes, from memory" },
    ],
    insulationClass: "155 (F)",
    coil: { ratedOhm: 57.6, toleranceFraction: "2/25", source: "Maker's data sheet" },
  },
  serviceLevels: {
    calendar: {
      timeZone: "Europe/Vienna",
      hours: {
        monday: office,
        tuesday: office,
        wednesday: office,
        thursday: office,
        friday: office,
        saturday: [],
        sunday: [],
      },
      holidays: [calendarDay("2026-12-08")],
    },
    answerWorkingDays: 5,
    priorityWeights: { safetyCritical: 50, batchUnderWatch: 30, timeLeft: 10, repeatFailure: 20, age: 1 },
  },
  credit: {
    rounding: "halfUp",
    notePrefix: "LP-",
    settledBy: {
      part: "creditNote",
      labour: "workshopInvoice",
      diagnosis: "workshopInvoice",
      consumables: "creditNote",
      carriage: "outsideTax",
    },
    handling: { amountMinor: 4_50, reason: "Goods-in and test" },
    currency: "GBP",
  },
};
