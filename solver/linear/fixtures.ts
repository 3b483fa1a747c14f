/** Matrices for the tests of this folder: nine-node cells on rectangles, Σ K + jM, with turn voltages; dense reference solutions. */
import { Matrix, solve as solveDense } from "ml-matrix";
import type { ComplexVector } from "../types.ts";
import type { ElementStructure, ElementValues } from "./structure.ts";

/** ∫ N_i' N_j' and ∫ N_i N_j of three-node line elements of length 1 (exact integrals of the quadratic Lagrange polynomials). */
const STIFF = [7, -8, 1, -8, 16, -8, 1, -8, 7].map((v) => v / 3);
const MASS = [4, 2, -1, 2, 16, 2, -1, 2, 4].map((v) => v / 30);

/** A structure with its values, and where its nodes lie. */
export interface TestMatrix {
  readonly structure: ElementStructure;
  readonly values: ElementValues;
  /** Per node of the lattice: its unknown, −1 where fixed to zero (the line x = xs[0]). */
  readonly unknownOf: Int32Array;
  readonly columns: number;
}

/**
 * Δ-like operator K + jσM on the cells between the lines xs and ys, zero on the line x = xs[0]. `turnOf(i, j)` names the turn of a cell or
 * −1; its cells carry one more unknown u with [K + jM, −jM1; ·, j1ᵀM1], as the field equations have it. σ = `loss` there, else `air`.
 */
export function cellMatrix(
  xs: readonly number[],
  ys: readonly number[],
  turnOf: (i: number, j: number) => number,
  turns: number,
  loss: number,
  air = 0,
): TestMatrix {
  const columns = 2 * xs.length - 1;
  const lattice = columns * (2 * ys.length - 1);
  const unknownOf = new Int32Array(lattice);
  let unknowns = 0;
  for (let v = 0; v < lattice; v++) unknownOf[v] = v % columns === 0 ? -1 : unknowns++;
  const out = {
    start: [0],
    ids: [] as number[],
    x: [] as number[],
    y: [] as number[],
    re: [] as number[],
    im: [] as number[],
  };
  for (let j = 0; j + 1 < ys.length; j++) {
    for (let i = 0; i + 1 < xs.length; i++) {
      const turn = turnOf(i, j);
      const cell = cellOf(xs[i + 1] - xs[i], ys[j + 1] - ys[j], turn < 0 ? air : loss, turn >= 0);
      const node = (a: number): number => unknownOf[(2 * j + Math.floor(a / 3)) * columns + 2 * i + (a % 3)];
      const ids = [0, 1, 2, 3, 4, 5, 6, 7, 8].map(node);
      if (turn >= 0) ids.push(unknowns + turn);
      const kept = ids.map((_, a) => a).filter((a) => ids[a] >= 0);
      for (const a of kept) {
        out.ids.push(ids[a]);
        for (const b of kept.filter((q) => q <= a)) {
          out.re.push(cell.re[10 * a + b]);
          out.im.push(cell.im[10 * a + b]);
        }
      }
      out.start.push(out.ids.length);
      out.x.push((xs[i] + xs[i + 1]) / 2);
      out.y.push((ys[j] + ys[j + 1]) / 2);
    }
  }
  const structure = {
    unknowns: unknowns + turns,
    start: Int32Array.from(out.start),
    ids: Int32Array.from(out.ids),
    x: Float64Array.from(out.x),
    y: Float64Array.from(out.y),
  };
  const values = { re: Float64Array.from(out.re), im: Float64Array.from(out.im) };
  return { structure, values, unknownOf, columns };
}

/** The 10 × 10 matrix of one cell: nine nodes and its turn's u. */
function cellOf(
  hx: number,
  hy: number,
  loss: number,
  hasTurn: boolean,
): { re: Float64Array; im: Float64Array } {
  const re = new Float64Array(100);
  const im = new Float64Array(100);
  for (let a = 0; a < 9; a++) {
    for (let b = 0; b < 9; b++) {
      const p = 3 * (a % 3) + (b % 3);
      const q = 3 * Math.floor(a / 3) + Math.floor(b / 3);
      re[10 * a + b] = (STIFF[p] * MASS[q] * hy) / hx + (MASS[p] * STIFF[q] * hx) / hy;
      const m = loss * hx * hy * MASS[p] * MASS[q];
      im[10 * a + b] = m;
      if (!hasTurn) continue;
      im[90 + b] -= m;
      im[10 * a + 9] -= m;
      im[99] += m;
    }
  }
  return { re, im };
}

/** Lines that grow by `ratio` from the first interval `h`, `n` intervals. */
export function gradedLines(n: number, h: number, ratio: number): number[] {
  const lines = [0];
  for (let i = 0; i < n; i++) lines.push(lines[i] + h * ratio ** i);
  return lines;
}

/** Random numbers in [0, 1) from a seed (mulberry32). */
export function random(seed: number): () => number {
  let s = seed | 0;
  return () => {
    s = (s + 0x6d2b79f5) | 0;
    let t = Math.imul(s ^ (s >>> 15), 1 | s);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

/** A random complex vector with parts in (−1, 1). */
export function randomVector(n: number, next: () => number): ComplexVector {
  return {
    re: Float64Array.from({ length: n }, () => 2 * next() - 1),
    im: Float64Array.from({ length: n }, () => 2 * next() - 1),
  };
}

/** x with A x = b by the pivoted dense elimination of ml-matrix on [Re A, −Im A; Im A, Re A]. */
export function denseSolution(
  structure: ElementStructure,
  values: ElementValues,
  b: ComplexVector,
): ComplexVector {
  const { unknowns: n, start, ids } = structure;
  const a = Matrix.zeros(2 * n, 2 * n);
  const add = (i: number, j: number, re: number, im: number): void => {
    a.set(i, j, a.get(i, j) + re);
    a.set(n + i, n + j, a.get(n + i, n + j) + re);
    a.set(n + i, j, a.get(n + i, j) + im);
    a.set(i, n + j, a.get(i, n + j) - im);
  };
  let v = 0;
  for (let e = 0; e + 1 < start.length; e++)
    for (let p = start[e]; p < start[e + 1]; p++)
      for (let q = start[e]; q <= p; q++, v++) {
        add(ids[p], ids[q], values.re[v], values.im[v]);
        if (q < p) add(ids[q], ids[p], values.re[v], values.im[v]);
      }
  const x = solveDense(a, Matrix.columnVector([...b.re, ...b.im])).to1DArray();
  return { re: Float64Array.from(x.slice(0, n)), im: Float64Array.from(x.slice(n)) };
}

/** max |x − y| / max |y|. */
export function difference(x: ComplexVector, y: ComplexVector): number {
  let off = 0;
  let size = 0;
  for (let i = 0; i < y.re.length; i++) {
    off = Math.max(off, Math.hypot(x.re[i] - y.re[i], x.im[i] - y.im[i]));
    size = Math.max(size, Math.hypot(y.re[i], y.im[i]));
  }
  return off / size;
}
