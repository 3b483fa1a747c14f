/**
 * Lowers the number of cut edges of a graph's bisection by moving single nodes across it.
 * Fiduccia & Mattheyses, Proc. 19th Design Automation Conf. (1982) 175 (from memory).
 */

/** A graph on positions lo … hi: the neighbours of i are adjacent[from[i]] … adjacent[to[i] − 1]. */
export interface SubGraph {
  readonly from: Int32Array;
  readonly to: Int32Array;
  readonly adjacent: Int32Array;
}

/** A bisection as good as it is small and balanced: cut (1 + PENALTY (2t/n − 1)²), t and n − t the sizes of the halves. */
export function balancedCost(cut: number, t: number, n: number): number {
  const skew = (2 * t) / n - 1;
  return cut * (1 + PENALTY * skew * skew) + 1e-3 * skew * skew;
}
const PENALTY = 1;

/** Gains beyond ±LIMIT share the last list. */
const LIMIT = 7;
const LISTS = 2 * LIMIT + 1;
const NONE = -1;
/** States of a node in a pass: in no list, in a list, moved. */
const FREE = 0;
const LISTED = 1;
const MOVED = 2;

/** Improves bisections; owns the scratch space for graphs of up to `count` nodes. */
export class Mover {
  /** 0 or 1 a node: its half. Set by the caller before `improve`. */
  readonly side: Uint8Array;
  private readonly state: Uint8Array;
  /** Cut edges fewer when the node moves. */
  private readonly gain: Int32Array;
  /** Lists of nodes by side and gain, doubly linked. */
  private readonly head = new Int32Array(2 * LISTS);
  private readonly next: Int32Array;
  private readonly previous: Int32Array;
  private readonly moved: Int32Array;

  constructor(count: number) {
    this.side = new Uint8Array(count);
    this.state = new Uint8Array(count);
    this.gain = new Int32Array(count);
    this.next = new Int32Array(count);
    this.previous = new Int32Array(count);
    this.moved = new Int32Array(count);
  }

  /** Improves side[lo … hi), `size` nodes of it on side 0, keeping at least `least` a side. Returns the new number on side 0. */
  improve(graph: SubGraph, lo: number, hi: number, size: number, least: number): number {
    let now = size;
    for (let pass = 0; pass < 3; pass++) {
      const better = this.pass(graph, lo, hi, now, least);
      if (better < 0) break;
      now = better;
    }
    return now;
  }

  /** Every node moves at most once, best gain first; ends at the best state met. Returns the size of side 0, or −1 if nothing improved. */
  private pass(graph: SubGraph, lo: number, hi: number, first: number, least: number): number {
    const { gain, moved, side } = this;
    const n = hi - lo;
    let cut = this.start(graph, lo, hi);
    let size = first;
    let best = balancedCost(cut, size, n);
    let bestSize = -1;
    let bestCount = 0;
    let count = 0;
    const patience = 20 + (n >> 5);
    while (count - bestCount < patience) {
      const i = this.pick(size > least, n - size > least, 2 * size >= n);
      if (i === NONE) break;
      cut -= gain[i];
      size += side[i] === 0 ? -1 : 1;
      this.move(graph, i);
      moved[count++] = i;
      const cost = balancedCost(cut, size, n);
      if (cost >= best) continue;
      best = cost;
      bestSize = size;
      bestCount = count;
    }
    while (count > bestCount) side[moved[--count]] ^= 1;
    return bestSize;
  }

  /** Gains of all nodes, lists of those at the cut; returns the cut. */
  private start(graph: SubGraph, lo: number, hi: number): number {
    const { side, state, gain } = this;
    const { from, to, adjacent } = graph;
    this.head.fill(NONE);
    let cut = 0;
    for (let i = lo; i < hi; i++) {
      let outer = 0;
      for (let k = from[i]; k < to[i]; k++) outer += side[adjacent[k]] ^ side[i];
      state[i] = FREE;
      gain[i] = 2 * outer - (to[i] - from[i]);
      if (outer > 0) this.insert(i);
      cut += outer;
    }
    return cut / 2;
  }

  private listOf(i: number): number {
    return this.side[i] * LISTS + Math.max(-LIMIT, Math.min(LIMIT, this.gain[i])) + LIMIT;
  }

  private insert(i: number): void {
    const list = this.listOf(i);
    const head = this.head[list];
    this.next[i] = head;
    this.previous[i] = NONE;
    if (head !== NONE) this.previous[head] = i;
    this.head[list] = i;
    this.state[i] = LISTED;
  }

  private remove(i: number): void {
    const before = this.previous[i];
    const after = this.next[i];
    if (before === NONE) this.head[this.listOf(i)] = after;
    else this.next[before] = after;
    if (after !== NONE) this.previous[after] = before;
    this.state[i] = FREE;
  }

  /** The listed node of the highest gain whose move is allowed. */
  private pick(from0: boolean, from1: boolean, prefer0: boolean): number {
    for (let g = LISTS - 1; g >= 0; g--) {
      const a = from0 ? this.head[g] : NONE;
      const b = from1 ? this.head[LISTS + g] : NONE;
      if (a !== NONE && (prefer0 || b === NONE)) return a;
      if (b !== NONE) return b;
    }
    return NONE;
  }

  /** Moves i for this pass and renews the gains around it. */
  private move(graph: SubGraph, i: number): void {
    const { side, state, gain } = this;
    const { from, to, adjacent } = graph;
    this.remove(i);
    state[i] = MOVED;
    side[i] ^= 1;
    for (let k = from[i]; k < to[i]; k++) {
      const j = adjacent[k];
      if (state[j] === MOVED) continue;
      if (state[j] === LISTED) this.remove(j);
      gain[j] += side[j] === side[i] ? -2 : 2;
      this.insert(j);
    }
  }
}
