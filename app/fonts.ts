import localFont from "next/font/local";

// The framework reads these calls at build time, so every value has to stand here as a literal.
// The extended-latin files load only when such a letter occurs: their range says so, and they are not preloaded.

const text = localFont({
  src: "../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2",
  weight: "200 800",
  variable: "--face-text",
  display: "swap",
  preload: true,
});

const textExtended = localFont({
  src: "../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-ext-wght-normal.woff2",
  weight: "200 800",
  variable: "--face-text-extended",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: "unicode-range",
      value:
        "U+0100-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+0304,U+0308,U+0329,U+1D00-1DBF,U+1E00-1E9F,U+1EF2-1EFF,U+20A0-20AB,U+20AD-20C0,U+2113,U+2C60-2C7F,U+A720-A7FF",
    },
  ],
});

const mono = localFont({
  src: "../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-wght-normal.woff2",
  weight: "200 800",
  variable: "--face-mono",
  display: "swap",
  preload: true,
});

const monoExtended = localFont({
  src: "../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-ext-wght-normal.woff2",
  weight: "200 800",
  variable: "--face-mono-extended",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: "unicode-range",
      value:
        "U+0100-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+0304,U+0308,U+0329,U+1D00-1DBF,U+1E00-1E9F,U+1EF2-1EFF,U+20A0-20AB,U+20AD-20C0,U+2113,U+2C60-2C7F,U+A720-A7FF",
    },
  ],
});

const heading = localFont({
  src: "../node_modules/@fontsource/besley/files/besley-latin-600-normal.woff2",
  weight: "600",
  variable: "--face-heading",
  display: "swap",
  preload: false,
  adjustFontFallback: "Times New Roman",
});

const headingExtended = localFont({
  src: "../node_modules/@fontsource/besley/files/besley-latin-ext-600-normal.woff2",
  weight: "600",
  variable: "--face-heading-extended",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: "unicode-range",
      value:
        "U+0100-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+0304,U+0308,U+0329,U+1D00-1DBF,U+1E00-1E9F,U+1EF2-1EFF,U+20A0-20AB,U+20AD-20C0,U+2113,U+2C60-2C7F,U+A720-A7FF",
    },
  ],
});

/** The classes that put all six font variables on the page; belongs on `<html>`. */
export const fontVariables = [text, textExtended, mono, monoExtended, heading, headingExtended]
  .map((font) => font.variable)
  .join(" ");
