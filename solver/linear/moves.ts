/**
 * Lowers the number of cut nets of a bisection by moving single elements across it.
 * Fiduccia & Mattheyses, Proc. 19th Design Automation Conf. (1982) 175 (from memory).
 */

/** A hypergraph: net ids of each element, element ids of each net. */
export interface Nets {
  readonly elementStart: Int32Array;
  readonly elementNets: Int32Array;
  readonly netStart: Int32Array;
  readonly netElements: Int32Array;
}

/** The cut as balanced: cut (1 + penalty (2t/n − 1)²), t and n − t the sizes of the halves. */
export function balancedCost(cut: number, t: number, n: number, penalty: number): number {
  const skew = (2 * t) / n - 1;
  return cut * (1 + penalty * skew * skew) + 1e-3 * skew * skew;
}

/** Gains are kept within ±LIMIT. */
const LIMIT = 31;
const BUCKETS = 2 * LIMIT + 1;
/** Nets of more elements than this pass on no gains: they hardly ever change state. */
const WIDE = 16;

/** Scratch space of `refineCut`, reused for all sets of one hypergraph. */
export class Refinement {
  readonly nets: Nets;
  readonly side: Uint8Array;
  /** Elements of each net on sides 0 and 1: at[2v + side]. */
  private readonly at: Int32Array;
  /** Per element: stamp of the set it belongs to; stamp of the pass it moved in. */
  private readonly member: Int32Array;
  private readonly locked: Int32Array;
  private readonly gain: Int32Array;
  /** Doubly linked lists of elements by side and gain; −1 ends, −2 in no list. */
  private readonly head = new Int32Array(2 * BUCKETS);
  private readonly next: Int32Array;
  private readonly previous: Int32Array;
  private readonly moved: Int32Array;
  private readonly top = new Int32Array(2);
  private set = 0;
  private pass = 0;

  constructor(nets: Nets, side: Uint8Array) {
    const count = side.length;
    this.nets = nets;
    this.side = side;
    this.at = new Int32Array(2 * (nets.netStart.length - 1));
    this.member = new Int32Array(count);
    this.locked = new Int32Array(count);
    this.gain = new Int32Array(count);
    this.next = new Int32Array(count).fill(-2);
    this.previous = new Int32Array(count);
    this.moved = new Int32Array(count);
  }

  /**
   * Improves side[] on the set list[lo … hi), of which `first` elements are on side 0; keeps at least `least` a side.
   * Returns the new number on side 0.
   */
  refine(list: Int32Array, lo: number, hi: number, first: number, least: number, penalty: number): number {
    this.set++;
    for (let i = lo; i < hi; i++) this.member[list[i]] = this.set;
    let cut = this.count(list, lo, hi);
    let size = first;
    for (let pass = 0; pass < 4; pass++) {
      const better = this.run(list, lo, hi, size, cut, least, penalty);
      size = better.size;
      if (better.cut >= cut) break;
      cut = better.cut;
    }
    return size;
  }

  /** Counts the nets' elements by side; returns the number of cut nets. */
  private count(list: Int32Array, lo: number, hi: number): number {
    const { at, side } = this;
    const { elementStart, elementNets } = this.nets;
    for (let i = lo; i < hi; i++) {
      const e = list[i];
      for (let k = elementStart[e]; k < elementStart[e + 1]; k++) {
        at[2 * elementNets[k]] = 0;
        at[2 * elementNets[k] + 1] = 0;
      }
    }
    let cut = 0;
    for (let i = lo; i < hi; i++) {
      const e = list[i];
      const s = side[e];
      for (let k = elementStart[e]; k < elementStart[e + 1]; k++) {
        const v = 2 * elementNets[k];
        if (at[v + s]++ === 0 && at[v + 1 - s] > 0) cut++;
      }
    }
    return cut;
  }

  /** One pass: every element moves at most once, best gain first; ends at the best state met. */
  private run(
    list: Int32Array,
    lo: number,
    hi: number,
    first: number,
    startCut: number,
    least: number,
    penalty: number,
  ): { cut: number; size: number } {
    const n = hi - lo;
    this.pass++;
    this.head.fill(-1);
    this.top.fill(0);
    this.collect(list, lo, hi);
    let cut = startCut;
    let size = first;
    let count = 0;
    let best = { cut, size };
    let bestCost = balancedCost(cut, size, n, penalty);
    let bestCount = 0;
    const patience = 12 + (n >> 5);
    while (count - bestCount < patience) {
      const e = this.pick(size > least, n - size > least, 2 * size >= n);
      if (e < 0) break;
      cut -= this.gain[e];
      size += this.side[e] === 0 ? -1 : 1;
      this.move(e);
      this.moved[count++] = e;
      const cost = balancedCost(cut, size, n, penalty);
      if (cost < bestCost) {
        bestCost = cost;
        best = { cut, size };
        bestCount = count;
      }
    }
    while (count > bestCount) this.undo(this.moved[--count]);
    this.release(list, lo, hi);
    return best;
  }

  /** Lists the elements at the cut. */
  private collect(list: Int32Array, lo: number, hi: number): void {
    const { at } = this;
    const { elementStart, elementNets } = this.nets;
    for (let i = lo; i < hi; i++) {
      const e = list[i];
      for (let k = elementStart[e]; k < elementStart[e + 1]; k++) {
        const v = 2 * elementNets[k];
        if (at[v] > 0 && at[v + 1] > 0) {
          this.insert(e, this.gainOf(e));
          break;
        }
      }
    }
  }

  private release(list: Int32Array, lo: number, hi: number): void {
    for (let i = lo; i < hi; i++) this.next[list[i]] = -2;
  }

  /** Cut nets fewer when e changes side. */
  private gainOf(e: number): number {
    const { at } = this;
    const { elementStart, elementNets } = this.nets;
    const s = this.side[e];
    let g = 0;
    for (let k = elementStart[e]; k < elementStart[e + 1]; k++) {
      const v = 2 * elementNets[k];
      const mine = at[v + s];
      const other = at[v + 1 - s];
      if (other === 0) {
        if (mine > 1) g--;
      } else if (mine === 1) g++;
    }
    return g;
  }

  private bucket(e: number, g: number): number {
    return this.side[e] * BUCKETS + Math.max(-LIMIT, Math.min(LIMIT, g)) + LIMIT;
  }

  private insert(e: number, g: number): void {
    const b = this.bucket(e, g);
    const h = this.head[b];
    this.gain[e] = g;
    this.next[e] = h;
    this.previous[e] = -1;
    if (h >= 0) this.previous[h] = e;
    this.head[b] = e;
    const s = this.side[e];
    const level = b - s * BUCKETS;
    if (level > this.top[s]) this.top[s] = level;
  }

  private remove(e: number): void {
    const p = this.previous[e];
    const q = this.next[e];
    if (p >= 0) this.next[p] = q;
    else this.head[this.bucket(e, this.gain[e])] = q;
    if (q >= 0) this.previous[q] = p;
    this.next[e] = -2;
  }

  /** The listed element of the highest gain whose move is allowed, or −1. */
  private pick(from0: boolean, from1: boolean, prefer0: boolean): number {
    const a = from0 ? this.highest(0) : -1;
    const b = from1 ? this.highest(1) : -1;
    if (a < 0 && b < 0) return -1;
    const s = a > b || (a === b && prefer0) ? 0 : 1;
    return this.head[s * BUCKETS + (s === 0 ? a : b)];
  }

  private highest(s: number): number {
    let t = this.top[s];
    while (t >= 0 && this.head[s * BUCKETS + t] < 0) t--;
    this.top[s] = Math.max(t, 0);
    return t;
  }

  /** Moves e for good in this pass and renews the gains around it. */
  private move(e: number): void {
    this.remove(e);
    this.locked[e] = this.pass;
    this.undo(e);
    const { elementStart, elementNets, netStart, netElements } = this.nets;
    for (let k = elementStart[e]; k < elementStart[e + 1]; k++) {
      const v = elementNets[k];
      if (netStart[v + 1] - netStart[v] > WIDE) continue;
      for (let i = netStart[v]; i < netStart[v + 1]; i++) {
        const f = netElements[i];
        if (this.member[f] !== this.set || this.locked[f] === this.pass) continue;
        const g = this.gainOf(f);
        if (this.next[f] !== -2) {
          if (g === this.gain[f]) continue;
          this.remove(f);
        }
        this.insert(f, g);
      }
    }
  }

  /** Changes e's side and the nets' counts. */
  private undo(e: number): void {
    const { at, side } = this;
    const { elementStart, elementNets } = this.nets;
    const s = side[e];
    for (let k = elementStart[e]; k < elementStart[e + 1]; k++) {
      const v = 2 * elementNets[k];
      at[v + s]--;
      at[v + 1 - s]++;
    }
    side[e] = 1 - s;
  }
}
