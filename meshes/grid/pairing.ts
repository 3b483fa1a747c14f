/** Quadrilaterals from pairs of triangles, the best pairs first; what finds no good partner stays a triangle. */
import { edgeKey, edgeMap, type FillEdge, nextHalf, type Triangulation } from "./triangulation.ts";

export interface Filling {
  /** All points: the given ones first. */
  readonly x: number[];
  readonly y: number[];
  /** Triangles and quadrilaterals, counter-clockwise corner ids. */
  readonly faces: number[][];
  readonly labels: number[];
}

/** Least quality (1 = rectangle, 0 = an angle of 0° or 180°) of a quadrilateral made of two triangles. */
const LEAST_QUAD = 0.3;

/** Cosine of the angle from which a corner between two given edges is too flat to be a corner of one face. */
export const FLAT_EAR = -0.5;

/** Quadrilaterals from pairs of triangles, best first; the rest stay triangles. */
export function pairUp(net: Triangulation, x: number[], y: number[], edges: readonly FillEdge[]): Filling {
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

function area(x: readonly number[], y: readonly number[], corners: readonly number[]): number {
  let sum = 0;
  for (let i = 0; i < corners.length; i++) {
    const a = corners[i];
    const b = corners[(i + 1) % corners.length];
    sum += x[a] * y[b] - x[b] * y[a];
  }
  return sum / 2;
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
