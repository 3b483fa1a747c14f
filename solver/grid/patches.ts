/**
 * Makes a PatchMesh from quadrilaterals given by their corners: numbers the edges, remembers which lie on arcs,
 * and finds the outer circle's edges in order.
 */
import type { PatchMesh } from "../types.ts";

/** An arc some edges lie on: given per edge by the key of its two corners. */
export interface ArcOfEdge {
  readonly a: number;
  readonly b: number;
  readonly centreR: number;
  readonly centreZ: number;
  readonly radius: number;
}

/** Corners (m), four corner ids a patch (counter-clockwise), a region id a patch, the arcs, and the outer circle if any. */
export function makePatchMesh(
  r: Float64Array,
  z: Float64Array,
  corners: Int32Array,
  region: Int32Array,
  arcs: readonly ArcOfEdge[],
  outer: { readonly centreZ: number; readonly radius: number } | null,
): PatchMesh {
  const count = r.length;
  const key = (a: number, b: number): number => (a < b ? a * count + b : b * count + a);
  const ids = new Map<number, number>();
  const ends: number[] = [];
  const patchEdges = new Int32Array(corners.length);
  for (let k = 0; k < corners.length; k++) {
    const a = corners[k];
    const b = corners[(k & ~3) + ((k + 1) & 3)];
    const id = key(a, b);
    let e = ids.get(id);
    if (e === undefined) {
      e = ends.length / 2;
      ids.set(id, e);
      ends.push(a, b);
    }
    patchEdges[k] = e;
  }
  const edgeArc = new Float64Array((ends.length / 2) * 3);
  const onOuter: number[] = [];
  for (const arc of arcs) {
    const e = ids.get(key(arc.a, arc.b));
    if (e === undefined) throw new RangeError("an arc names two corners that share no edge");
    edgeArc[3 * e] = arc.centreR;
    edgeArc[3 * e + 1] = arc.centreZ;
    edgeArc[3 * e + 2] = arc.radius;
    const isOuter =
      outer !== null && arc.centreR === 0 && arc.centreZ === outer.centreZ && arc.radius === outer.radius;
    if (isOuter) onOuter.push(e);
  }
  const height = (e: number): number => z[ends[2 * e]] + z[ends[2 * e + 1]];
  onOuter.sort((e, f) => height(e) - height(f));
  return {
    r,
    z,
    corners,
    patchEdges,
    edgeEnds: Int32Array.from(ends),
    edgeArc,
    region,
    outer,
    outerEdges: Int32Array.from(onOuter),
  };
}

/**
 * Patches between lines r_0 < r_1 < … and z_0 < z_1 < … (m), each with the region `regionAt` names for its middle.
 * Boundaries are natural except the axis; for strips cut from infinite rods and plates.
 */
export function tensorPatches(
  rLines: readonly number[],
  zLines: readonly number[],
  regionAt: (r: number, z: number) => number,
): PatchMesh {
  const nr = rLines.length;
  const nz = zLines.length;
  const r = new Float64Array(nr * nz);
  const z = new Float64Array(nr * nz);
  for (let j = 0; j < nz; j++) {
    for (let i = 0; i < nr; i++) {
      r[j * nr + i] = rLines[i];
      z[j * nr + i] = zLines[j];
    }
  }
  const corners: number[] = [];
  const region: number[] = [];
  for (let j = 0; j + 1 < nz; j++) {
    for (let i = 0; i + 1 < nr; i++) {
      const k = j * nr + i;
      corners.push(k, k + 1, k + nr + 1, k + nr);
      region.push(regionAt((rLines[i] + rLines[i + 1]) / 2, (zLines[j] + zLines[j + 1]) / 2));
    }
  }
  return makePatchMesh(r, z, Int32Array.from(corners), Int32Array.from(region), [], null);
}
