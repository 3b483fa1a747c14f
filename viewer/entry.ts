/**
 * What is typed into a blank, and what a blank shows: the one place where a typed number with its unit becomes a value of the
 * document, and back. Decimal comma and decimal point both count; what is no number stays the text it is, for the schema to refuse.
 */

/** What a blank measures: how its values are shown, which units are understood after a number, and how far the arrow keys step. */
export interface Quantity {
  /** Shown after the blank; "" for a bare number. */
  readonly unit: string;
  /** Value of the document = number typed × the unit's factor. */
  readonly units: Readonly<Record<string, number>>;
  /** One press of an arrow key, in the shown unit. */
  readonly step: number;
  /** Positive quantities never step to 0 or below. */
  readonly positive: boolean;
  /** A bare number below this can only be meant in the document's own unit. */
  readonly bareBelow?: number;
}

const lengths = { mm: 1, cm: 10, m: 1000, in: 25.4, inch: 25.4, '"': 25.4 };
const length = (step: number, positive = true): Quantity => ({ unit: "mm", units: lengths, step, positive });
const bare = (step: number): Quantity => ({ unit: "", units: { "": 1 }, step, positive: true });
const prefixed = (symbol: string, step: number): Quantity => ({
  unit: symbol,
  units: { [symbol]: 1, [`m${symbol}`]: 1e-3, [`k${symbol}`]: 1e3, [`M${symbol}`]: 1e6 },
  step,
  positive: true,
});

export const quantities = {
  wall: length(0.1),
  pitch: length(0.5),
  gap: length(0.1),
  size: length(1),
  position: length(1, false),
  count: bare(1),
  permeability: bare(1),
  lossTangent: { ...bare(0.001), positive: false },
  temperature: { unit: "°C", units: { "°C": 1, C: 1 }, step: 5, positive: false },
  polarisation: { unit: "T", units: { T: 1, mT: 1e-3 }, step: 0.1, positive: true },
  percent: { unit: "%", units: { "%": 1 }, step: 0.1, positive: true },
  frequency: {
    unit: "kHz",
    units: { kHz: 1e3, Hz: 1, MHz: 1e6 },
    step: 1,
    positive: true,
  },
  /** Below 0.001 µΩ·m nothing is taken, so that 2.5e-7 without a unit is read as Ω·m, as tables print it. */
  resistivity: {
    unit: "µΩ·m",
    units: { µΩ·m: 1e-6, μΩ·m: 1e-6, uΩ·m: 1e-6, uOhmm: 1e-6, µΩ·cm: 1e-8, μΩ·cm: 1e-8, Ω·m: 1, Ohmm: 1 },
    step: 0.01,
    positive: true,
    bareBelow: 1e-3,
  },
  current: prefixed("A", 10),
  power: prefixed("W", 100),
  voltage: prefixed("V", 5),
} as const satisfies Record<string, Quantity>;

/** Twelve digits: all that is meant, none of what binary fractions add. */
const clean = (x: number): number => Number(x.toPrecision(12));

const plainNumber = /^[+-]?(\d+[.,]?\d*|[.,]\d+)(e[+-]?\d+)?$/i;
const fraction = /^([+-]?)(?:(\d+)\s+)?(\d+)\/([1-9]\d*)$/;

/** A number as people write it (10.5; 10,5; −3; 2.5e-7; 1 3/8); null for anything else. */
export function numberIn(text: string): number | null {
  const tidy = text
    .trim()
    .replaceAll("−", "-")
    .replaceAll(/[\u202f\u00a0]/g, "");
  if (plainNumber.test(tidy)) return finite(Number(tidy.replace(",", ".")));
  const [, sign, whole, over, under] = fraction.exec(tidy) ?? [];
  if (over === undefined) return null;
  return (sign === "-" ? -1 : 1) * (Number(whole ?? 0) + Number(over) / Number(under));
}

const finite = (x: number): number | null => (Number.isFinite(x) ? x : null);

/** A number and the unit after it, if any; × and middle dots count as the dot, and letters as written. */
function split(text: string): [number: string, unit: string] {
  const [, number, unit] = /^(.*?[\d.,])\s*([^\d\s.,][^\d]*)?$/.exec(text.trim()) ?? [];
  return number === undefined ? [text, ""] : [number, (unit ?? "").trim().replaceAll(/[ *⋅]/g, "·")];
}

/** The value of the document that `text` stands for; the text itself where it is no number of this quantity. */
export function readEntry(text: string, quantity: Quantity): number | string {
  const { units, unit, bareBelow } = quantity;
  const [digits, given] = split(text);
  const number = numberIn(digits);
  if (number === null) return text;
  if (given === "" && bareBelow !== undefined && Math.abs(number) < bareBelow) return number;
  const factor = given === "" ? units[unit] : Object.hasOwn(units, given) ? units[given] : undefined;
  return factor === undefined ? text : clean(number * factor);
}

/** What a blank shows for a value of the document; texts as they were typed, nothing for nothing. */
export function showEntry(value: unknown, quantity: Quantity): string {
  if (value === undefined || value === null) return "";
  if (typeof value !== "number") return typeof value === "string" ? value : JSON.stringify(value);
  return showNumber(value / (quantity.units[quantity.unit] ?? 1));
}

function showNumber(x: number): string {
  return String(clean(x)).replace("e+", "e");
}

/** The value one arrow key further (`steps` ±1, ±10 with Shift); small positive values go by finer steps, never to 0. */
export function stepped(value: number, steps: number, quantity: Quantity): number {
  const factor = quantity.units[quantity.unit] ?? 1;
  const shown = value / factor;
  if (quantity.positive && !whole(quantity)) {
    const step = fineStep(shown, steps, quantity.step);
    return clean(Math.round((shown + steps * step) / step) * step * factor);
  }
  const next = Math.round((shown + steps * quantity.step) / quantity.step) * quantity.step;
  return clean((whole(quantity) ? Math.max(1, next) : next) * factor);
}

const whole = (quantity: Quantity): boolean => quantity === quantities.count;

/** The step, or as many tenths of it as keep a step down above 0. */
function fineStep(shown: number, steps: number, step: number): number {
  let fine = step;
  while (shown > 0 && steps < 0 && shown + steps * fine < fine / 2) fine /= 10;
  return fine;
}

// Lists

const separators = /\s*;\s*|,\s+|\s+/;

/**
 * The numbers of a list, separated by blanks, semicolons or commas; what is none stays text. A comma inside a word is a decimal
 * comma, unless the word has a point or several commas, or only separating there gives `wanted` numbers.
 */
export function readList(text: string, wanted?: number): (number | string)[] {
  const words = text
    .trim()
    .split(separators)
    .filter((w) => w !== "" && w !== "mm");
  const few = words.flatMap((word) => (asOne(word) ? [word] : word.split(",")));
  const many = words.flatMap((word) => word.split(","));
  const chosen = few.length !== wanted && many.length === wanted ? many : few;
  return chosen.filter((w) => w !== "").map((word) => numberIn(word) ?? word);
}

const asOne = (word: string): boolean =>
  !(word.includes(".") && word.includes(",")) && word.split(",").length <= 2 && !word.includes(",-");

/** A list as a blank shows it. */
export function showList(values: readonly unknown[]): string {
  return values.map((v) => (typeof v === "number" ? showNumber(v) : String(v))).join(", ");
}

/** One tuple of `columns` numbers a line; a line that is none stays text. Empty lines are passed over. */
export function readRows(text: string, columns: number): (readonly (number | string)[] | string)[] {
  return text
    .split("\n")
    .filter((line) => line.trim() !== "")
    .map((line) => {
      const numbers = readList(line, columns);
      return numbers.length >= columns && numbers.every((n) => typeof n === "number") ? numbers : line.trim();
    });
}

/** Tuples a line each; undefined for no list at all. */
export function showRows(rows: unknown): string {
  if (!Array.isArray(rows)) return typeof rows === "string" ? rows : "";
  return rows.map((row: unknown) => (Array.isArray(row) ? showList(row) : String(row))).join("\n");
}
