import type { Chance } from "../../random";
import { dotText, meterDigits } from "./glyphs";
import { circle, group, linear, rect, softShadow, stroke } from "./svg";

/** A hand meter around (0, 0), 300 wide and 520 high, its display showing a value and its unit. */
export function meter(value: string, unit: string, draw: Chance): { defs: string; body: string } {
  const shell = draw.pick(["#c8a018", "#b5402a", "#3f4650"]);
  const ticks = Array.from({ length: 12 }, (_, place) => {
    const angle = (place * Math.PI) / 6;
    const [x, y] = [Math.cos(angle), Math.sin(angle)];
    return stroke(
      `M${(x * 88).toFixed(1)} ${(90 + y * 88).toFixed(1)}L${(x * 100).toFixed(1)} ${(90 + y * 100).toFixed(1)}`,
      ["#e9e6dc", 3],
    );
  });
  const height = Math.min(92, 400 / Math.max(4, value.length));
  return {
    defs: linear("glass", [0, 0, 0.4, 1], [0, "#c3cdb8"], [1, "#93a088"]),
    body: [
      softShadow(rect([-146, -252, 300, 524], "#000", { rx: 30 })),
      rect([-150, -260, 300, 520], shell, { rx: 30 }),
      rect([-130, -240, 260, 480], "#24272b", { rx: 20 }),
      rect([-112, -218, 224, 150], "url(#glass)", { rx: 8 }),
      meterDigits(value, { x: -98, y: -190, height: height, fill: "#1b211a" }),
      dotText(unit, { x: 46, y: -92, dot: 2.4, fill: "#1b211a" }),
      circle([0, 90, 76], "#15171a"),
      circle([0, 90, 70], "#33383d"),
      group(`rotate(${draw.whole(0, 11) * 30} 0 90)`, rect([-7, 26, 14, 64], "#e9e6dc", { rx: 5 })),
      ...ticks,
      circle([-70, 214, 15], "#0c0d0e"),
      circle([0, 214, 15], "#0c0d0e"),
      circle([70, 214, 15], "#8f1d16"),
      stroke(`M0 214C-40 ${draw.whole(300, 340)} -160 ${draw.whole(280, 360)} -330 ${draw.whole(160, 330)}`, [
        "#101214",
        13,
      ]),
      stroke(`M70 214C60 ${draw.whole(310, 360)} -140 ${draw.whole(320, 400)} -330 ${draw.whole(240, 380)}`, [
        "#8f1d16",
        13,
      ]),
      rect([-108, -214, 216, 40], "#fff", { "fill-opacity": 0.12, rx: 8 }),
    ].join(""),
  };
}

const SCREWDRIVER = (colour: string): string =>
  rect([-210, -20, 170, 40], colour, { rx: 16 }) +
  rect([-200, -14, 150, 10], "#fff", { "fill-opacity": 0.3, rx: 5 }) +
  rect([-42, -7, 230, 14], "#b9c0c4") +
  rect([180, -9, 24, 18], "#8d9499");

const FEELER = (): string =>
  Array.from({ length: 4 }, (_, leaf) =>
    group(
      `rotate(${-14 + leaf * 11})`,
      rect([0, -12, 260, 24], "#b4bcc1", { rx: 12, stroke: "#6f767b", "stroke-width": 1.5 }),
    ),
  ).join("") + circle([6, 0, 16], "#52585d");

const WASHERS = (draw: Chance): string =>
  Array.from({ length: draw.whole(3, 6) }, () => {
    const [x, y, r] = [draw.whole(-70, 70), draw.whole(-60, 60), draw.whole(12, 20)];
    return (
      circle([x, y, r], "#8d9499") + circle([x, y, r * 0.86], "#bcc4c9") + circle([x, y, r * 0.42], "#2a241f")
    );
  }).join("");

/** Something that happens to lie in a corner of the bench. */
export function clutter(draw: Chance): string {
  const corner = draw.pick([
    [170, 130],
    [1030, 120],
    [150, 780],
    [1060, 790],
  ] as const);
  const thing = draw.pick([
    SCREWDRIVER(draw.pick(["#b3261e", "#1f5d8c", "#d08a1d", "#2f6b3a"])),
    FEELER(),
    WASHERS(draw),
  ]);
  return group(
    `translate(${corner[0]} ${corner[1]}) rotate(${draw.whole(0, 359)}) scale(${draw.between(0.7, 1.1).toFixed(2)})`,
    thing,
  );
}
