import type { FamilyCode } from "@/lib/parts/families";
import { chanceFrom, type Chance } from "../../random";
import { HEIGHT, light, WIDTH } from "./bench";
import { brake, gearbox, motor, type Thing } from "./drive-parts";
import { battery, charger, controller, throttle } from "./electric-parts";
import { label, type LabelText } from "./label";
import { group, haze, softShadow, tag } from "./svg";
import { clutter, meter } from "./tools";

/** How the camera looks at the part: at its label, at the whole, close at the place of the fault, or with a meter on it. */
export type View = "label" | "part" | "close" | "meter";

export type PhotoScene = {
  /** Names this photo among all; everything left to chance in it follows from this. */
  readonly key: string;
  readonly family: FamilyCode;
  readonly view: View;
  readonly label: LabelText;
  /** What the meter shows. */
  readonly reading: { readonly value: string; readonly unit: string } | null;
  /** Whether the damage of the story can be seen. */
  readonly marked: boolean;
  /** A small photo is two fifths as wide and high, and takes a fifth of the time. */
  readonly size: "full" | "small";
};

/** Pixels of a photo. */
export const pixelsOf = ({ size }: Pick<PhotoScene, "size">): { width: number; height: number } =>
  size === "full" ? { width: WIDTH, height: HEIGHT } : { width: WIDTH * 0.4, height: HEIGHT * 0.4 };

const THINGS: Readonly<Record<FamilyCode, (draw: Chance, marked: boolean) => Thing>> = {
  brake,
  motor,
  gearbox,
  battery,
  charger: (draw, marked) => charger(draw, marked ? "off" : draw.pick(["red", "green"])),
  controller,
  throttle,
};

type Framing = { readonly x: number; readonly y: number; readonly turn: number; readonly scale: number };

const framingOf = (view: View, draw: Chance): Framing => {
  const turn = draw.between(-16, 16);
  if (view === "label")
    return {
      x: 600 + draw.whole(-60, 60),
      y: 450 + draw.whole(-40, 40),
      turn: turn * 0.7,
      scale: draw.between(1.75, 2.1),
    };
  if (view === "close")
    return {
      x: 600 + draw.whole(-130, 130),
      y: 460 + draw.whole(-90, 90),
      turn: turn * 2,
      scale: draw.between(1.45, 1.8),
    };
  if (view === "meter")
    return {
      x: 390 + draw.whole(-30, 30),
      y: 450 + draw.whole(-60, 60),
      turn,
      scale: draw.between(0.95, 1.15),
    };
  return {
    x: 600 + draw.whole(-90, 90),
    y: 450 + draw.whole(-60, 60),
    turn: turn * 1.6,
    scale: draw.between(1.05, 1.3),
  };
};

// Where a part carries its label, and how large beside itself.
const STICKER: Readonly<Record<FamilyCode, Framing>> = {
  brake: { x: 0, y: 0, turn: 0, scale: 0 },
  motor: { x: 34, y: -14, turn: 0, scale: 0.5 },
  gearbox: { x: 82, y: -42, turn: 0, scale: 0.26 },
  battery: { x: 0, y: -20, turn: 0, scale: 0.48 },
  charger: { x: -120, y: -6, turn: 0, scale: 0.58 },
  controller: { x: -30, y: -60, turn: 0, scale: 0.42 },
  throttle: { x: 0, y: -72, turn: 0, scale: 0 },
};

const placed = ({ x, y, turn, scale }: Framing, body: string): string =>
  group(
    `translate(${x.toFixed(1)} ${y.toFixed(1)}) rotate(${turn.toFixed(2)}) scale(${scale.toFixed(3)})`,
    body,
  );

const shadowOf = (thing: Thing, framing: Framing, draw: Chance): string =>
  placed(
    { ...framing, x: framing.x + draw.whole(8, 26), y: framing.y + draw.whole(14, 30) },
    softShadow(thing.outline),
  );

const SCALE = 0.75;

/** What stands on the bench as SVG, drawn at three quarters of its pixels: part, label or meter, and light. */
export function sceneSvg(scene: PhotoScene): string {
  const draw = chanceFrom(`photo/${scene.key}`);
  const thing = THINGS[scene.family](draw.fork("thing"), scene.marked);
  const framing = framingOf(scene.view, draw);
  const lamp = light(draw.fork("light"));
  const shown =
    scene.view === "meter" && scene.reading
      ? meter(scene.reading.value, scene.reading.unit, draw.fork("meter"))
      : null;
  const meterAt: Framing = {
    x: 925 + draw.whole(-20, 20),
    y: 440 + draw.whole(-30, 30),
    turn: draw.between(-9, 9),
    scale: draw.between(1.1, 1.22),
  };
  const body = [
    scene.view === "label" ? "" : clutter(draw.fork("clutter")),
    shadowOf(thing, framing, draw),
    placed(framing, thing.body + stickerOn(scene, draw)),
    scene.view === "label" ? labelUpClose(scene, framing, draw) : "",
    shown ? placed(meterAt, shown.body) : "",
    lamp.body,
  ];
  const defs = tag("defs", {}, haze("smear", "#2b2118"), thing.defs, shown?.defs ?? "", lamp.defs);
  const { width, height } = pixelsOf(scene);
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${width * SCALE}" height="${height * SCALE}" viewBox="0 0 ${WIDTH} ${HEIGHT}">${defs}${body.join("")}</svg>`;
}

function stickerOn(scene: PhotoScene, draw: Chance): string {
  const at = STICKER[scene.family];
  return scene.view === "label" || at.scale === 0 ? "" : placed(at, label(scene.label, draw.fork("label")));
}

function labelUpClose(scene: PhotoScene, framing: Framing, draw: Chance): string {
  const at = {
    ...framing,
    x: 600 + draw.whole(-50, 50),
    y: 450 + draw.whole(-50, 50),
    scale: draw.between(1.5, 1.75),
  };
  const shade = softShadow(tag("rect", { x: -258, y: -128, width: 520, height: 262, rx: 12, fill: "#000" }));
  return placed(at, shade + label(scene.label, draw.fork("label")));
}
