import { scaleLinear } from "d3-scale";
import type { MonthLine } from "@/lib/reports/life-curves/view";
import type { LifeFrame } from "./life-curve-plot";

export type MonthBar = {
  readonly month: number;
  readonly x: number;
  readonly width: number;
  readonly y: number;
  readonly lowerY: number;
  readonly upperY: number;
  readonly isCut: boolean;
  readonly isEmpty: boolean;
  readonly othersY: number | null;
};

export type MonthPlot = {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly bars: readonly MonthBar[];
  readonly rateTicks: readonly { readonly y: number; readonly rate: number }[];
  readonly monthTicks: readonly { readonly x: number; readonly month: number }[];
};

const TICKS = 4;
/** An interval of a cell with little exposure may reach far: the scale goes by the rates and lets it run out. */
const ROOM_FOR_INTERVALS = 2.2;

/** Rates by month in service placed as bars from nought, with their intervals and the rate of the others. */
export function monthPlot(months: readonly MonthLine[], frame: LifeFrame): MonthPlot {
  const [left, right] = [frame.left, frame.width - frame.right];
  const [top, bottom] = [frame.top, frame.top + frame.height];
  const highest = Math.max(1, ...months.flatMap(({ rate, others }) => [rate?.value ?? 0, others ?? 0]));
  const rates = scaleLinear()
    .domain([0, highest * ROOM_FOR_INTERVALS])
    .nice(TICKS)
    .range([bottom, top])
    .clamp(true);
  const most = rates.domain()[1] ?? highest;
  const cell = (right - left) / Math.max(1, months.length);
  const every = Math.max(1, Math.ceil(28 / cell));
  return {
    left,
    right,
    top,
    bottom,
    bars: months.flatMap(({ month, rate, others }) =>
      rate === null
        ? []
        : [
            {
              month,
              x: left + month * cell + cell * 0.15,
              width: cell * 0.7,
              y: rates(rate.value),
              lowerY: rates(rate.lower),
              upperY: rates(rate.upper ?? most),
              isEmpty: rate.value === 0,
              isCut: (rate.upper ?? Infinity) > most,
              othersY: others === null ? null : rates(others),
            },
          ],
    ),
    rateTicks: rates.ticks(TICKS).map((rate) => ({ y: rates(rate), rate })),
    monthTicks: Array.from({ length: Math.floor(months.length / every) + 1 }, (_, at) => ({
      x: left + at * every * cell,
      month: at * every,
    })),
  };
}
