/** x = L⁻ᵀ D⁻¹ L⁻¹ b, front by front: forward children to parents, backward parents to children. */
import type { ComplexVector } from "../types.ts";
import type { FactorNumbers } from "./front.ts";
import type { Fronts } from "./symbolic.ts";

/** Solves for one right-hand side in new numbering, in place. */
export function solveFronts(fronts: Fronts, factor: FactorNumbers, x: ComplexVector): void {
  const local = { re: new Float64Array(fronts.largest), im: new Float64Array(fronts.largest) };
  const count = fronts.rows.length;
  for (let f = 0; f < count; f++) forward(fronts, factor, f, x, local);
  divide(factor, x);
  for (let f = count - 1; f >= 0; f--) backward(fronts, factor, f, x, local);
}

/** x ← L⁻¹ x within front f: x_i −= l_ik x_k for k ascending. */
function forward(fronts: Fronts, factor: FactorNumbers, f: number, x: ComplexVector, local: ComplexVector) {
  const { rowIds, rowStart } = fronts;
  const from = rowStart[f];
  const n = fronts.rows[f];
  const p = fronts.pivots[f];
  if (p === 0) return;
  const { re, im } = factor;
  const yr = local.re;
  const yi = local.im;
  for (let i = 0; i < n; i++) {
    yr[i] = x.re[rowIds[from + i]];
    yi[i] = x.im[rowIds[from + i]];
  }
  let l = fronts.entryStart[f];
  for (let k = 0; k < p; k++) {
    const ar = yr[k];
    const ai = yi[k];
    for (let i = k + 1; i < n; i++) {
      yr[i] -= re[l] * ar - im[l] * ai;
      yi[i] -= re[l] * ai + im[l] * ar;
      l++;
    }
  }
  for (let i = 0; i < n; i++) {
    x.re[rowIds[from + i]] = yr[i];
    x.im[rowIds[from + i]] = yi[i];
  }
}

/** x ← D⁻¹ x. */
function divide(factor: FactorNumbers, x: ComplexVector): void {
  const { inverseRe, inverseIm } = factor;
  for (let k = 0; k < inverseRe.length; k++) {
    const xr = x.re[k];
    x.re[k] = xr * inverseRe[k] - x.im[k] * inverseIm[k];
    x.im[k] = xr * inverseIm[k] + x.im[k] * inverseRe[k];
  }
}

/** x ← L⁻ᵀ x within front f: x_k −= Σ_i l_ik x_i for k descending. */
function backward(fronts: Fronts, factor: FactorNumbers, f: number, x: ComplexVector, local: ComplexVector) {
  const { rowIds, rowStart } = fronts;
  const from = rowStart[f];
  const n = fronts.rows[f];
  const p = fronts.pivots[f];
  if (p === 0) return;
  const { re, im } = factor;
  const yr = local.re;
  const yi = local.im;
  for (let i = 0; i < n; i++) {
    yr[i] = x.re[rowIds[from + i]];
    yi[i] = x.im[rowIds[from + i]];
  }
  let end = fronts.entryStart[f + 1];
  for (let k = p - 1; k >= 0; k--) {
    end -= n - 1 - k;
    const shift = end - k - 1;
    let sr = yr[k];
    let si = yi[k];
    for (let i = k + 1; i < n; i++) {
      const lr = re[shift + i];
      const li = im[shift + i];
      sr -= lr * yr[i] - li * yi[i];
      si -= lr * yi[i] + li * yr[i];
    }
    yr[k] = sr;
    yi[k] = si;
  }
  for (let k = 0; k < p; k++) {
    x.re[rowIds[from + k]] = yr[k];
    x.im[rowIds[from + k]] = yi[k];
  }
}
