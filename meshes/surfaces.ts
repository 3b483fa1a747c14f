/** A part's own measures: distances inside it from its surfaces and its extent, which shares by depth and by slice are told in; thickness, surface. */
import type { Body, Piece, Point } from "./scene.ts";

/** Distance (m) from (r, z) to the nearest surface of the part, bore and ends counted, the axis not. */
export function surfaceDistance(body: Body): (r: number, z: number) => number {
  const surfaces = body.pieces.map(pieceDistance);
  const [only] = surfaces;
  if (only !== undefined && surfaces.length === 1) return only;
  return (r, z) => surfaces.reduce((least, d) => Math.min(least, d(r, z)), Infinity);
}

function pieceDistance(piece: Piece): (r: number, z: number) => number {
  if (piece.kind === "sphere") {
    return (r, z) => Math.abs(piece.radius - Math.hypot(r, z - piece.centreZ));
  }
  const sides = piece.points
    .map((p, i): [Point, Point] => [p, piece.points[(i + 1) % piece.points.length] ?? p])
    .filter(([p, q]) => p[0] > 0 || q[0] > 0);
  return (r, z) => {
    let least = Infinity;
    for (const side of sides) least = Math.min(least, squareDistance(side[0], side[1], r, z));
    return Math.sqrt(least);
  };
}

function squareDistance(p: Point, q: Point, r: number, z: number): number {
  const dr = q[0] - p[0];
  const dz = q[1] - p[1];
  const t = Math.max(0, Math.min(1, ((r - p[0]) * dr + (z - p[1]) * dz) / (dr * dr + dz * dz)));
  const er = r - p[0] - t * dr;
  const ez = z - p[1] - t * dz;
  return er * er + ez * ez;
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

/** Twice the area of a body's half section over the length of its outline off the axis, m: a slab's thickness, a long rod's diameter. */
export function meanThickness(body: Body): number {
  let [area, outline] = [0, 0];
  for (const piece of body.pieces) {
    if (piece.kind === "sphere") {
      area += (Math.PI * piece.radius ** 2) / 2;
      outline += Math.PI * piece.radius;
      continue;
    }
    piece.points.forEach((p, i) => {
      const q = piece.points[(i + 1) % piece.points.length] ?? p;
      area += (p[0] * q[1] - q[0] * p[1]) / 2;
      if (p[0] > 0 || q[0] > 0) outline += Math.hypot(q[0] - p[0], q[1] - p[1]);
    });
  }
  return (2 * area) / outline;
}

/** Surface of revolution of a body that is all spheres (they touch in points at most), m²; null of others, which grids follow exactly. */
export function sphereSurface(body: Body): number | null {
  let area = 0;
  for (const piece of body.pieces) {
    if (piece.kind !== "sphere") return null;
    area += 4 * Math.PI * piece.radius ** 2;
  }
  return area;
}
