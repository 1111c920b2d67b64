import { describe, expect, it } from "vitest";
import { calendarDay } from "@/lib/kernel/calendar-day";
import {
  formatBytes,
  formatDay,
  formatDetail,
  formatInstant,
  formatMoney,
  formatMonth,
  formatNumber,
  formatPercent,
  formatResult,
  formatTime,
} from "@/lib/kernel/format";
import { isLocale } from "@/lib/kernel/locale";
import { money } from "@/lib/kernel/money";

/** Formats put several kinds of space between figure and sign; which one does not matter here. */
const plain = (text: string) => text.replace(/[\u00a0\u202f]/g, " ");

describe("printing", () => {
  const day = calendarDay("2027-05-03");
  const at = new Date("2027-05-03T12:02:00Z");

  it("prints a day in words, in the reader's language", () => {
    expect([formatDay(day, "en"), formatDay(day, "de"), formatDay(day, "long")]).toEqual([
      "3 May 2027",
      "3. Mai 2027",
      "3 May 2027",
    ]);
    expect([formatMonth(day, "en"), formatMonth(day, "de")]).toEqual(["May 2027", "Mai 2027"]);
  });

  it("prints an instant on the clock of the zone asked for, not of the machine", () => {
    expect(formatInstant(at, "en", "Europe/London")).toBe("3 May 2027, 13:02");
    expect(formatInstant(at, "de", "Europe/Vienna")).toBe("3. Mai 2027, 14:02");
    expect(formatTime(new Date("2027-05-03T22:05:00Z"), "en", "Europe/Vienna")).toBe("00:05");
    expect(formatInstant(new Date("2027-05-03T22:05:00Z"), "en", "Europe/Vienna")).toBe("4 May 2027, 00:05");
  });

  it("prints money with the ledger's decimals, also where the format library has others", () => {
    expect(plain(formatMoney(money(145_55, "GBP"), "en"))).toBe("£145.55");
    expect(plain(formatMoney(money(1_145_55, "EUR"), "de"))).toBe("1.145,55 €");
    expect(plain(formatMoney(money(145_50, "HUF"), "en"))).toBe("HUF 145.50");
    expect(plain(formatMoney(money(145, "JPY"), "en"))).toBe("JP¥145");
    expect(plain(formatMoney(money(123_456_789_012_345_678_25n, "GBP"), "en"))).toBe(
      "£123,456,789,012,345,678.25",
    );
  });

  it("prints numbers, shares and sizes", () => {
    expect([
      formatNumber(1234.5, "en"),
      formatNumber(1234.5, "de"),
      formatNumber(2, "en", { least: 2 }),
    ]).toEqual(["1,234.5", "1.234,5", "2.00"]);
    expect([plain(formatPercent(0.125, "en")), plain(formatPercent(0.125, "de"))]).toEqual([
      "12.5%",
      "12,5 %",
    ]);
    const sizes = [12, 640 * 1024, 1.4 * 1024 ** 2, 25 * 1024 ** 2, 1023 * 1024, 2.5 * 1024 ** 3];
    expect(sizes.map((bytes) => formatBytes(bytes, "en"))).toEqual([
      "12 byte",
      "640 kB",
      "1.4 MB",
      "25 MB",
      "1 MB",
      "2.5 GB",
    ]);
  });

  it("prints the days in a step or a reason and leaves every other value as it is", () => {
    expect(formatDetail({ fittedOn: "2026-01-15", months: 24, serial: "2026-01-15" }, "de")).toEqual({
      fittedOn: "15. Januar 2026",
      months: 24,
      serial: "2026-01-15",
    });
    expect([formatResult("2028-01-14", "en"), formatResult("211", "en")]).toEqual(["14 January 2028", "211"]);
  });

  it("knows its languages", () => {
    expect(["en", "de", "long", "fr"].map(isLocale)).toEqual([true, true, true, false]);
  });
});
