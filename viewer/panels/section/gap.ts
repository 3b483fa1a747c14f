/** Where coil and part come closest, mm: the clearance a winder looks at first. */
import type { Copper, Placed } from "../../../meshes/layout.ts";
import type { Xy } from "../../../meshes/planar.ts";
import type { Figure } from "../../../meshes/shapes.ts";

export interface Gap {
  readonly distance: number;
  /** On the part's surface, and on the copper's. */
  readonly part: Xy;
  readonly copper: Xy;
  readonly pointer: string;
}

/** More pairs of figures and edges than this are not compared: nobody reads one gap among so many. */
const MOST_PAIRS = 300_000;

/** The narrowest gap between copper and the parts; null when there is none or something overlaps. */
export function narrowestGap(copper: Copper, parts: readonly Placed[]): Gap | null {
  const edges = parts
    .flatMap((p) => p.pieces)
    .reduce((n, f) => n + (f.kind === "disc" ? 1 : f.points.length), 0);
  if (edges * copper.figures.length > MOST_PAIRS) return null;
  let best: Gap | null = null;
  for (const part of parts) {
    for (const piece of part.pieces) {
      for (const turn of copper.figures) {
        const found = between(piece, turn);
        if (best === null || better(found, best)) best = { ...found, pointer: part.pointer };
      }
    }
  }
  return best !== null && best.distance > 0 ? best : null;
}

type Pair = Omit<Gap, "pointer">;

/** Shorter; of equal ones the upper when across, the outer when along the axis: its leader leaves the drawing there. */
function better(a: Pair, b: Pair): boolean {
  const slack = 1e-6 * Math.max(1, Math.abs(b.distance));
  if (Math.abs(a.distance - b.distance) > slack) return a.distance < b.distance;
  return isAcross(a) ? a.copper[1] > b.copper[1] + slack : a.copper[0] > b.copper[0] + slack;
}

/** Whether a gap is measured rather across the axis than along it. */
export function isAcross({ part, copper }: Pick<Gap, "part" | "copper">): boolean {
  return Math.abs(part[0] - copper[0]) >= Math.abs(part[1] - copper[1]);
}

function between(part: Figure, copper: Figure): Pair {
  if (part.kind === "disc")
    return fromDisc(part, copper, (p, c, distance) => ({ distance, part: p, copper: c }));
  if (copper.kind === "disc")
    return fromDisc(copper, part, (c, p, distance) => ({ distance, part: p, copper: c }));
  const out = nearestOf(copper.points, part.points, true);
  const back = nearestOf(part.points, copper.points, false);
  return out.distance <= back.distance
    ? { distance: out.distance, copper: out.from, part: out.to }
    : { distance: back.distance, part: back.from, copper: back.to };
}

type Disc = Extract<Figure, { kind: "disc" }>;

function fromDisc(disc: Disc, other: Figure, made: (on: Xy, to: Xy, distance: number) => Pair): Pair {
  const centre: Xy = [disc.r, disc.z];
  const to =
    other.kind === "disc"
      ? towards([other.r, other.z], centre, other.radius)
      : nearestOf([centre], other.points, true).to;
  const on = towards(centre, to, disc.radius);
  return made(on, to, Math.hypot(to[0] - centre[0], to[1] - centre[1]) - disc.radius);
}

/** The point at `distance` from `from` on the way to `to`. */
function towards(from: Xy, to: Xy, distance: number): Xy {
  const [dr, dz] = [to[0] - from[0], to[1] - from[1]];
  const length = Math.hypot(dr, dz) || 1;
  return [from[0] + (dr / length) * distance, from[1] + (dz / length) * distance];
}

interface Nearest {
  readonly from: Xy;
  readonly to: Xy;
  readonly distance: number;
}

/** The point of a polygon's edges nearest to any of `points`; edges along the axis are no surface where `body` says so. */
function nearestOf(points: readonly Xy[], polygon: readonly Xy[], body: boolean): Nearest {
  let best: Nearest = { from: [0, 0], to: [0, 0], distance: Infinity };
  polygon.forEach((a, i) => {
    const b = polygon[(i + 1) % polygon.length]!;
    if (body && a[0] === 0 && b[0] === 0) return;
    for (const from of points) {
      const to = onSegment(from, a, b);
      const distance = Math.hypot(from[0] - to[0], from[1] - to[1]);
      // Of equal ones the upper, as above.
      if (distance < best.distance - 1e-9 || (distance < best.distance + 1e-9 && to[1] > best.to[1])) {
        best = { from, to, distance };
      }
    }
  });
  return best;
}

function onSegment(p: Xy, a: Xy, b: Xy): Xy {
  const [dr, dz] = [b[0] - a[0], b[1] - a[1]];
  const squared = dr * dr + dz * dz;
  const t = squared === 0 ? 0 : Math.max(0, Math.min(1, ((p[0] - a[0]) * dr + (p[1] - a[1]) * dz) / squared));
  return [a[0] + t * dr, a[1] + t * dz];
}
