/**
 * How long a cell's side may be where: h(x) = min_j (h_j + G |x − x_j|) over sources x_j at sharp corners (by skin
 * depth), where bodies come near each other, and where a curve bends; and the stops at which nodes of facing sides match.
 * The factors were found by trial against finer grids; no source.
 */
import {
  AIR,
  type Nodes,
  nearestOnSide,
  type RegionTraits,
  type Shape,
  type Side,
  sideDirection,
  sidePoint,
} from "./shape.ts";
import type { Plane } from "./sides.ts";

/** Growth of the cell length per unit of distance, along sides. */
const GROWTH = 0.5;
/** First cell at a right-angled corner of a conductor, in skin depths; of a magnetic one, whose corner field is singular. */
const CORNER_SKIN = 0.85;
const CORNER_SKIN_MAGNETIC = 0.45;
/** First cell at a corner of a magnetic body at most, in lengths of its shorter side: where the skin is wide or there is none, the body's own size is that of the singular field. */
const CORNER_SHARE = 0.02;
/** Longest cell on an arc, in radii: about a sixth of a quarter turn on a sphere, less on a wire's far side. */
const ARC_SHARE = 0.62;
/** Widest angle one edge of the filling may span: its bulge must stay inside the faces beside it, rad. */
const WIDEST_ARC = 0.8;
/** Least cell at a corner that faces another across a narrow gap, in lengths of its side. */
const MOUTH = 0.03;
/** A round turn farther from a side than this, in radii, needs no nodes that face each other. */
const FACING = 4;
/** Turns of direction below this are a bend, not a corner, rad. */
export const CORNER_ANGLE = 0.26;

export class SizeField {
  private readonly r: number[] = [];
  private readonly z: number[] = [];
  private readonly h: number[] = [];
  constructor(private readonly cap: number) {}

  /** A source; one that changes nothing is left out. */
  add(r: number, z: number, h: number): void {
    if (this.at(r, z) <= h) return;
    this.r.push(r);
    this.z.push(z);
    this.h.push(h);
  }

  at(r: number, z: number): number {
    let best = this.cap;
    for (let j = 0; j < this.r.length; j++) {
      const d = Math.abs(r - this.r[j]) + Math.abs(z - this.z[j]);
      if (this.h[j] + 0.7 * GROWTH * d >= best) continue;
      best = Math.min(best, this.h[j] + GROWTH * Math.hypot(r - this.r[j], z - this.z[j]));
    }
    return best;
  }
}

export interface Stop {
  readonly side: number;
  readonly t: number;
  readonly gap: number;
}

export interface Sizing {
  readonly field: SizeField;
  /** Places where nodes of facing sides should match, nearest facing first. */
  readonly stops: readonly Stop[];
}

/** Sources and stops of the whole plane. `extra`: more sources, [r, z, h], where an earlier try went wrong. */
export function makeSizing(
  plane: Plane,
  shapes: readonly Shape[],
  traits: readonly RegionTraits[],
  extra: readonly (readonly [number, number, number])[],
): Sizing {
  const field = new SizeField(0.4);
  for (const [r, z, h] of extra) field.add(r, z, h);
  addCorners(plane, traits, field);
  addArcEnds(plane, field);
  const stops: Stop[] = [];
  plane.sides.forEach((side, index) => {
    const internal = side.shape >= 0 && shapes[side.shape].around !== AIR;
    if (internal) return;
    shapes.forEach((shape, other) => {
      if (shape.around !== AIR) return;
      if (shape.kind === "disc") {
        if (other !== side.shape) faceDisc(plane, index, shape.centre, shape.radius, field, stops);
      } else {
        for (const p of shape.points) faceCorner(plane, index, p[0], p[1], field, stops);
      }
    });
  });
  return { field, stops: stops.sort((a, b) => a.gap - b.gap) };
}

/** Ends of arcs as fine as the arcs themselves: where a wire crosses the mirror plane, the plane's own sides must start as fine. */
function addArcEnds({ nodes, sides }: Plane, field: SizeField): void {
  for (const { arc, a, b, kind } of sides) {
    if (arc === null || kind !== "surface") continue;
    for (const v of [a, b]) field.add(nodes.r[v], nodes.z[v], ARC_SHARE * arc.radius);
  }
}

/** Small cells at the corners of conducting and magnetic regions. */
function addCorners(plane: Plane, traits: readonly RegionTraits[], field: SizeField): void {
  const { nodes, sides } = plane;
  const at = new Map<number, Side[]>();
  for (const s of sides) {
    if (s.kind !== "surface") continue;
    for (const v of [s.a, s.b]) at.set(v, [...(at.get(v) ?? []), s]);
  }
  for (const [vertex, meeting] of at) {
    for (let i = 0; i < meeting.length; i++) {
      for (let j = i + 1; j < meeting.length; j++) {
        const bend = turnBetween(meeting[i], meeting[j], vertex, nodes);
        if (bend < CORNER_ANGLE) continue;
        addCorner(field, nodes, vertex, bend, [meeting[i], meeting[j]], traits);
      }
    }
    if (nodes.r[vertex] === 0 && meeting.length === 1) {
      const along = Math.abs(sideDirection(meeting[0], nodes, meeting[0].a === vertex ? 0 : 1)[1]);
      const bend = Math.PI - 2 * Math.acos(Math.min(1, along));
      if (bend > CORNER_ANGLE) addCorner(field, nodes, vertex, bend, meeting, traits);
    }
  }
}

/** A source at a corner (or a tip on the axis) by the finest of the regions that meet there. */
function addCorner(
  field: SizeField,
  nodes: Nodes,
  vertex: number,
  bend: number,
  meeting: readonly Side[],
  traits: readonly RegionTraits[],
): void {
  const shorter = Math.min(...meeting.map((s) => s.length));
  let h = Infinity;
  for (const region of meeting.flatMap((s) => [s.left, s.right])) {
    const trait = traits[region];
    if (trait === undefined || !trait.active) continue;
    const first = trait.magnetic ? CORNER_SKIN_MAGNETIC : CORNER_SKIN;
    const most = trait.magnetic || trait.skinDepth === Infinity ? CORNER_SHARE * shorter : Infinity;
    h = Math.min(h, Math.min(first * trait.skinDepth, most) * Math.min(3, Math.PI / 2 / bend));
  }
  if (h < Infinity) field.add(nodes.r[vertex], nodes.z[vertex], Math.min(h, 0.35 * shorter));
}

/** Angle by which the path along two sides turns at their common vertex, 0..π. */
function turnBetween(s: Side, t: Side, vertex: number, nodes: Nodes): number {
  const away = (side: Side): [number, number] => {
    const d = sideDirection(side, nodes, side.a === vertex ? 0 : 1);
    return side.a === vertex ? d : [-d[0], -d[1]];
  };
  const u = away(s);
  const v = away(t);
  return Math.PI - Math.acos(Math.max(-1, Math.min(1, u[0] * v[0] + u[1] * v[1])));
}

/** A round turn or a sphere near this side: chords must not cut the gap, nodes should face each other. */
function faceDisc(
  plane: Plane,
  index: number,
  centre: readonly [number, number],
  radius: number,
  field: SizeField,
  stops: Stop[],
): void {
  const side = plane.sides[index];
  const near = nearestOnSide(side, plane.nodes, centre[0], centre[1]);
  const gap = near.distance - radius;
  if (gap <= 0 || near.t <= 0 || near.t >= 1) return;
  if (gap > FACING * radius && 0.6 * gap > longestCell(side)) return;
  const bend = side.arc === null ? radius : Math.min(radius, side.arc.radius);
  const [r, z] = sidePoint(side, plane.nodes, near.t);
  const own =
    side.arc === null ? 0.6 * Math.sqrt(2 * bend * gap + gap * gap) : 0.5 * Math.sqrt(2 * bend * gap);
  field.add(r, z, own);
  if (gap > FACING * radius) return;
  const k = radius / near.distance;
  field.add(
    centre[0] + k * (r - centre[0]),
    centre[1] + k * (z - centre[1]),
    0.5 * Math.sqrt(2 * bend * gap),
  );
  stops.push({ side: index, t: near.t, gap });
  const [qr, qz] = [centre[0] + k * (r - centre[0]), centre[1] + k * (z - centre[1])];
  plane.sides.forEach((other, j) => {
    if (other.arc === null || other.arc.centre[0] !== centre[0] || other.arc.centre[1] !== centre[1]) return;
    if (other.arc.radius !== radius) return;
    const hit = nearestOnSide(other, plane.nodes, qr, qz);
    if (hit.distance < 1e-9 && hit.t > 0 && hit.t < 1) stops.push({ side: j, t: hit.t, gap });
  });
}

/** Longest cell a side can have whatever its surroundings. */
function longestCell(side: Side): number {
  if (side.kind === "edge") return Infinity;
  return side.arc === null ? side.length / 2 : ARC_SHARE * side.arc.radius;
}

/** A corner near this side. */
function faceCorner(
  plane: Plane,
  index: number,
  r: number,
  z: number,
  field: SizeField,
  stops: Stop[],
): void {
  const side = plane.sides[index];
  const near = nearestOnSide(side, plane.nodes, r, z);
  if (near.distance < 1e-9) return;
  const [pr, pz] = sidePoint(side, plane.nodes, near.t);
  if (near.t <= 1e-9 || near.t >= 1 - 1e-9) {
    field.add(pr, pz, Math.max(0.7 * near.distance, MOUTH * side.length));
    return;
  }
  const share =
    side.arc === null ? near.distance : Math.min(near.distance, Math.sqrt(side.arc.radius * near.distance));
  field.add(pr, pz, 0.7 * share);
  stops.push({ side: index, t: near.t, gap: near.distance });
}

/**
 * Parameters of a side's nodes, both ends included: an even number of intervals whose pairs are the edges of the filling.
 */
export function sampleSide(plane: Plane, index: number, sizing: Sizing): number[] {
  const side = plane.sides[index];
  const stops = chooseStops(plane, index, sizing);
  const out = [0];
  for (let i = 0; i + 1 < stops.length; i++) {
    const from = stops[i];
    const to = stops[i + 1];
    const cells = 48;
    const sum = new Float64Array(cells + 1);
    const longest = side.arc === null ? Infinity : ARC_SHARE * side.arc.radius;
    for (let k = 0; k < cells; k++) {
      const [r, z] = sidePoint(side, plane.nodes, from + ((k + 0.5) / cells) * (to - from));
      sum[k + 1] =
        sum[k] + ((to - from) * side.length) / cells / (2 * Math.min(longest, sizing.field.at(r, z)));
    }
    const least = side.arc === null ? 1 : ((to - from) * side.length) / (WIDEST_ARC * side.arc.radius);
    const n = 2 * Math.max(1, Math.ceil(least - 1e-9), Math.ceil(sum[cells] - 0.3));
    let k = 0;
    for (let j = 1; j <= n; j++) {
      const want = (sum[cells] * j) / n;
      while (k + 1 < cells && sum[k + 1] < want) k++;
      const part = j === n ? 1 : (k + (want - sum[k]) / (sum[k + 1] - sum[k])) / cells;
      out.push(from + part * (to - from));
    }
  }
  return out;
}

/** Ends of the side and those stops that face something nearer than a cell or two, not too close together. */
function chooseStops(plane: Plane, index: number, sizing: Sizing): number[] {
  const side = plane.sides[index];
  const chosen = [0, 1];
  for (const stop of sizing.stops) {
    if (stop.side !== index) continue;
    const [r, z] = sidePoint(side, plane.nodes, stop.t);
    const h = sizing.field.at(r, z);
    if (stop.gap > 3 * h) continue;
    if (chosen.every((t) => Math.abs(t - stop.t) * side.length > 0.9 * h)) chosen.push(stop.t);
  }
  return chosen.sort((a, b) => a - b);
}
