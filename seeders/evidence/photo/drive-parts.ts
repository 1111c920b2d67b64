import type { Chance } from "../../random";
import { circle, ellipse, group, haze, linear, radial, rect, stroke } from "./svg";

/** A thing on the bench, drawn around (0, 0) at about 300 units half width. `outline` is its shadow. */
export type Thing = { readonly defs: string; readonly body: string; readonly outline: string };

const polar = (radius: number, degrees: number): readonly [number, number] => [
  radius * Math.cos((degrees * Math.PI) / 180),
  radius * Math.sin((degrees * Math.PI) / 180),
];

const screw = ([x, y]: readonly [number, number], r: number, turn: number): string =>
  circle([x, y, r], "#6f767b") +
  circle([x, y, r * 0.84], "url(#bright)") +
  group(
    `translate(${x.toFixed(1)} ${y.toFixed(1)}) rotate(${turn})`,
    rect([-r * 0.7, -r * 0.14, r * 1.4, r * 0.28], "#3a3f43"),
    rect([-r * 0.14, -r * 0.7, r * 0.28, r * 1.4], "#3a3f43"),
  );

const brightMetal = radial("bright", [0.35, 0.3, 0.9], [0, "#f3f5f6"], [0.5, "#a7aeb3"], [1, "#5c6368"]);

const lead = (d: string, colour: string): string =>
  stroke(d, ["#15171a", 17], { "stroke-opacity": 0.5 }) +
  stroke(d, [colour, 13]) +
  stroke(d, ["#fff", 3], { "stroke-opacity": 0.28 });

/** The brake as taken off: magnet body, friction face, hub, two leads, and the hand release where it has one. */
export function brake(draw: Chance, hot: boolean): Thing {
  const body = draw.pick(["#33373b", "#41454a", "#4a4038"]);
  const streaks = Array.from({ length: 26 }, () => {
    const [from, span, radius] = [draw.between(0, 360), draw.between(8, 70), draw.between(128, 190)];
    const [x1, y1] = polar(radius, from);
    const [x2, y2] = polar(radius, from + span);
    return stroke(
      `M${x1.toFixed(1)} ${y1.toFixed(1)}A${radius.toFixed(1)} ${radius.toFixed(1)} 0 0 1 ${x2.toFixed(1)} ${y2.toFixed(1)}`,
      [draw.pick(["#1d1712", "#6d5c49"]), draw.between(1, 4)],
      { "stroke-opacity": 0.5 },
    );
  });
  const burn = hot
    ? circle([0, 0, 172], "none", { stroke: "#4b2a55", "stroke-width": 34, "stroke-opacity": 0.3 }) +
      circle([0, 0, 196], "none", { stroke: "#8a4b16", "stroke-width": 16, "stroke-opacity": 0.4 })
    : "";
  const screws = [30, 150, 270].map((at) => {
    const [x, y] = polar(228, at + draw.whole(-3, 3));
    return screw([x, y], 19, draw.whole(0, 90));
  });
  const sag = draw.whole(40, 130);
  const leads =
    lead(`M150 190C220 ${260 + sag} 330 ${200 + sag} 470 ${270 + sag}`, "#b3261e") +
    lead(`M120 208C180 ${300 + sag} 300 ${260 + sag} 440 ${330 + sag}`, draw.pick(["#1f2a44", "#2b2b2b"]));
  const release = draw.happens(0.5)
    ? group(
        `rotate(${draw.whole(-70, -20)})`,
        rect([-18, -330, 36, 150], "#c9a227", { rx: 14 }),
        rect([-8, -322, 10, 130], "#fff", { "fill-opacity": 0.25 }),
      )
    : "";
  return {
    defs:
      brightMetal +
      radial("magnet", [0.36, 0.3, 0.85], [0, "#8d9297"], [0.35, body], [1, "#0f1113"]) +
      radial("lining", [0.4, 0.35, 0.8], [0, "#8b765d"], [0.6, "#5f4e3c"], [1, "#3a2f25"]),
    outline: circle([0, 0, 268], "#000"),
    body: [
      leads,
      release,
      circle([0, 0, 264], "url(#magnet)"),
      circle([0, 0, 264], "none", { stroke: "#c6cbd0", "stroke-width": 3, "stroke-opacity": 0.5 }),
      circle([0, 0, 204], "url(#lining)"),
      ...streaks,
      burn,
      circle([0, 0, 112], "#24272a"),
      circle([0, 0, 106], "url(#bright)"),
      group(`rotate(${draw.whole(0, 90)})`, rect([-44, -44, 88, 88], "#101214", { rx: 6 })),
      ...screws,
    ].join(""),
  };
}

/** A drive motor lying on its side, brush caps towards the camera. */
export function motor(draw: Chance): Thing {
  const paint = draw.pick([
    ["#4b5157", "#2a2e32"],
    ["#1f2226", "#0e1012"],
    ["#6b7075", "#3b4045"],
  ] as const);
  const caps = [-40, 70].map(
    (y) =>
      circle([-168, y, 30], "#191b1d") +
      circle([-168, y, 22], "#33363a") +
      rect([-190, y - 4, 44, 8], "#0c0d0e"),
  );
  const fins = Array.from({ length: 5 }, (_, place) =>
    rect([-110 + place * 62, -128, 6, 256], "#000", { "fill-opacity": 0.3 }),
  );
  return {
    defs:
      brightMetal +
      linear("can", [0, 0, 0, 1], [0, paint[1]], [0.22, "#b9c0c5"], [0.42, paint[0]], [1, "#060708"]) +
      linear("cap", [0, 0, 0, 1], [0, "#5b6166"], [0.25, "#dfe3e6"], [0.6, "#8c9398"], [1, "#34393d"]),
    outline: rect([-250, -132, 500, 264], "#000", { rx: 40 }),
    body: [
      lead(
        `M-230 60C-330 ${draw.whole(60, 150)} -330 ${draw.whole(170, 260)} -470 ${draw.whole(180, 300)}`,
        "#b3261e",
      ),
      lead(
        `M-230 84C-310 ${draw.whole(100, 170)} -300 ${draw.whole(220, 300)} -430 ${draw.whole(260, 360)}`,
        "#22252a",
      ),
      rect([242, -26, 120, 52], "url(#cap)", { rx: 6 }),
      rect([292, -34, 60, 14], "#3a3f43"),
      rect([-140, -130, 340, 260], "url(#can)", { rx: 18 }),
      ...fins,
      rect([-236, -118, 110, 236], "url(#cap)", { rx: 26 }),
      rect([190, -112, 66, 224], "url(#cap)", { rx: 16 }),
      ...caps,
      screw([222, -80], 13, draw.whole(0, 90)),
      screw([222, 80], 13, draw.whole(0, 90)),
    ].join(""),
  };
}

/** A right-angle drive gearbox: cast housing, flange with bolts, output shaft with its keyway. */
export function gearbox(draw: Chance, keyOut: boolean): Thing {
  const bolts = [0, 60, 120, 180, 240, 300].map((at) => {
    const [x, y] = polar(146, at + 12);
    return screw([-90 + x, y], 15, draw.whole(0, 90));
  });
  const oil = draw.happens(0.5) ? ellipse([60, 150, 110, 40], "url(#oil)") : "";
  const key = keyOut
    ? group(
        `translate(300 ${draw.whole(96, 130)}) rotate(${draw.whole(8, 40)})`,
        rect([-42, -11, 84, 22], "url(#bright)", { rx: 4 }),
      )
    : rect([206, -16, 92, 10], "#6e757a");
  return {
    defs:
      brightMetal +
      haze("oil", "#1a1206") +
      linear("cast", [0, 0, 1, 1], [0, "#d3d7da"], [0.45, "#8f969b"], [1, "#474d52"]) +
      linear("shaft", [0, 0, 0, 1], [0, "#52585c"], [0.3, "#f0f2f3"], [1, "#3f4549"]),
    outline: circle([-90, 0, 190], "#000") + rect([-60, -110, 340, 220], "#000", { rx: 30 }),
    body: [
      rect([-40, -104, 240, 208], "url(#cast)", { rx: 34 }),
      rect([190, -46, 190, 92], "url(#shaft)", { rx: 8 }),
      rect([206, -16, 96, 18], "#23272a", { rx: 4 }),
      key,
      circle([-90, 0, 184], "url(#cast)"),
      circle([-90, 0, 184], "none", { stroke: "#eef1f2", "stroke-width": 3, "stroke-opacity": 0.6 }),
      ...bolts,
      circle([-90, 0, 84], "#2c3135"),
      circle([-90, 0, 78], "url(#bright)"),
      circle([-90, 0, 34], "#121416"),
      oil,
    ].join(""),
  };
}
