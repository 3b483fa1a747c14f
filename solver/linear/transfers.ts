/**
 * WebAssembly functions around the elimination of a front: moving its numbers, and using its columns to solve. JavaScript would do as well once
 * compiled, but a cold process runs its loops interpreted, and boxes every number.
 *
 * Addresses, planes (bytes from real to imaginary parts) and strides are in bytes, as in kernel.ts.
 */
import {
  add,
  both,
  type Code,
  constant,
  F64,
  FunctionBuilder,
  firstOf,
  get,
  I32,
  less,
  load,
  loadInteger,
  loadNumber,
  multiply,
  numberAdd,
  numberMultiply,
  numberSubtract,
  type Part,
  secondOf,
  set,
  shiftLeft,
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

const step = (local: number, bytes: number): Code => set(local, add(get(local), constant(bytes)));

/**
 * `pack(c, plane, column, first, last, n, skip, re, im)`: rows k + skip … n − 1 of columns first … last − 1 of a front, one column
 * after another, to `re` and `im`.
 */
export function pack(): Part {
  const builder = new FunctionBuilder(9, false);
  const [c, plane, column, first, last, n, skip, re, im] = Array.from({ length: 9 }, (_, i) => i);
  const i32 = (): number => builder.local(I32);
  const [a, b, end, lastPair] = [i32(), i32(), i32(), i32()];
  const onward = (bytes: number): Code => [a, b, re, im].flatMap((local) => step(local, bytes));
  const code = [
    ...set(c, add(get(c), multiply(get(first), get(column)))),
    ...whileLess(get(first), get(last), [
      ...set(a, add(get(c), shiftLeft(add(get(first), get(skip)), 3))),
      ...set(b, add(get(a), get(plane))),
      ...set(end, add(get(c), shiftLeft(get(n), 3))),
      ...set(lastPair, subtract(get(end), constant(8))),
      ...whileLess(get(a), get(lastPair), [
        ...store(get(re), 0, load(get(a), 0)),
        ...store(get(im), 0, load(get(b), 0)),
        ...onward(16),
      ]),
      ...when(less(get(a), get(end)), [
        ...storeNumber(get(re), 0, loadNumber(get(a), 0)),
        ...storeNumber(get(im), 0, loadNumber(get(b), 0)),
        ...onward(8),
      ]),
      ...set(c, add(get(c), get(column))),
      ...set(first, add(get(first), constant(1))),
    ]),
  ];
  return { builder, code: builder.finish(code) };
}

/**
 * `extend(source, sourcePlane, stride, change, index, indexEnd, c, plane, column)`: C(index_i, index_j) += source(i, j), i ≥ j. The source's
 * column j begins at its diagonal; the next one `stride` further, `stride` changing by `change` each time. Indices are 32-bit.
 */
export function extend(): Part {
  const builder = new FunctionBuilder(9, false);
  const [source, sourcePlane, stride, change, index, indexEnd, c, plane, column] = Array.from(
    { length: 9 },
    (_, i) => i,
  );
  const i32 = (): number => builder.local(I32);
  const [top, at, atIm, a, i] = [i32(), i32(), i32(), i32(), i32()];
  const code = [
    ...whileLess(get(index), get(indexEnd), [
      ...set(top, add(get(c), multiply(loadInteger(get(index), 0), get(column)))),
      ...set(a, get(source)),
      ...set(i, get(index)),
      ...whileLess(get(i), get(indexEnd), [
        ...set(at, add(get(top), shiftLeft(loadInteger(get(i), 0), 3))),
        ...set(atIm, add(get(at), get(plane))),
        ...storeNumber(get(at), 0, numberAdd(loadNumber(get(at), 0), loadNumber(get(a), 0))),
        ...storeNumber(
          get(atIm),
          0,
          numberAdd(loadNumber(get(atIm), 0), loadNumber(add(get(a), get(sourcePlane)), 0)),
        ),
        ...step(a, 8),
        ...step(i, 4),
      ]),
      ...set(source, add(get(source), get(stride))),
      ...set(stride, add(get(stride), get(change))),
      ...step(index, 4),
    ]),
  ];
  return { builder, code: builder.finish(code) };
}

/** Parameters of `forward` and `backward`, and what both do with them. */
class Sweep {
  readonly builder = new FunctionBuilder(9, false);
  readonly l = 0;
  readonly plane = 1;
  readonly x = 2;
  readonly xPlane = 3;
  readonly rows = 4;
  readonly n = 5;
  readonly p = 6;
  readonly y = 7;
  readonly yPlane = 8;
  /** Of y: the pivot's address, the next one's behind the last row; where the loops are; the last place a pair may begin. */
  readonly at = this.i32();
  readonly end = this.i32();
  readonly i = this.i32();
  readonly lastPair = this.i32();
  /** The other end of the loop. */
  readonly row = this.i32();
  readonly place = this.i32();
  readonly a = [this.f64(), this.f64()] as const;
  readonly b = [this.f64(), this.f64()] as const;
  readonly v = [this.v128(), this.v128()] as const;
  readonly w = [this.v128(), this.v128()] as const;

  private i32(): number {
    return this.builder.local(I32);
  }
  private f64(): number {
    return this.builder.local(F64);
  }
  private v128(): number {
    return this.builder.local(V128);
  }

  /** Address `plane` further. */
  im(address: number, plane: number): Code {
    return add(get(address), get(plane));
  }

  /** Runs `body` for the first `count` rows: i at their number in y, place at their number in x. */
  private forRows(count: number, body: Code): Code {
    return [
      ...set(this.i, get(this.y)),
      ...set(this.row, get(this.rows)),
      ...set(this.end, add(get(this.y), shiftLeft(get(count), 3))),
      ...whileLess(get(this.i), get(this.end), [
        ...set(this.place, add(get(this.x), shiftLeft(loadInteger(get(this.row), 0), 3))),
        ...body,
        ...step(this.i, 8),
        ...step(this.row, 4),
      ]),
    ];
  }

  /** y ← the front's rows of x; `end` behind them. */
  gather(): Code {
    return this.forRows(this.n, [
      ...storeNumber(get(this.i), 0, loadNumber(get(this.place), 0)),
      ...storeNumber(this.im(this.i, this.yPlane), 0, loadNumber(this.im(this.place, this.xPlane), 0)),
    ]);
  }

  /** The first `count` rows of x ← y. */
  scatter(count: number): Code {
    return this.forRows(count, [
      ...storeNumber(get(this.place), 0, loadNumber(get(this.i), 0)),
      ...storeNumber(this.im(this.place, this.xPlane), 0, loadNumber(this.im(this.i, this.yPlane), 0)),
    ]);
  }

  /** Runs `two` for pairs of rows below the pivot and `one` for what is left; i and l go along. */
  below(two: Code, one: Code): Code {
    return [
      ...set(this.i, add(get(this.at), constant(8))),
      ...set(this.lastPair, subtract(get(this.end), constant(8))),
      ...whileLess(get(this.i), get(this.lastPair), [...two, ...step(this.i, 16), ...step(this.l, 16)]),
      ...when(less(get(this.i), get(this.end)), [...one, ...step(this.l, 8)]),
    ];
  }
}

/**
 * `forward(l, plane, x, xPlane, rows, n, p, y, yPlane)`: x ← L⁻¹ x within a front of n rows and p pivots: x_i −= l_ik x_k, k ascending.
 * l: its columns below the diagonal, one after another; rows: 32-bit places in x; y: room for n numbers.
 */
export function forward(): Part {
  const s = new Sweep();
  const { builder, l, plane, y, yPlane, p, at, i, a, v } = s;
  const last = builder.local(I32);
  const [lr, li] = s.w;
  const [kr, ki] = s.b;
  const minus = (address: Code, product: Code): Code =>
    store(address, 0, vectorSubtract(load(address, 0), product));
  const minusOne = (address: Code, product: Code): Code =>
    storeNumber(address, 0, numberSubtract(loadNumber(address, 0), product));
  const column = [
    ...set(a[0], loadNumber(get(at), 0)),
    ...set(a[1], loadNumber(s.im(at, yPlane), 0)),
    ...set(v[0], both(get(a[0]))),
    ...set(v[1], both(get(a[1]))),
    ...s.below(
      [
        ...set(lr, load(get(l), 0)),
        ...set(li, load(s.im(l, plane), 0)),
        ...minus(
          get(i),
          vectorSubtract(vectorMultiply(get(lr), get(v[0])), vectorMultiply(get(li), get(v[1]))),
        ),
        ...minus(
          s.im(i, yPlane),
          vectorAdd(vectorMultiply(get(lr), get(v[1])), vectorMultiply(get(li), get(v[0]))),
        ),
      ],
      [
        ...set(kr, loadNumber(get(l), 0)),
        ...set(ki, loadNumber(s.im(l, plane), 0)),
        ...minusOne(
          get(i),
          numberSubtract(numberMultiply(get(kr), get(a[0])), numberMultiply(get(ki), get(a[1]))),
        ),
        ...minusOne(
          s.im(i, yPlane),
          numberAdd(numberMultiply(get(kr), get(a[1])), numberMultiply(get(ki), get(a[0]))),
        ),
      ],
    ),
  ];
  const code = [
    ...s.gather(),
    ...set(at, get(y)),
    ...set(last, add(get(y), shiftLeft(get(p), 3))),
    ...whileLess(get(at), get(last), [...column, ...step(at, 8)]),
    ...s.scatter(s.n),
  ];
  return { builder, code: builder.finish(code) };
}

/** `backward(…)`, as `forward`: x ← L⁻ᵀ x within a front: x_k −= Σ_i l_ik x_i, k descending; only the pivots change. */
export function backward(): Part {
  const s = new Sweep();
  const { builder, l, plane, y, yPlane, p, at, end, i, a, b, v, w } = s;
  const before = builder.local(I32);
  const column = builder.local(I32);
  const [xr, xi, lr, li] = [w[0], w[1], builder.local(V128), builder.local(V128)];
  const [kr, ki] = [builder.local(F64), builder.local(F64)];
  const product = (sign: typeof vectorAdd, p1: number, q1: number, p2: number, q2: number): Code =>
    sign(vectorMultiply(get(p1), get(q1)), vectorMultiply(get(p2), get(q2)));
  const one = (sign: typeof numberAdd, p1: number, q1: number, p2: number, q2: number): Code =>
    sign(numberMultiply(get(p1), get(q1)), numberMultiply(get(p2), get(q2)));
  const zero: Code = [0x44, 0, 0, 0, 0, 0, 0, 0, 0];
  const sumOf = (q: 0 | 1): Code => numberAdd(get(a[q]), numberAdd(firstOf(get(v[q])), secondOf(get(v[q]))));
  const pivot = [
    // Back over the column, which ends where the one behind it began.
    ...set(column, subtract(subtract(get(column), get(end)), constant(-8))),
    ...set(column, add(get(column), get(at))),
    ...set(l, get(column)),
    ...[0, 1].flatMap((q) => [...set(a[q], zero), ...set(v[q], both(zero))]),
    ...s.below(
      [
        ...set(lr, load(get(l), 0)),
        ...set(li, load(s.im(l, plane), 0)),
        ...set(xr, load(get(i), 0)),
        ...set(xi, load(s.im(i, yPlane), 0)),
        ...set(v[0], vectorAdd(get(v[0]), product(vectorSubtract, lr, xr, li, xi))),
        ...set(v[1], vectorAdd(get(v[1]), product(vectorAdd, lr, xi, li, xr))),
      ],
      [
        ...set(kr, loadNumber(get(l), 0)),
        ...set(ki, loadNumber(s.im(l, plane), 0)),
        ...set(b[0], loadNumber(get(i), 0)),
        ...set(b[1], loadNumber(s.im(i, yPlane), 0)),
        ...set(a[0], one(numberSubtract, kr, b[0], ki, b[1])),
        ...set(a[1], one(numberAdd, kr, b[1], ki, b[0])),
      ],
    ),
    ...storeNumber(get(at), 0, numberSubtract(loadNumber(get(at), 0), sumOf(0))),
    ...storeNumber(s.im(at, yPlane), 0, numberSubtract(loadNumber(s.im(at, yPlane), 0), sumOf(1))),
  ];
  const code = [
    ...s.gather(),
    // Behind the last column: Σ_k (n − 1 − k) = p (2n − 1 − p)/2 numbers from the first.
    ...set(column, multiply(get(p), subtract(subtract(shiftLeft(get(s.n), 1), constant(1)), get(p)))),
    ...set(column, add(get(l), shiftLeft(get(column), 2))),
    ...set(before, subtract(get(y), constant(8))),
    ...set(at, add(get(before), shiftLeft(get(p), 3))),
    ...whileLess(get(before), get(at), [...pivot, ...set(at, subtract(get(at), constant(8)))]),
    ...s.scatter(s.p),
  ];
  return { builder, code: builder.finish(code) };
}
