/** One front in the workspace: where it lies, and its partial factorisation by the kernel (see kernel.ts for the equation). */
import { BLOCK, kernelModule } from "./kernel.ts";

/** The factor's numbers: L by columns below the diagonal, and 1/D. */
export interface FactorNumbers {
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly inverseRe: Float64Array;
  readonly inverseIm: Float64Array;
}

/** Where one front lies: indices into the workspace's numbers. */
export interface FrontLayout {
  /** Numbers from one column to the next: the rows, rounded up to whole tiles. */
  readonly leading: number;
  /** Index of the imaginary parts; the real parts begin at 0. */
  readonly imag: number;
  /** Indices of the kernel's packed L and W, of 1/D (pairs re, im), and of what lies behind. */
  readonly packL: number;
  readonly packW: number;
  readonly inverse: number;
  readonly end: number;
}

/** The layout of a front of n rows: square, one spare column, whole tiles. */
export function layoutOf(n: number): FrontLayout {
  const leading = (n + 3) & ~3;
  const imag = leading * (n + 1);
  const packL = (2 * imag + 7) & ~7;
  const packW = packL + 2 * leading * BLOCK;
  const inverse = packW + 2 * leading * BLOCK;
  return { leading, imag, packL, packW, inverse, end: inverse + 2 * n + 2 };
}

/** The kernel with its memory. */
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
  /** The memory as numbers. Stale after the next call of `frontWorkspace`. */
  readonly numbers: Float64Array;
}

interface WasmMemory {
  readonly buffer: ArrayBuffer;
  grow(pages: number): number;
}
declare const WebAssembly: {
  Module: new (code: Uint8Array) => object;
  Instance: new (module: object) => { readonly exports: { run: Workspace["run"]; memory: WasmMemory } };
};

const PAGE = 65536;
/** Kept for the life of the process: it grows to the largest front met and is reused. */
let instance: { readonly run: Workspace["run"]; readonly memory: WasmMemory } | undefined;
let numbers = new Float64Array(0);

/** The kernel, with room for fronts up to n rows. Contents are whatever the last user left. */
export function frontWorkspace(n: number): Workspace {
  instance ??= new WebAssembly.Instance(new WebAssembly.Module(kernelModule())).exports;
  const missing = layoutOf(n).end * 8 - instance.memory.buffer.byteLength;
  if (missing > 0) instance.memory.grow(Math.ceil(missing / PAGE));
  if (numbers.buffer !== instance.memory.buffer) numbers = new Float64Array(instance.memory.buffer);
  return { run: instance.run, numbers };
}

/**
 * Eliminates the first p of n rows of the front in the workspace. Entries of L go to `out` from index `entry`, 1/D from index `pivot`.
 * Returns −1, or the pivot (counted within the front; the first of its pair) that is zero or not finite.
 */
export function eliminate(
  space: Workspace,
  n: number,
  p: number,
  out: FactorNumbers,
  entry: number,
  pivot: number,
): number {
  const { leading, imag, packL, packW, inverse } = layoutOf(n);
  const c = space.numbers;
  const bad = space.run(0, 8 * imag, 8 * leading, 8 * packL, 8 * packW, 8 * inverse, n, p);
  if (bad >= 0) return bad;
  const { re, im } = out;
  let e = entry;
  for (let k = 0; k < p; k++) {
    out.inverseRe[pivot + k] = c[inverse + 2 * k];
    out.inverseIm[pivot + k] = c[inverse + 2 * k + 1];
    const end = k * leading + n;
    for (let i = k * leading + k + 1; i < end; i++) {
      re[e] = c[i];
      im[e] = c[imag + i];
      e++;
    }
  }
  return -1;
}
