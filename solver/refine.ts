/**
 * Solves on nested grids until the asked accuracy holds, and says how far each number may be from the truth.
 *
 * bar(q) = max(|q_n − q_m|, Σ_i |c_i,n − c_i,m|) / ((n/m)^p − 1), levels m < n the last two, c_i the parts q is the sum of.
 * An error that falls at least as h^p is bounded by it (Richardson). Smooth fields fall as h⁴ in powers and energies; p = 2 allows for
 * conductors' edges, 4/3 for sharp edges of magnetic bodies (field ∝ distance^(−1/3), energy h^(4/3)), 1/2 for values at a place. Where two
 * parts of the error cancel in q_n − q_m by chance they do not in every c_i. The grid reaches to infinity, so there is no outer boundary to
 * allow for; the direct solution's own error is far below (its residual is reported).
 */

import { SolverError } from "./errors.ts";

/** What one grid says. */
export interface GridAnswer {
  /** Cells along a patch's edge. */
  readonly level: number;
  readonly unknowns: number;
  /** Numbers by name; the same names on every grid. */
  readonly values: ReadonlyMap<string, number>;
  /** Parts whose sum a value is, where it has any; as many on every grid. */
  readonly parts: ReadonlyMap<string, readonly number[]>;
  /** Order p at which each value's error falls at least. */
  readonly orders: ReadonlyMap<string, number>;
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
    const moved = partsMoved(coarse.parts.get(name), fine.parts.get(name));
    const shrink = (fine.level / coarse.level) ** (fine.orders.get(name) ?? Number.NaN) - 1;
    const bar = Math.max(Math.abs(value - before), moved) / shrink;
    // A bar that is no number would never shrink, and no level would be the next.
    if (!Number.isFinite(bar)) throw new SolverError("number", `${name} is ${value} after ${before}`);
    bars.set(name, bar);
  }
  return bars;
}

function partsMoved(before: readonly number[] | undefined, after: readonly number[] | undefined): number {
  if (before === undefined || after === undefined) return 0;
  return after.reduce((sum, c, i) => sum + Math.abs(c - before[i]), 0);
}

/** Level to solve next when `bars` must shrink by `factor`: bars fall at least as n^−p, usually as n⁻³ or better. */
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
