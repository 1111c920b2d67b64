import type { Config } from "tailwindcss";
import reactAria from "tailwindcss-react-aria-components";

// Raw values live in app/globals.css; this file only gives them their names.
// Colours, corners, shadows and type sizes replace the framework's own lists: what is not named here does not exist.

const state = (name: string) => ({ DEFAULT: `var(--${name})`, wash: `var(--${name}-wash)` });

export default {
  darkMode: ["selector", '[data-theme="dark"]'],
  theme: {
    colors: {
      transparent: "transparent",
      current: "currentColor",
      paper: "var(--paper)",
      card: "var(--card)",
      well: "var(--well)",
      ink: { DEFAULT: "var(--ink)", 2: "var(--ink-2)", 3: "var(--ink-3)" },
      edge: "var(--edge)",
      rule: "var(--rule)",
      petrol: { DEFAULT: "var(--petrol)", deep: "var(--petrol-deep)" },
      "on-petrol": "var(--on-petrol)",
      focus: "var(--focus)",
      proven: state("proven"),
      wanting: state("wanting"),
      refused: state("refused"),
      moving: state("moving"),
      settled: state("settled"),
      quiet: state("quiet"),
      series: {
        1: "var(--series-1)",
        2: "var(--series-2)",
        3: "var(--series-3)",
        4: "var(--series-4)",
        5: "var(--series-5)",
      },
    },
    borderRadius: { none: "0", sheet: "2px", control: "4px", full: "9999px" },
    boxShadow: { none: "none", panel: "0 8px 24px rgb(20 24 27 / 0.18)" },
    fontFamily: {
      heading: ["var(--face-heading)", "var(--face-heading-extended)", "Georgia", "serif"],
      text: [
        "var(--face-text)",
        "var(--face-text-extended)",
        "Noto Sans Variable",
        "system-ui",
        "sans-serif",
      ],
      mono: [
        "var(--face-mono)",
        "var(--face-mono-extended)",
        "Noto Sans Variable",
        "ui-monospace",
        "monospace",
      ],
    },
    fontSize: {
      13: ["0.8125rem", { lineHeight: "1.5" }],
      14: ["0.875rem", { lineHeight: "1.5" }],
      16: ["1rem", { lineHeight: "1.5" }],
      18: ["1.125rem", { lineHeight: "1.5" }],
      20: ["1.25rem", { lineHeight: "1.2" }],
      24: ["1.5rem", { lineHeight: "1.2" }],
      30: ["1.875rem", { lineHeight: "1.2" }],
      40: ["2.5rem", { lineHeight: "1.2" }],
      // These two follow the density a person has chosen.
      body: ["var(--body)", { lineHeight: "1.5" }],
      small: ["var(--small)", { lineHeight: "1.5" }],
    },
    extend: {
      spacing: { row: "var(--row)", control: "var(--control)", target: "var(--target)" },
      maxWidth: { measure: "66ch", page: "90rem" },
      transitionDuration: { state: "120ms", panel: "180ms" },
      transitionTimingFunction: { DEFAULT: "ease-out" },
    },
  },
  plugins: [reactAria],
} satisfies Config;
