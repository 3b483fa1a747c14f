/** x = A⁻¹ b for A = Σ_e P_eᵀ A_e P_e complex symmetric: analyse once per structure, factorise per matrix, solve per right-hand side. */
import { SolverError } from "../errors.ts";
import type { ComplexVector } from "../types.ts";
import { dissect } from "./dissection.ts";
import type { FactorNumbers } from "./front.ts";
import { factoriseFronts } from "./numeric.ts";
import { residual } from "./residual.ts";
import { solveFronts } from "./solve.ts";
import { checkStructure, checkValues, type ElementStructure, type ElementValues } from "./structure.ts";
import { type Fronts, frontsOf, triangle } from "./symbolic.ts";

export { type Residual, residual } from "./residual.ts";
export type { ElementStructure, ElementValues } from "./structure.ts";

/** Ordering and symbolic factorisation; reused for all matrices of one structure. */
export interface Analysis {
  readonly structure: ElementStructure;
  /** Complex numbers the factor will keep: L below the diagonal, and D. */
  readonly entries: number;
  /** Complex multiplications a factorisation takes. */
  readonly multiplications: number;
  readonly fronts: Fronts;
  /** Per element the index of its first value; length elements + 1. */
  readonly valueStart: Int32Array;
}

/** A = L D Lᵀ. */
export interface Factor {
  readonly analysis: Analysis;
  readonly numbers: FactorNumbers;
}

/** A refined solution with its backward error. */
export interface RefinedSolution {
  readonly x: ComplexVector;
  /** max_i |b − A x|_i / (|A| |x| + |b|)_i, |A| taken element by element; see `residual`. */
  readonly residual: number;
}

/** Orders the unknowns and lays out the factor. Throws SolverError `structure` when the arrays do not describe a matrix. */
export function analyse(structure: ElementStructure): Analysis {
  checkStructure(structure);
  const { start } = structure;
  const valueStart = new Int32Array(start.length);
  for (let e = 0; e + 1 < start.length; e++)
    valueStart[e + 1] = valueStart[e] + triangle(start[e + 1] - start[e]);
  const fronts = frontsOf(structure, dissect(structure));
  const count = fronts.rows.length;
  return {
    structure,
    entries: fronts.entryStart[count] + structure.unknowns,
    multiplications: fronts.work[count],
    fronts,
    valueStart,
  };
}

/**
 * A = L D Lᵀ. `onProgress` hears the done fraction 0…1 now and then and may throw to abort.
 * Throws SolverError `structure` when the values do not fit, `singular` at a zero or non-finite pivot.
 */
export function factorise(
  analysis: Analysis,
  values: ElementValues,
  onProgress?: (fraction: number) => void,
): Factor {
  const { structure, fronts, valueStart } = analysis;
  checkValues(values, valueStart[valueStart.length - 1]);
  return { analysis, numbers: factoriseFronts(structure, valueStart, fronts, values, onProgress) };
}

/** A x = b for `count` right-hand sides stored one after another; returns new arrays of the same length. */
export function solve(factor: Factor, rhs: ComplexVector, count = 1): ComplexVector {
  const { fronts, structure } = factor.analysis;
  const n = structure.unknowns;
  if (rhs.re.length !== n * count || rhs.im.length !== n * count)
    throw new SolverError(
      "structure",
      `${count} right-hand sides need ${n * count} numbers, got ${rhs.re.length}`,
    );
  const { newNumber } = fronts;
  const x = { re: new Float64Array(n * count), im: new Float64Array(n * count) };
  const y = { re: new Float64Array(n), im: new Float64Array(n) };
  for (let from = 0; from < n * count; from += n) {
    for (let i = 0; i < n; i++) {
      y.re[newNumber[i]] = rhs.re[from + i];
      y.im[newNumber[i]] = rhs.im[from + i];
    }
    solveFronts(fronts, factor.numbers, y);
    for (let i = 0; i < n; i++) {
      x.re[from + i] = y.re[newNumber[i]];
      x.im[from + i] = y.im[newNumber[i]];
    }
  }
  return x;
}

/** A backward error this small is left alone: refining it moves x by 1e-13 at most (measured over the gallery). */
const ENOUGH = 1e-14;

/** x and its backward error, with one step of iterative refinement where it is worth one. `rhs` holds one right-hand side. */
export function solveRefined(factor: Factor, values: ElementValues, rhs: ComplexVector): RefinedSolution {
  const { structure } = factor.analysis;
  const x = solve(factor, rhs);
  const first = residual(structure, values, x, rhs);
  if (first.error <= ENOUGH) return { x, residual: first.error };
  const dx = solve(factor, first.r);
  for (let i = 0; i < structure.unknowns; i++) {
    x.re[i] += dx.re[i];
    x.im[i] += dx.im[i];
  }
  return { x, residual: residual(structure, values, x, rhs).error };
}
