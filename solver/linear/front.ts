/** One front in the workspace: where it lies, and its partial factorisation by the kernel (see kernel.ts for the equation). */
import { BLOCK, kernelModule } from "./kernel.ts";

/** The factor's numbers: L by columns below the diagonal, and 1/D. */
export interface FactorNumbers {
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly inverseRe: Float64Array;
  readonly inverseIm: Float64Array;
}

/** How a front of n rows lies from its first number on: square, by columns, one spare column. */
export interface FrontLayout {
  /** Numbers from one column to the next: the rows, rounded up to whole tiles. */
  readonly leading: number;
  /** From a real part to its imaginary part. */
  readonly imag: number;
  readonly size: number;
}

/** The layout of a front of n rows. */
export function layoutOf(n: number): FrontLayout {
  const leading = (n + 3) & ~3;
  const imag = leading * (n + 1);
  return { leading, imag, size: 2 * imag };
}

/** The kernel with its memory: room for two fronts, a child and its parent. Indices into `numbers`. */
export interface Workspace {
  /** See `kernelModule`; addresses in bytes. */
  readonly run: (
    c: number,
    plane: number,
    column: number,
    packL: number,
    packW: number,
    inverse: number,
    n: number,
    p: number,
  ) => number;
  readonly numbers: Float64Array;
  /** The most rows of a front. */
  readonly rows: number;
  readonly areas: readonly [number, number];
  /** The kernel's packed L and W, and 1/D (pairs re, im). */
  readonly packL: number;
  readonly packW: number;
  readonly inverse: number;
}

declare const WebAssembly: {
  Memory: new (size: { initial: number }) => { readonly buffer: ArrayBuffer };
  Module: new (code: Uint8Array) => object;
  Instance: new (
    module: object,
    host: { host: { memory: object } },
  ) => { readonly exports: { readonly run: Workspace["run"] } };
};

const PAGE = 65536;
/** Kept for the life of the process: the compiled kernel, and a memory as large as the largest front met. */
let compiled: object | undefined;
let space: Workspace | undefined;

/**
 * The kernel, with room for fronts up to n rows; contents are whatever the last user left. A memory too small is replaced, not grown:
 * growing detaches its buffer, and at the first detached buffer V8 throws away all code compiled for typed arrays.
 */
export function frontWorkspace(n: number): Workspace {
  if (space !== undefined && space.rows >= n) return space;
  const rows = Math.ceil(Math.max(n, 1.2 * (space?.rows ?? 0)));
  const { leading, size } = layoutOf(rows);
  const packL = (2 * size + 7) & ~7;
  const packW = packL + 2 * leading * BLOCK;
  const inverse = packW + 2 * leading * BLOCK;
  compiled ??= new WebAssembly.Module(kernelModule());
  const memory = new WebAssembly.Memory({ initial: Math.ceil((8 * (inverse + 2 * rows + 2)) / PAGE) });
  const { run } = new WebAssembly.Instance(compiled, { host: { memory } }).exports;
  space = { run, numbers: new Float64Array(memory.buffer), rows, areas: [0, size], packL, packW, inverse };
  return space;
}

/** C = 0, where it will be read: whole columns of small fronts, of large ones what lies below the diagonal tile's top. */
export function clearFront(c: Float64Array, area: number, n: number): void {
  const { leading, imag, size } = layoutOf(n);
  if (n < LARGE) {
    c.fill(0, area, area + size);
    return;
  }
  for (let j = 0; j <= n; j++) {
    const from = area + j * leading + (j & ~3);
    const to = area + (j + 1) * leading;
    c.fill(0, from, to);
    c.fill(0, imag + from, imag + to);
  }
}
const LARGE = 200;

/**
 * Eliminates the first p of n rows of the front at `area`. Entries of L go to `out` from index `entry`, 1/D from index `pivot`.
 * Returns −1, or the pivot (counted within the front; the first of its pair) that is zero or not finite.
 */
export function eliminate(
  space: Workspace,
  area: number,
  n: number,
  p: number,
  out: FactorNumbers,
  entry: number,
  pivot: number,
): number {
  const { leading, imag } = layoutOf(n);
  const { numbers: c, inverse } = space;
  const bad = space.run(8 * area, 8 * imag, 8 * leading, 8 * space.packL, 8 * space.packW, 8 * inverse, n, p);
  if (bad >= 0) return bad;
  const { re, im } = out;
  let e = entry;
  for (let k = 0; k < p; k++) {
    out.inverseRe[pivot + k] = c[inverse + 2 * k];
    out.inverseIm[pivot + k] = c[inverse + 2 * k + 1];
    const column = area + k * leading;
    const end = column + n;
    for (let i = column + k + 1; i < end; i++) {
      re[e] = c[i];
      im[e] = c[imag + i];
      e++;
    }
  }
  return -1;
}
