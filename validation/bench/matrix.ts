/** Matrices of designs, by elements as the solver takes them, and assembled by columns as other programs take them. */
import { build } from "../../meshes/build.ts";
import { checkDesign } from "../../meshes/check.ts";
import {
  type ComplexVector,
  cutGrid,
  type ElementStructure,
  type ElementValues,
  elementValues,
  MU0,
  prepareFolded,
} from "../../solver/index.ts";
import { readArrays, writeArrays } from "./container.ts";

/** A x = b by elements. */
export interface ElementSystem {
  readonly structure: ElementStructure;
  readonly values: ElementValues;
  readonly rhs: ComplexVector;
}

/** A by columns, both triangles: column j's rows are rows[start[j]] … rows[start[j + 1] − 1], ascending. */
export interface Columns {
  readonly start: Int32Array;
  readonly rows: Int32Array;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** The equations predict solves for the loaded state of a design on the grid of this level: those of the half where it solves by half. */
export function systemOf(design: unknown, level: number): ElementSystem {
  const { scene } = checkDesign(design);
  const built = build(scene);
  const grid = cutGrid(built.mesh, level);
  const whole = built.materials("loaded");
  const prepared = prepareFolded(grid, [built.materials("empty"), whole], scene.circuit);
  const folded = "half" in prepared;
  const solved = folded ? prepared.half : prepared;
  const materials = folded
    ? whole.map((m) => (m.turn < 0 ? m : { ...m, turn: prepared.turnOf[m.turn] ?? -1 }))
    : whole;
  const state = { materials, omega: 2 * Math.PI * scene.frequency };
  const { structure, nodal } = solved.system;
  const rhs = { re: new Float64Array(structure.unknowns), im: new Float64Array(structure.unknowns) };
  rhs.re.fill(MU0, nodal);
  return { structure, values: elementValues(solved.system, solved.grid, solved.integrals, state), rhs };
}

/** The assembled matrix. */
export function columnsOf({ structure, values }: ElementSystem): Columns {
  const { unknowns, start, ids } = structure;
  const all = everyEntry(structure, values);
  const first = new Int32Array(unknowns + 1);
  for (const j of all.column) first[j + 1]! += 1;
  for (let j = 0; j < unknowns; j++) first[j + 1]! += first[j]!;
  const next = first.slice(0, unknowns);
  const order = new Int32Array(all.column.length);
  all.column.forEach((j, k) => {
    order[next[j]!++] = k;
  });
  const rows: number[] = [];
  const out = { start: new Int32Array(unknowns + 1), re: [] as number[], im: [] as number[] };
  for (let j = 0; j < unknowns; j++) {
    const own = order.subarray(first[j]!, first[j + 1]!).sort((a, b) => all.row[a]! - all.row[b]!);
    let last = -1;
    for (const k of own) {
      if (all.row[k] === last) {
        out.re[out.re.length - 1]! += all.re[k]!;
        out.im[out.im.length - 1]! += all.im[k]!;
        continue;
      }
      last = all.row[k]!;
      rows.push(last);
      out.re.push(all.re[k]!);
      out.im.push(all.im[k]!);
    }
    out.start[j + 1] = rows.length;
  }
  if (ids.length !== start.at(-1)) throw new RangeError("the structure's ids do not end where start says");
  return {
    start: out.start,
    rows: Int32Array.from(rows),
    re: Float64Array.from(out.re),
    im: Float64Array.from(out.im),
  };
}

/** All entries of all elements, those beyond the diagonal twice. */
function everyEntry({ start, ids }: ElementStructure, values: ElementValues) {
  let count = 0;
  for (let e = 0; e + 1 < start.length; e++) count += (start[e + 1]! - start[e]!) ** 2;
  const row = new Int32Array(count);
  const column = new Int32Array(count);
  const re = new Float64Array(count);
  const im = new Float64Array(count);
  let v = 0;
  let k = 0;
  const put = (i: number, j: number): void => {
    row[k] = i;
    column[k] = j;
    re[k] = values.re[v]!;
    im[k++] = values.im[v]!;
  };
  for (let e = 0; e + 1 < start.length; e++) {
    for (let p = start[e]!; p < start[e + 1]!; p++) {
      for (let q = start[e]!; q <= p; q++) {
        put(ids[p]!, ids[q]!);
        if (q !== p) put(ids[q]!, ids[p]!);
        v++;
      }
    }
  }
  return { row, column, re, im };
}

/** max_i |b − A x|_i / (|A| |x| + |b|)_i, moduli as |re| + |im|. */
export function backwardError(a: Columns, x: ComplexVector, b: ComplexVector): number {
  const r = { re: b.re.slice(), im: b.im.slice() };
  const scale = b.re.map((re, i) => Math.abs(re) + Math.abs(b.im[i]!));
  for (let j = 0; j + 1 < a.start.length; j++) {
    const [xr, xi] = [x.re[j]!, x.im[j]!];
    const size = Math.abs(xr) + Math.abs(xi);
    for (let k = a.start[j]!; k < a.start[j + 1]!; k++) {
      const i = a.rows[k]!;
      const [ar, ai] = [a.re[k]!, a.im[k]!];
      r.re[i]! -= ar * xr - ai * xi;
      r.im[i]! -= ar * xi + ai * xr;
      scale[i]! += (Math.abs(ar) + Math.abs(ai)) * size;
    }
  }
  return r.re.reduce((worst, re, i) => Math.max(worst, (Math.abs(re) + Math.abs(r.im[i]!)) / scale[i]!), 0);
}

/** Writes a system by elements. */
export function writeSystem(path: string, { structure, values, rhs }: ElementSystem): void {
  const { unknowns, start, ids, x, y } = structure;
  writeArrays(path, [Int32Array.of(unknowns), start, ids, x, y, values.re, values.im, rhs.re, rhs.im]);
}

/** Reads what `writeSystem` wrote. */
export function readSystem(path: string): ElementSystem {
  const [size, start, ids, x, y, re, im, rhsRe, rhsIm] = readArrays(path) as [
    Int32Array,
    Int32Array,
    Int32Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
  ];
  return {
    structure: { unknowns: size[0]!, start, ids, x, y },
    values: { re, im },
    rhs: { re: rhsRe, im: rhsIm },
  };
}

/** Writes an assembled matrix and a right-hand side, as superlu.py reads them. */
export function writeColumns(path: string, a: Columns, rhs: ComplexVector): void {
  writeArrays(path, [a.start, a.rows, a.re, a.im, rhs.re, rhs.im]);
}
