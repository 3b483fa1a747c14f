/** Quadratic and linear forms of one cell's nodal values, shared by losses, sources and surface fields. */
import type { ComplexVector } from "../types.ts";
import { PACKED } from "./integrals.ts";
import { NODES } from "./shape.ts";

/** dᴴ A d for a packed real symmetric A at place `cell` and nine complex numbers d. */
export function quadraticForm(
  packed: Float64Array,
  cell: number,
  re: Float64Array,
  im: Float64Array,
): number {
  let k = cell * PACKED;
  let sum = 0;
  for (let i = 0; i < NODES; i++) {
    let x = 0;
    let y = 0;
    for (let j = 0; j < i; j++, k++) {
      x += packed[k] * re[j];
      y += packed[k] * im[j];
    }
    const diagonal = packed[k++];
    sum += re[i] * (2 * x + diagonal * re[i]) + im[i] * (2 * y + diagonal * im[i]);
  }
  return sum;
}

/** y = A x for a packed real symmetric A at place `cell` and nine real numbers x. */
export function multiply(packed: Float64Array, cell: number, x: Float64Array, y: Float64Array): void {
  let k = cell * PACKED;
  y.fill(0);
  for (let i = 0; i < NODES; i++) {
    for (let j = 0; j < i; j++, k++) {
      y[i] += packed[k] * x[j];
      y[j] += packed[k] * x[i];
    }
    y[i] += packed[k++] * x[i];
  }
}

/** ψ − u at the nine nodes starting at `first`. */
export function gather(
  psi: ComplexVector,
  nodes: Int32Array,
  first: number,
  uRe: number,
  uIm: number,
  re: Float64Array,
  im: Float64Array,
): void {
  for (let i = 0; i < NODES; i++) {
    const node = nodes[first + i];
    re[i] = psi.re[node] - uRe;
    im[i] = psi.im[node] - uIm;
  }
}
