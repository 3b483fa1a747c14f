/**
 * A = L D Lᵀ, front by front: assemble the cells or the two children's remainders, eliminate. The remainder of a left child waits on a
 * stack; a right child's is fetched where it lies, for its parent comes next.
 */
import { SolverError } from "../errors.ts";
import {
  clearFront,
  eliminate,
  type FactorNumbers,
  frontWorkspace,
  layoutOf,
  packColumns,
  type Workspace,
} from "./front.ts";
import type { ElementStructure, ElementValues } from "./structure.ts";
import { type Fronts, isRightChild, SHELF, triangle } from "./symbolic.ts";

/** Lower triangles by columns, waiting for their parent front: indices into the workspace's numbers. */
interface Stack {
  readonly re: number;
  readonly im: number;
  top: number;
}

/**
 * L on its way from the fronts to the factor: collected in the workspace and copied a few fronts at a time, for each copy makes two objects, and
 * thousands of them make a heap grow. Indices into the workspace's numbers.
 */
interface Shelf {
  readonly re: number;
  readonly im: number;
  /** Numbers of L that left for the factor, and that are here. */
  gone: number;
  count: number;
}

/** How often progress is told: in this many parts of the work. */
const REPORTS = 50;

/** Factorises; throws SolverError `singular` at a zero or non-finite pivot, and whatever onProgress throws. */
export function factoriseFronts(
  structure: ElementStructure,
  valueStart: Int32Array,
  fronts: Fronts,
  values: ElementValues,
  onProgress: ((fraction: number) => void) | undefined,
): FactorNumbers {
  const { tree, pivots, rows, entryStart, work } = fronts;
  const count = rows.length;
  const entries = entryStart[count];
  const out: FactorNumbers = {
    re: new Float64Array(entries),
    im: new Float64Array(entries),
    inverseRe: new Float64Array(structure.unknowns),
    inverseIm: new Float64Array(structure.unknowns),
  };
  const space = frontWorkspace(fronts.largest, fronts.room);
  const stack: Stack = { re: space.rest, im: space.rest + fronts.stack, top: 0 };
  const shelf: Shelf = {
    re: stack.im + fronts.stack,
    im: stack.im + fronts.stack + SHELF,
    gone: 0,
    count: 0,
  };
  const c = space.numbers;
  let pivot = 0;
  let told = 0;
  for (let f = 0; f < count; f++) {
    const area = space.areas[f & 1];
    clearFront(c, area, rows[f]);
    if (tree.left[f] < 0) assembleLeaf(structure, valueStart, fronts, values, f, c, area);
    else {
      addNeighbour(fronts, f, space, space.areas[(f - 1) & 1], area);
      addWaiting(fronts, stack, f, space, area);
    }
    const bad = eliminate(space, area, rows[f], pivots[f], out, pivot);
    if (bad >= 0) throw singular(fronts, pivot + bad);
    keepColumns(fronts, shelf, f, space, area, out);
    pivot += pivots[f];
    if (!isRightChild(tree, f)) keepRemainder(fronts, stack, f, space, area);
    if (onProgress !== undefined && (f + 1 === count || work[f + 1] - told >= work[count] / REPORTS)) {
      told = work[f + 1];
      onProgress(told / work[count]);
    }
  }
  clearShelf(shelf, c, out);
  return out;
}

function singular(fronts: Fronts, row: number): SolverError {
  const unknown = fronts.newNumber.indexOf(row);
  return new SolverError("singular", `the pivot of unknown ${unknown} is zero or not finite`);
}

/** C += the matrices of leaf f's elements. */
function assembleLeaf(
  structure: ElementStructure,
  valueStart: Int32Array,
  fronts: Fronts,
  values: ElementValues,
  f: number,
  c: Float64Array,
  area: number,
): void {
  const { tree, placeOfId } = fronts;
  const { leading, imag } = layoutOf(fronts.rows[f]);
  const { start } = structure;
  for (let t = tree.begin[f]; t < tree.end[f]; t++) {
    const e = tree.order[t];
    let v = valueStart[e];
    for (let i = start[e]; i < start[e + 1]; i++) {
      const a = placeOfId[i];
      for (let j = start[e]; j <= i; j++) {
        const b = placeOfId[j];
        const at = area + (a > b ? b * leading + a : a * leading + b);
        c[at] += values.re[v];
        c[imag + at] += values.im[v];
        v++;
      }
    }
  }
}

/** C += the remainder of f's right child, still where it was eliminated: it comes right before f. */
function addNeighbour(fronts: Fronts, f: number, space: Workspace, from: number, area: number): void {
  const g = f - 1;
  const { leading, imag } = layoutOf(fronts.rows[g]);
  const source = from + fronts.pivots[g] * (leading + 1);
  addRemainder(fronts, g, space, [source, source + imag, leading + 1, 0], f, area);
}

/** C += the remainder of f's left child, taken from the top of the stack. */
function addWaiting(fronts: Fronts, stack: Stack, f: number, space: Workspace, area: number): void {
  const g = fronts.tree.left[f];
  const rest = fronts.rows[g] - fronts.pivots[g];
  stack.top -= triangle(rest);
  addRemainder(fronts, g, space, [stack.re + stack.top, stack.im + stack.top, rest, -1], f, area);
}

/** C += the remainder of child g: where its real and imaginary parts are, the first column's stride and its change. */
function addRemainder(
  fronts: Fronts,
  g: number,
  { kernel, integers, packL }: Workspace,
  [re, im, stride, change]: readonly [number, number, number, number],
  f: number,
  area: number,
): void {
  const { rowInParent, rowStart } = fronts;
  const { leading, imag } = layoutOf(fronts.rows[f]);
  // The places go to where the kernel packs L otherwise.
  const first = rowStart[g] + fronts.pivots[g];
  const count = rowStart[g + 1] - first;
  for (let i = 0; i < count; i++) integers[2 * packL + i] = rowInParent[first + i];
  const [index, end] = [8 * packL, 8 * packL + 4 * count];
  const [source, plane, target] = [8 * re, 8 * (im - re), 8 * area];
  kernel.extend(source, plane, 8 * stride, 8 * change, index, end, target, 8 * imag, 8 * leading);
}

/** Puts the columns of the pivots on the shelf; those of a front too large for it go to the other area, free by now, and straight on. */
function keepColumns(
  { pivots, rows, entryStart }: Fronts,
  shelf: Shelf,
  f: number,
  space: Workspace,
  area: number,
  out: FactorNumbers,
): void {
  const count = entryStart[f + 1] - entryStart[f];
  if (shelf.count + count > SHELF) clearShelf(shelf, space.numbers, out);
  if (count <= SHELF) {
    packColumns(space, area, rows[f], pivots[f], shelf.re + shelf.count, shelf.im + shelf.count);
    shelf.count += count;
    return;
  }
  const other = space.areas[1 - (f & 1)];
  packColumns(space, area, rows[f], pivots[f], other, other + count);
  clearShelf({ re: other, im: other + count, gone: shelf.gone, count }, space.numbers, out);
  shelf.gone += count;
}

/** Copies what is on the shelf to the factor. */
function clearShelf(shelf: Shelf, c: Float64Array, out: FactorNumbers): void {
  out.re.set(c.subarray(shelf.re, shelf.re + shelf.count), shelf.gone);
  out.im.set(c.subarray(shelf.im, shelf.im + shelf.count), shelf.gone);
  shelf.gone += shelf.count;
  shelf.count = 0;
}

/** Puts the rows beyond the pivots on the stack. */
function keepRemainder(fronts: Fronts, stack: Stack, f: number, { kernel }: Workspace, area: number): void {
  const n = fronts.rows[f];
  const p = fronts.pivots[f];
  const { leading, imag } = layoutOf(n);
  const [re, im] = [8 * (stack.re + stack.top), 8 * (stack.im + stack.top)];
  kernel.pack(8 * area, 8 * imag, 8 * leading, p, n, n, 0, re, im);
  stack.top += triangle(n - p);
}
