import { describe, expect, it } from "vitest";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { chanceFrom } from "@/seeders/random";
import { idOf } from "@/seeders/identity";
import { workingDayAgo } from "@/seeders/days";

const draws = (seed: string, count: number): number[] => {
  const chance = chanceFrom(seed);
  return Array.from({ length: count }, () => chance.next());
};

describe("chance in the story", () => {
  it("repeats itself for the same seed and not for another", () => {
    expect(draws("a", 50)).toEqual(draws("a", 50));
    expect(draws("a", 50)).not.toEqual(draws("b", 50));
  });

  it("gives a chapter its own stream, whatever was drawn before", () => {
    const [early, late] = [chanceFrom("a"), chanceFrom("a")];
    late.next();
    expect(late.fork("chapter").next()).toBe(early.fork("chapter").next());
  });

  it("spreads evenly over 0 to 1", () => {
    const bins = draws("even", 20_000).reduce<number[]>((counts, value) => {
      const bin = Math.floor(value * 10);
      counts[bin] = (counts[bin] ?? 0) + 1;
      return counts;
    }, []);
    // Chi-squared with nine degrees of freedom: 27.9 is passed by chance once in a thousand.
    const chiSquared = bins.reduce((sum, count) => sum + (count - 2000) ** 2 / 2000, 0);
    expect(bins).toHaveLength(10);
    expect(chiSquared).toBeLessThan(27.9);
  });

  it("draws lives of which 63.2 % end before the scale", () => {
    const chance = chanceFrom("lives");
    const lives = Array.from({ length: 20_000 }, () => chance.weibull(1.7, 400));
    // 1 - 1/e, within four standard errors of 0.0034.
    expect(lives.filter((life) => life <= 400).length / lives.length).toBeCloseTo(0.632, 1);
    expect(Math.abs(lives.filter((life) => life <= 400).length / lives.length - 0.63212)).toBeLessThan(
      0.0137,
    );
  });

  it("picks each of several and never beside them", () => {
    const chance = chanceFrom("pick");
    const picked = new Set(Array.from({ length: 200 }, () => chance.pick(["a", "b", "c"])));
    expect(picked).toEqual(new Set(["a", "b", "c"]));
    expect(() => chance.pick([])).toThrow(RangeError);
  });
});

describe("names and days of the story", () => {
  it("an id is the same each time, of version 8, and another for another name", () => {
    expect(idOf("unit", "a", 1)).toBe(idOf("unit", "a", 1));
    expect(idOf("unit", "a", 1)).not.toBe(idOf("unit", "a", 2));
    expect(idOf("unit", "a", 1)).toMatch(
      /^[0-9a-f]{8}-[0-9a-f]{4}-8[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/,
    );
  });

  it("a day of the story is never a weekend and never later than asked for", () => {
    const today = calendarDay("2026-12-01");
    const days = Array.from({ length: 60 }, (_, ago) => workingDayAgo(today, ago));
    expect(days.filter((day) => [0, 6].includes(new Date(`${day}T12:00:00Z`).getUTCDay()))).toEqual([]);
    expect(days.toSorted().toReversed()).toEqual(days);
  });
});
