type Attributes = Readonly<Record<string, string | number>>;

/** One SVG element as text. Texts inside come from the story alone and hold no markup. */
export const tag = (name: string, attributes: Attributes, ...inside: readonly string[]): string => {
  const written = Object.entries(attributes).map(
    ([key, value]) => ` ${key}="${typeof value === "number" ? round(value) : value}"`,
  );
  return inside.length === 0
    ? `<${name}${written.join("")}/>`
    : `<${name}${written.join("")}>${inside.join("")}</${name}>`;
};

const round = (value: number): number => Math.round(value * 100) / 100;

type Box = readonly [x: number, y: number, width: number, height: number];

export const rect = ([x, y, width, height]: Box, fill: string, more: Attributes = {}): string =>
  tag("rect", { x, y, width, height, fill, ...more });

export const circle = (
  [cx, cy, r]: readonly [number, number, number],
  fill: string,
  more: Attributes = {},
): string => tag("circle", { cx, cy, r, fill, ...more });

export const ellipse = ([cx, cy, rx, ry]: Box, fill: string, more: Attributes = {}): string =>
  tag("ellipse", { cx, cy, rx, ry, fill, ...more });

/** A stroked line without a fill, by its colour and width: cables, scratches, edges. */
export const stroke = (
  d: string,
  [colour, width]: readonly [string, number],
  more: Attributes = {},
): string =>
  tag("path", { d, fill: "none", stroke: colour, "stroke-width": width, "stroke-linecap": "round", ...more });

export const group = (transform: string, ...inside: readonly string[]): string =>
  tag("g", { transform }, ...inside);

type Stop = readonly [offset: number, colour: string, opacity?: number];

const stops = (list: readonly Stop[]): string[] =>
  list.map(([offset, colour, opacity = 1]) =>
    tag("stop", { offset, "stop-color": colour, "stop-opacity": opacity }),
  );

/** A gradient along a direction given by two points in the shape's own box. */
export const linear = (
  id: string,
  [x1, y1, x2, y2]: readonly [number, number, number, number],
  ...list: readonly Stop[]
): string => tag("linearGradient", { id, x1, y1, x2, y2 }, ...stops(list));

export const radial = (
  id: string,
  [cx, cy, r]: readonly [number, number, number],
  ...list: readonly Stop[]
): string => tag("radialGradient", { id, cx, cy, r }, ...stops(list));

/** A soft blot in one colour, darkest in the middle: for stains, soot and smears. A blur filter would cost ten times as much. */
export const haze = (id: string, colour: string): string =>
  radial(id, [0.5, 0.5, 0.5], [0, colour, 0.9], [0.5, colour, 0.5], [1, colour, 0]);

/** A soft shadow from an outline: the same shape a little larger each time, faint each time. */
export const softShadow = (outline: string): string =>
  Array.from({ length: 7 }, (_, place) =>
    tag("g", { transform: `scale(${(0.985 + place * 0.013).toFixed(3)})`, opacity: 0.085 }, outline),
  ).join("");
