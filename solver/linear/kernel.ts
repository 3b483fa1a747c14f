/**
 * C(i, j) ← C(i, j) − Σ_k L(i, k) W(j, k) on a lower triangle of complex numbers: the one loop that costs.
 *
 * The loop is a WebAssembly function of two-number vectors, assembled here instruction by instruction (JavaScript has no such vectors;
 * measured 2–3 × a plain loop). Tiles of four rows by two columns stay in registers over the whole sum over k:
 *
 *   C: a square array by columns, `leading` numbers a column, imaginary parts `plane` bytes after the real parts;
 *   L: tile after tile of four rows, each k a line of 64 bytes: re × 4, im × 4;
 *   W: pair after pair of columns, each k 32 bytes: re, im, re, im.
 *
 * Instruction codes: WebAssembly Core Specification 2.0 (W3C, 2022), section 5.4.
 */

/** Everything a kernel call needs; addresses and strides in bytes. */
export type UpdateKernel = (
  /** Address of C(0, 0). */
  c: number,
  plane: number,
  /** From one column of C to the next. */
  columnStride: number,
  /** Address of L's tile 0 and W's pair 0 (may lie before the arrays when those begin at a later tile). */
  l: number,
  w: number,
  tileStride: number,
  pairStride: number,
  /** Terms of the sum, at least 1. */
  terms: number,
  /** Row tiles first … last − 1 (rows 4t … 4t + 3) and column pairs first … last − 1 (columns 2s, 2s + 1), lower part only. */
  firstTile: number,
  lastTile: number,
  firstPair: number,
  lastPair: number,
) => void;

/** A kernel with its memory, kept for the life of the process: it grows to the largest front met and is reused. */
export interface Workspace {
  readonly update: UpdateKernel;
  /** The memory as numbers, at least as many as asked for. Stale after the next call of `workspace`. */
  readonly numbers: Float64Array;
}

interface WasmMemory {
  readonly buffer: ArrayBuffer;
  grow(pages: number): number;
}
declare const WebAssembly: {
  Module: new (code: Uint8Array) => object;
  Instance: new (module: object) => { readonly exports: { update: UpdateKernel; memory: WasmMemory } };
};

const PAGE = 65536;
let instance: { readonly update: UpdateKernel; readonly memory: WasmMemory } | undefined;
let numbers = new Float64Array(0);

/** The kernel, with room for `count` numbers. Contents are whatever the last user left. */
export function workspace(count: number): Workspace {
  if (instance === undefined) {
    instance = new WebAssembly.Instance(new WebAssembly.Module(moduleCode())).exports;
  }
  const missing = count * 8 - instance.memory.buffer.byteLength;
  if (missing > 0) instance.memory.grow(Math.ceil(missing / PAGE));
  if (numbers.buffer !== instance.memory.buffer) numbers = new Float64Array(instance.memory.buffer);
  return { update: instance.update, numbers };
}

const I32 = 0x7f;
const V128 = 0x7b;
const VOID = 0x40;

/** Unsigned LEB128. */
function leb(n: number): number[] {
  return n < 128 ? [n] : [(n & 127) | 128, ...leb(n >>> 7)];
}
const get = (local: number): number[] => [0x20, local];
const set = (local: number): number[] => [0x21, local];
const constant = (n: number): number[] => [0x41, ...(n < 64 ? [n] : [(n & 127) | 128, n >> 7])];
const ADD = [0x6a];
const MULTIPLY = [0x6c];
const SHIFT_LEFT = [0x74];
const LESS = [0x48];
const vector = (code: number): number[] => [0xfd, ...leb(code)];
const V_ADD = vector(0xf0);
const V_SUBTRACT = vector(0xf1);
const V_MULTIPLY = vector(0xf2);
/** Load of two numbers, of one number into both places, and store; byte offset from the address. */
const load = (offset: number): number[] => [...vector(0x00), 3, ...leb(offset)];
const loadBoth = (offset: number): number[] => [...vector(0x0a), 3, ...leb(offset)];
const store = (offset: number): number[] => [...vector(0x0b), 3, ...leb(offset)];
/** Runs body while local `i` < local `end`, at least once unless tested before; body must advance i. */
const repeat = (i: number, end: number, body: number[]): number[] => [
  ...[0x02, VOID, ...get(i), ...get(end), ...LESS, 0x45, 0x0d, 0],
  ...[0x03, VOID, ...body, ...get(i), ...get(end), ...LESS, 0x0d, 0, 0x0b, 0x0b],
];
const advance = (local: number, by: number[]): number[] => [...get(local), ...by, ...ADD, ...set(local)];

/** Locals: the twelve parameters in order, then addresses and counters, then vectors. */
const P = {
  c: 0,
  plane: 1,
  column: 2,
  l: 3,
  w: 4,
  tileStride: 5,
  pairStride: 6,
  terms: 7,
  firstTile: 8,
  lastTile: 9,
  firstPair: 10,
  lastPair: 11,
};
const T = { tile: 12, pair: 13, pairEnd: 14, a: 15, b: 16, aEnd: 17, at0: 18, at1: 19, at2: 20, at3: 21 };
const FIRST_VECTOR = 22;
/** Accumulators: [column][re, im][rows 0–1, 2–3], then the tile's line of L and one number of W. */
const acc = (column: number, part: number, half: number): number =>
  FIRST_VECTOR + 4 * column + 2 * part + half;
const LINE = FIRST_VECTOR + 8;
const FACTOR = FIRST_VECTOR + 12;
const VECTORS = 13;

/** acc ← acc ± line × factor. */
const accumulate = (a: number, line: number, operation: number[]): number[] => [
  ...get(a),
  ...get(line),
  ...get(FACTOR),
  ...V_MULTIPLY,
  ...operation,
  ...set(a),
];

/** One term of the sum for the tile: 8 loads, 16 products. */
function term(): number[] {
  const code: number[] = [];
  for (let i = 0; i < 4; i++) code.push(...get(T.a), ...load(16 * i), ...set(LINE + i));
  for (let column = 0; column < 2; column++) {
    code.push(...get(T.b), ...loadBoth(16 * column), ...set(FACTOR));
    for (let half = 0; half < 2; half++) {
      code.push(...accumulate(acc(column, 0, half), LINE + half, V_SUBTRACT));
      code.push(...accumulate(acc(column, 1, half), LINE + 2 + half, V_SUBTRACT));
    }
    code.push(...get(T.b), ...loadBoth(16 * column + 8), ...set(FACTOR));
    for (let half = 0; half < 2; half++) {
      code.push(...accumulate(acc(column, 0, half), LINE + 2 + half, V_ADD));
      code.push(...accumulate(acc(column, 1, half), LINE + half, V_SUBTRACT));
    }
  }
  return [...code, ...advance(T.b, constant(32)), ...advance(T.a, constant(64))];
}

/** One tile: addresses, load, sum over k, store. */
function tile(): number[] {
  const addresses = [
    ...[...get(P.c), ...get(T.pair), ...constant(1), ...SHIFT_LEFT, ...get(P.column), ...MULTIPLY, ...ADD],
    ...[...get(T.tile), ...constant(5), ...SHIFT_LEFT, ...ADD, ...set(T.at0)],
    ...[...get(T.at0), ...get(P.plane), ...ADD, ...set(T.at1)],
    ...[...get(T.at0), ...get(P.column), ...ADD, ...set(T.at2)],
    ...[...get(T.at1), ...get(P.column), ...ADD, ...set(T.at3)],
    ...[...get(P.l), ...get(T.tile), ...get(P.tileStride), ...MULTIPLY, ...ADD, ...set(T.a)],
    ...[...get(T.a), ...get(P.terms), ...constant(6), ...SHIFT_LEFT, ...ADD, ...set(T.aEnd)],
    ...[...get(P.w), ...get(T.pair), ...get(P.pairStride), ...MULTIPLY, ...ADD, ...set(T.b)],
  ];
  const loads: number[] = [];
  const stores: number[] = [];
  for (let i = 0; i < 8; i++) {
    const address = get(T.at0 + (i >> 1));
    loads.push(...address, ...load(16 * (i & 1)), ...set(FIRST_VECTOR + i));
    stores.push(...address, ...get(FIRST_VECTOR + i), ...store(16 * (i & 1)));
  }
  return [...addresses, ...loads, ...repeat(T.a, T.aEnd, term()), ...stores];
}

/** For each row tile, for each pair of columns that reaches below the diagonal there (2s ≤ 4t + 3). */
function body(): number[] {
  const pairs = [...tile(), ...advance(T.pair, constant(1))];
  const lastPair = [
    ...[...get(T.tile), ...constant(1), ...SHIFT_LEFT, ...constant(2), ...ADD, ...set(T.pairEnd)],
    ...[...get(P.lastPair), ...get(T.pairEnd), ...get(P.lastPair), ...get(T.pairEnd), ...LESS, 0x1b],
  ];
  return [
    ...[...get(P.firstTile), ...set(T.tile)],
    ...repeat(T.tile, P.lastTile, [
      ...[...lastPair, ...set(T.pairEnd), ...get(P.firstPair), ...set(T.pair)],
      ...repeat(T.pair, T.pairEnd, pairs),
      ...advance(T.tile, constant(1)),
    ]),
    0x0b,
  ];
}

/** The binary module: exports `memory` and `update`. */
function moduleCode(): Uint8Array {
  const section = (id: number, content: number[]): number[] => [id, ...leb(content.length), ...content];
  const name = (text: string): number[] => [text.length, ...Array.from(text, (ch) => ch.charCodeAt(0))];
  const locals = [2, T.at3 - P.lastPair, I32, VECTORS, V128];
  const code = [...locals, ...body()];
  return Uint8Array.from([
    ...[0x00, 0x61, 0x73, 0x6d, 1, 0, 0, 0],
    ...section(1, [1, 0x60, 12, ...new Array<number>(12).fill(I32), 0]),
    ...section(3, [1, 0]),
    ...section(5, [1, 0, 1]),
    ...section(7, [2, ...name("memory"), 2, 0, ...name("update"), 0, 0]),
    ...section(10, [1, ...leb(code.length), ...code]),
  ]);
}
