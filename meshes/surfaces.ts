/** Distances of a point inside a part from its surfaces, and its extent: what shares by depth and by slice are measured in. */
import type { Body, Piece, Point } from "./scene.ts";

/** Distance (m) from (r, z) to the nearest surface of the part, bore and ends counted, the axis not. */
export function surfaceDistance(body: Body): (r: number, z: number) => number {
  const surfaces = body.pieces.map(pieceDistance);
  return (r, z) => surfaces.reduce((least, d) => Math.min(least, d(r, z)), Infinity);
}

function pieceDistance(piece: Piece): (r: number, z: number) => number {
  if (piece.kind === "sphere") {
    return (r, z) => Math.abs(piece.radius - Math.hypot(r, z - piece.centreZ));
  }
  const sides = piece.points
    .map((p, i): [Point, Point] => [p, piece.points[(i + 1) % piece.points.length] ?? p])
    .filter(([p, q]) => p[0] > 0 || q[0] > 0);
  return (r, z) => sides.reduce((least, [p, q]) => Math.min(least, sideDistance(p, q, r, z)), Infinity);
}

function sideDistance(p: Point, q: Point, r: number, z: number): number {
  const [dr, dz] = [q[0] - p[0], q[1] - p[1]];
  const t = Math.max(0, Math.min(1, ((r - p[0]) * dr + (z - p[1]) * dz) / (dr * dr + dz * dz)));
  return Math.hypot(r - p[0] - t * dr, z - p[1] - t * dz);
}

/** Lowest and highest point of a part, and its least and greatest radius, m. */
export function extentOf(body: Body): { low: number; high: number; inner: number; outer: number } {
  const boxes = body.pieces.map((p) => {
    if (p.kind === "sphere") {
      return { low: p.centreZ - p.radius, high: p.centreZ + p.radius, inner: 0, outer: p.radius };
    }
    const rs = p.points.map((q) => q[0]);
    const zs = p.points.map((q) => q[1]);
    return { low: Math.min(...zs), high: Math.max(...zs), inner: Math.min(...rs), outer: Math.max(...rs) };
  });
  return {
    low: Math.min(...boxes.map((b) => b.low)),
    high: Math.max(...boxes.map((b) => b.high)),
    inner: Math.min(...boxes.map((b) => b.inner)),
    outer: Math.max(...boxes.map((b) => b.outer)),
  };
}
