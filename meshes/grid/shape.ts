/**
 * The plane as the grid generator sees it: closed loops of straight and circular sides, each with the region on its
 * left and on its right, in lengths of one unit ≈ the scene's size. Vertices are exact: two sides that meet share one.
 */

/** Region id of air; copper and bodies count from 1. */
export const AIR = 0;
/** Label of what is not filled: outside the domain. */
export const OUTSIDE = -1;

export type Pair = readonly [number, number];

/** A closed outline and what it encloses. */
export type Shape =
  | {
      readonly kind: "polygon";
      /** Counter-clockwise corners. */
      readonly points: readonly Pair[];
      readonly region: number;
      /** Region outside the shape where nothing else touches: air, or the copper round a bore. */
      readonly around: number;
    }
  | {
      readonly kind: "disc";
      readonly centre: Pair;
      readonly radius: number;
      readonly region: number;
      readonly around: number;
    };

/** Skin depth of a region where it conducts and carries current, else Infinity. */
export interface RegionTraits {
  readonly skinDepth: number;
  /** Thickness to be layered right through (a tube's wall), or 0. */
  readonly wall: number;
  /** True where the region conducts or is magnetic: its corners want small cells. */
  readonly active: boolean;
  readonly magnetic: boolean;
}

export type Domain =
  /** Half disc of this radius about (0, 0), closed towards open space; `mirror`: only z ≥ 0 of it. */
  | { readonly kind: "open"; readonly radius: number; readonly mirror: boolean }
  /** The rectangle between two radii and two heights, its sides natural. */
  | {
      readonly kind: "strip";
      readonly rFrom: number;
      readonly rTo: number;
      readonly zFrom: number;
      readonly zTo: number;
    };

export interface Arc {
  readonly centre: Pair;
  readonly radius: number;
  /** Angle of the first end and signed sweep, rad. */
  readonly from: number;
  readonly sweep: number;
}

/** A side between two vertices, run from a to b. */
export interface Side {
  readonly a: number;
  readonly b: number;
  readonly arc: Arc | null;
  left: number;
  right: number;
  /** surface: between regions; edge: boundary of the domain (axis, mirror plane, outer circle, strip). */
  readonly kind: "surface" | "edge";
  readonly length: number;
  /** Index of the shape it came from; −1 for the domain's boundary. */
  readonly shape: number;
}

/** Growing table of node positions. */
export class Nodes {
  readonly r: number[] = [];
  readonly z: number[] = [];
  private readonly known = new Map<string, number>();

  add(r: number, z: number): number {
    this.r.push(r);
    this.z.push(z);
    return this.r.length - 1;
  }

  /** The vertex at this place, made when new: places closer than about 1e-10 are one. */
  vertex(r: number, z: number): number {
    const qr = Math.round(r * 2 ** 33);
    const qz = Math.round(z * 2 ** 33);
    for (let i = -1; i <= 1; i++) {
      for (let j = -1; j <= 1; j++) {
        const id = this.known.get(`${qr + i},${qz + j}`);
        if (id !== undefined) return id;
      }
    }
    const id = this.add(r, z);
    this.known.set(`${qr},${qz}`, id);
    return id;
  }
}

/** Point of a side at parameter t in 0..1. */
export function sidePoint(side: Side, nodes: Nodes, t: number): [number, number] {
  if (side.arc !== null) {
    const angle = side.arc.from + t * side.arc.sweep;
    return [
      side.arc.centre[0] + side.arc.radius * Math.cos(angle),
      side.arc.centre[1] + side.arc.radius * Math.sin(angle),
    ];
  }
  const { r, z } = nodes;
  return [r[side.a] + t * (r[side.b] - r[side.a]), z[side.a] + t * (z[side.b] - z[side.a])];
}

/** Parameter (0..1) and distance of the point of a side that is nearest to (r, z). */
export function nearestOnSide(
  side: Side,
  nodes: Nodes,
  r: number,
  z: number,
): { t: number; distance: number } {
  let t: number;
  if (side.arc !== null) {
    const { centre, from, sweep } = side.arc;
    let turn = Math.atan2(z - centre[1], r - centre[0]) - from;
    const middle = sweep / 2;
    while (turn - middle > Math.PI) turn -= 2 * Math.PI;
    while (turn - middle < -Math.PI) turn += 2 * Math.PI;
    t = turn / sweep;
  } else {
    const dr = nodes.r[side.b] - nodes.r[side.a];
    const dz = nodes.z[side.b] - nodes.z[side.a];
    t = ((r - nodes.r[side.a]) * dr + (z - nodes.z[side.a]) * dz) / (dr * dr + dz * dz);
  }
  t = Math.min(1, Math.max(0, t));
  const [pr, pz] = sidePoint(side, nodes, t);
  return { t, distance: Math.hypot(r - pr, z - pz) };
}

/** Unit direction of travel of a side at parameter t. */
export function sideDirection(side: Side, nodes: Nodes, t: number): [number, number] {
  if (side.arc !== null) {
    const angle = side.arc.from + t * side.arc.sweep;
    const sign = Math.sign(side.arc.sweep);
    return [-sign * Math.sin(angle), sign * Math.cos(angle)];
  }
  const dr = nodes.r[side.b] - nodes.r[side.a];
  const dz = nodes.z[side.b] - nodes.z[side.a];
  const l = Math.hypot(dr, dz);
  return [dr / l, dz / l];
}

/** True when (r, z) lies inside the shape (its boundary counts as either). */
export function insideShape(shape: Shape, r: number, z: number): boolean {
  if (shape.kind === "disc") return Math.hypot(r - shape.centre[0], z - shape.centre[1]) < shape.radius;
  let inside = false;
  const p = shape.points;
  for (let i = 0, j = p.length - 1; i < p.length; j = i++) {
    const above = p[i][1] > z;
    if (above !== p[j][1] > z && r < ((p[j][0] - p[i][0]) * (z - p[i][1])) / (p[j][1] - p[i][1]) + p[i][0]) {
      inside = !inside;
    }
  }
  return inside;
}
