import type { Chance } from "../../random";
import type { Thing } from "./drive-parts";
import { circle, group, haze, linear, radial, rect, stroke } from "./svg";

const cable = (d: string, width = 16): string =>
  stroke(d, ["#0c0d0f", width + 4], { "stroke-opacity": 0.5 }) +
  stroke(d, ["#1d2024", width]) +
  stroke(d, ["#fff", 3], { "stroke-opacity": 0.2 });

/** A battery block from above: case, lid ribs, two terminals, a strap. */
export function battery(draw: Chance, swollen: boolean): Thing {
  const lid = draw.pick([
    ["#3d4247", "#17191c"],
    ["#5a6066", "#2b2f33"],
    ["#2f3a46", "#12171d"],
  ] as const);
  const bulge = swollen ? stroke("M-300 -170Q-336 0 -300 190", ["#000", 26], { "stroke-opacity": 0.5 }) : "";
  const ribs = Array.from({ length: 6 }, (_, place) =>
    rect([-250 + place * 86, 70, 58, 96], "#000", { "fill-opacity": 0.2, rx: 8 }),
  );
  const post = (x: number, colour: string) =>
    circle([x, -110, 46], colour) +
    circle([x, -110, 30], "url(#lead)") +
    circle([x - 8, -118, 8], "#fff", { "fill-opacity": 0.7 });
  const furred = draw.happens(0.3) ? circle([206, -82, 38], "url(#furred)") : "";
  return {
    defs:
      haze("furred", "#cfe6d8") +
      linear("lid", [0, 0, 0.7, 1], [0, lid[0]], [1, lid[1]]) +
      radial("lead", [0.35, 0.3, 0.9], [0, "#eceff1"], [1, "#777f85"]),
    outline: rect([-318, -206, 636, 428], "#000", { rx: 26 }),
    body: [
      rect([-310, -200, 620, 416], "url(#lid)", { rx: 22 }),
      rect([-298, -188, 596, 392], "none", {
        rx: 16,
        stroke: "#fff",
        "stroke-width": 3,
        "stroke-opacity": 0.16,
      }),
      bulge,
      ...ribs,
      post(-206, "#8f1d16"),
      post(206, "#141618"),
      furred,
      stroke(`M-120 -150C-40 ${draw.whole(-190, -150)} 60 ${draw.whole(-190, -150)} 130 -150`, [
        "#0a0b0c",
        22,
      ]),
    ].join(""),
  };
}

/** A charger: plastic case with air slots, a lamp, mains lead and output plug. */
export function charger(draw: Chance, lamp: "red" | "green" | "off"): Thing {
  const shell = draw.pick([
    ["#2b2e33", "#0f1113"],
    ["#d9d6cc", "#a8a498"],
    ["#3a4a5c", "#1c2530"],
  ] as const);
  const slots = Array.from({ length: 9 }, (_, place) =>
    rect([60 + place * 24, -96, 10, 192], "#050607", { rx: 5 }),
  );
  const glow = lamp === "off" ? "#3b3f43" : lamp === "red" ? "#ff3b2e" : "#39d353";
  return {
    defs: haze("glow", glow) + linear("shell", [0, 0, 0.6, 1], [0, shell[0]], [1, shell[1]]),
    outline: rect([-300, -160, 600, 320], "#000", { rx: 34 }),
    body: [
      cable(`M-290 40C-400 ${draw.whole(0, 90)} -380 ${draw.whole(200, 280)} -560 ${draw.whole(180, 330)}`),
      cable(`M290 -30C390 ${draw.whole(-90, 20)} 420 ${draw.whole(100, 220)} 560 ${draw.whole(60, 240)}`),
      rect([-296, -156, 592, 312], "url(#shell)", { rx: 32 }),
      rect([-284, -146, 568, 40], "#fff", { rx: 20, "fill-opacity": 0.12 }),
      ...slots,
      circle([-238, 104, 44], "url(#glow)", { opacity: lamp === "off" ? 0 : 0.6 }),
      circle([-238, 104, 13], glow),
    ].join(""),
  };
}

/** A controller: finned aluminium with a row of sockets. */
export function controller(draw: Chance, burnt: boolean): Thing {
  const fins = Array.from({ length: 13 }, (_, place) =>
    rect([-290 + place * 46, -170, 24, 230], "url(#fin)"),
  );
  const sockets = [-240, -110, 20, 150].map((x, place) => {
    const pins = Array.from({ length: 4 }, (_, pin) =>
      rect(
        [x + 12 + (pin % 2) * 38, 104 + Math.floor(pin / 2) * 36, 18, 18],
        burnt && place === 2 && pin === 1 ? "#000" : "#c9a24a",
        { rx: 3 },
      ),
    );
    return (
      rect([x, 90, 98, 86], "#e7e2d4", { rx: 8 }) +
      rect([x + 5, 95, 88, 76], "#2a2c2e", { rx: 5 }) +
      pins.join("")
    );
  });
  const soot = burnt ? circle([86, 132, 96], "url(#soot)") : "";
  const water = draw.happens(0.25)
    ? stroke("M-280 178C-200 150 -160 196 -90 178", ["#e8f1f0", 6], { "stroke-opacity": 0.5 })
    : "";
  return {
    defs:
      haze("soot", "#000") +
      linear("fin", [0, 0, 1, 0], [0, "#e2e6e8"], [0.4, "#a3abb0"], [1, "#4d5459"]) +
      linear("box", [0, 0, 0, 1], [0, "#7f878c"], [1, "#343a3e"]),
    outline: rect([-316, -186, 632, 386], "#000", { rx: 18 }),
    body:
      rect([-310, -180, 620, 376], "url(#box)", { rx: 14 }) + fins.join("") + sockets.join("") + soot + water,
  };
}

/** A throttle: lever on its pivot, the sensor housing and a thin lead with a plug. */
export function throttle(draw: Chance): Thing {
  const swing = draw.whole(-22, 16);
  return {
    defs:
      linear("arm", [0, 0, 0, 1], [0, "#3c4045"], [0.3, "#7b8187"], [1, "#15171a"]) +
      radial("knob", [0.35, 0.3, 0.85], [0, "#6a7076"], [0.5, "#24272b"], [1, "#08090a"]),
    outline: rect([-150, -110, 300, 220], "#000", { rx: 40 }) + rect([90, -40, 300, 80], "#000", { rx: 36 }),
    body: [
      cable(
        `M-140 60C-240 ${draw.whole(60, 140)} -260 ${draw.whole(160, 260)} -440 ${draw.whole(120, 300)}`,
        10,
      ),
      rect([-480, draw.whole(190, 230), 70, 54], "#efeae0", { rx: 6 }),
      rect([-146, -106, 292, 212], "url(#knob)", { rx: 36 }),
      circle([0, 0, 70], "#9aa1a6"),
      group(`rotate(${swing})`, rect([-20, -34, 410, 68], "url(#arm)", { rx: 34 })),
      circle([0, 0, 34], "#d6dade"),
      circle([0, 0, 12], "#23272a"),
    ].join(""),
  };
}
