/**
 * A = L D Lᵀ of a sparse complex symmetric matrix without pivoting, rows stored from their first entry on (envelope), in
 * reverse Cuthill–McKee order. A. George, J. W. H. Liu, Computer Solution of Large Sparse Positive Definite Systems (1981),
 * ch. 4 (from memory). Slow and simple on purpose: it shares nothing with the solver's own factorisation.
 */
import type { ComplexVector } from "../../solver/index.ts";

/** Neighbours of every unknown, without itself. */
export type Graph = readonly (readonly number[])[];

/** Place of every unknown in reverse Cuthill–McKee order. */
export function reverseCuthillMcKee(graph: Graph): Int32Array {
  const n = graph.length;
  const place = new Int32Array(n).fill(-1);
  let count = 0;
  for (let seed = 0; seed < n; seed++) {
    if (place[seed] !== -1) continue;
    const order = breadthFirst(graph, farthest(graph, seed));
    for (const i of order) place[i] = n - 1 - count++;
  }
  return place;
}

/** An unknown at the far end of the component of `seed`: two sweeps. */
function farthest(graph: Graph, seed: number): number {
  const first = breadthFirst(graph, seed);
  const second = breadthFirst(graph, first[first.length - 1]!);
  return second[second.length - 1]!;
}

function breadthFirst(graph: Graph, start: number): number[] {
  const seen = new Set([start]);
  const order = [start];
  for (let head = 0; head < order.length; head++) {
    const next = graph[order[head]!]!.filter((j) => !seen.has(j));
    next.sort((a, b) => graph[a]!.length - graph[b]!.length || a - b);
    for (const j of next) {
      seen.add(j);
      order.push(j);
    }
  }
  return order;
}

/** The matrix in envelope form: row i holds columns first[i] … i at start[i] …. */
export class Envelope {
  readonly first: Int32Array;
  readonly start: Float64Array;
  readonly re: Float64Array;
  readonly im: Float64Array;
  private readonly place: Int32Array;

  constructor(graph: Graph) {
    const n = graph.length;
    this.place = reverseCuthillMcKee(graph);
    this.first = Int32Array.from({ length: n }, (_, i) => i);
    graph.forEach((row, i) => {
      const p = this.place[i]!;
      for (const j of row) this.first[p] = Math.min(this.first[p]!, this.place[j]!);
    });
    this.start = new Float64Array(n + 1);
    for (let i = 0; i < n; i++) this.start[i + 1] = this.start[i]! + i - this.first[i]! + 1;
    this.re = new Float64Array(this.start[n]!);
    this.im = new Float64Array(this.start[n]!);
  }

  /** A_ij += re + j im (both halves of the matrix may be given; the upper one is ignored). */
  add(i: number, j: number, re: number, im: number): void {
    const [p, q] = [this.place[i]!, this.place[j]!];
    if (q > p) return;
    const at = this.start[p]! + q - this.first[p]!;
    this.re[at]! += re;
    this.im[at]! += im;
  }

  /** Overwrites the matrix with L (unit diagonal left out) and 1/D on the diagonal. */
  factorise(): void {
    const { first, start, re, im } = this;
    const n = first.length;
    for (let i = 0; i < n; i++) {
      const fi = first[i]!;
      const rowI = start[i]! - fi;
      // Row i holds g_ij = l_ij d_j until the diagonal is reached.
      for (let j = fi + 1; j < i; j++) {
        const from = Math.max(fi, first[j]!);
        const rowJ = start[j]! - first[j]!;
        let x = re[rowI + j]!;
        let y = im[rowI + j]!;
        for (let k = from; k < j; k++) {
          const a = re[rowI + k]!;
          const b = im[rowI + k]!;
          const c = re[rowJ + k]!;
          const d = im[rowJ + k]!;
          x -= a * c - b * d;
          y -= a * d + b * c;
        }
        re[rowI + j] = x;
        im[rowI + j] = y;
      }
      let [x, y] = [re[rowI + i]!, im[rowI + i]!];
      for (let k = fi; k < i; k++) {
        const at = start[k + 1]! - 1;
        const [a, b, c, d] = [re[rowI + k]!, im[rowI + k]!, re[at]!, im[at]!];
        const [lRe, lIm] = [a * c - b * d, a * d + b * c];
        x -= a * lRe - b * lIm;
        y -= a * lIm + b * lRe;
        re[rowI + k] = lRe;
        im[rowI + k] = lIm;
      }
      const size = x * x + y * y;
      if (!(size > 0)) throw new RangeError(`row ${i} has no pivot`);
      re[rowI + i] = x / size;
      im[rowI + i] = -y / size;
    }
  }

  /** Solves A x = b with the factors; b is kept. */
  solve(b: ComplexVector): ComplexVector {
    const { first, start, re, im, place } = this;
    const n = first.length;
    const x = new Float64Array(n);
    const y = new Float64Array(n);
    for (let i = 0; i < n; i++) {
      x[place[i]!] = b.re[i]!;
      y[place[i]!] = b.im[i]!;
    }
    for (let i = 0; i < n; i++) {
      const row = start[i]! - first[i]!;
      for (let k = first[i]!; k < i; k++) {
        x[i]! -= re[row + k]! * x[k]! - im[row + k]! * y[k]!;
        y[i]! -= re[row + k]! * y[k]! + im[row + k]! * x[k]!;
      }
    }
    return this.back(x, y);
  }

  /** x := L⁻ᵀ D⁻¹ x, back in the caller's order. */
  private back(x: Float64Array, y: Float64Array): ComplexVector {
    const { first, start, re, im, place } = this;
    const n = first.length;
    for (let i = 0; i < n; i++) {
      const at = start[i + 1]! - 1;
      const [a, b] = [x[i]!, y[i]!];
      x[i] = a * re[at]! - b * im[at]!;
      y[i] = a * im[at]! + b * re[at]!;
    }
    for (let i = n - 1; i >= 0; i--) {
      const row = start[i]! - first[i]!;
      const [a, b] = [x[i]!, y[i]!];
      for (let k = first[i]!; k < i; k++) {
        x[k]! -= re[row + k]! * a - im[row + k]! * b;
        y[k]! -= re[row + k]! * b + im[row + k]! * a;
      }
    }
    const out = { re: new Float64Array(n), im: new Float64Array(n) };
    for (let i = 0; i < n; i++) {
      out.re[i] = x[place[i]!]!;
      out.im[i] = y[place[i]!]!;
    }
    return out;
  }
}
