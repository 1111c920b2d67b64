import "server-only";
import { dayInZone, type CalendarDay } from "@/lib/kernel/calendar-day";
import type { Actor } from "./actor";

/** The day it is now where the actor's organisation works. */
export const todayOf = ({ timeZone }: Pick<Actor, "timeZone">): CalendarDay =>
  dayInZone(new Date(), timeZone);
