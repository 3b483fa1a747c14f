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

/** The kernel's functions; see kernel.ts and transfers.ts. Addresses in bytes. */
interface Kernel {
  eliminate(
    c: number,
    plane: number,
    column: number,
    packL: number,
    packW: number,
    inverse: number,
    n: number,
    p: number,
  ): number;
  pack(
    c: number,
    plane: number,
    column: number,
    first: number,
    last: number,
    n: number,
    skip: number,
    re: number,
    im: number,
  ): void;
  extend(
    source: number,
    sourcePlane: number,
    stride: number,
    change: number,
    index: number,
    indexEnd: number,
    c: number,
    plane: number,
    column: number,
  ): void;
  readonly forward: Sweep;
  readonly backward: Sweep;
}

type Sweep = (
  l: number,
  plane: number,
  x: number,
  xPlane: number,
  rows: number,
  n: number,
  p: number,
  y: number,
  yPlane: number,
) => void;

/** The kernel with its memory: room for two fronts, a child and its parent, and more. Indices into `numbers`. */
export interface Workspace {
  readonly kernel: Kernel;
  readonly numbers: Float64Array;
  /** The same memory as 32-bit integers. */
  readonly integers: Int32Array;
  /** The most rows of a front. */
  readonly rows: number;
  readonly areas: readonly [number, number];
  /** The kernel's packed L and W; outside of an elimination room for twice 48 numbers a row each. */
  readonly packL: number;
  readonly packW: number;
  /** 1/D (pairs re, im). */
  readonly inverse: number;
  /** Room for `spare` numbers more. */
  readonly rest: number;
  readonly spare: number;
}

declare const WebAssembly: {
  Memory: new (size: { initial: number }) => { readonly buffer: ArrayBuffer };
  Module: new (code: Uint8Array) => object;
  Instance: new (module: object, host: { host: { memory: object } }) => { readonly exports: Kernel };
};

const PAGE = 65536;
/** Kept for the life of the process: the compiled kernel, and a memory as large as the largest front and rest met. */
let compiled: object | undefined;
let space: Workspace | undefined;

/**
 * The kernel, with room for fronts up to n rows and `spare` numbers; contents are whatever the last user left. A memory too small is
 * replaced, not grown: growing detaches its buffer, and at the first detached buffer V8 throws away all code compiled for typed arrays.
 */
export function frontWorkspace(n: number, spare = 0): Workspace {
  if (space !== undefined && space.rows >= n && space.spare >= spare) return space;
  const rows = grown(n, space?.rows ?? 0);
  const room = grown(spare, space?.spare ?? 0);
  const { leading, size } = layoutOf(rows);
  const packL = (2 * size + 7) & ~7;
  const packW = packL + 2 * leading * BLOCK;
  const inverse = packW + 2 * leading * BLOCK;
  const rest = inverse + 2 * rows + 2;
  compiled ??= new WebAssembly.Module(kernelModule());
  const memory = new WebAssembly.Memory({ initial: Math.ceil((8 * (rest + room)) / PAGE) });
  const { exports: kernel } = new WebAssembly.Instance(compiled, { host: { memory } });
  const numbers = new Float64Array(memory.buffer);
  const integers = new Int32Array(memory.buffer);
  space = { kernel, numbers, integers, rows, areas: [0, size], packL, packW, inverse, rest, spare: room };
  return space;
}

/** A little more than asked for where the memory has to be replaced again, the old size where that will do. */
function grown(asked: number, old: number): number {
  return asked <= old ? old : Math.ceil(Math.max(asked, 1.2 * old));
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
 * Eliminates the first p of n rows of the front at `area`; 1/D goes to `out` from index `pivot`, L stays in the front.
 * Returns −1, or the pivot (counted within the front; the first of its pair) that is zero or not finite.
 */
export function eliminate(
  space: Workspace,
  area: number,
  n: number,
  p: number,
  out: Pick<FactorNumbers, "inverseRe" | "inverseIm">,
  pivot: number,
): number {
  const { leading, imag } = layoutOf(n);
  const { kernel, numbers: c, inverse, packL, packW } = space;
  const bad = kernel.eliminate(8 * area, 8 * imag, 8 * leading, 8 * packL, 8 * packW, 8 * inverse, n, p);
  if (bad >= 0) return bad;
  for (let k = 0; k < p; k++) {
    out.inverseRe[pivot + k] = c[inverse + 2 * k];
    out.inverseIm[pivot + k] = c[inverse + 2 * k + 1];
  }
  return -1;
}

/** Copies the first p columns of the front below its diagonal, one after another, to indices `re` and `im` of the workspace. */
export function packColumns(
  { kernel }: Workspace,
  area: number,
  n: number,
  p: number,
  re: number,
  im: number,
): void {
  const { leading, imag } = layoutOf(n);
  kernel.pack(8 * area, 8 * imag, 8 * leading, 0, p, n, 1, 8 * re, 8 * im);
}
