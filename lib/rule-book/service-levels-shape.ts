import { z } from "zod";
import { day, rising, timeZone } from "./shape-parts";

const minutes = (time: string): number => Number(time.slice(0, 2)) * 60 + Number(time.slice(3));

const opening = z.strictObject({
  opens: z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, "timeNeeded"),
  closes: z.string().regex(/^(([01]\d|2[0-3]):[0-5]\d|24:00)$/, "timeNeeded"),
});

/** Hours of a weekday in order, none overlapping; an empty list is a day off. */
const openings = z
  .array(opening)
  .max(6)
  .refine(
    (list) => rising(list.flatMap(({ opens, closes }) => [minutes(opens), minutes(closes)])),
    "hoursOutOfOrder",
  );

const calendar = z.strictObject({
  timeZone,
  hours: z
    .strictObject({
      monday: openings,
      tuesday: openings,
      wednesday: openings,
      thursday: openings,
      friday: openings,
      saturday: openings,
      sunday: openings,
    })
    .refine((week) => Object.values(week).some((list) => list.length > 0), "hoursMissing"),
  holidays: z.array(day).max(400),
});

const weight = z.int().min(0).max(100);

/** When the distributor works, how soon it answers, and what makes a claim urgent. */
export const serviceLevelsShape = z.strictObject({
  calendar,
  answerWorkingDays: z.int().min(1).max(60),
  /** Points each cause adds to the priority of a claim, and per day of its age. */
  priorityWeights: z.strictObject({
    safetyCritical: weight,
    batchUnderWatch: weight,
    timeLeft: weight,
    repeatFailure: weight,
    age: weight,
  }),
});

export type ServiceLevels = z.infer<typeof serviceLevelsShape>;
