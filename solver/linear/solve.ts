/**
 * x = L⁻ᵀ D⁻¹ L⁻¹ b, front by front: forward children to parents, backward parents to children. The kernel works on copies of L in its own
 * memory, taken a few fronts at a time: small enough to stay in the second cache, and few enough that copying costs no calls.
 */
import type { ComplexVector } from "../types.ts";
import { type FactorNumbers, frontWorkspace, type Workspace } from "./front.ts";
import type { Fronts } from "./symbolic.ts";

/** Numbers of L and rows copied at a time; a front that has more comes alone. The kernel's room for packed L holds as many rows. */
const ENTRIES = 12_000;
const ROWS = 180;

/** Solves for one right-hand side in new numbering, in place. */
export function solveFronts(fronts: Fronts, factor: FactorNumbers, x: ComplexVector): void {
  const n = x.re.length;
  const space = frontWorkspace(fronts.largest, fronts.room);
  const { numbers, rest, kernel } = space;
  numbers.set(x.re, rest);
  numbers.set(x.im, rest + n);
  const bounds = batches(fronts, space);
  for (let b = 1; b < bounds.length; b++) {
    fetch(fronts, factor, bounds[b - 1], bounds[b], space);
    for (let f = bounds[b - 1]; f < bounds[b]; f++) sweep(fronts, f, bounds[b - 1], n, space, kernel.forward);
  }
  divide(factor, numbers, rest, n);
  for (let b = bounds.length - 1; b > 0; b--) {
    fetch(fronts, factor, bounds[b - 1], bounds[b], space);
    for (let f = bounds[b] - 1; f >= bounds[b - 1]; f--)
      sweep(fronts, f, bounds[b - 1], n, space, kernel.backward);
  }
  x.re.set(numbers.subarray(rest, rest + n));
  x.im.set(numbers.subarray(rest + n, rest + 2 * n));
}

/** Where batches of fronts begin, and the number of fronts. */
function batches({ rows, rowStart, entryStart }: Fronts, { areas, rows: most }: Workspace): number[] {
  const entries = Math.min(ENTRIES, areas[1]);
  const bounds = [0];
  let from = 0;
  for (let f = 1; f < rows.length; f++) {
    const small = rowStart[f + 1] - rowStart[from] <= ROWS * most;
    if (small && entryStart[f + 1] - entryStart[from] <= entries) continue;
    bounds.push(f);
    from = f;
  }
  return [...bounds, rows.length];
}

/** Copies L and rows of fronts from … to − 1: L to the fronts' areas, the rows to where the kernel packs L otherwise. */
function fetch(
  { rowIds, rowStart, entryStart }: Fronts,
  { re, im }: FactorNumbers,
  from: number,
  to: number,
  { numbers, integers, areas, packL }: Workspace,
): void {
  numbers.set(re.subarray(entryStart[from], entryStart[to]), areas[0]);
  numbers.set(im.subarray(entryStart[from], entryStart[to]), areas[1]);
  integers.set(rowIds.subarray(rowStart[from], rowStart[to]), 2 * packL);
}

/** Front f of a batch that was fetched. */
function sweep(
  { pivots, rows, rowStart, entryStart }: Fronts,
  f: number,
  from: number,
  n: number,
  { areas, packL, packW, rest }: Workspace,
  run: Workspace["kernel"]["forward"],
): void {
  if (pivots[f] === 0) return;
  const l = 8 * (areas[0] + entryStart[f] - entryStart[from]);
  const ids = 8 * packL + 4 * (rowStart[f] - rowStart[from]);
  run(l, 8 * (areas[1] - areas[0]), 8 * rest, 8 * n, ids, rows[f], pivots[f], 8 * packW, 8 * rows[f]);
}

/** x ← D⁻¹ x; x begins at `at`, its imaginary parts n further. */
function divide({ inverseRe, inverseIm }: FactorNumbers, x: Float64Array, at: number, n: number): void {
  for (let k = 0; k < n; k++) {
    const re = x[at + k];
    const im = x[at + n + k];
    x[at + k] = re * inverseRe[k] - im * inverseIm[k];
    x[at + n + k] = re * inverseIm[k] + im * inverseRe[k];
  }
}
