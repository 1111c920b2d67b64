// The first sign that fits decides: most browsers also carry the names of the ones they descend from.
const BROWSERS = [
  ["Edg", "Edge"],
  ["OPR/", "Opera"],
  ["SamsungBrowser/", "Samsung Internet"],
  ["Firefox/", "Firefox"],
  ["FxiOS/", "Firefox"],
  ["HeadlessChrome/", "Chrome"],
  ["Chrome/", "Chrome"],
  ["CriOS/", "Chrome"],
  ["Safari/", "Safari"],
] as const;
const SYSTEMS = [
  ["iPhone", "iPhone"],
  ["iPad", "iPad"],
  ["Android", "Android"],
  ["CrOS", "ChromeOS"],
  ["Windows", "Windows"],
  ["Mac OS X", "macOS"],
  ["Linux", "Linux"],
] as const;

const nameIn = (agent: string, names: readonly (readonly [string, string])[]) =>
  names.find(([sign]) => agent.includes(sign))?.[1] ?? null;

export type DeviceName = { readonly browser: string | null; readonly system: string | null };

/** What a browser says about itself, as its owner would say it. It may be made up: good for recognising, not for proof. */
export const deviceName = (agent: string): DeviceName => ({
  browser: nameIn(agent, BROWSERS),
  system: nameIn(agent, SYSTEMS),
});
