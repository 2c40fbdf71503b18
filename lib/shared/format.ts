/**
 * Numbers as they stand on screen. Every function takes null, undefined, NaN and infinities and answers `missingText` or "∞",
 * never "NaN". Groups of three digits are separated, and units joined, by a narrow no-break space.
 */

export const missingText = "–";

/** Narrow no-break space (U+202F). */
export const thinSpace = "\u202f";

export const quantityUnits = ["count", "seconds", "gibibytes", "ratio", "fraction", "flops", "number"] as const;
export type QuantityUnit = (typeof quantityUnits)[number];

type MaybeNumber = number | null | undefined;
type DisplayUnit = { size: number; symbol: string };

const timeUnits: readonly DisplayUnit[] = [
  { size: 1e-6, symbol: "µs" },
  { size: 1e-3, symbol: "ms" },
  { size: 1, symbol: "s" },
  { size: 60, symbol: "min" },
  { size: 3600, symbol: "h" },
  { size: 86_400, symbol: "d" },
];

/** Sizes in GiB. */
const memoryUnits: readonly DisplayUnit[] = [
  { size: 2 ** -20, symbol: "KiB" },
  { size: 2 ** -10, symbol: "MiB" },
  { size: 1, symbol: "GiB" },
  { size: 2 ** 10, symbol: "TiB" },
  { size: 2 ** 20, symbol: "PiB" },
];

const siPrefixes: readonly DisplayUnit[] = [
  { size: 1, symbol: "" },
  { size: 1e3, symbol: "k" },
  { size: 1e6, symbol: "M" },
  { size: 1e9, symbol: "G" },
  { size: 1e12, symbol: "T" },
  { size: 1e15, symbol: "P" },
  { size: 1e18, symbol: "E" },
];

/** The stated quantity with its unit, to `digits` significant digits (whole digits are never dropped). */
export function formatQuantity(value: MaybeNumber, unit: QuantityUnit, digits?: number): string {
  return formatters[unit](value, digits);
}

const formatters: Record<QuantityUnit, (value: MaybeNumber, digits?: number) => string> = {
  count: (value) => formatCount(value),
  seconds: formatSeconds,
  gibibytes: formatGib,
  ratio: formatRatio,
  fraction: formatPercent,
  flops: (value, digits) => formatSi(value, "flop", digits),
  number: formatNumber,
};

/** A whole number in thin-space groups: 395 932. */
export function formatCount(value: MaybeNumber): string {
  return special(value) ?? formatNumber(Math.round(finite(value)), 15);
}

/** A number in thin-space groups; below 1e-3 and from 1e15 on as 4.1 × 10⁻⁷. */
export function formatNumber(value: MaybeNumber, digits = 3): string {
  const text = special(value);
  if (text !== null) return text;
  const number = finite(value);
  const magnitude = Math.abs(number);
  if (magnitude !== 0 && (magnitude < 1e-3 || magnitude >= 1e15)) return scientific(number, Math.min(digits, 4));
  return group(rounded(number, digits));
}

/** A power of ten as an axis label: 1, 10, 10⁻³. */
export function formatPowerOfTen(value: number): string {
  return value === 1 || value === 10 ? String(value) : `10${superscript(Math.round(Math.log10(value)))}`;
}

/** With an SI prefix: 12.4 M, or 3.1 Tflop with a unit. */
export function formatSi(value: MaybeNumber, unit = "", digits = 3): string {
  const text = special(value);
  if (text !== null) return text;
  const number = finite(value);
  if (number !== 0 && (Math.abs(number) < 1e-3 || Math.abs(number) >= 1e21)) return join(scientific(number, digits), unit);
  const chosen = Math.abs(number) < 1 ? firstOf(siPrefixes) : chooseUnit(number, siPrefixes, digits);
  return join(group(rounded(number / chosen.size, digits)), chosen.symbol + unit);
}

/** Seconds as µs, ms, s, min, h or d. */
export function formatSeconds(value: MaybeNumber, digits = 2): string {
  return formatInUnits(value, timeUnits, digits, "s");
}

/** GiB as KiB, MiB, GiB, TiB or PiB. */
export function formatGib(value: MaybeNumber, digits = 2): string {
  return formatInUnits(value, memoryUnits, digits, "GiB");
}

/** 1.8x; from 10 on without decimals. */
export function formatRatio(value: MaybeNumber, digits = 2): string {
  const text = special(value);
  if (text !== null) return text;
  const number = finite(value);
  const magnitude = Math.abs(number);
  if (magnitude >= 1e6 || (magnitude !== 0 && magnitude < 1e-3)) return `${scientific(number, 2)}x`;
  if (magnitude >= 0.095 && magnitude < 9.95 && digits === 2) return `${number.toFixed(1)}x`;
  return `${group(rounded(number, digits))}x`;
}

/** A fraction of one as a percentage: 0.793 is 79 %. */
export function formatPercent(value: MaybeNumber, digits = 2): string {
  const text = special(value);
  if (text !== null) return text;
  return join(formatNumber(finite(value) * 100, digits), "%");
}

/** "31 to 60 s": one unit for both ends where they share it, else each with its own. */
export function formatRange(low: MaybeNumber, high: MaybeNumber, unit: QuantityUnit, digits?: number): string {
  const first = formatQuantity(low, unit, digits);
  const second = formatQuantity(high, unit, digits);
  if (first === second) return first;
  const [firstNumber, firstSymbol] = splitSymbol(first);
  const [, secondSymbol] = splitSymbol(second);
  return firstSymbol !== "" && firstSymbol === secondSymbol ? `${firstNumber} to ${second}` : `${first} to ${second}`;
}

/** "41 of 52". */
export function formatOf(part: MaybeNumber, whole: MaybeNumber): string {
  return `${formatCount(part)} of ${formatCount(whole)}`;
}

/** The full value in the unit it is stored in, for hover and exports. */
export function formatExact(value: MaybeNumber, unit: QuantityUnit): string {
  const text = special(value);
  if (text !== null) return value === null || value === undefined || Number.isNaN(value) ? "not known" : text;
  const number = Number(finite(value).toPrecision(12));
  const magnitude = Math.abs(number);
  const plain = magnitude !== 0 && (magnitude < 1e-6 || magnitude >= 1e21) ? scientific(number, 6) : group(decimal(number));
  return join(plain, exactSymbols[unit]);
}

const exactSymbols: Record<QuantityUnit, string> = {
  count: "",
  seconds: "s",
  gibibytes: "GiB",
  ratio: "x",
  fraction: "of 1",
  flops: "flop",
  number: "",
};

function special(value: MaybeNumber): string | null {
  if (value === null || value === undefined || Number.isNaN(value)) return missingText;
  if (value === Infinity) return "∞";
  return value === -Infinity ? "−∞" : null;
}

function finite(value: MaybeNumber): number {
  return typeof value === "number" && Number.isFinite(value) ? value : 0;
}

function firstOf(units: readonly DisplayUnit[]): DisplayUnit {
  return units[0] ?? { size: 1, symbol: "" };
}

function formatInUnits(value: MaybeNumber, units: readonly DisplayUnit[], digits: number, zeroSymbol: string): string {
  const text = special(value);
  if (text !== null) return text;
  const number = finite(value);
  if (number === 0) return join("0", zeroSymbol);
  const chosen = chooseUnit(number, units, digits);
  const scaled = number / chosen.size;
  const figures = Math.abs(scaled) < 1e-3 || Math.abs(scaled) >= 1e6 ? scientific(scaled, digits) : group(rounded(scaled, digits));
  return join(figures, chosen.symbol);
}

/** The largest unit of which the rounded value is at least one: 59.96 s is 1 min, not 60 s. */
function chooseUnit(value: number, units: readonly DisplayUnit[], digits: number): DisplayUnit {
  let chosen = firstOf(units);
  let smaller = chosen;
  for (const unit of units) {
    const inSmaller = Number(rounded(value / smaller.size, digits));
    if (Math.abs(inSmaller) * smaller.size >= unit.size * (1 - 1e-12)) chosen = unit;
    smaller = unit;
  }
  return chosen;
}

/** To significant digits without dropping whole ones, trailing zeros removed. */
function rounded(value: number, digits: number): string {
  if (value === 0) return "0";
  const wholeDigits = Math.floor(Math.log10(Math.abs(value))) + 1;
  const text = wholeDigits >= digits ? value.toFixed(0) : decimal(Number(value.toPrecision(digits)));
  return text === "-0" ? "0" : text;
}

/** Plain decimal notation, for values from 1e-6 up to 1e21. */
function decimal(value: number): string {
  const text = String(value);
  return text.includes("e") ? value.toFixed(12).replace(/\.?0+$/, "") : text;
}

function group(text: string): string {
  const [whole = "", fraction] = text.replace("-", "−").split(".");
  const grouped = whole.replace(/\B(?=(\d{3})+(?!\d))/g, thinSpace);
  return fraction === undefined ? grouped : `${grouped}.${fraction}`;
}

function scientific(value: number, digits: number): string {
  const [mantissa = "0", exponent = "0"] = value.toExponential(Math.max(0, digits - 1)).split("e");
  const shortened = String(Number(mantissa)).replace("-", "−");
  return `${shortened}${thinSpace}×${thinSpace}10${superscript(Number(exponent))}`;
}

function superscript(exponent: number): string {
  const digits = "⁰¹²³⁴⁵⁶⁷⁸⁹";
  const body = [...String(Math.abs(exponent))].map((digit) => digits[Number(digit)] ?? "").join("");
  return exponent < 0 ? `⁻${body}` : body;
}

function join(figures: string, symbol: string): string {
  return symbol === "" ? figures : `${figures}${thinSpace}${symbol}`;
}

function splitSymbol(text: string): [string, string] {
  const match = /^([−\d.\u202f]+?)(\u202f?)(\D*)$/u.exec(text);
  if (match === null) return [text, ""];
  return [match[1] ?? text, match[3] ?? ""];
}
