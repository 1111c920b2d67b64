import { addDays, isoWeek, type CalendarDay } from "@/lib/kernel/calendar-day";
import type { FamilyCode } from "@/lib/parts/families";
import { idOf } from "../identity";
import { partNumbered, type MakerName, type Part } from "./catalogue";

/** The hidden truth of a batch: S(t) = exp(-(t/scaleDays)^shape) from the day a unit is fitted. */
export type Truth = { readonly shape: number; readonly scaleDays: number };

export type Batch = {
  readonly id: string;
  readonly part: Part;
  readonly code: string;
  readonly madeDaysAgo: number;
  readonly units: number;
  readonly truth: Truth;
  /** What the story needs this batch for. */
  readonly role: "usual" | "bad" | "young";
};

// Wearing parts die of age, electronics at any age; tuned so that three or four units in a hundred come back.
const USUAL: Readonly<Record<FamilyCode, Truth>> = {
  brake: { shape: 2, scaleDays: 2700 },
  motor: { shape: 2.2, scaleDays: 2250 },
  controller: { shape: 1.1, scaleDays: 12_500 },
  charger: { shape: 1.2, scaleDays: 9000 },
  battery: { shape: 2.8, scaleDays: 1480 },
  gearbox: { shape: 2.6, scaleDays: 1850 },
  throttle: { shape: 1.3, scaleDays: 7000 },
};

/** The coil of this batch is wound too thin: it loses its release once it is hot, in the first months of use. */
const BAD_COILS: Truth = { shape: 2.2, scaleDays: 178 };

// Part, units in each of its batches, and how many days ago each was made.
const PLAN: readonly (readonly [partNumber: string, units: number, ...madeDaysAgo: number[]])[] = [
  ["LMB-2410", 230, 780, 655, 540, 415],
  ["LMB-2410", 220, 240],
  ["LMB-2410", 120, 48],
  ["LMB-2415", 150, 742, 560, 371, 180],
  ["LMM-2425", 140, 760, 505, 268],
  ["LMM-2440", 120, 690, 402],
  ["LMC-2470", 150, 735, 470, 214],
  ["LMC-2412", 110, 588, 301],
  ["LML-2408", 160, 671, 342],
  ["LMA-1236", 220, 749, 520, 266],
  ["LMA-2520", 90, 440],
  ["LMG-3201", 150, 632, 325],
  ["LMT-0501", 140, 720],
  ["LMT-0502", 150, 418],
  ["FS-1104", 150, 701, 438, 205],
  ["FS-1208", 140, 667],
  ["FS-1310", 140, 512],
  ["FS-1405", 150, 480],
  ["FS-1512", 180, 590, 282],
  ["FS-1603", 140, 545],
  ["FS-1702", 120, 391],
];

const BAD_BATCH_MADE_DAYS_AGO = 240;
const YOUNG_BATCH_MADE_DAYS_AGO = 48;

/** Every batch of the story, with codes as each maker writes them. */
export const batchesOn = (today: CalendarDay): Batch[] =>
  PLAN.flatMap(([number, units, ...made]) =>
    made.map((madeDaysAgo): Batch => {
      const part = partNumbered(number);
      const role = number !== "LMB-2410" ? "usual" : roleOf(madeDaysAgo);
      const truth = role === "bad" ? BAD_COILS : USUAL[part.family];
      const id = idOf("batch", number, madeDaysAgo);
      return {
        id,
        part,
        code: codeOf(part.maker, addDays(today, -madeDaysAgo)),
        madeDaysAgo,
        units,
        truth,
        role,
      };
    }),
  );

const roleOf = (madeDaysAgo: number): Batch["role"] =>
  madeDaysAgo === BAD_BATCH_MADE_DAYS_AGO
    ? "bad"
    : madeDaysAgo === YOUNG_BATCH_MADE_DAYS_AGO
      ? "young"
      : "usual";

function codeOf(maker: MakerName, madeOn: CalendarDay): string {
  const { year, week } = isoWeek(madeOn);
  const [yy, ww, month] = [
    String(year % 100).padStart(2, "0"),
    String(week).padStart(2, "0"),
    madeOn.slice(5, 7),
  ];
  if (maker === "Ostrand") return `R${yy}${ww}`;
  return maker === "Kelvane" ? `K-${yy}-${month}${ww}` : `BX${ww}${yy}`;
}
