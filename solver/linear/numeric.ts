/**
 * A = L D Lᵀ, front by front: assemble the cells or the two children's remainders, eliminate. The remainder of a left child waits on a
 * stack; a right child's is fetched where it lies, for its parent comes next.
 */
import { SolverError } from "../errors.ts";
import { clearFront, eliminate, type FactorNumbers, frontWorkspace, layoutOf } from "./front.ts";
import type { ElementStructure, ElementValues } from "./structure.ts";
import { type Fronts, isRightChild, triangle } from "./symbolic.ts";

/** Lower triangles by columns, waiting for their parent front. */
interface Stack {
  readonly re: Float64Array;
  readonly im: Float64Array;
  top: number;
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
  const stack: Stack = { re: new Float64Array(fronts.stack), im: new Float64Array(fronts.stack), top: 0 };
  const space = frontWorkspace(fronts.largest);
  const c = space.numbers;
  let pivot = 0;
  let told = 0;
  for (let f = 0; f < count; f++) {
    const area = space.areas[f & 1];
    clearFront(c, area, rows[f]);
    if (tree.left[f] < 0) assembleLeaf(structure, valueStart, fronts, values, f, c, area);
    else {
      addNeighbour(fronts, f, c, space.areas[(f - 1) & 1], area);
      addWaiting(fronts, stack, f, c, area);
    }
    const bad = eliminate(space, area, rows[f], pivots[f], out, entryStart[f], pivot);
    if (bad >= 0) throw singular(fronts, pivot + bad);
    pivot += pivots[f];
    if (!isRightChild(tree, f)) keepRemainder(fronts, stack, f, c, area);
    if (onProgress !== undefined && (f + 1 === count || work[f + 1] - told >= work[count] / REPORTS)) {
      told = work[f + 1];
      onProgress(told / work[count]);
    }
  }
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
function addNeighbour(fronts: Fronts, f: number, c: Float64Array, from: number, area: number): void {
  const { rowInParent, rowStart } = fronts;
  const g = f - 1;
  const source = layoutOf(fronts.rows[g]);
  const { leading, imag } = layoutOf(fronts.rows[f]);
  const p = fronts.pivots[g];
  const n = fronts.rows[g];
  const first = rowStart[g];
  for (let j = p; j < n; j++) {
    const column = area + rowInParent[first + j] * leading;
    const s = from + j * source.leading;
    for (let i = j; i < n; i++) {
      const at = column + rowInParent[first + i];
      c[at] += c[s + i];
      c[imag + at] += c[s + source.imag + i];
    }
  }
}

/** C += the remainder of f's left child, taken from the top of the stack. */
function addWaiting(fronts: Fronts, stack: Stack, f: number, c: Float64Array, area: number): void {
  const { rowInParent, rowStart } = fronts;
  const g = fronts.tree.left[f];
  const { leading, imag } = layoutOf(fronts.rows[f]);
  const first = rowStart[g] + fronts.pivots[g];
  const last = rowStart[g + 1];
  const { re, im } = stack;
  stack.top -= triangle(last - first);
  let s = stack.top;
  for (let j = first; j < last; j++) {
    const column = area + rowInParent[j] * leading;
    for (let i = j; i < last; i++) {
      const at = column + rowInParent[i];
      c[at] += re[s];
      c[imag + at] += im[s];
      s++;
    }
  }
}

/** Puts the rows beyond the pivots on the stack. */
function keepRemainder(fronts: Fronts, stack: Stack, f: number, c: Float64Array, area: number): void {
  const n = fronts.rows[f];
  const { leading, imag } = layoutOf(n);
  const { re, im } = stack;
  let s = stack.top;
  for (let j = fronts.pivots[f]; j < n; j++) {
    const column = area + j * leading;
    for (let i = j; i < n; i++) {
      re[s] = c[column + i];
      im[s] = c[imag + column + i];
      s++;
    }
  }
  stack.top = s;
}
