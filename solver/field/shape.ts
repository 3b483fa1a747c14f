/**
 * Shape functions of a nine-node cell on −1 ≤ ξ, η ≤ 1:
 *
 *   N_{a+3b}(ξ, η) = L_a(ξ; m(η)) · L_b(η; n(ξ)),
 *
 * L_a(x; m) the quadratic that is 1 at its own and 0 at the other two of the places −1, m, +1. On an ordinary cell m = n = 0:
 * the biquadratic Lagrange cell. An edge that leaves the axis at a right angle has its middle node at a quarter of s = r²; there
 * m = ∓1/2 makes s linear along the edge, so that ψ = s f(s, z) is met by polynomials in s and the map stays regular at
 * r = 0 (see axis.ts for ψ itself there). m and n go linearly from one edge of the cell to the
 * opposite one; traces on an edge depend on its own m alone, so neighbours fit; ΣN = 1 everywhere, so constants, s and z are exact.
 */

/** Nodes a cell. */
export const NODES = 9;
/** The middle node of an edge that leaves the axis squarely stands at a quarter of s, and of z: within these bounds (an arc of 45° still does). */
const QUARTER = [0.2, 0.3] as const;
/** A rise below this part of the edge's length is none. */
const LEVEL = 1e-9;

/** Values of the nine functions and of their derivatives at points one after another: 9 numbers a point. */
export interface ShapeTable {
  readonly n: Float64Array;
  readonly dXi: Float64Array;
  readonly dEta: Float64Array;
}

/**
 * Kind of a cell from its nodes' positions (m): four base-3 digits, one an edge (b = 0, b = 2, a = 0, a = 2), each
 * 0 = ordinary, 1 = leaves the axis at its first end, 2 = at its last end.
 */
export function kindOfCell(r: Float64Array, z: Float64Array, nodes: Int32Array, first: number): number {
  const digit = (i: number, j: number, k: number): number =>
    edgeKind(r, z, nodes[first + i], nodes[first + j], nodes[first + k]);
  return digit(0, 1, 2) + 3 * digit(6, 7, 8) + 9 * digit(0, 3, 6) + 27 * digit(2, 5, 8);
}

/** 1 or 2 where the edge through three nodes leaves the axis at its first or last end at a right angle, else 0. */
export function edgeKind(r: Float64Array, z: Float64Array, i: number, j: number, k: number): 0 | 1 | 2 {
  if (r[i] === 0 && r[k] > 0) return leavesSquarely(z[i], r[j], z[j], r[k], z[k]) ? 1 : 0;
  if (r[k] === 0 && r[i] > 0) return leavesSquarely(z[k], r[j], z[j], r[i], z[i]) ? 2 : 0;
  return 0;
}

/** True when z goes with s along the edge: level, or an arc about the axis. A slanted line goes with r, and belongs to r as its coordinate. */
function leavesSquarely(z0: number, rm: number, zm: number, r1: number, z1: number): boolean {
  const quarter = (q: number): boolean => q > QUARTER[0] && q < QUARTER[1];
  const level = Math.abs(zm - z0) <= LEVEL * r1 && Math.abs(z1 - z0) <= LEVEL * r1;
  return quarter((rm / r1) ** 2) && (level || quarter((zm - z0) / (z1 - z0)));
}

/** Place of the middle node of an edge of a kind. */
export function middleOf(kind: number): number {
  return kind === 1 ? -0.5 : kind === 2 ? 0.5 : 0;
}

/** L_0, L_1, L_2, then their derivatives by x, then by m, at x with the middle place m; into out (9 numbers). */
export function quadratics(x: number, m: number, out: Float64Array): void {
  const p = 1 + m;
  const q = 1 - m;
  const bubble = 1 - x * x;
  out[0] = ((1 - x) * (m - x)) / (2 * p);
  out[1] = bubble / (p * q);
  out[2] = ((1 + x) * (x - m)) / (2 * q);
  out[3] = (2 * x - 1 - m) / (2 * p);
  out[4] = (-2 * x) / (p * q);
  out[5] = (2 * x + 1 - m) / (2 * q);
  out[6] = bubble / (2 * p * p);
  out[7] = (2 * m * bubble) / (p * q * p * q);
  out[8] = -bubble / (2 * q * q);
}

const A = new Float64Array(9);
const B = new Float64Array(9);

/** The nine functions and derivatives at (ξ, η) of a cell of this kind, written at place `at` of the table. */
export function shapeAt(kind: number, xi: number, eta: number, out: ShapeTable, at = 0): void {
  if (kind === 0) {
    ordinaryAt(xi, eta, out, at * NODES);
    return;
  }
  const m0 = middleOf(kind % 3);
  const m1 = middleOf(Math.floor(kind / 3) % 3);
  const n0 = middleOf(Math.floor(kind / 9) % 3);
  const n1 = middleOf(Math.floor(kind / 27));
  quadratics(xi, (m0 * (1 - eta) + m1 * (1 + eta)) / 2, A);
  quadratics(eta, (n0 * (1 - xi) + n1 * (1 + xi)) / 2, B);
  const dm = (m1 - m0) / 2;
  const dn = (n1 - n0) / 2;
  const from = at * NODES;
  for (let b = 0; b < 3; b++) {
    for (let a = 0; a < 3; a++) {
      const k = from + a + 3 * b;
      out.n[k] = A[a] * B[b];
      out.dXi[k] = A[3 + a] * B[b] + A[a] * B[6 + b] * dn;
      out.dEta[k] = A[a] * B[3 + b] + A[6 + a] * dm * B[b];
    }
  }
}

/** The same for an ordinary cell, to the same digits: nearly all are, and finding places asks for millions. */
function ordinaryAt(xi: number, eta: number, out: ShapeTable, from: number): void {
  ordinaryQuadratics(xi, A);
  ordinaryQuadratics(eta, B);
  for (let b = 0; b < 3; b++) {
    for (let a = 0; a < 3; a++) {
      const k = from + a + 3 * b;
      out.n[k] = A[a] * B[b];
      out.dXi[k] = A[3 + a] * B[b];
      out.dEta[k] = A[a] * B[3 + b];
    }
  }
}

/** quadratics(x, 0, out) without the derivatives by m. */
function ordinaryQuadratics(x: number, out: Float64Array): void {
  out[0] = (x * (x - 1)) / 2;
  out[1] = 1 - x * x;
  out[2] = (x * (x + 1)) / 2;
  out[3] = x - 0.5;
  out[4] = -2 * x;
  out[5] = x + 0.5;
}

/** An empty table of `points` points. */
export function emptyTable(points: number): ShapeTable {
  return {
    n: new Float64Array(points * NODES),
    dXi: new Float64Array(points * NODES),
    dEta: new Float64Array(points * NODES),
  };
}

/** Four-point Gauss rule on −1 … 1 (Abramowitz & Stegun table 25.4; here from the closed form of the roots of P_4). */
export const GAUSS4 = gauss4();

function gauss4(): { readonly x: readonly number[]; readonly w: readonly number[] } {
  const inner = Math.sqrt(3 / 7 - (2 / 7) * Math.sqrt(6 / 5));
  const outer = Math.sqrt(3 / 7 + (2 / 7) * Math.sqrt(6 / 5));
  const wInner = (18 + Math.sqrt(30)) / 36;
  const wOuter = (18 - Math.sqrt(30)) / 36;
  return { x: [-outer, -inner, inner, outer], w: [wOuter, wInner, wInner, wOuter] };
}

/** The 4 × 4 Gauss points of a cell and their weights. */
export const GAUSS16 = gauss16();

function gauss16(): {
  readonly xi: readonly number[];
  readonly eta: readonly number[];
  readonly w: readonly number[];
} {
  const xi: number[] = [];
  const eta: number[] = [];
  const w: number[] = [];
  for (let j = 0; j < 4; j++) {
    for (let i = 0; i < 4; i++) {
      xi.push(GAUSS4.x[i]);
      eta.push(GAUSS4.x[j]);
      w.push(GAUSS4.w[i] * GAUSS4.w[j]);
    }
  }
  return { xi, eta, w };
}
