import { rect } from "./svg";

// A dot-matrix face, as serials are printed and pecked: five columns a letter, lowest bit at the top. Drawn as shapes,
// because a machine without fonts would print nothing.
const COLUMNS: Readonly<Record<string, string>> = {
  "0": "3e5149453e",
  "1": "00427f4000",
  "2": "7249494946",
  "3": "2141494d33",
  "4": "1814127f10",
  "5": "2745454539",
  "6": "3c4a494931",
  "7": "4121110907",
  "8": "3649494936",
  "9": "464949291e",
  A: "7c1211127c",
  B: "7f49494936",
  C: "3e41414122",
  D: "7f4141413e",
  E: "7f49494941",
  F: "7f09090901",
  G: "3e41415173",
  H: "7f0808087f",
  I: "00417f4100",
  J: "2040413f01",
  K: "7f08142241",
  L: "7f40404040",
  M: "7f021c027f",
  N: "7f0408107f",
  O: "3e4141413e",
  P: "7f09090906",
  Q: "3e4151215e",
  R: "7f09192946",
  S: "2649494932",
  T: "03017f0103",
  U: "3f4040403f",
  V: "1f2040201f",
  W: "3f4038403f",
  X: "6314081463",
  Y: "0304780403",
  Z: "6159494d43",
  "-": "0808080808",
  ".": "0000606000",
  ",": "0050300000",
  ":": "0036360000",
  "/": "2010080402",
  "%": "2313086462",
  "+": "08083e0808",
  "°": "0006090906",
};

const ADVANCE = 6;
const ROWS = 7;

/** Where a text in the dot-matrix face begins, the side of one dot, and its ink. */
export type DotStyle = {
  readonly x: number;
  readonly y: number;
  readonly dot: number;
  readonly fill: string;
};

const GAP = 0.06;

/** A text in the dot-matrix face as one path; a letter is 5 dots wide and 7 high. */
export function dotText(text: string, style: DotStyle): string {
  const parts = [...text.toUpperCase()].flatMap((letter, place) =>
    letterPath(letter, { ...style, x: style.x + place * ADVANCE * style.dot }),
  );
  return `<path d="${parts.join("")}" fill="${style.fill}"/>`;
}

function letterPath(letter: string, { x, y, dot }: DotStyle): string[] {
  const columns = COLUMNS[letter] ?? "";
  const size = (dot * (1 - GAP)).toFixed(1);
  const out: string[] = [];
  for (let column = 0; column * 2 < columns.length; column += 1) {
    const bits = Number.parseInt(columns.slice(column * 2, column * 2 + 2), 16);
    for (let row = 0; row < ROWS; row += 1) {
      if ((bits & (1 << row)) === 0) continue;
      out.push(`M${(x + column * dot).toFixed(1)} ${(y + row * dot).toFixed(1)}h${size}v${size}h-${size}z`);
    }
  }
  return out;
}

// Which of the seven bars of a meter's figure are lit: top, upper right, lower right, bottom, lower left, upper left, middle.
const BARS: Readonly<Record<string, string>> = {
  "0": "1111110",
  "1": "0110000",
  "2": "1101101",
  "3": "1111001",
  "4": "0110011",
  "5": "1011011",
  "6": "1011111",
  "7": "1110000",
  "8": "1111111",
  "9": "1111011",
  O: "1111110",
  L: "0001110",
  "-": "0000001",
};

export type MeterStyle = {
  readonly x: number;
  readonly y: number;
  readonly height: number;
  readonly fill: string;
};

/** A number on a meter's display: figures of the given height, decimal point drawn after the figure before it. */
export function meterDigits(text: string, style: MeterStyle): string {
  const [width, thick] = [style.height * 0.52, style.height * 0.1];
  let x = style.x;
  const out: string[] = [];
  for (const letter of text) {
    if (letter === "." || letter === ",") {
      out.push(rect([x - width * 0.3, style.y + style.height - thick, thick, thick], style.fill));
      continue;
    }
    out.push(...litBars(BARS[letter] ?? "", { ...style, x }));
    x += width * 1.45;
  }
  return out.join("");
}

function litBars(lit: string, { x, y, height, fill }: MeterStyle): string[] {
  const [width, thick, half] = [height * 0.52, height * 0.1, height / 2];
  const bar = half - thick * 1.5;
  const bars: readonly (readonly [number, number, number, number])[] = [
    [thick, 0, width - 2 * thick, thick],
    [width - thick, thick, thick, bar],
    [width - thick, half + thick / 2, thick, bar],
    [thick, height - thick, width - 2 * thick, thick],
    [0, half + thick / 2, thick, bar],
    [0, thick, thick, bar],
    [thick, half - thick / 2, width - 2 * thick, thick],
  ];
  return bars
    .filter((_, place) => lit[place] === "1")
    .map(([dx, dy, w, h]) => rect([x + dx, y + dy, w, h], fill, { rx: thick / 3 }));
}
