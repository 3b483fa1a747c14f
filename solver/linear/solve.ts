/** x = L⁻ᵀ D⁻¹ L⁻¹ b, front by front: forward children to parents, backward parents to children. */
import type { ComplexVector } from "../types.ts";
import { type FactorNumbers, frontWorkspace, type Workspace } from "./front.ts";
import type { Fronts } from "./symbolic.ts";

/** Solves for one right-hand side in new numbering, in place. */
export function solveFronts(fronts: Fronts, factor: FactorNumbers, x: ComplexVector): void {
  const n = x.re.length;
  const space = frontWorkspace(fronts.largest, 2 * n);
  const { numbers, rest, kernel } = space;
  numbers.set(x.re, rest);
  numbers.set(x.im, rest + n);
  const count = fronts.rows.length;
  for (let f = 0; f < count; f++) sweep(fronts, factor, f, n, space, kernel.forward);
  divide(factor, numbers, rest, n);
  for (let f = count - 1; f >= 0; f--) sweep(fronts, factor, f, n, space, kernel.backward);
  x.re.set(numbers.subarray(rest, rest + n));
  x.im.set(numbers.subarray(rest + n, rest + 2 * n));
}

/** One front: its columns of L go to the first front's area, its rows and its part of x to where the kernel packs otherwise. */
function sweep(
  fronts: Fronts,
  factor: FactorNumbers,
  f: number,
  n: number,
  space: Workspace,
  run: Workspace["kernel"]["forward"],
): void {
  const p = fronts.pivots[f];
  if (p === 0) return;
  const { rowIds, rowStart, entryStart } = fronts;
  const { numbers, integers, packL, packW, rest } = space;
  const rows = fronts.rows[f];
  const [from, to] = [entryStart[f], entryStart[f + 1]];
  numbers.set(factor.re.subarray(from, to), 0);
  numbers.set(factor.im.subarray(from, to), to - from);
  integers.set(rowIds.subarray(rowStart[f], rowStart[f + 1]), 2 * packL);
  run(0, 8 * (to - from), 8 * rest, 8 * n, 8 * packL, rows, p, 8 * packW, 8 * rows);
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
