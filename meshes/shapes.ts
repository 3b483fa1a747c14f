/**
 * The pieces a part or guide consists of, as plain figures of the half plane (r, z), r ≥ 0. Lengths in the document's mm.
 * Polygons come out counter-clockwise, without repeated or collinear corners.
 */
import type { Guide, Part, Solid } from "./design.ts";
import {
  area,
  type Box,
  boxOf,
  inside,
  polygonSeparation,
  type Separation,
  toSurface,
  type Xy,
} from "./planar.ts";

/** A connected figure, mm. A sphere is a disc about a point of the axis. */
export type Figure =
  | { readonly kind: "polygon"; readonly points: readonly Xy[] }
  | { readonly kind: "disc"; readonly r: number; readonly z: number; readonly radius: number };

/** The upright rectangle around a figure (a disc's left half included). */
export function figureBox(f: Figure): Box {
  if (f.kind === "polygon") return boxOf(f.points);
  return { left: f.r - f.radius, right: f.r + f.radius, low: f.z - f.radius, high: f.z + f.radius };
}

/** How two figures stand to each other; distances below `tolerance` count as touching. */
export function separation(a: Figure, b: Figure, tolerance: number): Separation {
  if (a.kind === "polygon" && b.kind === "polygon") return polygonSeparation(a.points, b.points, tolerance);
  const clear = a.kind === "disc" ? discClearance(a, b) : discClearance(b as Disc, a);
  const gap = Math.abs(clear) <= tolerance ? 0 : Math.max(0, clear);
  return { overlap: clear < -tolerance ? -clear : 0, gap, nearMiss: gap > 0 ? gap : Infinity };
}

type Disc = Extract<Figure, { kind: "disc" }>;

/** Distance of a point outside a figure from it; 0 and below inside. */
export function toFigure(p: Xy, f: Figure): number {
  return discClearance({ kind: "disc", r: p[0], z: p[1], radius: 0 }, f);
}

/** Distance from a disc to another figure, negative by the depth of an overlap. */
function discClearance(disc: Disc, other: Figure): number {
  if (other.kind === "disc")
    return Math.hypot(disc.r - other.r, disc.z - other.z) - disc.radius - other.radius;
  const centre: Xy = [disc.r, disc.z];
  const distance = toSurface(centre, other.points);
  return (inside(centre, other.points) ? -distance : distance) - disc.radius;
}

/** The pieces of a part or guide, bottom to top. */
export function piecesOf(body: Part | Guide | Solid): readonly Figure[] {
  if (body.shape !== "stack") return [solidPiece(body)];
  const { of, count, gapMm } = body;
  const piece = solidPiece(of);
  const step = heightOf(of) + gapMm;
  const shift = (i: number) => (i - (count - 1) / 2) * step;
  // Washers without a gap are one solid bar: their faces touch all over.
  if (gapMm === 0 && of.shape === "cylinder") return [solidPiece({ ...of, lengthMm: count * of.lengthMm })];
  return Array.from({ length: count }, (_, i) => moved(piece, shift(i)));
}

/** True for what has an outer side and a bore in the sense of the depth shares: a cylinder, also a stack of them. */
export function isCylinder(body: Part | Guide): boolean {
  return body.shape === "cylinder" || (body.shape === "stack" && body.of.shape === "cylinder");
}

/** Height of a solid along z, mm. */
function heightOf(solid: Solid): number {
  if (solid.shape === "cylinder") return solid.lengthMm;
  if (solid.shape === "sphere") return solid.diameterMm;
  const z = solid.pointsMm.map((p) => p[1]);
  return Math.max(...z) - Math.min(...z);
}

function solidPiece(solid: Solid): Figure {
  if (solid.shape === "sphere")
    return { kind: "disc", r: 0, z: solid.centreZMm, radius: solid.diameterMm / 2 };
  if (solid.shape === "outline") return { kind: "polygon", points: tidied(solid.pointsMm) };
  const inner = solid.boreDiameterMm / 2;
  const outer = solid.diameterMm / 2;
  const low = solid.centreZMm - solid.lengthMm / 2;
  const high = solid.centreZMm + solid.lengthMm / 2;
  return {
    kind: "polygon",
    points: [
      [inner, low],
      [outer, low],
      [outer, high],
      [inner, high],
    ],
  };
}

/** Counter-clockwise, corners on a straight line between their neighbours left out. */
export function tidied(points: readonly Xy[]): readonly Xy[] {
  const turned = area(points) < 0 ? points.toReversed() : points;
  const n = turned.length;
  const corners = turned.filter((p, i) => {
    const [ar, az] = turned[(i + n - 1) % n]!;
    const [br, bz] = turned[(i + 1) % n]!;
    const [u, v, w, x] = [p[0] - ar, p[1] - az, br - p[0], bz - p[1]];
    return Math.abs(u * x - v * w) > 1e-9 * Math.hypot(u, v) * Math.hypot(w, x);
  });
  return corners;
}

function moved(figure: Figure, dz: number): Figure {
  if (figure.kind === "disc") return { ...figure, z: figure.z + dz };
  return { kind: "polygon", points: figure.points.map(([r, z]): Xy => [r, z + dz]) };
}
