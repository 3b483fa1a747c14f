/**
 * Partial factorisation of a dense complex symmetric front: [F11 ·; F21 F22] = [L11 0; L21 I] diag(D, S) [·]ᵀ, S = F22 − L21 D L21ᵀ.
 *
 * A WebAssembly module of two-number vectors, assembled here (JavaScript has no such vectors, and a cold process would run its loops
 * interpreted). Blocks of BLOCK pivots; within a block two columns at a time are brought up to date (left-looking) and
 * eliminated; then the block is taken out of the columns behind it (right-looking) by tiles of four rows and two
 * columns that stay in registers over the whole sum. Addresses and strides are in bytes:
 *
 *   C: the front, square, by columns; imaginary parts `plane` after the real parts; only i ≥ j means anything;
 *   L: a block's columns packed tile after tile of four rows, each pivot a line of 64: re × 4, im × 4;
 *   W = D Lᵀ: pair after pair of columns of C, each pivot 32: re, im, re, im.
 *
 * No pivoting: stable where real and imaginary parts are semidefinite and together definite
 * (Higham, Math. Comp. 67 (1998) 1591, from memory).
 */
import { backward, extend, forward, pack } from "./transfers.ts";
import {
  add,
  and,
  both,
  type Code,
  call,
  constant,
  F64,
  FunctionBuilder,
  firsts,
  get,
  I32,
  larger,
  leave,
  less,
  load,
  loadBoth,
  loadNumber,
  moduleOf,
  multiply,
  notPositive,
  numberAdd,
  numberDivide,
  numberMultiply,
  numberNegate,
  numberSubtract,
  seconds,
  set,
  shiftLeft,
  shiftRight,
  smaller,
  store,
  storeNumber,
  subtract,
  V128,
  vectorAdd,
  vectorMultiply,
  vectorSubtract,
  when,
  whileLess,
} from "./wasm.ts";

/** Pivots a block: a tile of L and a pair of W (64 and 32 bytes a pivot) stay in the first cache. A multiple of 4. */
export const BLOCK = 48;
/** Column pairs at a time: their part of W stays in the second cache. */
const PAIRS = 128;

/** Index of each function in the module. */
const UPDATE = 0;
const ONE = 1;
const TWO = 2;
const ELIMINATE = 3;

/**
 * The module: exports `eliminate(c, plane, column, packL, packW, inverse, n, p)` → −1 or the pivot that is zero or not finite, and what
 * transfers.ts describes.
 */
export function kernelModule(): Uint8Array {
  const around = { pack: 4, extend: 5, forward: 6, backward: 7 };
  return moduleOf([update(), columns(1), columns(2), eliminate(), pack(), extend(), forward(), backward()], {
    eliminate: ELIMINATE,
    ...around,
  });
}

/**
 * C(i, j) −= Σ_k L(i, k) W(j, k), k < terms, on row tiles firstTile … and column pairs firstPair … below the diagonal.
 * `l` and `w` are where tile 0 and pair 0 would be.
 */
function update(): { builder: FunctionBuilder; code: Code } {
  const builder = new FunctionBuilder(12, false);
  const [c, plane, column, l, w, tileStride, pairStride, terms, firstTile, lastTile, firstPair, lastPair] =
    Array.from({ length: 12 }, (_, i) => i);
  const i32 = (): number => builder.local(I32);
  const [tile, pair, pairEnd, a, b, aEnd] = [i32(), i32(), i32(), i32(), i32(), i32()];
  /** Addresses of the tile: re and im of its first column, of its second. */
  const at = [i32(), i32(), i32(), i32()];
  /** The tile: [column][re, im][rows 0–1, rows 2–3]. */
  const sum = Array.from({ length: 8 }, () => builder.local(V128));
  const line = Array.from({ length: 4 }, () => builder.local(V128));
  const factor = builder.local(V128);
  const take = (s: number, v: number, sign: typeof vectorAdd): Code =>
    set(sum[s], sign(get(sum[s]), vectorMultiply(get(line[v]), get(factor))));
  const term: Code = [
    ...line.flatMap((v, i) => set(v, load(get(a), 16 * i))),
    ...[0, 1].flatMap((q) => [
      ...set(factor, loadBoth(get(b), 16 * q)),
      ...[0, 1, 2, 3].flatMap((v) => take(4 * q + v, v, vectorSubtract)),
      ...set(factor, loadBoth(get(b), 16 * q + 8)),
      ...[2, 3].flatMap((v) => take(4 * q + v - 2, v, vectorAdd)),
      ...[0, 1].flatMap((v) => take(4 * q + v + 2, v, vectorSubtract)),
    ]),
    ...set(a, add(get(a), constant(64))),
    ...set(b, add(get(b), constant(32))),
  ];
  const position = add(multiply(shiftLeft(get(pair), 1), get(column)), shiftLeft(get(tile), 5));
  const oneTile: Code = [
    ...set(at[0], add(get(c), position)),
    ...set(at[1], add(get(at[0]), get(plane))),
    ...set(at[2], add(get(at[0]), get(column))),
    ...set(at[3], add(get(at[1]), get(column))),
    ...set(a, add(get(l), multiply(get(tile), get(tileStride)))),
    ...set(aEnd, add(get(a), shiftLeft(get(terms), 6))),
    ...set(b, add(get(w), multiply(get(pair), get(pairStride)))),
    ...sum.flatMap((s, i) => set(s, load(get(at[i >> 1]), 16 * (i & 1)))),
    ...whileLess(get(a), get(aEnd), term),
    ...sum.flatMap((s, i) => store(get(at[i >> 1]), 16 * (i & 1), get(s))),
    ...set(pair, add(get(pair), constant(1))),
  ];
  const code = [
    ...set(tile, get(firstTile)),
    ...whileLess(get(tile), get(lastTile), [
      ...set(pairEnd, add(shiftLeft(get(tile), 1), constant(2))),
      ...set(pairEnd, smaller(get(lastPair), get(pairEnd))),
      ...set(pair, get(firstPair)),
      ...whileLess(get(pair), get(pairEnd), oneTile),
      ...set(tile, add(get(tile), constant(1))),
    ]),
  ];
  return { builder, code: builder.finish(code) };
}

/**
 * Eliminates pivot k, or k and k + 1: L over W in C, L and W into their packs, 1/D to `inverse`.
 * l and w are where pivot k lies in tile 0 and pair 0. Returns 0, or 1 when a pivot is zero or not finite.
 * Parts above the diagonal get meaningless numbers that nothing reads.
 */
function columns(count: 1 | 2): { builder: FunctionBuilder; code: Code } {
  const builder = new FunctionBuilder(10, true);
  const [c, plane, column, l, w, tileStride, pairStride, inverse, k, lastTile] = Array.from(
    { length: 10 },
    (_, i) => i,
  );
  const i32 = (): number => builder.local(I32);
  const [tile, diagonal, diagonalIm, packL, packW, even] = [i32(), i32(), i32(), i32(), i32(), i32()];
  /** Addresses of the columns' next four rows: re and im of each. */
  const at = [i32(), i32(), i32(), i32()];
  const f64 = (): number => builder.local(F64);
  const [dr, di, square, wr, wi, tr, ti] = [f64(), f64(), f64(), f64(), f64(), f64(), f64()];
  const v128 = (): number => builder.local(V128);
  const v = [v128(), v128(), v128(), v128()];
  const [yr, yi] = [v128(), v128()];
  const [xr, xi, lr, li] = [v128(), v128(), v128(), v128()];
  const cross = (a: number, b: number, p: number, q: number, sign: typeof vectorAdd): Code =>
    sign(vectorMultiply(get(a), get(b)), vectorMultiply(get(p), get(q)));

  /** 1/d of pivot q from (dr, di). */
  const invert = (q: number): Code => [
    ...set(square, numberAdd(numberMultiply(get(dr), get(dr)), numberMultiply(get(di), get(di)))),
    ...when(notPositive(get(square)), leave(constant(1))),
    ...set(dr, numberDivide(get(dr), get(square))),
    ...set(di, numberDivide(numberNegate(get(di)), get(square))),
    ...storeNumber(get(inverse), 16 * q, get(dr)),
    ...storeNumber(get(inverse), 16 * q + 8, get(di)),
    ...set(v[2 * q], both(get(dr))),
    ...set(v[2 * q + 1], both(get(di))),
  ];
  /** d of the second pivot: C(k+1, k+1) − w²/d, w = C(k+1, k). */
  const second: Code = [
    ...set(wr, loadNumber(get(diagonal), 8)),
    ...set(wi, loadNumber(get(diagonalIm), 8)),
    ...set(yr, both(get(wr))),
    ...set(yi, both(get(wi))),
    ...set(tr, numberSubtract(numberMultiply(get(wr), get(dr)), numberMultiply(get(wi), get(di)))),
    ...set(ti, numberAdd(numberMultiply(get(wr), get(di)), numberMultiply(get(wi), get(dr)))),
    ...set(diagonal, add(get(diagonal), get(column))),
    ...set(diagonalIm, add(get(diagonalIm), get(column))),
    ...set(dr, numberSubtract(numberMultiply(get(tr), get(wr)), numberMultiply(get(ti), get(wi)))),
    ...set(di, numberAdd(numberMultiply(get(tr), get(wi)), numberMultiply(get(ti), get(wr)))),
    ...set(dr, numberSubtract(loadNumber(get(diagonal), 8), get(dr))),
    ...set(di, numberSubtract(loadNumber(get(diagonalIm), 8), get(di))),
    ...invert(1),
  ];
  /** Two rows of column q: w → packW, l = w/d → packL and C. `half` names rows 0–1 or 2–3 of the tile. */
  const halfTile = (half: number, q: number): Code => [
    ...set(xr, load(get(at[2 * q]), 16 * half)),
    ...set(xi, load(get(at[2 * q + 1]), 16 * half)),
    ...(q === 0
      ? []
      : [
          ...set(xr, vectorSubtract(get(xr), cross(lr, yr, li, yi, vectorSubtract))),
          ...set(xi, vectorSubtract(get(xi), cross(lr, yi, li, yr, vectorAdd))),
        ]),
    ...set(even, add(get(packW), half === 0 ? constant(0) : get(pairStride))),
    ...store(get(even), 32 * q, firsts(get(xr), get(xi))),
    ...store(get(even), 32 * q + 16, seconds(get(xr), get(xi))),
    ...set(lr, cross(xr, v[2 * q], xi, v[2 * q + 1], vectorSubtract)),
    ...set(li, cross(xr, v[2 * q + 1], xi, v[2 * q], vectorAdd)),
    ...store(get(packL), 64 * q + 16 * half, get(lr)),
    ...store(get(packL), 64 * q + 32 + 16 * half, get(li)),
    ...store(get(at[2 * q]), 16 * half, get(lr)),
    ...store(get(at[2 * q + 1]), 16 * half, get(li)),
  ];
  const qs = count === 1 ? [0] : [0, 1];
  const code = [
    ...set(diagonal, add(add(get(c), multiply(get(k), get(column))), shiftLeft(get(k), 3))),
    ...set(diagonalIm, add(get(diagonal), get(plane))),
    ...set(dr, loadNumber(get(diagonal), 0)),
    ...set(di, loadNumber(get(diagonalIm), 0)),
    ...invert(0),
    ...(count === 1 ? [] : second),
    ...set(tile, shiftRight(get(k), 2)),
    ...set(at[0], add(add(get(c), multiply(get(k), get(column))), shiftLeft(get(tile), 5))),
    ...set(at[1], add(get(at[0]), get(plane))),
    ...set(at[2], add(get(at[0]), get(column))),
    ...set(at[3], add(get(at[1]), get(column))),
    ...set(packL, add(get(l), multiply(get(tile), get(tileStride)))),
    ...set(packW, add(get(w), multiply(shiftLeft(get(tile), 1), get(pairStride)))),
    ...whileLess(get(tile), get(lastTile), [
      ...[0, 1].flatMap((half) => qs.flatMap((q) => halfTile(half, q))),
      ...at.flatMap((address) => set(address, add(get(address), constant(32)))),
      ...set(packL, add(get(packL), get(tileStride))),
      ...set(packW, add(get(packW), shiftLeft(get(pairStride), 1))),
      ...set(tile, add(get(tile), constant(1))),
    ]),
    ...constant(0),
  ];
  return { builder, code: builder.finish(code) };
}

/** The driver: blocks, pairs of columns, and what is behind the block. */
function eliminate(): { builder: FunctionBuilder; code: Code } {
  const builder = new FunctionBuilder(8, true);
  const [c, plane, column, packL, packW, inverse, n, p] = Array.from({ length: 8 }, (_, i) => i);
  const i32 = (): number => builder.local(I32);
  const [k0, k1, width, k, l, w, pair, tiles, pairs, bad] = Array.from({ length: 10 }, i32);
  const zero = builder.local(V128);
  const tileStride = shiftLeft(get(width), 6);
  const pairStride = shiftLeft(get(width), 5);
  const shape = [get(c), get(plane), get(column), get(l), get(w), tileStride, pairStride];
  const done = subtract(get(k), get(k0));
  const eliminateColumns = (index: number): Code =>
    call(index, [
      ...[get(c), get(plane), get(column)],
      ...[add(get(l), shiftLeft(done, 6)), add(get(w), shiftLeft(done, 5)), tileStride, pairStride],
      ...[add(get(inverse), shiftLeft(get(k), 4)), get(k), get(tiles)],
    ]);
  const two = add(get(k), constant(2));
  const panel: Code = [
    ...when(
      less(get(k0), get(k)),
      call(UPDATE, [
        ...shape,
        ...[done, shiftRight(get(k), 2), get(tiles)],
        ...[shiftRight(get(k), 1), add(shiftRight(get(k), 1), constant(1))],
      ]),
    ),
    ...when(less(get(k1), two), set(bad, eliminateColumns(ONE)), set(bad, eliminateColumns(TWO))),
    ...when(get(bad), leave(get(k))),
    ...set(k, two),
  ];
  /** An odd block shares its last pair with the first column behind it, which has all terms but the last already. */
  const lastPair = add(get(w), multiply(shiftRight(get(k1), 1), pairStride));
  const clearSharedPair: Code = [
    ...set(k, lastPair),
    ...set(bad, subtract(add(get(k), pairStride), constant(32))),
    ...whileLess(get(k), get(bad), [
      ...store(get(k), 0, get(zero)),
      ...store(get(k), 16, get(zero)),
      ...set(k, add(get(k), constant(32))),
    ]),
    ...store(get(k), 0, get(zero)),
  ];
  const behind: Code = [
    ...when(and(get(k1), constant(1)), clearSharedPair),
    ...set(pair, shiftRight(get(k1), 1)),
    ...whileLess(get(pair), get(pairs), [
      ...call(UPDATE, [
        ...shape,
        ...[get(width), larger(shiftRight(get(k1), 2), shiftRight(get(pair), 1)), get(tiles), get(pair)],
        smaller(get(pairs), add(get(pair), constant(PAIRS))),
      ]),
      ...set(pair, add(get(pair), constant(PAIRS))),
    ]),
  ];
  const code = [
    ...set(tiles, shiftRight(add(get(n), constant(3)), 2)),
    ...set(pairs, shiftRight(add(get(n), constant(1)), 1)),
    ...whileLess(get(k0), get(p), [
      ...set(k1, smaller(get(p), add(get(k0), constant(BLOCK)))),
      ...set(width, subtract(get(k1), get(k0))),
      ...set(l, subtract(get(packL), multiply(shiftRight(get(k0), 2), tileStride))),
      ...set(w, subtract(get(packW), multiply(shiftRight(get(k0), 1), pairStride))),
      ...set(k, get(k0)),
      ...whileLess(get(k), get(k1), panel),
      ...when(less(get(k1), get(n)), behind),
      ...set(k0, get(k1)),
    ]),
    ...constant(-1),
  ];
  return { builder, code: builder.finish(code) };
}
