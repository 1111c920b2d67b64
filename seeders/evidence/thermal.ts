import type { Chance } from "../random";

/** One row of a run on the bench. Seconds from switching on, °C, V, A; speed in rpm where the part turns. */
export type RunRow = {
  readonly timeS: number;
  readonly coilCelsius: number;
  readonly caseCelsius: number;
  readonly ambientCelsius: number;
  readonly volt: number;
  readonly ampere: number;
  readonly rpm: number | null;
  readonly event: string;
};

export type Run = { readonly rows: readonly RunRow[]; readonly faultAtS: number | null };

export type RunPlan = {
  readonly seed: Chance;
  /** Resistance of the copper at 20 °C in ohm. */
  readonly ohmAt20: number;
  /** Minutes until the fault, or null for a run that ends well. */
  readonly faultAfterMinutes: number | null;
  /** Minutes the run lasts where there is no fault. */
  readonly minutes: number;
  readonly stepS: number;
  /** Brakes and controllers are watched by their current; a motor turns as well. */
  readonly turns: boolean;
  readonly words: { readonly on: string; readonly fault: string; readonly off: string };
};

const COPPER_K = 235;
const MINUTES_AFTER_FAULT = 2.5;
/** The coil at which a doomed part gives up, and what it would reach if it went on. */
const FAULT_CELSIUS = 84;
const END_CELSIUS = 116;
const HEALTHY_END_CELSIUS = 78;
/** Seconds in which a dragging lining adds its own heat. */
const DRAG_TAU_S = 240;

/**
 * A run by the first-order course T(t) = Tend - (Tend - T0) exp(-t/tau), the case behind the coil, and a current that
 * falls as the copper warms: R = R20 (235 + T)/255. A doomed part reaches its fault exactly where the plan says.
 */
export function runOf(plan: RunPlan): Run {
  const { seed, ohmAt20, faultAfterMinutes } = plan;
  const ambient = seed.between(17.5, 23.5);
  const faultAtS =
    faultAfterMinutes === null ? null : Math.round((faultAfterMinutes * 60) / plan.stepS) * plan.stepS;
  const end = faultAtS === null ? HEALTHY_END_CELSIUS + seed.between(-5, 5) : END_CELSIUS;
  const tauS =
    faultAtS === null
      ? seed.between(620, 1100)
      : faultAtS / Math.log((end - ambient) / (end - FAULT_CELSIUS));
  const lastS = faultAtS === null ? plan.minutes * 60 : faultAtS + MINUTES_AFTER_FAULT * 60;
  const volts = seed.between(23.7, 24.6);
  const rows: RunRow[] = [];
  for (let timeS = 0; timeS <= lastS; timeS += plan.stepS) {
    const afterS = faultAtS === null ? -1 : timeS - faultAtS;
    const drag = afterS > 0 ? 34 * (1 - Math.exp(-afterS / DRAG_TAU_S)) : 0;
    const coil = end - (end - ambient) * Math.exp(-timeS / tauS) + drag;
    const casing = ambient + (coil - ambient) * 0.62 * (1 - Math.exp(-timeS / (tauS * 0.55)));
    const volt = volts - 0.00012 * timeS + seed.normal(0, 0.025);
    const isStopped = plan.turns && afterS >= 0;
    rows.push({
      timeS,
      coilCelsius: coil + seed.normal(0, 0.18),
      caseCelsius: casing + seed.normal(0, 0.15),
      ambientCelsius: ambient + seed.normal(0, 0.08) + timeS * 0.0003,
      volt,
      ampere: plan.turns
        ? loadAmpere(coil, isStopped, seed)
        : volt / ohmOf(ohmAt20, coil) + seed.normal(0, 0.0008),
      rpm: plan.turns ? (isStopped ? 0 : 3050 - (coil - ambient) * 3 + seed.normal(0, 9)) : null,
      event:
        timeS === 0
          ? plan.words.on
          : faultAtS === timeS
            ? plan.words.fault
            : timeS + plan.stepS > lastS
              ? plan.words.off
              : "",
    });
  }
  return { rows, faultAtS };
}

const ohmOf = (ohmAt20: number, celsius: number): number =>
  (ohmAt20 * (COPPER_K + celsius)) / (COPPER_K + 20);

const loadAmpere = (coil: number, isStopped: boolean, seed: Chance): number =>
  isStopped ? 0.4 + seed.normal(0, 0.03) : 7.5 + (coil - 20) * 0.035 + seed.normal(0, 0.12);
