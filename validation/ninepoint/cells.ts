/**
 * Four-node cells of the second-order scheme, in A_φ over (r, z), without the 2π of the full turn:
 *
 *   inside:  K_ij = ∫ (1/r) ∂_r(rN_i) ∂_r(rN_j) + r ∂_zN_i ∂_zN_j,  M_ij = ∫ r N_i N_j,  c_i = ∫ N_i,  d = ∫ 1/r   (dr dz);
 *   outside: the inverted field Â(x') = (R/ρ') A(R²x'/ρ'²) obeys the same equation in the ball ρ' < R, and its energy is
 *            K_ij = ∫ r (∂_rN_i ∂_rN_j + ∂_zN_i ∂_zN_j) + N_i N_j/r over the half disc, with no term on the rim
 *            (Lord Kelvin's inversion; the rim terms of the two forms cancel on a sphere about the axis).
 *
 * Nothing of this is shared with the solver: other unknown, other variables, other shape functions, other outside.
 */

/** Integrals of one cell; matrices row by row, 16 numbers. */
export interface CellMatrices {
  readonly k: Float64Array;
  readonly m: Float64Array;
  readonly c: Float64Array;
  d: number;
}

const G = Math.sqrt(0.6);
const POINTS = [-G, 0, G];
const WEIGHTS = [5 / 9, 8 / 9, 5 / 9];
const SIGN_X = [-1, 1, 1, -1];
const SIGN_Y = [-1, -1, 1, 1];

export function emptyCell(): CellMatrices {
  return { k: new Float64Array(16), m: new Float64Array(16), c: new Float64Array(4), d: 0 };
}

/** Fills `out` for the quadrilateral with corners (r, z), counter-clockwise; nine Gauss points. */
export function fillCell(
  r: readonly number[],
  z: readonly number[],
  outside: boolean,
  out: CellMatrices,
): void {
  out.k.fill(0);
  out.m.fill(0);
  out.c.fill(0);
  out.d = 0;
  for (let p = 0; p < 3; p++) {
    for (let q = 0; q < 3; q++)
      addPoint(r, z, outside, POINTS[p]!, POINTS[q]!, WEIGHTS[p]! * WEIGHTS[q]!, out);
  }
}

const N = new Float64Array(4);
const NR = new Float64Array(4);
const NZ = new Float64Array(4);

function addPoint(
  r: readonly number[],
  z: readonly number[],
  outside: boolean,
  x: number,
  y: number,
  weight: number,
  out: CellMatrices,
): void {
  let [rp, rx, ry, zx, zy] = [0, 0, 0, 0, 0];
  for (let i = 0; i < 4; i++) {
    const [sx, sy] = [SIGN_X[i]!, SIGN_Y[i]!];
    N[i] = ((1 + sx * x) * (1 + sy * y)) / 4;
    NR[i] = (sx * (1 + sy * y)) / 4;
    NZ[i] = (sy * (1 + sx * x)) / 4;
    rp += N[i]! * r[i]!;
    rx += NR[i]! * r[i]!;
    ry += NZ[i]! * r[i]!;
    zx += NR[i]! * z[i]!;
    zy += NZ[i]! * z[i]!;
  }
  const det = rx * zy - ry * zx;
  const w = weight * Math.abs(det);
  for (let i = 0; i < 4; i++) {
    const [byX, byY] = [NR[i]!, NZ[i]!];
    NR[i] = (byX * zy - byY * zx) / det;
    NZ[i] = (byY * rx - byX * ry) / det;
  }
  for (let i = 0; i < 4; i++) {
    out.c[i]! += w * N[i]!;
    for (let j = 0; j < 4; j++) {
      const slopes = NR[i]! * NR[j]! + NZ[i]! * NZ[j]!;
      const cross = outside ? 0 : NR[i]! * N[j]! + N[i]! * NR[j]!;
      out.k[4 * i + j]! += w * (rp * slopes + cross + (N[i]! * N[j]!) / rp);
      out.m[4 * i + j]! += w * rp * N[i]! * N[j]!;
    }
  }
  out.d += w / rp;
}
