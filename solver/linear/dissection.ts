/**
 * Elements → a binary tree whose halves share few unknowns (nested dissection of the elements).
 *
 * Elements and unknowns form a hypergraph: an unknown is a net over its elements, and a cut's size is the number of nets
 * with elements on both sides. Each set of elements is swept along several directions, every cut position counted;
 * the best one is smoothed by single moves (Fiduccia & Mattheyses, Proc. 19th Design Automation Conf. (1982) 175, from
 * memory). George, SIAM J. Numer. Anal. 10 (1973) 345 (from memory) for the dissection itself.
 */
import { balancedCost, type Nets, Refinement } from "./moves.ts";
import type { ElementStructure } from "./structure.ts";

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
/** Cut positions tried lie between this share of the elements and the rest. */
const EDGE_SHARE = 0.3;
/** How much a cut may grow to be balanced: cost = cut (1 + PENALTY (2t/n − 1)²). */
const PENALTY = 1;
/** Directions of sweep: angles iπ/SWEEPS in the (x, y) plane. */
const SWEEPS = 4;
/** Sets below this size are not worth smoothing. */
const SMOOTH_FROM = 12;

/** Splits the elements down to leaves. */
export function dissect(structure: ElementStructure): Tree {
  const count = structure.start.length - 1;
  const nets = netsOf(structure);
  const lists = sweepLists(structure, count);
  const work = {
    nets,
    lists,
    spare: new Int32Array(count),
    size: new Int32Array(structure.unknowns),
    left: new Int32Array(structure.unknowns),
    moves: new Refinement(nets, new Uint8Array(count)),
  };
  const tree = { begin: [] as number[], end: [] as number[], left: [] as number[], right: [] as number[] };
  const split = (lo: number, hi: number): number => {
    let a = -1;
    let b = -1;
    if (hi - lo > LEAF) {
      const middle = bisect(work, lo, hi);
      a = split(lo, middle);
      b = split(middle, hi);
    }
    tree.left.push(a);
    tree.right.push(b);
    tree.begin.push(lo);
    return tree.end.push(hi) - 1;
  };
  split(0, count);
  return {
    order: lists[0],
    begin: Int32Array.from(tree.begin),
    end: Int32Array.from(tree.end),
    left: Int32Array.from(tree.left),
    right: Int32Array.from(tree.right),
  };
}

interface Work {
  readonly nets: Nets;
  /** The elements sorted along each direction; the same range of all lists holds the same set. */
  readonly lists: readonly Int32Array[];
  readonly spare: Int32Array;
  /** Per net: its elements within the set; and those a sweep has yet to meet. */
  readonly size: Int32Array;
  readonly left: Int32Array;
  readonly moves: Refinement;
}

/** Unknowns of two or more elements, by element and by unknown. */
function netsOf(structure: ElementStructure): Nets {
  const { start, ids, unknowns } = structure;
  const count = start.length - 1;
  const degree = new Int32Array(unknowns);
  for (let i = 0; i < ids.length; i++) degree[ids[i]]++;
  const netStart = new Int32Array(unknowns + 1);
  for (let v = 0; v < unknowns; v++) netStart[v + 1] = netStart[v] + (degree[v] > 1 ? degree[v] : 0);
  const fill = netStart.slice(0, unknowns);
  const netElements = new Int32Array(netStart[unknowns]);
  const elementStart = new Int32Array(count + 1);
  const elementNets = new Int32Array(netStart[unknowns]);
  let top = 0;
  for (let e = 0; e < count; e++) {
    for (let i = start[e]; i < start[e + 1]; i++) {
      const v = ids[i];
      if (degree[v] < 2) continue;
      elementNets[top++] = v;
      netElements[fill[v]++] = e;
    }
    elementStart[e + 1] = top;
  }
  return { elementStart, elementNets, netStart, netElements };
}

/** The elements sorted along each direction. Sorted as numbers (27 bits of position, then the element) for speed. */
function sweepLists(structure: ElementStructure, count: number): Int32Array[] {
  const { x, y } = structure;
  const lists: Int32Array[] = [];
  const key = new Float64Array(count);
  for (let d = 0; d < SWEEPS; d++) {
    const cx = Math.cos((d * Math.PI) / SWEEPS);
    const cy = Math.sin((d * Math.PI) / SWEEPS);
    let low = Infinity;
    let high = -Infinity;
    for (let e = 0; e < count; e++) {
      key[e] = cx * x[e] + cy * y[e];
      if (key[e] < low) low = key[e];
      if (key[e] > high) high = key[e];
    }
    const scale = high > low ? (2 ** 27 - 1) / (high - low) : 0;
    for (let e = 0; e < count; e++) key[e] = Math.floor((key[e] - low) * scale) * 2 ** 25 + e;
    key.sort();
    lists.push(Int32Array.from(key, (k) => k % 2 ** 25));
  }
  return lists;
}

/** Splits the set lists[·][lo … hi) in two; returns where the second begins. */
function bisect(work: Work, lo: number, hi: number): number {
  const { lists, moves } = work;
  const { side } = moves;
  countNets(work, lo, hi);
  let best = Infinity;
  let bestList = lists[0];
  let middle = (lo + hi) >> 1;
  for (const list of lists) {
    const { cost, at } = sweep(work, list, lo, hi);
    if (cost < best) {
      best = cost;
      bestList = list;
      middle = at;
    }
  }
  for (let i = lo; i < hi; i++) side[bestList[i]] = i < middle ? 0 : 1;
  if (hi - lo >= SMOOTH_FROM)
    middle = lo + moves.refine(bestList, lo, hi, middle - lo, least(hi - lo), PENALTY);
  for (const list of lists) partition(list, side, lo, hi, work.spare);
  return middle;
}

/** size[v] = left[v] = elements of net v within the set. */
function countNets(work: Work, lo: number, hi: number): void {
  const { size, left, lists } = work;
  const { elementStart, elementNets } = work.nets;
  const list = lists[0];
  for (let i = lo; i < hi; i++) {
    const e = list[i];
    for (let k = elementStart[e]; k < elementStart[e + 1]; k++) size[elementNets[k]] = 0;
  }
  for (let i = lo; i < hi; i++) {
    const e = list[i];
    for (let k = elementStart[e]; k < elementStart[e + 1]; k++) left[elementNets[k]] = ++size[elementNets[k]];
  }
}

/** The cheapest cut position along one list: the first half is list[lo … at). */
function sweep(work: Work, list: Int32Array, lo: number, hi: number): { cost: number; at: number } {
  const { size, left } = work;
  const { elementStart, elementNets } = work.nets;
  const n = hi - lo;
  const from = lo + least(n);
  const to = hi - least(n);
  let open = 0;
  let cost = Infinity;
  let at = from;
  for (let i = lo; i < hi; i++) {
    const e = list[i];
    for (let k = elementStart[e]; k < elementStart[e + 1]; k++) {
      const v = elementNets[k];
      if (left[v] === size[v]) open++;
      if (--left[v] === 0) {
        open--;
        left[v] = size[v];
      }
    }
    const t = i + 1;
    if (t < from || t > to) continue;
    const c = balancedCost(open, t - lo, n, PENALTY);
    if (c < cost) {
      cost = c;
      at = t;
    }
  }
  return { cost, at };
}

/** Fewest elements of a half. */
function least(n: number): number {
  return Math.max(1, Math.floor(n * EDGE_SHARE));
}

/** Moves side 0 before side 1, keeping the order within each. */
function partition(list: Int32Array, side: Uint8Array, lo: number, hi: number, spare: Int32Array): void {
  let a = lo;
  let b = 0;
  for (let i = lo; i < hi; i++) {
    const e = list[i];
    if (side[e] === 0) list[a++] = e;
    else spare[b++] = e;
  }
  for (let i = 0; i < b; i++) list[a + i] = spare[i];
}
