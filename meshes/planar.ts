/**
 * Plane geometry of the half plane (r, z), r ≥ 0, where an edge along r = 0 is no surface: distances, areas and how far two
 * figures overlap. Units are the caller's. Side tests are exact (J. R. Shewchuk, Discrete Comput. Geom. 18, 305 (1997)).
 */
import { orient2d } from "robust-predicates";

/** [r, z]. */
export type Xy = readonly [number, number];

/** Signed area of a polygon, positive when counter-clockwise (r right, z up); taken about its first corner against cancellation. */
export function area(points: readonly Xy[]): number {
  const [r0, z0] = points[0] ?? [0, 0];
  let twice = 0;
  for (let i = 1; i + 1 < points.length; i++) {
    const [a, b] = [points[i]!, points[i + 1]!];
    twice += (a[0] - r0) * (b[1] - z0) - (b[0] - r0) * (a[1] - z0);
  }
  return twice / 2;
}

/** Distance of p from the segment a–b. */
export function pointToSegment(p: Xy, a: Xy, b: Xy): number {
  const [dr, dz] = [b[0] - a[0], b[1] - a[1]];
  const squared = dr * dr + dz * dz;
  const t = squared === 0 ? 0 : ((p[0] - a[0]) * dr + (p[1] - a[1]) * dz) / squared;
  // Measured from the nearer end, so that a point on a corner is at distance 0 exactly.
  if (t <= 0) return Math.hypot(p[0] - a[0], p[1] - a[1]);
  if (t >= 1) return Math.hypot(p[0] - b[0], p[1] - b[1]);
  return Math.abs((p[0] - a[0]) * dz - (p[1] - a[1]) * dr) / Math.sqrt(squared);
}

/** True when a–b and c–d cross at a point inside both, or one ends on the other; exact. */
export function segmentsMeet(a: Xy, b: Xy, c: Xy, d: Xy): boolean {
  const side = (p: Xy, q: Xy, s: Xy) => Math.sign(orient2d(p[0], p[1], q[0], q[1], s[0], s[1]));
  const [c1, d1, a1, b1] = [side(a, b, c), side(a, b, d), side(c, d, a), side(c, d, b)];
  if (c1 === 0 && d1 === 0) return collinearOverlap(a, b, c, d);
  return c1 !== d1 && a1 !== b1;
}

function collinearOverlap(a: Xy, b: Xy, c: Xy, d: Xy): boolean {
  const axis = Math.abs(b[0] - a[0]) > Math.abs(b[1] - a[1]) ? 0 : 1;
  const [low, high] = [Math.min(a[axis], b[axis]), Math.max(a[axis], b[axis])];
  return Math.max(c[axis], d[axis]) >= low && Math.min(c[axis], d[axis]) <= high;
}

/** Smallest distance between two segments; 0 when they meet. */
export function segmentDistance(a: Xy, b: Xy, c: Xy, d: Xy): number {
  if (segmentsMeet(a, b, c, d)) return 0;
  return Math.min(
    pointToSegment(a, c, d),
    pointToSegment(b, c, d),
    pointToSegment(c, a, b),
    pointToSegment(d, a, b),
  );
}

/** True when p is inside the polygon; points on its boundary may come out either way, those on an axis edge inside. */
export function inside(p: Xy, points: readonly Xy[]): boolean {
  let odd = false;
  let before = points.at(-1)!;
  for (const here of points) {
    if (here[1] > p[1] !== before[1] > p[1]) {
      const r = before[0] + ((p[1] - before[1]) / (here[1] - before[1])) * (here[0] - before[0]);
      if (r > p[0]) odd = !odd;
    }
    before = here;
  }
  return odd;
}

/** Distance of p from the polygon's surface: its edges, those along the axis left out. */
export function toSurface(p: Xy, points: readonly Xy[]): number {
  let least = Infinity;
  let before = points.at(-1)!;
  for (const here of points) {
    if (before[0] !== 0 || here[0] !== 0) least = Math.min(least, pointToSegment(p, before, here));
    before = here;
  }
  return least;
}

/** How two figures stand to each other. */
export interface Separation {
  /** How deep one reaches into the other; 0 when they do not share any room. */
  readonly overlap: number;
  /** The smallest distance between them; 0 when they touch or overlap. */
  readonly gap: number;
  /** The smallest distance above the tolerance from a corner of one to an edge or corner of the other, wherever they may touch else. */
  readonly nearMiss: number;
}

/** Counter-clockwise polygons; distances below `tolerance` count as touching. */
export function polygonSeparation(a: readonly Xy[], b: readonly Xy[], tolerance: number): Separation {
  const depth = Math.max(depthInto(a, b, tolerance), depthInto(b, a, tolerance));
  if (depth > 0) {
    // Upright rectangles overlap by the room they share; so do figures whose boundaries run together everywhere, for want of depth.
    const upright = isUpright(a) && isUpright(b);
    const overlap = upright || depth <= 2 * tolerance ? Math.min(...sharedExtent(a, b)) : depth;
    return { overlap, gap: 0, nearMiss: Infinity };
  }
  let gap = Infinity;
  let nearMiss = Infinity;
  for (const [p, q] of [
    [a, b],
    [b, a],
  ] as const) {
    for (const corner of p) {
      let before = q.at(-1)!;
      for (const here of q) {
        const toEdge = pointToSegment(corner, before, here);
        const toCorner = Math.hypot(corner[0] - here[0], corner[1] - here[1]);
        gap = Math.min(gap, toEdge);
        if (toEdge > tolerance) nearMiss = Math.min(nearMiss, toEdge);
        if (toCorner > tolerance) nearMiss = Math.min(nearMiss, toCorner);
        before = here;
      }
    }
  }
  return { overlap: 0, gap: gap <= tolerance ? 0 : gap, nearMiss };
}

/**
 * How deep the boundary of `a` lies inside `b`, 0 when nowhere deeper than the tolerance. Edges of a are cut where b meets them; each
 * stretch then lies inside, outside or along b's boundary as a whole, and along it with the same sense both interiors lie on the
 * same side.
 */
function depthInto(a: readonly Xy[], b: readonly Xy[], tolerance: number): number {
  let deepest = 0;
  const box = boxOf(b);
  let before = a.at(-1)!;
  for (const here of a) {
    const far = boxDistance(boxOf([before, here]), box) > tolerance;
    if (!far && (before[0] !== 0 || here[0] !== 0)) {
      for (const middle of stretches(before, here, b, tolerance)) {
        deepest = Math.max(deepest, depthAt(middle, before, here, b, tolerance));
      }
    }
    const corner = far ? 0 : toSurface(here, b);
    if (corner > Math.max(deepest, tolerance) && inside(here, b)) deepest = corner;
    before = here;
  }
  return deepest;
}

/** Middles of the stretches of p–q between its meetings with b. */
function stretches(p: Xy, q: Xy, b: readonly Xy[], tolerance: number): Xy[] {
  const length = Math.hypot(q[0] - p[0], q[1] - p[1]);
  const cuts = [0, 1];
  let before = b.at(-1)!;
  for (const here of b) {
    if (pointToSegment(here, p, q) <= tolerance) {
      cuts.push(((here[0] - p[0]) * (q[0] - p[0]) + (here[1] - p[1]) * (q[1] - p[1])) / length ** 2);
    }
    const t = crossing(p, q, before, here);
    if (t > 0 && t < 1) cuts.push(t);
    before = here;
  }
  cuts.sort((s, t) => s - t);
  const middles: Xy[] = [];
  for (let i = 1; i < cuts.length; i++) {
    if ((cuts[i]! - cuts[i - 1]!) * length <= tolerance) continue;
    const t = (cuts[i]! + cuts[i - 1]!) / 2;
    middles.push([p[0] + t * (q[0] - p[0]), p[1] + t * (q[1] - p[1])]);
  }
  return middles;
}

/** Where on p–q (0 … 1) it crosses c–d; NaN when it does not. */
function crossing(p: Xy, q: Xy, c: Xy, d: Xy): number {
  const [ur, uz, vr, vz] = [q[0] - p[0], q[1] - p[1], d[0] - c[0], d[1] - c[1]];
  const det = ur * vz - uz * vr;
  if (det === 0) return Number.NaN;
  const [wr, wz] = [c[0] - p[0], c[1] - p[1]];
  const s = (wr * uz - wz * ur) / det;
  return s < 0 || s > 1 ? Number.NaN : (wr * vz - wz * vr) / det;
}

/** Depth of the stretch of p–q about `middle` inside b; along b's boundary with the same sense, just above the tolerance. */
function depthAt(middle: Xy, p: Xy, q: Xy, b: readonly Xy[], tolerance: number): number {
  const depth = toSurface(middle, b);
  if (depth > tolerance) return inside(middle, b) ? depth : 0;
  let before = b.at(-1)!;
  for (const here of b) {
    const along = (q[0] - p[0]) * (here[0] - before[0]) + (q[1] - p[1]) * (here[1] - before[1]);
    if (along > 0 && parallel(p, q, before, here) && pointToSegment(middle, before, here) <= tolerance) {
      return 2 * tolerance;
    }
    before = here;
  }
  return 0;
}

function parallel(p: Xy, q: Xy, c: Xy, d: Xy): boolean {
  const [ur, uz, vr, vz] = [q[0] - p[0], q[1] - p[1], d[0] - c[0], d[1] - c[1]];
  return Math.abs(ur * vz - uz * vr) <= 1e-6 * Math.hypot(ur, uz) * Math.hypot(vr, vz);
}

function isUpright(points: readonly Xy[]): boolean {
  const { left, right, low, high } = boxOf(points);
  return (
    points.length === 4 && points.every(([r, z]) => (r === left || r === right) && (z === low || z === high))
  );
}

function sharedExtent(a: readonly Xy[], b: readonly Xy[]): [number, number] {
  const [p, q] = [boxOf(a), boxOf(b)];
  return [
    Math.min(p.right, q.right) - Math.max(p.left, q.left),
    Math.min(p.high, q.high) - Math.max(p.low, q.low),
  ];
}

/** The upright rectangle around a figure. */
export interface Box {
  readonly left: number;
  readonly right: number;
  readonly low: number;
  readonly high: number;
}

/** Of at least one point. */
export function boxOf(points: readonly Xy[]): Box {
  let [left, right, low, high] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const [r, z] of points) {
    left = Math.min(left, r);
    right = Math.max(right, r);
    low = Math.min(low, z);
    high = Math.max(high, z);
  }
  return { left, right, low, high };
}

/** Distance between two boxes; 0 when they share a point. */
export function boxDistance(a: Box, b: Box): number {
  const dr = Math.max(0, a.left - b.right, b.left - a.right);
  const dz = Math.max(0, a.low - b.high, b.low - a.high);
  return Math.hypot(dr, dz);
}
