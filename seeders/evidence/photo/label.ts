import type { Chance } from "../../random";
import { dotText } from "./glyphs";
import { rect, stroke, tag } from "./svg";

export type LabelText = {
  readonly maker: string;
  readonly partNumber: string;
  readonly rating: string;
  readonly serial: string;
  readonly batch: string;
};

const WIDTH = 520;
const HEIGHT = 260;

/** A sticker of 520 by 260 around (0, 0): maker, part, rating, serial, batch, a matrix code, and the wear of the years. */
export function label(text: LabelText, draw: Chance): string {
  const paper = draw.pick(["#f2efe6", "#e9e9e4", "#f5f3ee", "#d9dcd8"]);
  const ink = draw.pick(["#14161a", "#1d2430", "#2a241f"]);
  const serialDot = Math.min(5.4, 490 / (text.serial.length * 6));
  const [left, top] = [-WIDTH / 2, -HEIGHT / 2];
  return [
    rect([left, top, WIDTH, HEIGHT], paper, { rx: 10 }),
    rect([left + 5, top + 5, WIDTH - 10, HEIGHT - 10], "none", {
      rx: 7,
      stroke: ink,
      "stroke-width": 2,
      "stroke-opacity": 0.55,
    }),
    dotText(text.maker, { x: left + 20, y: top + 20, dot: 4.6, fill: ink }),
    dotText(`PN ${text.partNumber}`, { x: left + 20, y: top + 72, dot: 3.6, fill: ink }),
    dotText(text.rating, {
      x: left + 20,
      y: top + 112,
      dot: Math.min(2.8, 350 / (text.rating.length * 6)),
      fill: ink,
    }),
    dotText("SERIAL", { x: left + 20, y: top + 150, dot: 1.9, fill: ink }),
    dotText(text.serial, { x: left + 20, y: top + 170, dot: serialDot, fill: ink }),
    dotText(`BATCH ${text.batch}`, { x: left + 20, y: top + 224, dot: 2.6, fill: ink }),
    matrixCode([left + WIDTH - 128, top + 22, 108], ink, draw),
    wear(draw),
  ].join("");
}

/** Something that looks like a matrix code: a solid L, a dashed edge, cells by chance. It is not meant to be read. */
function matrixCode([x, y, side]: readonly [number, number, number], ink: string, draw: Chance): string {
  const cells = 16;
  const cell = side / cells;
  const parts: string[] = [];
  for (let row = 0; row < cells; row += 1) {
    for (let column = 0; column < cells; column += 1) {
      const edge = column === 0 || row === cells - 1;
      const dashed = row === 0 ? column % 2 === 0 : column === cells - 1 && row % 2 === 1;
      const filled = edge || dashed || (row > 0 && column < cells - 1 && draw.happens(0.48));
      if (filled)
        parts.push(
          `M${(x + column * cell).toFixed(1)} ${(y + row * cell).toFixed(1)}h${cell.toFixed(1)}v${cell.toFixed(1)}h-${cell.toFixed(1)}z`,
        );
    }
  }
  return tag("path", { d: parts.join(""), fill: ink });
}

function wear(draw: Chance): string {
  const scratches = Array.from({ length: draw.whole(2, 7) }, () => {
    const [x, y] = [draw.whole(-240, 240), draw.whole(-110, 110)];
    return stroke(
      `M${x} ${y}l${draw.whole(-70, 70)} ${draw.whole(-24, 24)}`,
      [draw.pick(["#fff", "#5a5348"]), draw.between(0.8, 2)],
      { "stroke-opacity": 0.6 },
    );
  });
  const [x, y] = [draw.whole(-200, 200), draw.whole(-90, 90)];
  const smear = tag("ellipse", {
    cx: x,
    cy: y,
    rx: draw.whole(40, 120),
    ry: draw.whole(14, 40),
    fill: "url(#smear)",
    opacity: draw.between(0.15, 0.32),
    transform: `rotate(${draw.whole(-30, 30)})`,
  });
  return smear + scratches.join("");
}
