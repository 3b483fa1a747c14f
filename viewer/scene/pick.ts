/** What a ray meets first: one of the two cut faces, or the surface that is turned about the axis. */
import type { vec3 } from "gl-matrix";
import { cellAt, type Heat } from "../heat.ts";
import type { Boundary } from "./boundary.ts";

/** The opened wedge, as angles about the axis from +x towards +z; what lies between them is cut away. */
export const opening = { from: 0, to: Math.PI / 2 } as const;

export interface Met {
  /** The point on the section, m. */
  readonly r: number;
  readonly z: number;
  readonly cell: number;
  readonly on: "cut" | "surface";
  /** Distance along the ray, m. */
  readonly distance: number;
}

interface Ray {
  readonly from: vec3;
  /** Of length 1. */
  readonly along: vec3;
}

/** The first thing met; null when the ray goes past. */
export function meet(heat: Pick<Heat, "corners">, boundary: Boundary, ray: Ray): Met | null {
  const met = [
    meetFace(heat, opening.from, ray),
    meetFace(heat, opening.to, ray),
    meetSurface(boundary, ray),
  ].filter((m) => m !== null);
  return met.sort((a, b) => a.distance - b.distance)[0] ?? null;
}

/** The cut face at an angle about the axis: half a plane from the axis outwards. */
function meetFace(heat: Pick<Heat, "corners">, angle: number, { from, along }: Ray): Met | null {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const towards = along[2] * c - along[0] * s;
  const distance = -(from[2] * c - from[0] * s) / towards;
  if (!(distance > 0) || !Number.isFinite(distance)) return null;
  const r = (from[0] + distance * along[0]) * c + (from[2] + distance * along[2]) * s;
  const z = from[1] + distance * along[1];
  const cell = r < 0 ? -1 : cellAt(heat, r, z);
  return cell < 0 ? null : { r, z, cell, on: "cut", distance };
}

/** The rings of all edges, each a piece of a cone: x² + z² = (r0 + slope·(y − z0))², a quadratic in the distance. */
function meetSurface({ edges, cells }: Boundary, ray: Ray): Met | null {
  let best: Met | null = null;
  for (let k = 0; k < cells.length; k++) {
    for (const distance of distances(edges, 4 * k, ray)) {
      if (!(distance > 0) || distance >= (best?.distance ?? Infinity)) continue;
      const at = onEdge(edges, 4 * k, ray, distance);
      if (at !== null) best = { r: at[0], z: at[1], cell: cells[k]!, on: "surface", distance };
    }
  }
  return best;
}

function distances(edges: Float64Array, at: number, { from, along }: Ray): readonly number[] {
  const [r0, z0, r1, z1] = [edges[at]!, edges[at + 1]!, edges[at + 2]!, edges[at + 3]!];
  // A flat ring is met where the ray reaches its height.
  if (Math.abs(z1 - z0) < 1e-9 * Math.abs(r1 - r0)) return [(z0 - from[1]) / along[1]];
  const slope = (r1 - r0) / (z1 - z0);
  const radius = r0 + slope * (from[1] - z0);
  const grow = slope * along[1];
  const a = along[0] ** 2 + along[2] ** 2 - grow ** 2;
  const b = from[0] * along[0] + from[2] * along[2] - radius * grow;
  const c = from[0] ** 2 + from[2] ** 2 - radius ** 2;
  const inside = b * b - a * c;
  if (inside < 0) return [];
  const root = Math.sqrt(inside);
  return [(-b - root) / a, (-b + root) / a];
}

/** The section's point where the ray is on this edge's ring and not in the opened wedge. */
function onEdge(
  edges: Float64Array,
  at: number,
  { from, along }: Ray,
  distance: number,
): [number, number] | null {
  const [x, y, w] = [0, 1, 2].map((k) => from[k]! + distance * along[k]!) as [number, number, number];
  const angle = Math.atan2(w, x);
  if (angle > opening.from && angle < opening.to) return null;
  const r = Math.hypot(x, w);
  const [r0, z0, r1, z1] = [edges[at]!, edges[at + 1]!, edges[at + 2]!, edges[at + 3]!];
  const length = (r1 - r0) ** 2 + (z1 - z0) ** 2;
  const share = ((r - r0) * (r1 - r0) + (y - z0) * (z1 - z0)) / length;
  const off = Math.abs((r - r0) * (z1 - z0) - (y - z0) * (r1 - r0)) / length;
  return share < -1e-6 || share > 1 + 1e-6 || off > 1e-3 ? null : [r, y];
}
