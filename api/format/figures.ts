/** Numbers for people: SI prefixes, and digits no finer than the bar allows. */
import type { Uncertain } from "../../meshes/result.ts";

const prefixes: readonly (readonly [factor: number, symbol: string])[] = [
  [1e12, "T"],
  [1e9, "G"],
  [1e6, "M"],
  [1e3, "k"],
  [1, ""],
  [1e-3, "m"],
  [1e-6, "µ"],
  [1e-9, "n"],
  [1e-12, "p"],
  [1e-15, "f"],
];

/** A unit to write numbers in: the number is divided by `factor` and followed by `symbol`. */
export interface Unit {
  readonly factor: number;
  readonly symbol: string;
}

/** The prefixed unit in which the largest of `values` lies between 1 and 1000; the plain unit when all are 0. */
export function prefixed(symbol: string, values: readonly number[]): Unit {
  const largest = Math.max(0, ...values.map(Math.abs));
  if (largest === 0 || !Number.isFinite(largest)) return { factor: 1, symbol };
  const [factor, prefix] = prefixes.find(([f]) => largest >= 0.9995 * f) ?? prefixes.at(-1)!;
  return { factor, symbol: prefix + symbol };
}

/** Numbers that need no prefix yet, in a unit that is better left as it is known. */
const homely = { from: 1e-3, to: 1e6 };

/** `unit` as it is while the largest of `values` makes a number people read at sight, prefixed beyond. */
export function homelyUnit(unit: Unit, values: readonly number[]): Unit {
  const largest = Math.max(0, ...values.map((value) => Math.abs(value) / unit.factor));
  if (largest === 0 || (largest >= homely.from && largest < homely.to)) return unit;
  const { factor, symbol } = prefixed(unit.symbol, [largest]);
  return { factor: factor * unit.factor, symbol };
}

/** More digits than this are never shown, however small the bar. */
const mostDigits = 6;

/** Place (power of ten) of the last digit worth showing: the bar's first digit, or its second when it starts with 1 or 2. */
function lastPlace(value: number, bar: number): number {
  const finest = value === 0 ? -Infinity : Math.floor(Math.log10(Math.abs(value))) - mostDigits + 1;
  if (bar <= 0) return Number.isFinite(finest) ? finest : 0;
  const place = Math.floor(Math.log10(bar));
  // The allowance keeps 0.03, which division may have left a hair below, at one digit.
  return Math.max(bar / 10 ** place < 3 - 1e-9 ? place - 1 : place, finest);
}

function atPlace(x: number, place: number): string {
  const rounded = Math.round(x / 10 ** place) * 10 ** place;
  return rounded.toFixed(Math.max(0, -place));
}

/** A value and its bar as text in one unit; the bar is rounded up, and "" when it is 0. */
export interface Shown {
  readonly value: string;
  readonly bar: string;
}

/** Writes a value with its bar, both divided by the unit's factor. */
export function show(quantity: Uncertain, unit: Unit): Shown {
  const value = quantity.value / unit.factor;
  const bar = quantity.plusMinus / unit.factor;
  const place = lastPlace(value, bar);
  if (bar === 0) return { value: plain(value, 5), bar: "" };
  const step = 10 ** place;
  // Rounding up keeps the promise of the bar; the small allowance keeps 0.3 from becoming 0.4 by binary rounding.
  return { value: atPlace(value, place), bar: atPlace(Math.ceil(bar / step - 1e-9) * step, place) };
}

/** A value with its bar and unit in one piece, as "26.92 ± 0.03 mΩ"; the prefix is chosen unless a unit is given. */
export function figure(quantity: Uncertain, symbol: string | Unit): string {
  const unit = typeof symbol === "string" ? prefixed(symbol, [quantity.value]) : symbol;
  const { value, bar } = show(quantity, unit);
  return `${value}${bar === "" ? "" : ` ± ${bar}`} ${unit.symbol}`.trimEnd();
}

/** A number without a bar, rounded to so many significant digits, without trailing zeros or exponents. */
export function plain(value: number, digits = 4): string {
  if (value === 0) return "0";
  const place = Math.floor(Math.log10(Math.abs(value))) - digits + 1;
  const text = atPlace(value, place);
  return text.includes(".") ? text.replace(/\.?0+$/, "") : text;
}

/** The decimals with which the largest of `values` has so many significant digits. */
export function decimalsFor(values: readonly number[], digits: number): number {
  const largest = Math.max(0, ...values.map(Math.abs));
  return largest === 0 ? 0 : Math.max(0, digits - 1 - Math.floor(Math.log10(largest)));
}

/** Numbers of one column without bars: as many decimals for all as the largest needs for so many significant digits. */
export function evenly(values: readonly number[], digits = 4): string[] {
  const largest = Math.max(...values.map(Math.abs));
  const place = largest === 0 ? 0 : Math.floor(Math.log10(largest)) - digits + 1;
  return values.map((value) => atPlace(value, place));
}

/** A number without a bar, prefixed: "1.32 µH". */
export function plainFigure(value: number, symbol: string, digits = 4): string {
  const unit = prefixed(symbol, [value]);
  return `${plain(value / unit.factor, digits)} ${unit.symbol}`;
}

/** A share as per cent with one decimal: "62.9 %", "100 %", "under 0.1 %". */
export function percent(share: number): string {
  const value = 100 * share;
  if (value === 0) return "0 %";
  if (Math.abs(value) < 0.05) return "under 0.1 %";
  return `${value >= 99.95 ? value.toFixed(0) : value.toFixed(1)} %`;
}
