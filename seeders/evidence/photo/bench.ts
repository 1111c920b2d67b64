import { chanceFrom, type Chance } from "../../random";
import { ellipse, haze, linear, radial, rect, stroke, tag } from "./svg";

export const WIDTH = 1200;
export const HEIGHT = 900;

/** How much larger than a photo a bench is, so that each photo shows another piece of it. */
export const BENCH_MARGIN = 200;
const BENCH_WIDTH = WIDTH + BENCH_MARGIN;
const BENCH_HEIGHT = HEIGHT + BENCH_MARGIN;

type Tint = readonly [red: number, green: number, blue: number, strength: number];

/** Grain as stretched turbulence, tinted by a colour matrix; drawn over the whole bench. */
const grain = (frequency: string, seed: number, [r, g, b, strength]: Tint): string =>
  tag(
    "filter",
    { id: "grain", x: 0, y: 0, width: "100%", height: "100%" },
    tag("feTurbulence", { type: "fractalNoise", baseFrequency: frequency, numOctaves: 2, seed }),
    tag("feColorMatrix", {
      type: "matrix",
      values: `0 0 0 0 ${r} 0 0 0 0 ${g} 0 0 0 0 ${b} ${strength} 0 0 0 ${-strength * 0.32}`,
    }),
  );

const GRAINED = rect([0, 0, BENCH_WIDTH, BENCH_HEIGHT], "#000", { filter: "url(#grain)" });
const sheet = (fill: string): string => rect([0, 0, BENCH_WIDTH, BENCH_HEIGHT], fill);

function planks(base: string, draw: Chance): string {
  const width = draw.whole(170, 260);
  const joints = Array.from({ length: Math.ceil(BENCH_HEIGHT / width) }, (_, place) => {
    const y = place * width + draw.whole(-14, 14);
    const shade = rect([0, y, BENCH_WIDTH, width], draw.pick(["#000", "#fff"]), {
      "fill-opacity": draw.between(0.02, 0.09),
    });
    return shade + stroke(`M0 ${y}H${BENCH_WIDTH}`, ["#2d1e10", 3], { "stroke-opacity": 0.65 });
  });
  const stains = Array.from({ length: 5 }, () =>
    ellipse(
      [draw.whole(0, BENCH_WIDTH), draw.whole(0, BENCH_HEIGHT), draw.whole(60, 190), draw.whole(40, 120)],
      "url(#stain)",
      { opacity: 0.3 },
    ),
  );
  const defs = grain("0.004 0.11", draw.whole(1, 9999), [0.2, 0.12, 0.06, 1.5]) + haze("stain", "#2a1a0c");
  return tag("defs", {}, defs) + sheet(base) + GRAINED + joints.join("") + stains.join("");
}

function steel(edge: string, draw: Chance): string {
  const scratches = Array.from({ length: 26 }, () => {
    const from = `M${draw.whole(0, BENCH_WIDTH)} ${draw.whole(0, BENCH_HEIGHT)}`;
    return stroke(
      `${from}l${draw.whole(-220, 220)} ${draw.whole(-60, 60)}`,
      [draw.pick(["#e9eef0", "#5b646a"]), 1.2],
      { "stroke-opacity": 0.4 },
    );
  });
  const defs =
    grain("0.9 0.006", draw.whole(1, 9999), [0.1, 0.11, 0.12, 0.9]) +
    linear("sheet", [0, 0, 1, 1], [0, "#9aa2a8"], [0.5, "#b9c0c4"], [1, edge]);
  return tag("defs", {}, defs) + sheet("url(#sheet)") + GRAINED + scratches.join("");
}

function mat(base: string, draw: Chance): string {
  const step = draw.whole(54, 70);
  const rule = (d: string, place: number): string =>
    stroke(d, ["#c9d6d0", place % 5 === 0 ? 2.4 : 1], { "stroke-opacity": 0.22 });
  const upright = Array.from({ length: Math.ceil(BENCH_WIDTH / step) }, (_, place) =>
    rule(`M${place * step} 0V${BENCH_HEIGHT}`, place),
  );
  const across = Array.from({ length: Math.ceil(BENCH_HEIGHT / step) }, (_, place) =>
    rule(`M0 ${place * step}H${BENCH_WIDTH}`, place),
  );
  return (
    tag("defs", {}, grain("0.05 0.05", draw.whole(1, 9999), [0.05, 0.06, 0.05, 0.8])) +
    sheet(base) +
    upright.join("") +
    across.join("") +
    GRAINED
  );
}

function cardboard(base: string, draw: Chance): string {
  const fold = draw.whole(300, 1100);
  const crease = stroke(`M${fold} 0L${fold + draw.whole(-40, 40)} ${BENCH_HEIGHT}`, ["#6d5233", 4], {
    "stroke-opacity": 0.4,
  });
  return (
    tag("defs", {}, grain("0.35 0.02", draw.whole(1, 9999), [0.3, 0.2, 0.1, 0.8])) +
    sheet(base) +
    GRAINED +
    crease
  );
}

const BENCHES: readonly (readonly [draw: (colour: string, chance: Chance) => string, colour: string])[] = [
  [planks, "#a9814f"],
  [planks, "#8f6a42"],
  [steel, "#7d868d"],
  [mat, "#2f5d50"],
  [mat, "#2c4a6b"],
  [cardboard, "#b7935f"],
];

/** The benches of the story as SVG, drawn once at half size: each is larger than a photo by the margin. */
export const benchSvgs = (): string[] =>
  BENCHES.map(([drawn, colour], place) => {
    const size = `width="${BENCH_WIDTH / 2}" height="${BENCH_HEIGHT / 2}" viewBox="0 0 ${BENCH_WIDTH} ${BENCH_HEIGHT}"`;
    return `<svg xmlns="http://www.w3.org/2000/svg" ${size}>${drawn(colour, chanceFrom(`bench/${place}`))}</svg>`;
  });

/** One lamp from a side, the rest of the room darker; laid over everything. */
export function light(draw: Chance): { readonly defs: string; readonly body: string } {
  const [x, y] = [draw.between(0.1, 0.9), draw.between(-0.1, 0.5)];
  const warm = draw.pick(["#fff1d6", "#fdf7ea", "#eaf2ff"]);
  const defs =
    radial("lamp", [x, y, 0.85], [0, warm, draw.between(0.3, 0.5)], [0.45, warm, 0.08], [1, warm, 0]) +
    radial(
      "room",
      [x, y + 0.15, 1.05],
      [0, "#05070a", 0],
      [0.5, "#05070a", 0.1],
      [1, "#05070a", draw.between(0.5, 0.72)],
    );
  return {
    defs,
    body: rect([0, 0, WIDTH, HEIGHT], "url(#lamp)") + rect([0, 0, WIDTH, HEIGHT], "url(#room)"),
  };
}
