/**
 * Shapes and domain → the sides of the plane: cut at the mirror plane, split where another body's corner touches,
 * shared sides merged, and the axis, mirror plane and outer boundary added with the region each borders.
 */
import {
  AIR,
  type Arc,
  type Domain,
  insideShape,
  Nodes,
  OUTSIDE,
  type Pair,
  type Shape,
  type Side,
} from "./shape.ts";

/** Two corners closer than this to a line, relative to the scene, lie on it. */
const TOUCH = 1e-9;

interface Raw {
  readonly p: Pair;
  readonly q: Pair;
  readonly arc: Arc | null;
  readonly left: number;
  readonly right: number;
  readonly shape: number;
}

export interface Plane {
  readonly nodes: Nodes;
  readonly sides: Side[];
}

/** All sides of the plane. Shapes inside others (bores) come after what they lie in. */
export function makePlane(shapes: readonly Shape[], domain: Domain): Plane {
  const nodes = new Nodes();
  const mirror = domain.kind === "open" && domain.mirror;
  let raws = shapes.flatMap((s, i) => (s.kind === "disc" ? discSides(s, i) : polygonSides(s, i)));
  if (mirror) raws = raws.flatMap(keepUpper);
  raws = splitAtCorners(raws);
  const sides = mergeSides(raws, nodes);
  addBoundary(sides, nodes, shapes, domain);
  return { nodes, sides };
}

function polygonSides(shape: Extract<Shape, { kind: "polygon" }>, index: number): Raw[] {
  const sides: Raw[] = [];
  const n = shape.points.length;
  for (let i = 0; i < n; i++) {
    const p = shape.points[i];
    const q = shape.points[(i + 1) % n];
    if (p[0] === 0 && q[0] === 0) continue;
    sides.push({ p, q, arc: null, left: shape.region, right: shape.around, shape: index });
  }
  return sides;
}

/** Quarter arcs; a disc about a point of the axis gives the two on the right of it. */
function discSides(shape: Extract<Shape, { kind: "disc" }>, index: number): Raw[] {
  const { centre, radius } = shape;
  const on = (k: number): Pair => {
    const c = [0, 1, 0, -1][(k + 4) % 4];
    const s = [-1, 0, 1, 0][(k + 4) % 4];
    return [centre[0] + radius * c, centre[1] + radius * s];
  };
  const quarters = centre[0] === 0 ? [0, 1] : [0, 1, 2, 3];
  return quarters.map((k) => ({
    p: on(k),
    q: on(k + 1),
    arc: { centre, radius, from: ((k - 1) * Math.PI) / 2, sweep: Math.PI / 2 },
    left: shape.region,
    right: shape.around,
    shape: index,
  }));
}

/** The part of a side in z ≥ 0. Arcs end at the plane: a disc that crosses it is its own mirror image, centred on it. */
function keepUpper(side: Raw): Raw[] {
  const { p, q, arc } = side;
  if (p[1] >= 0 && q[1] >= 0) return [side];
  if (arc !== null || (p[1] <= 0 && q[1] <= 0)) return [];
  const cut: Pair = [p[0] + ((q[0] - p[0]) * p[1]) / (p[1] - q[1]), 0];
  return [p[1] > 0 ? { ...side, q: cut } : { ...side, p: cut }];
}

/** Straight sides split at every corner that lies on them. */
function splitAtCorners(raws: readonly Raw[]): Raw[] {
  const corners = raws.filter((s) => s.arc === null).map((s) => s.p);
  return raws.flatMap((side) => {
    if (side.arc !== null) return [side];
    const { p, q } = side;
    const l = Math.hypot(q[0] - p[0], q[1] - p[1]);
    const u = [(q[0] - p[0]) / l, (q[1] - p[1]) / l];
    const cuts: [number, Pair][] = [];
    for (const c of corners) {
      const along = (c[0] - p[0]) * u[0] + (c[1] - p[1]) * u[1];
      const off = (c[0] - p[0]) * u[1] - (c[1] - p[1]) * u[0];
      if (Math.abs(off) < TOUCH && along > TOUCH && along < l - TOUCH) cuts.push([along, c]);
    }
    cuts.sort((a, b) => a[0] - b[0]);
    const stops: Pair[] = [p, ...cuts.map((c) => c[1]), q];
    return stops.slice(1).map((stop, i) => ({ ...side, p: stops[i], q: stop }));
  });
}

/** Sides between vertices; a side met again the other way round joins its two regions. */
function mergeSides(raws: readonly Raw[], nodes: Nodes): Side[] {
  const byEnds = new Map<string, Side>();
  const sides: Side[] = [];
  for (const raw of raws) {
    const a = nodes.vertex(raw.p[0], raw.p[1]);
    const b = nodes.vertex(raw.q[0], raw.q[1]);
    if (a === b) continue;
    const twin = raw.arc === null ? byEnds.get(`${b},${a}`) : undefined;
    if (twin !== undefined) {
      twin.right = raw.left;
      continue;
    }
    const chord = Math.hypot(nodes.r[b] - nodes.r[a], nodes.z[b] - nodes.z[a]);
    const length = raw.arc === null ? chord : raw.arc.radius * Math.abs(raw.arc.sweep);
    const side: Side = {
      a,
      b,
      arc: raw.arc,
      left: raw.left,
      right: raw.right,
      kind: "surface",
      length,
      shape: raw.shape,
    };
    if (raw.arc === null && byEnds.has(`${a},${b}`)) continue;
    byEnds.set(`${a},${b}`, side);
    sides.push(side);
  }
  return sides;
}

/** Adds the domain's own boundary, domain on the left, split at every vertex that lies on it. */
function addBoundary(sides: Side[], nodes: Nodes, shapes: readonly Shape[], domain: Domain): void {
  const regionAt = (r: number, z: number): number => {
    let region = AIR;
    for (const s of shapes) if (insideShape(s, r, z)) region = s.region;
    return region;
  };
  const line = (stops: readonly number[], probe: Pair): void => {
    for (let i = 0; i + 1 < stops.length; i++) {
      const a = stops[i];
      const b = stops[i + 1];
      const left = regionAt(
        (nodes.r[a] + nodes.r[b]) / 2 + probe[0] * 1e-9,
        (nodes.z[a] + nodes.z[b]) / 2 + probe[1] * 1e-9,
      );
      const length = Math.hypot(nodes.r[b] - nodes.r[a], nodes.z[b] - nodes.z[a]);
      sides.push({ a, b, arc: null, left, right: OUTSIDE, kind: "edge", length, shape: -1 });
    }
  };
  const all = nodes.r.map((_, i) => i);
  if (domain.kind === "strip") {
    const { rFrom, rTo, zFrom, zTo } = domain;
    const c = [
      nodes.vertex(rFrom, zFrom),
      nodes.vertex(rTo, zFrom),
      nodes.vertex(rTo, zTo),
      nodes.vertex(rFrom, zTo),
    ];
    line([c[0], c[1]], [0, 1]);
    line([c[1], c[2]], [-1, 0]);
    line([c[2], c[3]], [0, -1]);
    line([c[3], c[0]], [1, 0]);
    return;
  }
  const R = domain.radius;
  const top = nodes.vertex(0, R);
  const right = nodes.vertex(R, 0);
  const quarter = (a: number, b: number, from: number): void => {
    const arc: Arc = { centre: [0, 0], radius: R, from, sweep: Math.PI / 2 };
    sides.push({ a, b, arc, left: AIR, right: OUTSIDE, kind: "edge", length: (R * Math.PI) / 2, shape: -1 });
  };
  const onAxis = all.filter((i) => nodes.r[i] === 0);
  const down = (list: number[]): number[] => [...new Set(list)].sort((i, j) => nodes.z[j] - nodes.z[i]);
  if (domain.mirror) {
    const origin = nodes.vertex(0, 0);
    const onPlane = all.filter((i) => nodes.z[i] === 0);
    line(down([top, ...onAxis, origin]), [1, 0]);
    line(
      [...new Set([origin, ...onPlane, right])].sort((i, j) => nodes.r[i] - nodes.r[j]),
      [0, 1],
    );
  } else {
    const bottom = nodes.vertex(0, -R);
    line(down([top, ...onAxis, bottom]), [1, 0]);
    quarter(bottom, right, -Math.PI / 2);
  }
  quarter(right, top, 0);
}
