/** The heat picture as the page holds it: cells of the half-section with their power density, and the outlines of the bodies. */
import type { HeatFile } from "../api/contract/heat.ts";
import type { Outline } from "../meshes/heatmap.ts";

/** Power density in the heated copper and parts of one state; what `HeatMap` says, in whatever width it came over the wire. */
export interface Heat {
  /** Eight numbers a cell: r0, z0, … r3, z3 of its corners in order round it, m, r ≥ 0. */
  readonly corners: Float32Array | Float64Array;
  /** W/m³, one number a cell. */
  readonly density: Float32Array | Float64Array;
  /** The index in `outlines` of (one of) its body's outlines, one number a cell. */
  readonly outline: Uint16Array | Uint32Array | Int32Array;
  readonly outlines: readonly Outline[];
}

/** The heat of a file, whose cells share their corners, with every cell's own corners side by side. */
export function heatOf({ points, cells, density, outline, outlines }: HeatFile): Heat {
  const corners = new Float32Array(2 * cells.length);
  for (let k = 0; k < cells.length; k++) {
    const from = 2 * cells[k]!;
    corners[2 * k] = points[from]!;
    corners[2 * k + 1] = points[from + 1]!;
  }
  return { corners, density, outline, outlines };
}

/** A box in the half-section, m. */
export interface Bounds {
  readonly rMax: number;
  readonly zMin: number;
  readonly zMax: number;
}

/** The least box from the axis that holds all outlines; a small one round the origin where there is none. */
export function boundsOf(outlines: readonly Outline[]): Bounds {
  const points = outlines.flatMap((outline) => outline.points);
  if (points.length === 0) return { rMax: 0.01, zMin: -0.01, zMax: 0.01 };
  let [rMax, zMin, zMax] = [1e-6, Infinity, -Infinity];
  for (const [r, z] of points) {
    rMax = Math.max(rMax, r);
    zMin = Math.min(zMin, z);
    zMax = Math.max(zMax, z);
  }
  return { rMax, zMin, zMax };
}

/** The cell that holds (r, z), r ≥ 0, edges counted; −1 where there is none. */
export function cellAt({ corners }: Pick<Heat, "corners">, r: number, z: number): number {
  for (let at = 0; at < corners.length; at += 8) {
    if (holds(corners, at, r, z)) return at / 8;
  }
  return -1;
}

/** Whether (r, z) lies on no more than one side of all four edges: inside a convex cell, whichever way round it runs. */
function holds(corners: Heat["corners"], at: number, r: number, z: number): boolean {
  let [left, right] = [true, true];
  for (let k = 0; k < 4; k++) {
    const i = at + 2 * k;
    const j = at + 2 * ((k + 1) % 4);
    const [r0, z0] = [corners[i]!, corners[i + 1]!];
    const side = (corners[j]! - r0) * (z - z0) - (corners[j + 1]! - z0) * (r - r0);
    left &&= side >= 0;
    right &&= side <= 0;
    if (!left && !right) return false;
  }
  return true;
}

/** Distance of a point from the nearest surface of the body an outline belongs to, m; its bores count, the axis does not. */
export function depthBelow(outlines: readonly Outline[], index: number, r: number, z: number): number {
  const body = outlines[index];
  let least = Infinity;
  for (const { role, name, points } of outlines) {
    if (role !== body?.role || name !== body.name) continue;
    points.forEach((p, k) => {
      const q = points[(k + 1) % points.length]!;
      if (p[0] > 0 || q[0] > 0) least = Math.min(least, sideDistance(p, q, r, z));
    });
  }
  return least;
}

type Point = Outline["points"][number];

function sideDistance(p: Point, q: Point, r: number, z: number): number {
  const [dr, dz] = [q[0] - p[0], q[1] - p[1]];
  const length = dr * dr + dz * dz;
  const t = length === 0 ? 0 : Math.max(0, Math.min(1, ((r - p[0]) * dr + (z - p[1]) * dz) / length));
  return Math.hypot(r - p[0] - t * dr, z - p[1] - t * dz);
}
