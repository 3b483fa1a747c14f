/**
 * Solves on nested grids until the asked accuracy holds, and says how far each number may be from the truth.
 *
 * Nine-node cells leave an error of two kinds: a fast one, n⁻⁴ in powers and energies where the field is smooth (n cells along a patch's
 * edge; twice the order of the cells: Strang and Fix, An Analysis of the Finite Element Method, 3.4, from memory), and a slow one, n^−p,
 * from edges where the field is not. Of what moves between levels 1 and 2 at most the share φ is owed to the slow one. So
 *
 *   e(n) ∝ (1 − φ) n⁻⁴/(1 − 2⁻⁴) + φ n^−p/(1 − 2^−p)
 *   bar(q) = max(|q_n − q_m|, Σ_i |c_i,n − c_i,m|) · e(n)/(e(m) − e(n)),  levels m < n the last two, c_i the parts q is the sum of.
 *
 * With φ = 1 that is Richardson's bound for errors that fall at least as n^−p. With a smaller φ the first bar is narrower, and later ones
 * narrow less than n⁻⁴, as the slow part is what remains. Where two parts of the error cancel in q_n − q_m by chance they do not in every c_i,
 * nor in q's kin: numbers that err for the same reason, whose relative movement counts as well. The grid reaches to infinity, so there is no
 * outer boundary to allow for; the direct solution's own error is far below (its residual is reported).
 */

import { SolverError } from "./errors.ts";

/** How the error of a number falls: its slow part's order p, and that part's share φ of what moves from level 1 to level 2. */
export interface Fall {
  readonly order: number;
  /** 0 … 1. */
  readonly share: number;
}

/** Order of the fast part. */
const FAST = 4;

/** A number that errs for the same reason as another. */
export interface Kin {
  readonly value: number;
  /** What its relative movement is worth, in the other's unit. */
  readonly weight: number;
}

/** What one grid says. */
export interface GridAnswer {
  /** Cells along a patch's edge. */
  readonly level: number;
  readonly unknowns: number;
  /** Numbers by name; the same names on every grid. */
  readonly values: ReadonlyMap<string, number>;
  /** Parts whose sum a value is, where it has any; as many on every grid. */
  readonly parts: ReadonlyMap<string, readonly number[]>;
  /** Kin of a value, where it has any; as many on every grid. */
  readonly kin?: ReadonlyMap<string, readonly Kin[]>;
  /** How each value's error falls at the slowest. */
  readonly falls: ReadonlyMap<string, Fall>;
  /** Half-widths that a value's rounding alone takes, for those that have any to speak of. */
  readonly rounding?: ReadonlyMap<string, number>;
}

export interface Refined<T extends GridAnswer> {
  readonly finest: T;
  readonly bars: ReadonlyMap<string, number>;
  readonly grids: number;
  /** True when `satisfied` held before the limit of unknowns was reached. */
  readonly met: boolean;
}

/** Bars (half-widths, in each value's unit) of a finer answer from the one before it. Throws SolverError `number` where there is none. */
export function barsBetween(coarse: GridAnswer, fine: GridAnswer): Map<string, number> {
  const bars = new Map<string, number>();
  for (const [name, value] of fine.values) {
    const before = coarse.values.get(name) ?? Number.NaN;
    const parts = partsMoved(coarse.parts.get(name), fine.parts.get(name));
    const kin = kinMoved(coarse.kin?.get(name), fine.kin?.get(name));
    const left = remaining(fine.falls.get(name), coarse.level, fine.level);
    const bar = Math.max(Math.abs(value - before), parts, kin) * left + (fine.rounding?.get(name) ?? 0);
    // A bar that is no number would never shrink, and no level would be the next.
    if (!Number.isFinite(bar)) throw new SolverError("number", `${name} is ${value} after ${before}`);
    bars.set(name, bar);
  }
  return bars;
}

/** What is left of an error at level n over what moved since level m; NaN where nobody says how it falls. */
export function remaining(fall: Fall | undefined, m: number, n: number): number {
  if (fall === undefined) return Number.NaN;
  const { order, share } = fall;
  const error = (level: number): number =>
    ((1 - share) * level ** -FAST) / (1 - 2 ** -FAST) + (share * level ** -order) / (1 - 2 ** -order);
  return error(n) / (error(m) - error(n));
}

function partsMoved(before: readonly number[] | undefined, after: readonly number[] | undefined): number {
  if (before === undefined || after === undefined) return 0;
  return after.reduce((sum, c, i) => sum + Math.abs(c - before[i]), 0);
}

function kinMoved(before: readonly Kin[] = [], after: readonly Kin[] = []): number {
  return after.reduce((sum, { value, weight }, i) => {
    const was = before[i]?.value ?? value;
    return value === 0 ? sum : sum + weight * Math.abs(1 - was / value);
  }, 0);
}

/** Level to solve next when `bars` must shrink by `factor`: bars usually fall as n⁻³ or better. */
export function nextLevel(level: number, factor: number): number {
  return Math.max(level + 1, Math.min(2 * level, Math.ceil(level * factor ** (1 / 3))));
}

/**
 * Levels 1, 2, then as far as needed. `excess(answer, bars)`: the largest ratio of a bar to what is asked, ≤ 1 when satisfied.
 * `unknownsAt(level)` against `limit` stops before a grid too large.
 */
export function refine<T extends GridAnswer>(
  solveAt: (level: number) => T,
  unknownsAt: (level: number) => number,
  excess: (answer: T, bars: ReadonlyMap<string, number>) => number,
  limit: number,
  onGrid?: (grids: number, excess: number) => void,
): Refined<T> {
  let coarse = solveAt(1);
  onGrid?.(1, Infinity);
  let level = 2;
  for (let grids = 2; ; grids++) {
    const fine = solveAt(level);
    const bars = barsBetween(coarse, fine);
    const over = excess(fine, bars);
    onGrid?.(grids, over);
    if (over <= 1) return { finest: fine, bars, grids, met: true };
    let next = nextLevel(level, over);
    while (next > level + 1 && unknownsAt(next) > limit) next--;
    if (unknownsAt(next) > limit) return { finest: fine, bars, grids, met: false };
    coarse = fine;
    level = next;
  }
}
