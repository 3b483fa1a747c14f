/**
 * Fills what the layers leave: a constrained Delaunay triangulation of the given edges, refined by circumcentres until every
 * triangle is as small as its surroundings ask, smoothed, and paired into quadrilaterals where they are good.
 * Refinement after L. P. Chew, "Guaranteed-quality triangular meshes", Cornell TR 89-983 (1989; from memory), with a size that
 * grows away from the edges; the edges themselves are never split.
 */
import { type Filling, FLAT_EAR, pairUp } from "./pairing.ts";
import {
  edgeKey,
  edgeMap,
  type FillEdge,
  nextHalf,
  type Triangulation,
  triangulate,
} from "./triangulation.ts";

/** Growth of the edge length per unit of distance from the given edges. */
const GROWTH = 0.65;

/** A triangle is too large when its circumradius exceeds this share of the wanted edge length (0.577 = equilateral). */
const LARGE = 0.8;

/** Most rounds of refinement; it ends by itself when nothing is too large any more. */
const ROUNDS = 80;

const SMOOTHINGS = 3;

const EAR_ROUNDS = 3;

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
