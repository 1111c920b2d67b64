/** The keys that work on every page, as they stand on the keyboard; several ways to the same thing side by side. */
export const KEYS = [
  { does: "next", keys: [["Tab"]] },
  { does: "previous", keys: [["Shift", "Tab"]] },
  { does: "press", keys: [["Enter"], ["Space"]] },
  { does: "choose", keys: [["Up"], ["Down"]] },
  { does: "close", keys: [["Esc"]] },
] as const;
