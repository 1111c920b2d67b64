/** The six state colours. Each stands for one meaning, everywhere. */
export const TONES = ["proven", "wanting", "refused", "moving", "settled", "quiet"] as const;
export type Tone = (typeof TONES)[number];

/** Words and shape in the state colour. */
export const toneText = {
  proven: "text-proven",
  wanting: "text-wanting",
  refused: "text-refused",
  moving: "text-moving",
  settled: "text-settled",
  quiet: "text-quiet",
} as const satisfies Record<Tone, string>;

/** The pale ground that belongs under it. */
export const toneWash = {
  proven: "bg-proven-wash",
  wanting: "bg-wanting-wash",
  refused: "bg-refused-wash",
  moving: "bg-moving-wash",
  settled: "bg-settled-wash",
  quiet: "bg-quiet-wash",
} as const satisfies Record<Tone, string>;
