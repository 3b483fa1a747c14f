/** Whether patches stay sound however finely they are cut: no corner turned over or flat. */
import { cutGrid, type Grid, type PatchMesh } from "../../solver/index.ts";

/** Least sine of a corner's angle for it to count as sound: well below the sharpest wedge and corner a design may have. */
const LEAST_SINE = 1e-3;

export interface BadCell {
  readonly r: number;
  readonly z: number;
  readonly size: number;
  readonly region: number;
}

/** Every patch with a flat or turned corner, however finely cut: by its edges' tangents, and by its cells at the first levels. */
export function badPatches(mesh: PatchMesh): BadCell[] {
  // The half mesh of a mirrored scene has no complete outer circle yet.
  const inside = { ...mesh, outer: null, outerEdges: new Int32Array(0) };
  return [...badCorners(mesh), ...[1, 2].flatMap((level) => badCells(cutGrid(inside, level)))];
}

/** True when the corner between two sides, the second counter-clockwise of the first, is neither turned over nor flat. */
function isSound(ur: number, uz: number, vr: number, vz: number): boolean {
  return ur * vz - uz * vr > LEAST_SINE * Math.sqrt((ur * ur + uz * uz) * (vr * vr + vz * vz));
}

/** Patches whose edges leave a corner in one line or turned over: what cells at the corner tend to. */
function badCorners(mesh: PatchMesh): BadCell[] {
  const bad: BadCell[] = [];
  for (let p = 0; p < mesh.region.length; p++) {
    for (let k = 0; k < 4; k++) {
      const corner = mesh.corners[4 * p + k];
      const u = edgeTangent(mesh, mesh.patchEdges[4 * p + k], corner);
      const v = edgeTangent(mesh, mesh.patchEdges[4 * p + ((k + 3) % 4)], corner);
      if (isSound(...u, ...v)) continue;
      bad.push({
        r: mesh.r[corner],
        z: mesh.z[corner],
        size: Math.max(Math.hypot(...u), Math.hypot(...v)),
        region: mesh.region[p],
      });
    }
  }
  return bad;
}

/** Direction in which an edge leaves one of its ends, as long as its chord. */
function edgeTangent(mesh: PatchMesh, e: number, from: number): [number, number] {
  const a = mesh.edgeEnds[2 * e];
  const to = a === from ? mesh.edgeEnds[2 * e + 1] : a;
  const chord: [number, number] = [mesh.r[to] - mesh.r[from], mesh.z[to] - mesh.z[from]];
  if (mesh.edgeArc[3 * e + 2] === 0) return chord;
  const across = [mesh.edgeArc[3 * e + 1] - mesh.z[from], mesh.r[from] - mesh.edgeArc[3 * e]];
  const scale = Math.hypot(...chord) / Math.hypot(...across);
  const ahead = across[0] * chord[0] + across[1] * chord[1] < 0 ? -scale : scale;
  return [ahead * across[0], ahead * across[1]];
}

function badCells(grid: Grid): BadCell[] {
  const bad: BadCell[] = [];
  const quad = new Int32Array(4);
  for (let c = 0; c < grid.cellRegion.length; c++) {
    let sound = true;
    for (let k = 0; k < 4 && sound; k++) {
      const at = c * 9 + (k % 2) + 3 * (k >> 1);
      quad[0] = grid.cellNodes[at];
      quad[1] = grid.cellNodes[at + 1];
      quad[2] = grid.cellNodes[at + 4];
      quad[3] = grid.cellNodes[at + 3];
      for (let i = 0; i < 4; i++) {
        const p = quad[i];
        const q = quad[(i + 1) % 4];
        const o = quad[(i + 3) % 4];
        const ur = grid.r[q] - grid.r[p];
        const uz = grid.z[q] - grid.z[p];
        const vr = grid.r[o] - grid.r[p];
        const vz = grid.z[o] - grid.z[p];
        if (!isSound(ur, uz, vr, vz)) sound = false;
      }
    }
    if (!sound) {
      const a = grid.cellNodes[c * 9];
      const b = grid.cellNodes[c * 9 + 8];
      const middle = grid.cellNodes[c * 9 + 4];
      bad.push({
        r: grid.r[middle],
        z: grid.z[middle],
        size: Math.hypot(grid.r[a] - grid.r[b], grid.z[a] - grid.z[b]),
        region: grid.cellRegion[c],
      });
    }
  }
  return bad;
}
