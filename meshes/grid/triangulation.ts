/** A constrained Delaunay triangulation in which every triangle knows which side of the labelled edges it lies on. */
import Constrainautor from "@kninnug/constrainautor";
import Delaunator from "delaunator";

/** A straight edge between two points (by index) and the labels on its two sides; −1 = leave empty. */
export interface FillEdge {
  readonly a: number;
  readonly b: number;
  readonly left: number;
  readonly right: number;
}

/** Thrown when the edges cross or contradict each other: the caller makes the layers thinner or the cells smaller. */
export class FillError extends Error {
  constructor(
    readonly x: number,
    readonly y: number,
  ) {
    super("edges of the filling cross");
  }
}

export interface Triangulation {
  readonly triangles: Uint32Array;
  readonly halfedges: Int32Array;
  readonly label: Int32Array;
}

export const nextHalf = (e: number): number => (e % 3 === 2 ? e - 2 : e + 1);

export function edgeKey(a: number, b: number): number {
  return a < b ? a * 4194304 + b : b * 4194304 + a;
}

export function edgeMap(edges: readonly FillEdge[]): Map<number, FillEdge> {
  return new Map(edges.map((e) => [edgeKey(e.a, e.b), e]));
}

export function triangulate(
  x: readonly number[],
  y: readonly number[],
  edges: readonly FillEdge[],
): Triangulation {
  const coords = new Float64Array(2 * x.length);
  for (let i = 0; i < x.length; i++) {
    coords[2 * i] = x[i];
    coords[2 * i + 1] = y[i];
  }
  const del = new Delaunator(coords);
  let at: FillEdge | undefined;
  try {
    const constrained = new Constrainautor(del);
    for (at of edges) constrained.constrainOne(at.a, at.b);
    constrained.delaunify(true);
  } catch {
    throw new FillError(
      at === undefined ? 0 : (x[at.a] + x[at.b]) / 2,
      at === undefined ? 0 : (y[at.a] + y[at.b]) / 2,
    );
  }
  return { triangles: del.triangles, halfedges: del.halfedges, label: labelTriangles(del, x, y, edges) };
}

/** The label of every triangle, spread from the labelled sides of the edges. */
function labelTriangles(
  del: { triangles: Uint32Array; halfedges: Int32Array },
  x: readonly number[],
  y: readonly number[],
  edges: readonly FillEdge[],
): Int32Array {
  const { triangles, halfedges } = del;
  const UNKNOWN = -2;
  const label = new Int32Array(triangles.length / 3).fill(UNKNOWN);
  const byEnds = edgeMap(edges);
  const queue: number[] = [];
  const fixed = new Uint8Array(triangles.length);
  for (let e = 0; e < triangles.length; e++) {
    const p = triangles[e];
    const q = triangles[nextHalf(e)];
    const edge = byEnds.get(edgeKey(p, q));
    if (edge === undefined) continue;
    fixed[e] = 1;
    const o = triangles[nextHalf(nextHalf(e))];
    const side = (x[edge.b] - x[edge.a]) * (y[o] - y[edge.a]) - (y[edge.b] - y[edge.a]) * (x[o] - x[edge.a]);
    const t = Math.floor(e / 3);
    const own = side > 0 ? edge.left : edge.right;
    if (label[t] !== UNKNOWN && label[t] !== own) throw new FillError(x[o], y[o]);
    if (label[t] === UNKNOWN) queue.push(t);
    label[t] = own;
  }
  for (let k = 0; k < queue.length; k++) {
    const t = queue[k];
    for (let e = 3 * t; e < 3 * t + 3; e++) {
      const twin = halfedges[e];
      if (fixed[e] === 1 || twin < 0) continue;
      const u = Math.floor(twin / 3);
      if (label[u] === UNKNOWN) {
        label[u] = label[t];
        queue.push(u);
      } else if (label[u] !== label[t]) {
        throw new FillError(x[triangles[e]], y[triangles[e]]);
      }
    }
  }
  return label;
}
