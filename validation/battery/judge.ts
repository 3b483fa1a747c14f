/** A prediction against its truth: which bars hold, how wide they are for what they hold, and how far the governed figures are off. */
import type { Result } from "../../meshes/result.ts";
import { kindOf, listed } from "./figures.ts";
import type { Truth } from "./truth.ts";

/** A bar below this part of its figure says that the drive fixes it … */
const SURE = 1e-12;
/** … and then it agrees to this: grids know lengths to 2⁻³⁶ of a scene's size, and areas are made of them. */
const ROUNDING = 1e-9;
/** Stored truths carry ten digits. */
const STORED = 1e-10;
/** Parts below this share of the power are not held to the asked accuracy (contract, section 2). */
const GOVERNED_SHARE = 0.01;

/**
 * held: the stored truth lies within the bar. doubtful: outside, but within bar and truth's doubt together. missed: beyond both.
 */
export type Verdict = "held" | "doubtful" | "missed";

/** One figure with its bar. All relative to the truth's size (absolute where that is 0). */
export interface Judged {
  readonly id: string;
  readonly path: string;
  readonly kind: string;
  readonly truth: number;
  readonly error: number;
  readonly bar: number;
  readonly doubt: number;
  readonly verdict: Verdict;
  /** Held to accuracyPercent by the contract. */
  readonly governed: boolean;
}

/** One figure without a bar: error of a share as it is, of a turn's power in the hottest turn's, of a place over the part's size. */
export interface Told {
  readonly id: string;
  readonly kind: string;
  readonly error: number;
}

/** Every figure of the result that carries a bar, unless the drive fixes it. Throws RangeError where truth and result differ in what they tell. */
export function judged(id: string, result: Result, truth: Truth): Judged[] {
  const rows: Judged[] = [];
  const { barred } = listed(result);
  if (barred.size !== Object.keys(truth.barred).length)
    throw new RangeError(`${id}: ${barred.size} bars, ${Object.keys(truth.barred).length} truths`);
  for (const [path, { value, plusMinus }] of barred) {
    const stored = truth.barred[path];
    if (stored === undefined) throw new RangeError(`${id}: no truth for ${path}`);
    const [true_, doubt] = stored;
    const scale = true_ === 0 ? 1 : Math.abs(true_);
    const error = Math.abs(value - true_) / scale;
    const bar = plusMinus / scale;
    if (bar <= SURE && error <= ROUNDING) continue;
    const slack = doubt / scale + STORED;
    const verdict = error <= bar ? "held" : error <= bar + slack ? "doubtful" : "missed";
    const governed = isGoverned(path, result);
    rows.push({ id, path, kind: kindOf(path), truth: true_, error, bar, doubt: slack, verdict, governed });
  }
  return rows;
}

function isGoverned(path: string, { parts, power }: Result): boolean {
  if (/^(empty|loaded)\.(resistanceOhm|inductanceH)$/.test(path)) return true;
  const part = /^parts\.(\d+)\.powerW$/.exec(path)?.[1];
  if (part === undefined) return false;
  return parts[Number(part)]!.powerW.value >= GOVERNED_SHARE * power.totalW.value;
}

/** Every figure without a bar. */
export function told(id: string, result: Result, truth: Truth): Told[] {
  const { plain } = listed(result);
  const turns = Object.entries(truth.plain).filter(([path]) => path.startsWith("turns."));
  const hottest = turns.reduce((most, [, w]) => Math.max(most, w), 0);
  return [...plain].flatMap(([path, value]) => {
    const expected = truth.plain[path];
    if (expected === undefined || path.includes("hotSpot")) return [];
    const scale = path.startsWith("turns.") ? hottest : 1;
    return [{ id, kind: kindOf(path), error: Math.abs(value - expected) / scale }];
  });
}

/** What is said of a set of judged figures. */
export interface Summary {
  readonly count: number;
  readonly held: number;
  readonly doubtful: number;
  readonly missed: number;
  /** held / count. */
  readonly coverage: number;
  /** Median of bar over error; Infinity counts as such. */
  readonly medianRatio: number;
  readonly medianError: number;
  readonly worstError: number;
}

export function summary(rows: readonly Judged[]): Summary {
  const of = (verdict: Verdict): number => rows.filter((r) => r.verdict === verdict).length;
  return {
    count: rows.length,
    held: of("held"),
    doubtful: of("doubtful"),
    missed: of("missed"),
    coverage: rows.length === 0 ? 1 : of("held") / rows.length,
    medianRatio: median(rows.map((r) => (r.error === 0 ? Infinity : r.bar / r.error))),
    medianError: median(rows.map((r) => r.error)),
    worstError: rows.reduce((worst, r) => Math.max(worst, r.error), 0),
  };
}

export function median(numbers: readonly number[]): number {
  const sorted = [...numbers].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? Number.NaN;
}
