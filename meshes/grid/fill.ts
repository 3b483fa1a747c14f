/**
 * Fills what the layers leave: a constrained Delaunay triangulation of the given edges, refined by circumcentres until every
 * triangle is as small as its surroundings ask, smoothed, and paired into quadrilaterals where they are good.
 * Refinement after L. P. Chew, "Guaranteed-quality triangular meshes", Cornell TR 89-983 (1989; from memory), with a size that
 * grows away from the edges; the edges themselves are never split.
 */
import Constrainautor from "@kninnug/constrainautor";
import Delaunator from "delaunator";

/** A straight edge between two points (by index) and the labels on its two sides; −1 = leave empty. */
export interface FillEdge {
  readonly a: number;
  readonly b: number;
  readonly left: number;
  readonly right: number;
}

export interface Filling {
  /** All points: the given ones first. */
  readonly x: number[];
  readonly y: number[];
  /** Triangles and quadrilaterals, counter-clockwise corner ids. */
  readonly faces: number[][];
  readonly labels: number[];
}

/** Growth of the edge length per unit of distance from the given edges. */
const GROWTH = 0.65;
/** A triangle is too large when its circumradius exceeds this share of the wanted edge length (0.577 = equilateral). */
const LARGE = 0.8;
/** Most rounds of refinement; it ends by itself when nothing is too large any more. */
const ROUNDS = 80;
const SMOOTHINGS = 3;
const EAR_ROUNDS = 3;
/** Cosine of the angle from which a corner between two given edges is too flat to be a corner of one face. */
const FLAT_EAR = -0.5;
/** Least quality (1 = rectangle, 0 = an angle of 0° or 180°) of a quadrilateral made of two triangles. */
const LEAST_QUAD = 0.3;

/** Thrown when the edges cross or contradict each other: the caller makes the layers thinner or the cells smaller. */
export class FillError extends Error {
  constructor(
    readonly x: number,
    readonly y: number,
  ) {
    super("edges of the filling cross");
  }
}

interface Triangulation {
  readonly triangles: Uint32Array;
  readonly halfedges: Int32Array;
  readonly label: Int32Array;
}

export function fill(
  px: readonly number[],
  py: readonly number[],
  edges: readonly FillEdge[],
  cap: (x: number, y: number) => number,
): Filling {
  const x = [...px];
  const y = [...py];
  const wanted = sizeFunction(x, y, edges, cap);
  let net = triangulate(x, y, edges);
  for (let round = 0; round < ROUNDS; round++) {
    const before = x.length;
    insertCentres(net, x, y, edges, wanted);
    if (x.length === before) break;
    net = triangulate(x, y, edges);
  }
  for (let round = 0; round < EAR_ROUNDS; round++) {
    if (!openFlatEars(net, x, y, edges)) break;
    net = triangulate(x, y, edges);
  }
  for (let k = 0; k < SMOOTHINGS; k++) {
    smooth(net, x, y, px.length);
    net = triangulate(x, y, edges);
  }
  return pairUp(net, x, y, edges);
}

const nextHalf = (e: number): number => (e % 3 === 2 ? e - 2 : e + 1);

function edgeKey(a: number, b: number): number {
  return a < b ? a * 4194304 + b : b * 4194304 + a;
}

function edgeMap(edges: readonly FillEdge[]): Map<number, FillEdge> {
  return new Map(edges.map((e) => [edgeKey(e.a, e.b), e]));
}

/** Edge length wanted at a point: min over given edges' ends of (their length + GROWTH · distance), and the cap. */
function sizeFunction(
  x: readonly number[],
  y: readonly number[],
  edges: readonly FillEdge[],
  cap: (x: number, y: number) => number,
): (qx: number, qy: number) => number {
  const sum = new Map<number, [number, number]>();
  for (const e of edges) {
    const l = Math.hypot(x[e.a] - x[e.b], y[e.a] - y[e.b]);
    for (const v of [e.a, e.b]) {
      const s = sum.get(v) ?? [0, 0];
      sum.set(v, [s[0] + l, s[1] + 1]);
    }
  }
  const ids = [...sum.keys()];
  const sx = Float64Array.from(ids, (i) => x[i]);
  const sy = Float64Array.from(ids, (i) => y[i]);
  const sh = Float64Array.from(ids, (i) => (sum.get(i)?.[0] ?? 0) / (sum.get(i)?.[1] ?? 1));
  return (qx, qy) => {
    let best = cap(qx, qy);
    for (let j = 0; j < sx.length; j++) {
      if (sh[j] >= best) continue;
      const reach = (best - sh[j]) / GROWTH;
      const dx = qx - sx[j];
      const dy = qy - sy[j];
      if (dx > reach || dx < -reach || dy > reach || dy < -reach) continue;
      best = Math.min(best, sh[j] + GROWTH * Math.hypot(dx, dy));
    }
    return best;
  };
}

function triangulate(x: readonly number[], y: readonly number[], edges: readonly FillEdge[]): Triangulation {
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

/**
 * Puts a point before every flat corner whose two given edges belong to one triangle, so that the corner gets an edge of its
 * own: on an arc the two edges are tangent there and the face would have an angle of 180°.
 */
function openFlatEars(net: Triangulation, x: number[], y: number[], edges: readonly FillEdge[]): boolean {
  const { triangles, label } = net;
  const byEnds = edgeMap(edges);
  const given = (p: number, q: number): boolean => byEnds.has(edgeKey(p, q));
  const old = x.length;
  for (let e = 0; e < triangles.length; e++) {
    if (label[Math.floor(e / 3)] < 0) continue;
    const [b, c, a] = [triangles[e], triangles[nextHalf(e)], triangles[nextHalf(nextHalf(e))]];
    if (!given(a, b) || !given(b, c)) continue;
    const [ux, uy, vx, vy] = [x[a] - x[b], y[a] - y[b], x[c] - x[b], y[c] - y[b]];
    const [lu, lv] = [Math.hypot(ux, uy), Math.hypot(vx, vy)];
    if ((ux * vx + uy * vy) / (lu * lv) > FLAT_EAR) continue;
    const [wx, wy] = [vx / lv - ux / lu, vy / lv - uy / lu];
    const sign = Math.sign(ux * vy - uy * vx);
    const reach = (0.45 * (lu + lv)) / 2 / Math.hypot(wx, wy);
    const px = x[b] + sign * wy * reach;
    const py = y[b] - sign * wx * reach;
    const near = 0.3 * Math.min(lu, lv);
    const free = x.every((_, i) => Math.abs(x[i] - px) > near || Math.abs(y[i] - py) > near);
    const home = findTriangle(net, x, y, Math.floor(e / 3), px, py);
    if (free && home >= 0) {
      x.push(px);
      y.push(py);
    }
  }
  return x.length > old;
}

/** One round: circumcentres of the triangles that are too large, worst first, where they fit. */
function insertCentres(
  net: Triangulation,
  x: number[],
  y: number[],
  edges: readonly FillEdge[],
  wanted: (x: number, y: number) => number,
): void {
  const { triangles, label } = net;
  const candidates: { x: number; y: number; h: number; excess: number }[] = [];
  for (let t = 0; t < label.length; t++) {
    if (label[t] < 0) continue;
    const c = circumcentre(x, y, triangles, t);
    if (c === null) continue;
    const home = findTriangle(net, x, y, t, c.x, c.y);
    if (home < 0 || label[home] !== label[t]) continue;
    const h = wanted(c.x, c.y);
    if (c.radius <= LARGE * h) continue;
    candidates.push({ x: c.x, y: c.y, h, excess: c.radius / h });
  }
  candidates.sort((a, b) => b.excess - a.excess);
  const old = x.length;
  const longest = edges.map((e) => Math.hypot(x[e.a] - x[e.b], y[e.a] - y[e.b]));
  for (const c of candidates) {
    if (crowded(c, x, y, old, longest, edges)) continue;
    x.push(c.x);
    y.push(c.y);
  }
}

/** True when the candidate stands too close to an edge, or to a point put in during this round. */
function crowded(
  c: { x: number; y: number; h: number },
  x: readonly number[],
  y: readonly number[],
  old: number,
  lengths: readonly number[],
  edges: readonly FillEdge[],
): boolean {
  for (let i = old; i < x.length; i++) {
    const dx = x[i] - c.x;
    const dy = y[i] - c.y;
    if (dx * dx + dy * dy < 0.64 * c.h * c.h) return true;
  }
  const near = 0.4 * c.h;
  for (let k = 0; k < edges.length; k++) {
    const e = edges[k];
    const ax = c.x - x[e.a];
    const ay = c.y - y[e.a];
    const reach = near + lengths[k];
    if (ax > reach || ax < -reach || ay > reach || ay < -reach) continue;
    const ex = x[e.b] - x[e.a];
    const ey = y[e.b] - y[e.a];
    const t = Math.max(0, Math.min(1, (ax * ex + ay * ey) / (ex * ex + ey * ey)));
    if (Math.hypot(ax - t * ex, ay - t * ey) < near) return true;
  }
  return false;
}

function circumcentre(
  x: readonly number[],
  y: readonly number[],
  triangles: Uint32Array,
  t: number,
): { x: number; y: number; radius: number } | null {
  const a = triangles[3 * t];
  const bx = x[triangles[3 * t + 1]] - x[a];
  const by = y[triangles[3 * t + 1]] - y[a];
  const cx = x[triangles[3 * t + 2]] - x[a];
  const cy = y[triangles[3 * t + 2]] - y[a];
  const d = 2 * (bx * cy - by * cx);
  if (d === 0) return null;
  const b2 = bx * bx + by * by;
  const c2 = cx * cx + cy * cy;
  const ux = (cy * b2 - by * c2) / d;
  const uy = (bx * c2 - cx * b2) / d;
  return { x: x[a] + ux, y: y[a] + uy, radius: Math.hypot(ux, uy) };
}

/** The triangle that holds (px, py), walking from triangle `from`; −1 when the walk leaves the hull or meets an empty label. */
function findTriangle(
  net: Triangulation,
  x: readonly number[],
  y: readonly number[],
  from: number,
  px: number,
  py: number,
): number {
  const { triangles, halfedges, label } = net;
  let t = from;
  for (let steps = 0; steps < 200; steps++) {
    let moved = false;
    for (let e = 3 * t; e < 3 * t + 3; e++) {
      const p = triangles[e];
      const q = triangles[nextHalf(e)];
      const o = triangles[nextHalf(nextHalf(e))];
      const own = (x[q] - x[p]) * (y[o] - y[p]) - (y[q] - y[p]) * (x[o] - x[p]);
      const his = (x[q] - x[p]) * (py - y[p]) - (y[q] - y[p]) * (px - x[p]);
      if (own * his >= 0) continue;
      const twin = halfedges[e];
      if (twin < 0) return -1;
      t = Math.floor(twin / 3);
      if (label[t] !== label[from]) return -1;
      moved = true;
      break;
    }
    if (!moved) return t;
  }
  return -1;
}

/** Moves every inserted point half-way to the mean of its neighbours, where no triangle turns over. */
function smooth(net: Triangulation, x: number[], y: number[], given: number): void {
  const { triangles } = net;
  const around = new Map<number, number[]>();
  for (let e = 0; e < triangles.length; e++) {
    const p = triangles[e];
    if (p < given) continue;
    around.set(p, [...(around.get(p) ?? []), e]);
  }
  for (let p = given; p < x.length; p++) {
    const star = around.get(p) ?? [];
    if (star.length === 0) continue;
    let mx = 0;
    let my = 0;
    for (const e of star) {
      mx += x[triangles[nextHalf(e)]] / star.length;
      my += y[triangles[nextHalf(e)]] / star.length;
    }
    const turns = star.every((e) => {
      const a = triangles[nextHalf(e)];
      const b = triangles[nextHalf(nextHalf(e))];
      const before = (x[a] - x[p]) * (y[b] - y[p]) - (y[a] - y[p]) * (x[b] - x[p]);
      const after = (x[a] - mx) * (y[b] - my) - (y[a] - my) * (x[b] - mx);
      return before * after > 0.02 * before * before;
    });
    if (turns) {
      x[p] = (x[p] + mx) / 2;
      y[p] = (y[p] + my) / 2;
    }
  }
}

/** Quadrilaterals from pairs of triangles, best first; the rest stay triangles. */
function pairUp(net: Triangulation, x: number[], y: number[], edges: readonly FillEdge[]): Filling {
  const { triangles, halfedges, label } = net;
  const byEnds = edgeMap(edges);
  const pairs: { e: number; quality: number; corners: number[] }[] = [];
  for (let e = 0; e < triangles.length; e++) {
    const twin = halfedges[e];
    const t = Math.floor(e / 3);
    if (twin < e || label[t] < 0) continue;
    const p = triangles[e];
    const q = triangles[nextHalf(e)];
    if (byEnds.has(edgeKey(p, q))) continue;
    const corners = [p, triangles[nextHalf(nextHalf(twin))], q, triangles[nextHalf(nextHalf(e))]];
    const quality = quadQuality(x, y, corners);
    if (quality > LEAST_QUAD && !hasFlatCorner(x, y, corners, byEnds)) pairs.push({ e, quality, corners });
  }
  pairs.sort((a, b) => b.quality - a.quality || a.e - b.e);
  const taken = new Uint8Array(label.length);
  const faces: number[][] = [];
  const labels: number[] = [];
  const push = (corners: number[], own: number): void => {
    faces.push(area(x, y, corners) > 0 ? corners : corners.reverse());
    labels.push(own);
  };
  for (const { e, corners } of pairs) {
    const t = Math.floor(e / 3);
    const u = Math.floor(halfedges[e] / 3);
    if (taken[t] === 1 || taken[u] === 1) continue;
    taken[t] = 1;
    taken[u] = 1;
    push(corners, label[t]);
  }
  for (let t = 0; t < label.length; t++) {
    if (label[t] >= 0 && taken[t] === 0) {
      push([triangles[3 * t], triangles[3 * t + 1], triangles[3 * t + 2]], label[t]);
    }
  }
  return { x, y, faces, labels };
}

function area(x: readonly number[], y: readonly number[], corners: readonly number[]): number {
  let sum = 0;
  for (let i = 0; i < corners.length; i++) {
    const a = corners[i];
    const b = corners[(i + 1) % corners.length];
    sum += x[a] * y[b] - x[b] * y[a];
  }
  return sum / 2;
}

/** True when two given edges meet in a corner that is nearly straight. */
function hasFlatCorner(
  x: readonly number[],
  y: readonly number[],
  corners: readonly number[],
  byEnds: ReadonlyMap<number, FillEdge>,
): boolean {
  return corners.some((b, i) => {
    const a = corners[(i + 3) % 4];
    const c = corners[(i + 1) % 4];
    if (!byEnds.has(edgeKey(a, b)) || !byEnds.has(edgeKey(b, c))) return false;
    const [ux, uy, vx, vy] = [x[a] - x[b], y[a] - y[b], x[c] - x[b], y[c] - y[b]];
    return (ux * vx + uy * vy) / (Math.hypot(ux, uy) * Math.hypot(vx, vy)) < FLAT_EAR;
  });
}

/** 1 − (largest departure from a right angle)/90°; negative when not convex. */
function quadQuality(x: readonly number[], y: readonly number[], corners: readonly number[]): number {
  const sign = Math.sign(area(x, y, corners));
  let worst = 0;
  for (let i = 0; i < 4; i++) {
    const a = corners[(i + 3) % 4];
    const b = corners[i];
    const c = corners[(i + 1) % 4];
    const ux = x[c] - x[b];
    const uy = y[c] - y[b];
    const vx = x[a] - x[b];
    const vy = y[a] - y[b];
    const cross = sign * (ux * vy - uy * vx);
    if (cross <= 0) return -1;
    worst = Math.max(worst, Math.abs(Math.atan2(cross, ux * vx + uy * vy) - Math.PI / 2));
  }
  return 1 - worst / (Math.PI / 2);
}
