/**
 * Elements → a binary tree whose halves share few unknowns (nested dissection of the elements).
 * George, SIAM J. Numer. Anal. 10 (1973) 345 (from memory).
 *
 * Each set of elements is swept along several directions and the edges between neighbours are counted at every cut
 * position; the best cut is then smoothed by single moves. A set's graph is copied into its halves' (two buffers
 * in turn), renumbered along x, so that the work stays in cache and cut edges are gone.
 */
import { balancedCost, Mover, type SubGraph } from "./moves.ts";
import { type Graph, neighboursOf } from "./neighbours.ts";
import { chain, type ElementStructure } from "./structure.ts";

/** A binary tree over the elements; nodes in postorder, the root last. */
export interface Tree {
  /** Elements, leaf by leaf. */
  readonly order: Int32Array;
  /** Per node: its elements are order[begin] … order[end − 1]. */
  readonly begin: Int32Array;
  readonly end: Int32Array;
  /** Per node: its children, −1 in leaves. */
  readonly left: Int32Array;
  readonly right: Int32Array;
}

/** Sets this small are not split: a dense front of a few cells is cheaper than more fronts. */
const LEAF = 4;
/** Sets below this size are not worth smoothing. */
const SMOOTH_FROM = 32;
/** A half holds at least this share of its set; of small sets more, or leaves would be lopsided. */
const LEAST_SHARE = 0.15;
const SMALL = 24;
const LEAST_SHARE_SMALL = 0.4;
/** Directions of sweep: angles dπ/SWEEPS in the (x, y) plane. */
const SWEEPS = 4;

/** The sets of one depth, each on positions lo … hi in ascending x. */
interface Level extends SubGraph {
  readonly element: Int32Array;
  /** Positions of each set in ascending order along directions 1, 2, …; direction 0 is the position itself. */
  readonly lists: readonly Int32Array[];
}

/** Splits the elements down to leaves. */
export function dissect(structure: ElementStructure): Tree {
  if (practice === undefined) {
    practice = new Dissection(chain(PRACTICE));
    practice.run();
  }
  return new Dissection(structure).run();
}

/**
 * A small run before the first, kept. V8 compiles a loop that is hot on its first call without knowing the code behind it, and
 * falls back to the interpreter each time it gets there; and it drops code together with the last object of the
 * shape it was compiled for. Measured: without this the first analyses of a process take two to four times as long.
 */
let practice: Dissection | undefined;
const PRACTICE = 100;

class Dissection {
  private readonly order: Int32Array;
  private readonly levels: readonly [Level, Level];
  private readonly mover: Mover;
  /** Per position: when a sweep met it; where it goes in the next level. */
  private readonly met: Int32Array;
  private readonly target: Int32Array;
  private sweeps = 0;
  private readonly begin: number[] = [];
  private readonly end: number[] = [];
  private readonly left: number[] = [];
  private readonly right: number[] = [];

  constructor(structure: ElementStructure) {
    const count = structure.start.length - 1;
    const graph = neighboursOf(structure);
    this.order = new Int32Array(count);
    this.levels = [emptyLevel(count, graph.list.length), emptyLevel(count, graph.list.length)];
    this.mover = new Mover(count);
    this.met = new Int32Array(count);
    this.target = new Int32Array(count);
    this.fillFirst(structure, graph);
  }

  run(): Tree {
    this.split(0, 0, this.order.length);
    const { order, begin, end, left, right } = this;
    const [b, e, l, r] = [begin, end, left, right].map((list) => Int32Array.from(list));
    return { order, begin: b, end: e, left: l, right: r };
  }

  /** Splits the set on positions lo … hi of the level at `depth`; returns its tree node. */
  private split(depth: number, lo: number, hi: number): number {
    const level = this.levels[depth & 1];
    let a = -1;
    let b = -1;
    if (hi - lo > LEAF) {
      const middle = lo + this.bisect(level, lo, hi);
      this.descend(level, this.levels[(depth + 1) & 1], lo, middle, hi);
      a = this.split(depth + 1, lo, middle);
      b = this.split(depth + 1, middle, hi);
    } else for (let i = lo; i < hi; i++) this.order[i] = level.element[i];
    this.begin.push(lo);
    this.end.push(hi);
    this.left.push(a);
    return this.right.push(b) - 1;
  }

  /** Chooses the halves: sets side[lo … hi) and returns the size of the first. */
  private bisect(level: Level, lo: number, hi: number): number {
    const { side } = this.mover;
    const n = hi - lo;
    const least = Math.max(1, Math.floor(n * (n < SMALL ? LEAST_SHARE_SMALL : LEAST_SHARE)));
    let best = this.sweep(level, 0, lo, hi, least);
    let direction = 0;
    for (let d = 1; d < SWEEPS; d++) {
      const found = this.sweep(level, d, lo, hi, least);
      if (found.cost >= best.cost) continue;
      best = found;
      direction = d;
    }
    const list = level.lists[direction];
    for (let i = lo; i < hi; i++) side[list[i]] = i - lo < best.size ? 0 : 1;
    return n < SMOOTH_FROM ? best.size : this.mover.improve(level, lo, hi, best.size, least);
  }

  /** The cheapest cut across direction d. */
  private sweep(
    level: Level,
    d: number,
    lo: number,
    hi: number,
    least: number,
  ): { cost: number; size: number } {
    const { met } = this;
    const { from, to, adjacent } = level;
    const list = level.lists[d];
    const n = hi - lo;
    const stamp = ++this.sweeps;
    let cut = 0;
    let cost = Infinity;
    let size = least;
    for (let t = 1; t <= n - least; t++) {
      const i = list[lo + t - 1];
      met[i] = stamp;
      for (let k = from[i]; k < to[i]; k++) cut += met[adjacent[k]] === stamp ? -1 : 1;
      if (t < least) continue;
      const c = balancedCost(cut, t, n);
      if (c >= cost) continue;
      cost = c;
      size = t;
    }
    return { cost, size };
  }

  /** Copies the two halves of a set from one level to the next, without the edges between them. */
  private descend(level: Level, next: Level, lo: number, middle: number, hi: number): void {
    this.aim(lo, middle, hi);
    for (let d = 0; d < SWEEPS; d++) this.copyList(level.lists[d], next.lists[d], lo, middle, hi);
    this.copyEdges(level, next, lo, hi);
  }

  private aim(lo: number, middle: number, hi: number): void {
    const { target } = this;
    const { side } = this.mover;
    let a = lo;
    let b = middle;
    for (let i = lo; i < hi; i++) target[i] = side[i] === 0 ? a++ : b++;
  }

  private copyList(list: Int32Array, copy: Int32Array, lo: number, middle: number, hi: number): void {
    const { target } = this;
    const { side } = this.mover;
    let a = lo;
    let b = middle;
    for (let i = lo; i < hi; i++) {
      const j = list[i];
      if (side[j] === 0) copy[a++] = target[j];
      else copy[b++] = target[j];
    }
  }

  private copyEdges(level: Level, next: Level, lo: number, hi: number): void {
    const { target } = this;
    const { side } = this.mover;
    for (let i = lo; i < hi; i++) {
      const j = target[i];
      next.element[j] = level.element[i];
      let top = level.from[i];
      next.from[j] = top;
      for (let k = level.from[i]; k < level.to[i]; k++) {
        const other = level.adjacent[k];
        if (side[other] === side[i]) next.adjacent[top++] = target[other];
      }
      next.to[j] = top;
    }
  }

  /** Level 0: all elements, one set. */
  private fillFirst(structure: ElementStructure, graph: Graph): void {
    const level = this.levels[0];
    const { element, from, to, adjacent, lists } = level;
    const { target } = this;
    const count = element.length;
    sortAlong(structure, 0, element);
    for (let i = 0; i < count; i++) target[element[i]] = i;
    for (let d = 0; d < SWEEPS; d++) {
      const list = lists[d];
      sortAlong(structure, d, list);
      for (let i = 0; i < count; i++) list[i] = target[list[i]];
    }
    for (let i = 0; i < count; i++) {
      from[i] = graph.start[element[i]];
      to[i] = graph.start[element[i] + 1];
      for (let k = from[i]; k < to[i]; k++) adjacent[k] = target[graph.list[k]];
    }
  }
}

function emptyLevel(count: number, edges: number): Level {
  const ints = (): Int32Array => new Int32Array(count);
  const lists = Array.from({ length: SWEEPS }, ints);
  return { element: ints(), from: ints(), to: ints(), adjacent: new Int32Array(edges), lists };
}

/** The elements in ascending order along direction d. Sorted as numbers (27 bits of position, then the element), which is fast. */
function sortAlong(structure: ElementStructure, d: number, out: Int32Array): void {
  const { x, y } = structure;
  const count = out.length;
  const cx = Math.cos((d * Math.PI) / SWEEPS);
  const cy = Math.sin((d * Math.PI) / SWEEPS);
  const key = new Float64Array(count);
  let low = Infinity;
  let high = -Infinity;
  for (let e = 0; e < count; e++) {
    key[e] = cx * x[e] + cy * y[e];
    low = Math.min(low, key[e]);
    high = Math.max(high, key[e]);
  }
  const scale = high > low ? (2 ** 27 - 1) / (high - low) : 0;
  for (let e = 0; e < count; e++) key[e] = Math.floor((key[e] - low) * scale) * 2 ** 25 + e;
  key.sort();
  for (let i = 0; i < count; i++) out[i] = key[i] % 2 ** 25;
}
