import sharp from "sharp";

/** A log as a cheap logger writes it: semicolons, decimal commas, °C; warms with a time constant of 8 minutes, then the fault. */
export function runLogCsv({ minutes = 24, faultAt = 17 } = {}): string {
  const rows = Array.from({ length: minutes * 6 + 1 }, (_row, index) => {
    const minute = index / 6;
    const celsius = 84 - (84 - 21) * Math.exp(-minute / 8);
    const ampere = 0.42 - 0.004 * (celsius - 21) * 0.42;
    const remark = index === faultAt * 6 ? "grabs" : "";
    const comma = (value: number) => value.toFixed(2).replace(".", ",");
    return [index * 10, comma(celsius), comma(21 + minute / 20), comma(ampere), remark].join(";");
  });
  return ["time_s;brake_C;ambient_C;current_A;event", ...rows].join("\n");
}

/** A photo of a label with a place in its data, as a phone writes it, so that a test can see the place gone. */
export async function photoWithPlace(text: string): Promise<Buffer> {
  const label = `<svg xmlns="http://www.w3.org/2000/svg" width="1200" height="900"><rect width="1200" height="900" fill="#6b6459"/>
    <rect x="180" y="220" width="840" height="420" rx="12" fill="#f1eee4"/>
    <text x="240" y="430" font-family="monospace" font-size="72" fill="#222">${text}</text></svg>`;
  return sharp(Buffer.from(label))
    .jpeg({ quality: 88 })
    .withExif({
      IFD0: { Make: "Bench camera" },
      IFD3: {
        GPSLatitudeRef: "N",
        GPSLatitude: "51/1 30/1 0/1",
        GPSLongitudeRef: "W",
        GPSLongitude: "0/1 7/1 0/1",
      },
    })
    .toBuffer();
}
