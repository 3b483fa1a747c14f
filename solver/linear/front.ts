/**
 * Partial factorisation of one dense front: [F11 ·; F21 F22] = [L11 0; L21 I] diag(D, S) [·]ᵀ, S = F22 − L21 D L21ᵀ.
 *
 * Blocks of BLOCK pivots; within a block two columns at a time are brought up to date by the kernel (left-looking) and
 * eliminated by plain loops; then the kernel takes the whole block out of the columns behind it (right-looking).
 * No pivoting: stable for complex symmetric matrices whose real and imaginary parts are semidefinite and together
 * definite (Higham, Math. Comp. 67 (1998) 1591, from memory).
 */
import { type Workspace, workspace } from "./kernel.ts";

/** Pivots a block: a tile of L (64 B a pivot) and a pair of W stay in the first cache. */
const BLOCK = 48;
/** Column pairs a kernel call: their part of W (32 B × BLOCK a pair) stays in the second cache. */
const PAIRS = 128;

/** The factor's numbers: L by columns below the diagonal, and 1/D. */
export interface FactorNumbers {
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly inverseRe: Float64Array;
  readonly inverseIm: Float64Array;
}

/** Where one front lies in the workspace; indices into `numbers`. */
export interface FrontLayout {
  /** Numbers from one column to the next: the rows, rounded up to whole tiles. */
  readonly leading: number;
  /** Index of the imaginary parts; the real parts begin at 0. */
  readonly imag: number;
  /** Indices of the packed L and W of a block. */
  readonly packL: number;
  readonly packW: number;
  readonly total: number;
}

/** The layout of a front of n rows: square, one spare column, whole tiles. */
export function layoutOf(n: number): FrontLayout {
  const leading = (n + 3) & ~3;
  const imag = leading * (n + 1);
  const packL = (2 * imag + 7) & ~7;
  const packW = packL + 2 * leading * BLOCK;
  return { leading, imag, packL, packW, total: packW + 2 * (leading + 2) * BLOCK };
}

/** Room in the workspace for fronts up to n rows. */
export function frontWorkspace(n: number): Workspace {
  return workspace(layoutOf(n).total);
}

/**
 * Eliminates the first p of n rows of the front in the workspace. Entries of L go to `out` from index `entry`, 1/D from index `pivot`.
 * Returns −1, or the pivot (counted within the front) that is zero or not finite.
 */
export function eliminate(
  space: Workspace,
  n: number,
  p: number,
  out: FactorNumbers,
  entry: number,
  pivot: number,
): number {
  const at = layoutOf(n);
  const { update, numbers } = space;
  let next = entry;
  for (let k0 = 0; k0 < p; k0 += BLOCK) {
    const k1 = Math.min(p, k0 + BLOCK);
    const width = k1 - k0;
    const call = (terms: number, firstTile: number, firstPair: number, lastPair: number): void =>
      update(
        0,
        8 * at.imag,
        8 * at.leading,
        8 * at.packL - 64 * width * (k0 >> 2),
        8 * at.packW - 32 * width * (k0 >> 1),
        64 * width,
        32 * width,
        terms,
        firstTile,
        at.leading >> 2,
        firstPair,
        lastPair,
      );
    if (width & 1) clearColumnW(numbers, at, k0, width, k1);
    for (let k = k0; k < k1; k += 2) {
      if (k > k0) call(k - k0, k >> 2, k >> 1, (k >> 1) + 1);
      for (let q = k; q < Math.min(k + 2, k1); q++) {
        const partner = q === k && k + 1 < k1 ? k + 1 : -1;
        if (!eliminateColumn(numbers, at, n, q, k0, k1, partner, out, next, pivot + q)) return q;
        next += n - 1 - q;
      }
    }
    if (k1 === n) break;
    packTrailingW(numbers, at, n, k0, k1);
    const pairs = (n + 1) >> 1;
    for (let s = k1 >> 1; s < pairs; s += PAIRS)
      call(width, Math.max(k1 >> 2, s >> 1), s, Math.min(pairs, s + PAIRS));
  }
  return -1;
}

/**
 * l_i = w_i/d for the rows below pivot k, d = C(k, k), w_i = C(i, k); and the partner column j takes C(i, j) −= l_i w_j.
 * One long loop because it is run for every number of the factor.
 */
function eliminateColumn(
  c: Float64Array,
  at: FrontLayout,
  n: number,
  k: number,
  k0: number,
  k1: number,
  partner: number,
  out: FactorNumbers,
  entry: number,
  pivot: number,
): boolean {
  const { leading, imag, packL, packW } = at;
  const width = k1 - k0;
  const column = k * leading;
  const dr = c[column + k];
  const di = c[imag + column + k];
  const square = dr * dr + di * di;
  if (!(square > 0 && square < Infinity)) return false;
  const vr = dr / square;
  const vi = -di / square;
  out.inverseRe[pivot] = vr;
  out.inverseIm[pivot] = vi;
  const other = partner * leading;
  const wr = partner < 0 ? 0 : c[column + partner];
  const wi = partner < 0 ? 0 : c[imag + column + partner];
  const { re, im } = out;
  const shift = entry - k - 1;
  const line = 8 * (k - k0);
  for (let tile = k >> 2; tile < leading >> 2; tile++) {
    const pack = packL + 8 * width * (tile - (k0 >> 2)) + line;
    for (let r = 0; r < 4; r++) {
      const i = 4 * tile + r;
      if (i <= k || i >= n) {
        c[pack + r] = 0;
        c[pack + r + 4] = 0;
        continue;
      }
      const xr = c[column + i];
      const xi = c[imag + column + i];
      const lr = xr * vr - xi * vi;
      const li = xr * vi + xi * vr;
      c[pack + r] = lr;
      c[pack + r + 4] = li;
      re[shift + i] = lr;
      im[shift + i] = li;
      if (partner >= 0) {
        c[other + i] -= lr * wr - li * wi;
        c[imag + other + i] -= lr * wi + li * wr;
      }
    }
  }
  for (let j = k + 1; j < k1; j++) {
    const pack = packW + 4 * width * ((j >> 1) - (k0 >> 1)) + 4 * (k - k0) + 2 * (j & 1);
    c[pack] = c[column + j];
    c[pack + 1] = c[imag + column + j];
  }
  return true;
}

/** W of one column = 0 for the whole block. */
function clearColumnW(c: Float64Array, at: FrontLayout, k0: number, width: number, j: number): void {
  const pack = at.packW + 4 * width * ((j >> 1) - (k0 >> 1)) + 2 * (j & 1);
  for (let k = 0; k < width; k++) {
    c[pack + 4 * k] = 0;
    c[pack + 4 * k + 1] = 0;
  }
}

/** W(j, k) = C(j, k) for the columns j behind the block; 0 for its own last column and the spare one where a pair holds them. */
function packTrailingW(c: Float64Array, at: FrontLayout, n: number, k0: number, k1: number): void {
  const { leading, imag, packW } = at;
  const width = k1 - k0;
  if (k1 & 1) clearColumnW(c, at, k0, width, k1 - 1);
  if (n & 1) clearColumnW(c, at, k0, width, n);
  for (let k = k0; k < k1; k++) {
    const column = k * leading;
    const first = packW + 4 * (k - k0) - 4 * width * (k0 >> 1);
    for (let j = k1; j < n; j++) {
      const pack = first + 4 * width * (j >> 1) + 2 * (j & 1);
      c[pack] = c[column + j];
      c[pack + 1] = c[imag + column + j];
    }
  }
}
