import type { Page } from "@playwright/test";

// What a person can act on. Of radios with one name the Tab key stops at one; hidden inputs are nobody's.
const REACHABLE =
  'a[href], button:not([disabled]), input:not([type="hidden"]):not([disabled]), select, textarea, summary';

/** The id of the element that has the focus. */
export const focusedId = (page: Page): Promise<string> =>
  page.evaluate(() => document.activeElement?.id ?? "");

/** Numbers all that should be reached, and names each for a sentence in a failure. */
const markReachable = (page: Page) =>
  page.evaluate((selector) => {
    const names: Record<string, string> = {};
    const groups = new Set<string>();
    let next = 0;
    for (const element of document.querySelectorAll<HTMLElement>(selector)) {
      if (!element.checkVisibility({ visibilityProperty: true }) || element.tabIndex < 0) continue;
      const key =
        element instanceof HTMLInputElement && element.type === "radio"
          ? `radio ${element.name}`
          : `${(next += 1)} ${element.tagName} ${element.textContent.trim().slice(0, 40)}`;
      element.dataset.stop = key;
      if (!groups.has(key)) names[key] = key;
      groups.add(key);
    }
    return Object.keys(names);
  }, REACHABLE);

/** Where the focus is now, and whether it can be seen there: a ring of 2 px or more on it or on the label around it. */
const lookAtFocus = (page: Page) =>
  page.evaluate(() => {
    const focused = document.activeElement;
    if (!(focused instanceof HTMLElement)) return null;
    const hasRing = [focused, focused.closest("label")].some((element) => {
      if (!element) return false;
      const { outlineStyle, outlineWidth } = getComputedStyle(element);
      const box = element.getBoundingClientRect();
      return outlineStyle !== "none" && parseFloat(outlineWidth) >= 2 && box.width > 1 && box.height > 1;
    });
    return { stop: focused.dataset.stop ?? null, hasRing };
  });

/** Presses Tab from the top of the page to its end, and tells what was never reached and what showed no ring. */
export async function tabThrough(page: Page) {
  const stops = await markReachable(page);
  const reached = new Set<string>();
  const ringless: string[] = [];
  for (let press = 0; press < stops.length + 20 && reached.size < stops.length; press += 1) {
    await page.keyboard.press("Tab");
    const seen = await lookAtFocus(page);
    if (!seen?.stop) continue;
    reached.add(seen.stop);
    if (!seen.hasRing) ringless.push(seen.stop);
  }
  return { count: stops.length, missed: stops.filter((stop) => !reached.has(stop)), ringless };
}

/** What is pressed and measures less than `least` px either way. A link inside a line of text is part of the line. */
export const smallTargets = (page: Page, least: number): Promise<string[]> =>
  page.evaluate(
    ([selector, size]) =>
      [...document.querySelectorAll<HTMLElement>(selector)].flatMap((element) => {
        if (!element.checkVisibility({ visibilityProperty: true }) || element.tabIndex < 0) return [];
        const ticked = element instanceof HTMLInputElement && /radio|checkbox|file/.test(element.type);
        const pressed = ticked ? (element.labels?.[0] ?? element) : element;
        const isInText = getComputedStyle(pressed).display === "inline";
        const { width, height } = pressed.getBoundingClientRect();
        // What waits in a box of one pixel until it has the focus is never pressed: the skip link, heads of a list.
        const isTuckedAway = width <= 1 || (pressed.closest("thead")?.clientWidth ?? width) <= 1;
        if (isInText || isTuckedAway || (width >= size - 0.5 && height >= size - 0.5)) return [];
        const words = (element.textContent.trim() || element.getAttribute("name")) ?? "";
        return [`${element.tagName} ${words.slice(0, 40)}: ${Math.round(width)} × ${Math.round(height)}`];
      }),
    [REACHABLE, least] as const,
  );
