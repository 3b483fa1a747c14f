/** x = A⁻¹ b for A = Σ_e P_eᵀ A_e P_e complex symmetric: analyse once per structure, factorise per matrix, solve per right-hand side. */
import { SolverError } from "../errors.ts";
import type { ComplexVector } from "../types.ts";
import type { ElementStructure, ElementValues } from "./structure.ts";

export type { ElementStructure, ElementValues } from "./structure.ts";

/** Ordering and symbolic factorisation; opaque, reused for all matrices of one structure. */
export interface Analysis {
  readonly structure: ElementStructure;
  /** Numbers kept in the factor. */
  readonly entries: number;
}

/** A = L D Lᵀ; opaque. */
export interface Factor {
  readonly analysis: Analysis;
  readonly a: ComplexVector;
}

/** A refined solution with its backward error. */
export interface RefinedSolution {
  readonly x: ComplexVector;
  /** max_i |b − A x|_i / (|A| |x| + |b|)_i, |A| taken element by element. */
  readonly residual: number;
}

/** Orders the unknowns. Throws SolverError `structure` when ids are out of range or arrays do not fit. */
export function analyse(structure: ElementStructure): Analysis {
  return { structure, entries: structure.unknowns ** 2 };
}

/**
 * A = L D Lᵀ. `onProgress` hears the done fraction 0…1 now and then and may throw to abort.
 * Throws SolverError `singular` at a zero or non-finite pivot.
 */
export function factorise(
  analysis: Analysis,
  values: ElementValues,
  onProgress?: (fraction: number) => void,
): Factor {
  const { unknowns: n, start, ids } = analysis.structure;
  const re = new Float64Array(n * n);
  const im = new Float64Array(n * n);
  for (let e = 0, v = 0; e + 1 < start.length; e++)
    for (let i = start[e]; i < start[e + 1]; i++)
      for (let j = start[e]; j <= i; j++, v++) {
        const at = Math.max(ids[i], ids[j]) * n + Math.min(ids[i], ids[j]);
        re[at] += values.re[v];
        im[at] += values.im[v];
      }
  for (let k = 0; k < n; k++) {
    const dr = re[k * n + k];
    const di = im[k * n + k];
    const q = dr * dr + di * di;
    if (!(q > 0 && q < Infinity)) throw new SolverError("singular", `pivot ${k} is zero or not finite`);
    for (let i = k + 1; i < n; i++) {
      const wr = re[i * n + k];
      const wi = im[i * n + k];
      const lr = (wr * dr + wi * di) / q;
      const li = (wi * dr - wr * di) / q;
      for (let j = k + 1; j <= i; j++) {
        re[i * n + j] -= lr * re[j * n + k] - li * im[j * n + k];
        im[i * n + j] -= lr * im[j * n + k] + li * re[j * n + k];
      }
    }
    for (let i = k + 1; i < n; i++) {
      const wr = re[i * n + k];
      const wi = im[i * n + k];
      re[i * n + k] = (wr * dr + wi * di) / q;
      im[i * n + k] = (wi * dr - wr * di) / q;
    }
    onProgress?.((k + 1) / n);
  }
  return { analysis, a: { re, im } };
}

/** A x = b for `count` right-hand sides stored one after another; returns new arrays of the same length. */
export function solve(factor: Factor, rhs: ComplexVector, count = 1): ComplexVector {
  const n = factor.analysis.structure.unknowns;
  const { re, im } = factor.a;
  const xr = rhs.re.slice();
  const xi = rhs.im.slice();
  for (let o = 0; o < count * n; o += n) {
    for (let i = 0; i < n; i++)
      for (let k = 0; k < i; k++) {
        const at = i * n + k;
        xr[o + i] -= re[at] * xr[o + k] - im[at] * xi[o + k];
        xi[o + i] -= re[at] * xi[o + k] + im[at] * xr[o + k];
      }
    for (let i = n - 1; i >= 0; i--) {
      const dr = re[i * n + i];
      const di = im[i * n + i];
      const q = dr * dr + di * di;
      const a = (xr[o + i] * dr + xi[o + i] * di) / q;
      const b = (xi[o + i] * dr - xr[o + i] * di) / q;
      xr[o + i] = a;
      xi[o + i] = b;
      for (let k = i + 1; k < n; k++) {
        const at = k * n + i;
        xr[o + i] -= re[at] * xr[o + k] - im[at] * xi[o + k];
        xi[o + i] -= re[at] * xi[o + k] + im[at] * xr[o + k];
      }
    }
  }
  return { re: xr, im: xi };
}

/** r = b − A x by elements, and the backward error max_i |r_i| / (|A| |x| + |b|)_i. */
export function residual(
  structure: ElementStructure,
  values: ElementValues,
  x: ComplexVector,
  b: ComplexVector,
): { readonly r: ComplexVector; readonly error: number } {
  const rr = b.re.slice();
  const ri = b.im.slice();
  const scale = b.re.map((v, i) => Math.hypot(v, b.im[i]));
  const { start, ids } = structure;
  const add = (i: number, j: number, ar: number, ai: number) => {
    rr[i] -= ar * x.re[j] - ai * x.im[j];
    ri[i] -= ar * x.im[j] + ai * x.re[j];
    scale[i] += Math.hypot(ar, ai) * Math.hypot(x.re[j], x.im[j]);
  };
  for (let e = 0, v = 0; e + 1 < start.length; e++)
    for (let i = start[e]; i < start[e + 1]; i++)
      for (let j = start[e]; j <= i; j++, v++) {
        add(ids[i], ids[j], values.re[v], values.im[v]);
        if (j < i) add(ids[j], ids[i], values.re[v], values.im[v]);
      }
  let error = 0;
  for (let i = 0; i < rr.length; i++)
    if (scale[i] > 0) error = Math.max(error, Math.hypot(rr[i], ri[i]) / scale[i]);
  return { r: { re: rr, im: ri }, error };
}

/** x with one step of iterative refinement, and its backward error (see `residual`). */
export function solveRefined(factor: Factor, values: ElementValues, rhs: ComplexVector): RefinedSolution {
  const { structure } = factor.analysis;
  const x = solve(factor, rhs);
  const dx = solve(factor, residual(structure, values, x, rhs).r);
  for (let i = 0; i < structure.unknowns; i++) {
    x.re[i] += dx.re[i];
    x.im[i] += dx.im[i];
  }
  return { x, residual: residual(structure, values, x, rhs).error };
}
