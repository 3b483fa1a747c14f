/** What is wrong with an outline by itself: repeated points, edges folded back, no area, a boundary that meets itself. */
import { area, boxDistance, boxOf, pointToSegment, segmentDistance, type Xy } from "./planar.ts";
import { type Fault, pointerTo } from "./refusal.ts";
import { SHARPEST, sineBetween } from "./wedges.ts";
import { figure } from "./words.ts";

/** Faults of an outline's points (mm), `pointer` naming the list. Empty = a simple polygon with area. */
export function outlineFaults(points: readonly Xy[], pointer: string): Fault[] {
  const box = boxOf(points);
  const size = Math.max(box.right - box.left, box.high - box.low);
  const repeated = repeatedPoints(points, pointer, 1e-9 * size);
  if (repeated.length > 0) return repeated;
  const noArea = "the outline encloses no area";
  if (onOneLine(points, 1e-9 * size)) return [{ pointer, detail: `${noArea}: its points lie on one line` }];
  const folds = foldedCorners(points, pointer);
  if (folds.length > 0) return folds;
  const meeting = firstMeeting(points, 1e-9 * size);
  if (meeting !== null) return [{ pointer, detail: meetingWords(points, meeting, 1e-9 * size) }];
  return Math.abs(area(points)) <= 1e-9 * size * size ? [{ pointer, detail: noArea }] : [];
}

function onOneLine(points: readonly Xy[], tolerance: number): boolean {
  const [a] = points;
  if (a === undefined) return true;
  const away = (p: Xy) => Math.hypot(p[0] - a[0], p[1] - a[1]);
  const far = points.reduce((best, p) => (away(p) > away(best) ? p : best), a);
  const across = (p: Xy) => Math.abs((p[0] - a[0]) * (far[1] - a[1]) - (p[1] - a[1]) * (far[0] - a[0]));
  return points.every((p) => across(p) <= tolerance * away(far));
}

/** Smallest distance between edges that are no neighbours, where it is below `limit`; null else. For sound outlines. */
export function narrowestNeck(
  points: readonly Xy[],
  limit: number,
): { edges: [number, number]; distance: number } | null {
  let narrowest: { edges: [number, number]; distance: number } | null = null;
  eachPair(points, limit, (i, j, distance) => {
    if (distance < (narrowest?.distance ?? limit)) narrowest = { edges: [i, j], distance };
    return false;
  });
  return narrowest;
}

function repeatedPoints(points: readonly Xy[], pointer: string, tolerance: number): Fault[] {
  const n = points.length;
  return points.flatMap((p, i) => {
    const before = (i + n - 1) % n;
    const q = points[before]!;
    if (Math.hypot(p[0] - q[0], p[1] - q[1]) > tolerance) return [];
    const detail =
      i === 0
        ? `the last point repeats the first; the outline closes by itself`
        : `point ${i} repeats point ${before} (counted from 0)`;
    return [{ pointer: pointerTo(pointer, i === 0 ? n - 1 : i), detail, accepted: "each point once" }];
  });
}

function foldedCorners(points: readonly Xy[], pointer: string): Fault[] {
  const n = points.length;
  return points.flatMap((p, i) => {
    const [a, b] = [points[(i + n - 1) % n]!, points[(i + 1) % n]!];
    if (sineBetween([a[0] - p[0], a[1] - p[1]], [b[0] - p[0], b[1] - p[1]]) >= SHARPEST) return [];
    const detail = `the outline folds back on itself at point ${i} (counted from 0)`;
    return [{ pointer: pointerTo(pointer, i), detail, accepted: "corners of at least 0.5 degrees" }];
  });
}

function firstMeeting(points: readonly Xy[], tolerance: number): [number, number] | null {
  let found: [number, number] | null = null;
  eachPair(points, tolerance, (i, j) => {
    found = [i, j];
    return true;
  });
  return found;
}

/** Visits pairs of edges (edge i runs from point i to the next) that are no neighbours and at most `reach` apart, until told to stop. */
function eachPair(
  points: readonly Xy[],
  reach: number,
  visit: (i: number, j: number, distance: number) => boolean,
): void {
  const n = points.length;
  const ends = points.map((p, i): [Xy, Xy] => [p, points[(i + 1) % n]!]);
  const boxes = ends.map(boxOf);
  for (let i = 0; i < n; i++) {
    for (let j = i + 2; j < n; j++) {
      if ((i === 0 && j === n - 1) || boxDistance(boxes[i]!, boxes[j]!) > reach) continue;
      const distance = segmentDistance(...ends[i]!, ...ends[j]!);
      if (distance <= reach && visit(i, j, distance)) return;
    }
  }
}

function meetingWords(points: readonly Xy[], [i, j]: [number, number], tolerance: number): string {
  const n = points.length;
  const at = (k: number) => points[k % n]!;
  const edge = (k: number) => `from point ${k} to ${(k + 1) % n}`;
  const verb = touchesOnly(points, i, j, tolerance) ? "touches" : "crosses";
  const [r, z] = meetingPoint(at(i), at(i + 1), at(j), at(j + 1));
  return `the outline ${verb} itself near [${figure(r)}, ${figure(z)}]: its edges ${edge(i)} and ${edge(j)} meet (points counted from 0)`;
}

/** True when a corner lies on the other edge. */
function touchesOnly(points: readonly Xy[], i: number, j: number, tolerance: number): boolean {
  const n = points.length;
  const at = (k: number) => points[k % n]!;
  const on = (k: number, edge: number) => pointToSegment(at(k), at(edge), at(edge + 1)) <= tolerance;
  return on(i, j) || on(i + 1, j) || on(j, i) || on(j + 1, i);
}

function meetingPoint(a: Xy, b: Xy, c: Xy, d: Xy): Xy {
  const [ur, uz, vr, vz] = [b[0] - a[0], b[1] - a[1], d[0] - c[0], d[1] - c[1]];
  const det = ur * vz - uz * vr;
  if (det === 0) return c;
  const t = Math.min(1, Math.max(0, ((c[0] - a[0]) * vz - (c[1] - a[1]) * vr) / det));
  return [a[0] + t * ur, a[1] + t * uz];
}
