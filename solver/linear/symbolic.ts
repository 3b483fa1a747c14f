/**
 * Tree of elements → fronts: which unknowns each tree node eliminates, the rows it carries, and where they go in its parent.
 *
 * An unknown is eliminated at the lowest node that holds all its elements; unknowns are renumbered in that order, so
 * every front lists its rows ascending, pivots first, and a child's rows keep their order inside the parent.
 * Duff & Reid, ACM Trans. Math. Softw. 9 (1983) 302 (from memory).
 */
import type { Tree } from "./dissection.ts";
import type { ElementStructure } from "./structure.ts";

/** Unknowns of more elements than this are eliminated last in their front. */
const WIDE = 16;
/** Numbers of L collected before they are copied to the factor. */
export const SHELF = 8192;
/** Larger than any row. */
const END = 0x7fffffff;

/** The fronts of a multifrontal factorisation, in the order they are worked (children before parents, the root last). */
export interface Fronts {
  readonly tree: Tree;
  /** Per front: number of pivots, number of rows (pivots included). */
  readonly pivots: Int32Array;
  readonly rows: Int32Array;
  /** Length fronts + 1: front f's rows are rowIds[rowStart[f]] …, as new numbers, ascending. */
  readonly rowStart: Int32Array;
  readonly rowIds: Int32Array;
  /** Per entry of rowIds, but only for rows beyond the pivots: the row's place in the parent front. */
  readonly rowInParent: Int32Array;
  /** Per entry of the structure's ids: the place of that unknown in its leaf's front. */
  readonly placeOfId: Int32Array;
  /** newNumber[unknown]. */
  readonly newNumber: Int32Array;
  /** Numbers of L below the diagonal, before front f; length fronts + 1. */
  readonly entryStart: Float64Array;
  /** Complex multiplications of the factorisation, before front f; length fronts + 1. */
  readonly work: Float64Array;
  /** Largest number of rows of a front. */
  readonly largest: number;
  /** Most numbers waiting on the stack of left children's remainders. */
  readonly stack: number;
  /** Real numbers wanted beside the fronts: for that stack and for L on its way (SHELF), and later for a solution. */
  readonly room: number;
}

/** The fronts that belong to a tree. */
export function frontsOf(structure: ElementStructure, tree: Tree): Fronts {
  const owner = ownersOf(structure, tree);
  const { newNumber, pivots } = renumber(structure, owner, tree.begin.length);
  const lists = rowLists(structure, tree, pivots, newNumber);
  const fronts = pivots.length;
  const rows = new Int32Array(fronts);
  for (let f = 0; f < fronts; f++) rows[f] = lists.rowStart[f + 1] - lists.rowStart[f];
  const { rowStart, rowIds, rowInParent, placeOfId } = lists;
  return {
    tree,
    pivots,
    rows,
    rowStart,
    rowIds,
    rowInParent,
    placeOfId,
    newNumber,
    ...totals(tree, pivots, rows, structure.unknowns),
  };
}

/** Per unknown the lowest tree node with all its elements. */
function ownersOf(structure: ElementStructure, tree: Tree): Int32Array {
  const { unknowns, start, ids } = structure;
  const { order, begin, end, left, right } = tree;
  const owner = new Int32Array(unknowns).fill(-1);
  const parent = new Int32Array(begin.length).fill(-1);
  for (let f = 0; f < begin.length; f++) {
    if (left[f] < 0) continue;
    parent[left[f]] = f;
    parent[right[f]] = f;
  }
  for (let f = 0; f < begin.length; f++) {
    if (left[f] >= 0) continue;
    for (let t = begin[f]; t < end[f]; t++) {
      for (let i = start[order[t]]; i < start[order[t] + 1]; i++) {
        let o = owner[ids[i]];
        if (o < 0) o = f;
        while (end[o] <= t) o = parent[o];
        owner[ids[i]] = o;
      }
    }
  }
  return owner;
}

/** Elimination order: by owner; within one owner unknowns of many elements (turn voltages) come last. */
function renumber(
  structure: ElementStructure,
  owner: Int32Array,
  fronts: number,
): { newNumber: Int32Array; pivots: Int32Array } {
  const { unknowns, ids } = structure;
  const degree = new Int32Array(unknowns);
  for (let i = 0; i < ids.length; i++) degree[ids[i]]++;
  const pivots = new Int32Array(fronts);
  for (let v = 0; v < unknowns; v++) pivots[owner[v]]++;
  const next = new Int32Array(fronts);
  for (let f = 1; f < fronts; f++) next[f] = next[f - 1] + pivots[f - 1];
  const newNumber = new Int32Array(unknowns);
  for (let v = 0; v < unknowns; v++) if (degree[v] <= WIDE) newNumber[v] = next[owner[v]]++;
  for (let v = 0; v < unknowns; v++) if (degree[v] > WIDE) newNumber[v] = next[owner[v]]++;
  return { newNumber, pivots };
}

/** The rows of every front, bottom up, with the maps between them. */
class RowLists {
  readonly rowStart: Int32Array;
  readonly placeOfId: Int32Array;
  rowIds: Int32Array;
  rowInParent: Int32Array;
  private top = 0;

  constructor(fronts: number, incidences: number) {
    this.rowStart = new Int32Array(fronts + 1);
    this.placeOfId = new Int32Array(incidences);
    this.rowIds = new Int32Array(4 * incidences + 16);
    this.rowInParent = new Int32Array(4 * incidences + 16);
  }

  /** Rows of leaf f: the unknowns of its elements, ascending. */
  leaf(f: number, structure: ElementStructure, tree: Tree, newNumber: Int32Array, place: Int32Array): void {
    const { start, ids } = structure;
    const { rowIds, placeOfId } = this;
    const from = this.top;
    let top = from;
    for (let t = tree.begin[f]; t < tree.end[f]; t++) {
      const e = tree.order[t];
      for (let i = start[e]; i < start[e + 1]; i++) {
        const row = newNumber[ids[i]];
        if (place[row] >= 0) continue;
        place[row] = 0;
        let at = top++;
        while (at > from && rowIds[at - 1] > row) {
          rowIds[at] = rowIds[at - 1];
          at--;
        }
        rowIds[at] = row;
      }
    }
    for (let i = from; i < top; i++) place[rowIds[i]] = i - from;
    for (let t = tree.begin[f]; t < tree.end[f]; t++) {
      const e = tree.order[t];
      for (let i = start[e]; i < start[e + 1]; i++) placeOfId[i] = place[newNumber[ids[i]]];
    }
    for (let i = from; i < top; i++) place[rowIds[i]] = -1;
    this.close(f, top);
  }

  /** Rows of f: what its children a and b leave over, merged. */
  merge(f: number, a: number, b: number, pivots: Int32Array): void {
    const { rowStart } = this;
    const aEnd = rowStart[a + 1];
    const bEnd = rowStart[b + 1];
    let i = rowStart[a] + pivots[a];
    let j = rowStart[b] + pivots[b];
    this.reserve(aEnd - i + bEnd - j);
    const { rowIds, rowInParent } = this;
    const from = this.top;
    let top = from;
    while (i < aEnd || j < bEnd) {
      const x = i < aEnd ? rowIds[i] : END;
      const y = j < bEnd ? rowIds[j] : END;
      if (x <= y) rowInParent[i++] = top - from;
      if (y <= x) rowInParent[j++] = top - from;
      rowIds[top++] = Math.min(x, y);
    }
    this.close(f, top);
  }

  private close(f: number, top: number): void {
    this.top = top;
    this.rowStart[f + 1] = top;
  }

  private reserve(more: number): void {
    if (this.top + more <= this.rowIds.length) return;
    const length = 2 * this.rowIds.length + more;
    for (const key of ["rowIds", "rowInParent"] as const) {
      const grown = new Int32Array(length);
      grown.set(this[key]);
      this[key] = grown;
    }
  }
}

/** Kept for the sake of the compiler, as the practice in dissection.ts. */
let practice: RowLists | undefined;

function rowLists(
  structure: ElementStructure,
  tree: Tree,
  pivots: Int32Array,
  newNumber: Int32Array,
): RowLists {
  if (practice === undefined) practice = new RowLists(0, 0);
  const lists = new RowLists(pivots.length, structure.ids.length);
  const place = new Int32Array(structure.unknowns).fill(-1);
  for (let f = 0; f < pivots.length; f++) {
    if (tree.left[f] < 0) lists.leaf(f, structure, tree, newNumber, place);
    else lists.merge(f, tree.left[f], tree.right[f], pivots);
  }
  return lists;
}

/** Sizes the numeric part needs to allocate everything once. */
function totals(
  tree: Tree,
  pivots: Int32Array,
  rows: Int32Array,
  unknowns: number,
): Pick<Fronts, "entryStart" | "work" | "largest" | "stack" | "room"> {
  const fronts = pivots.length;
  const entryStart = new Float64Array(fronts + 1);
  const work = new Float64Array(fronts + 1);
  let largest = 0;
  let waiting = 0;
  let stack = 0;
  for (let f = 0; f < fronts; f++) {
    const p = pivots[f];
    const n = rows[f];
    const rest = n - p;
    entryStart[f + 1] = entryStart[f] + p * rest + (p * (p - 1)) / 2;
    work[f + 1] = work[f] + (n * (n + 1) * (n + 2) - rest * (rest + 1) * (rest + 2)) / 6;
    largest = Math.max(largest, n);
    const left = tree.left[f];
    if (left >= 0) waiting -= triangle(rows[left] - pivots[left]);
    if (!isRightChild(tree, f)) waiting += triangle(rest);
    stack = Math.max(stack, waiting);
  }
  return { entryStart, work, largest, stack, room: 2 * Math.max(stack + SHELF, unknowns) };
}

/** Whether f is the right child of the front after it. */
export function isRightChild(tree: Tree, f: number): boolean {
  return tree.right[f + 1] === f;
}

/** Numbers in a lower triangle of order n. */
export function triangle(n: number): number {
  return (n * (n + 1)) / 2;
}
