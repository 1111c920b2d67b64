import { scaleLinear } from "d3-scale";
import type { Route } from "next";
import { CHART_INK } from "./series-style";

type Estimate = { readonly value: number; readonly lower: number; readonly upper: number | null };
type RateDotProps = {
  rate: Estimate | null;
  /** What it is measured against: the rate expected of this batch at its own ages. */
  expected: number | null;
  /** The right end of the scale, the same in every row. */
  most: number;
  ink: string;
  isFilled: boolean;
  href: Route;
  label: string;
};

const [WIDTH, HEIGHT, PAD] = [220, 28, 8];

/** One row of a ranked dot plot: the interval, the dot, and the expected value as a line across it. */
export function RateDot({ rate, expected, most, ink, isFilled, href, label }: RateDotProps) {
  const x = scaleLinear()
    .domain([0, most])
    .range([PAD, WIDTH - PAD])
    .clamp(true);
  const middle = HEIGHT / 2;
  if (!rate) return null;
  const end = x(rate.upper ?? most);
  const isCut = (rate.upper ?? Infinity) > most;
  // A dot past the end of the scale is not drawn at it: the arrow says that it lies beyond, the words say where.
  const isOff = rate.value > most;
  return (
    <a href={href} aria-label={label} className="inline-block align-middle">
      <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} width={WIDTH} height={HEIGHT} className="h-7 w-55 print:w-36">
        <line x1={PAD} x2={WIDTH - PAD} y1={middle} y2={middle} stroke="var(--rule)" />
        {expected === null || expected > most ? null : (
          <line
            x1={x(expected)}
            x2={x(expected)}
            y1={3}
            y2={HEIGHT - 3}
            stroke={CHART_INK.limit}
            strokeWidth={1.5}
          />
        )}
        <line
          x1={Math.min(x(rate.lower), end - 6)}
          x2={end}
          y1={middle}
          y2={middle}
          stroke={ink}
          strokeWidth={2.5}
        />
        {rate.lower > most ? null : (
          <line
            x1={x(rate.lower)}
            x2={x(rate.lower)}
            y1={middle - 5}
            y2={middle + 5}
            stroke={ink}
            strokeWidth={1.5}
          />
        )}
        {isCut ? (
          <path
            d={`M${end - 6} ${middle - 5}L${end} ${middle}L${end - 6} ${middle + 5}`}
            fill="none"
            stroke={ink}
            strokeWidth={1.5}
          />
        ) : (
          <line x1={end} x2={end} y1={middle - 5} y2={middle + 5} stroke={ink} strokeWidth={1.5} />
        )}
        {isOff ? null : (
          <circle
            cx={x(rate.value)}
            cy={middle}
            r={5.5}
            fill={isFilled ? ink : CHART_INK.ground}
            stroke={ink}
            strokeWidth={2}
          />
        )}
      </svg>
    </a>
  );
}
