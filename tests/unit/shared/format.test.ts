import { describe, expect, it } from "vitest";
import {
  formatCount,
  formatExact,
  formatGib,
  formatNumber,
  formatOf,
  formatPercent,
  formatQuantity,
  formatRange,
  formatRatio,
  formatSeconds,
  formatSi,
  quantityUnits,
} from "@/lib/shared/format";
import { formatDate, formatDateTime } from "@/lib/shared/format-date";

// Expected texts follow the SI brochure (9th edition, 5.4): groups of three by a thin space, a space before the unit and
// before "%"; IEC 80000-13 for KiB .. PiB; 60 s = 1 min, 3600 s = 1 h. Ordinary spaces stand here for the narrow one.
const plain = (text: string): string => text.replaceAll("\u202f", " ");

describe("format", () => {
  it.each([
    [395932, "395 932"],
    [12359421, "12 359 421"],
    [0, "0"],
    [-0, "0"],
    [999, "999"],
    [1000, "1 000"],
    [-4200, "−4 200"],
    [2.6, "3"],
    [1e18, "1 × 10¹⁸"],
  ])("groups the count %d in threes", (value, text) => expect(plain(formatCount(value))).toBe(text));

  it.each([
    [0, "0 s"],
    [42, "42 s"],
    [9.84, "9.8 s"],
    [0.42, "420 ms"],
    [0.0000123, "12 µs"],
    [1.2e-9, "0.0012 µs"],
    [59.4, "59 s"],
    [59.96, "1 min"],
    [90, "1.5 min"],
    [3599, "1 h"],
    [7560, "2.1 h"],
    [86400, "1 d"],
    [8.64e12, "1 × 10⁸ d"],
  ])("writes %d seconds in the unit a reader would choose", (value, text) => expect(plain(formatSeconds(value))).toBe(text));

  it.each([
    [1.8137, "1.8 GiB"],
    [128, "128 GiB"],
    [0.5, "512 MiB"],
    [1023.9, "1 TiB"],
    [1024, "1 TiB"],
    [3e-6, "3.1 KiB"],
    [0, "0 GiB"],
  ])("writes %d GiB with a binary prefix", (value, text) => expect(plain(formatGib(value))).toBe(text));

  it.each([
    [1, "1.0x"],
    [1.84, "1.8x"],
    [9.96, "10x"],
    [63.4, "63x"],
    [0.52, "0.5x"],
    [0.043, "0.043x"],
    [12345, "12 345x"],
    [0, "0x"],
  ])("writes the ratio %d", (value, text) => expect(plain(formatRatio(value))).toBe(text));

  it.each([
    [0.793, "79 %"],
    [0.0042, "0.42 %"],
    [1, "100 %"],
    [0, "0 %"],
  ])("writes the fraction %d as a percentage", (value, text) => expect(plain(formatPercent(value))).toBe(text));

  it.each([
    [12_359_421, "", "12.4 M"],
    [3.14e12, "flop", "3.14 Tflop"],
    [999.9, "", "1 k"],
    [0, "flop", "0 flop"],
    [0.5, "", "0.5"],
    [1e24, "flop", "1 × 10²⁴ flop"],
  ])("writes %d with an SI prefix", (value, unit, text) => expect(plain(formatSi(value, unit))).toBe(text));

  it.each([
    [4.1e-7, "4.1 × 10⁻⁷"],
    [0.0323, "0.0323"],
    [123456.7, "123 457"],
  ])("writes the plain number %d", (value, text) => expect(plain(formatNumber(value))).toBe(text));

  it.each([
    [31, 60, "seconds", "31 s to 1 min"],
    [31, 58, "seconds", "31 to 58 s"],
    [50, 72, "seconds", "50 s to 1.2 min"],
    [5, 8.2, "gibibytes", "5 to 8.2 GiB"],
    [1.2, 3.1, "ratio", "1.2 to 3.1x"],
    [0.66, 0.88, "fraction", "66 to 88 %"],
    [28, 35, "count", "28 to 35"],
    [5, 5, "seconds", "5 s"],
    [null, 5, "seconds", "– to 5 s"],
  ] as const)("writes the range %s to %s in %s", (low, high, unit, text) => expect(plain(formatRange(low, high, unit))).toBe(text));

  it.each(quantityUnits)("never shows NaN, null or an empty text for %s", (unit) => {
    for (const value of [null, undefined, Number.NaN]) {
      expect(formatQuantity(value, unit)).toBe("–");
      expect(formatExact(value, unit)).toBe("not known");
    }
    for (const value of [0, 5e-324, -1e-9, 1e308, Infinity, -Infinity, 1 / 3]) {
      expect(formatQuantity(value, unit)).toMatch(/[\d∞]/);
      expect(formatQuantity(value, unit) + formatExact(value, unit)).not.toMatch(/NaN|undefined|null|e[+-]/);
    }
  });

  it.each([
    [42.3178, "seconds", "42.3178 s"],
    [395932, "count", "395 932"],
    [0.1 + 0.2, "number", "0.3"],
    [1.5e-5, "number", "0.000015"],
    [4.1e-7, "number", "4.1 × 10⁻⁷"],
  ] as const)("keeps the full value of %d %s for hover", (value, unit, text) => expect(plain(formatExact(value, unit))).toBe(text));

  it("writes counts out of counts", () => expect(formatOf(41, 52)).toBe("41 of 52"));
});

describe("dates", () => {
  it("are written in UTC", () => {
    expect(formatDate("2026-12-01T23:30:00Z")).toBe("1 Dec 2026");
    expect(formatDateTime("2026-12-01T08:00:00Z")).toBe("1 Dec 2026, 08:00 UTC");
  });
  it.each([null, undefined, "not a date"])("are a dash for %s", (value) => expect(formatDate(value)).toBe("–"));
});
