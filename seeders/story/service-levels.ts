import { calendarDay, type CalendarDay } from "@/lib/kernel/calendar-day";
import type { ServiceLevels } from "@/lib/rule-book/service-levels-shape";
import { ORGANISATIONS, type SellerKey } from "./organisations";

const WEEK = {
  larkmoor: { day: [{ opens: "08:30", closes: "17:00" }], friday: [{ opens: "08:30", closes: "16:00" }] },
  fenwright: {
    day: [
      { opens: "08:00", closes: "12:00" },
      { opens: "13:00", closes: "17:00" },
    ],
    friday: [{ opens: "08:00", closes: "14:00" }],
  },
} as const;

// The days both countries keep every year; feasts that move are the administrator's to add.
const HOLIDAYS = {
  larkmoor: ["01-01", "12-25", "12-26"],
  fenwright: ["01-01", "05-01", "10-03", "12-25", "12-26"],
} as const;

/** When a distributor works, and how soon it answers. */
export function serviceLevels(seller: SellerKey, today: CalendarDay): ServiceLevels {
  const { day, friday } = WEEK[seller];
  const year = Number(today.slice(0, 4));
  const years = [year - 3, year - 2, year - 1, year, year + 1];
  const weekday = [...day];
  return {
    calendar: {
      timeZone: ORGANISATIONS[seller].timeZone,
      hours: {
        monday: weekday,
        tuesday: weekday,
        wednesday: weekday,
        thursday: weekday,
        friday: [...friday],
        saturday: [],
        sunday: [],
      },
      holidays: years.flatMap((one) => HOLIDAYS[seller].map((rest) => calendarDay(`${one}-${rest}`))),
    },
    answerWorkingDays: seller === "larkmoor" ? 5 : 8,
    priorityWeights: { safetyCritical: 40, batchUnderWatch: 20, timeLeft: 15, repeatFailure: 15, age: 1 },
  };
}
