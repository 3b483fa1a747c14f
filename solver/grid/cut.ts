/**
 * Cuts every patch of a mesh into n × n nine-node cells.
 *
 * Nodes on a patch follow the bilinearly blended (Coons) map of its four edges, each straight or an arc, at equal parameter
 * steps 1/(2n); the same edges cut by any n carry the same curve, so grids of different n are one family and their
 * results extrapolate. Gordon & Hall, Int. J. Numer. Meth. Engng 7 (1973) 461 (from memory).
 */
import type { Exterior, Grid, PatchMesh } from "../types.ts";

/** Radial intervals of the exterior at level 1: dipole and quadrupole are exact in one, higher poles want a second. */
const EXTERIOR_RINGS = 2;

/** Number of the nodes `cutGrid(mesh, n)` will make, without making them. */
export function countNodes(mesh: PatchMesh, n: number): number {
  const m = 2 * n - 1;
  const outer = mesh.outerEdges.length;
  const rings = outer === 0 ? 0 : EXTERIOR_RINGS * 2 * n * (outer * 2 * n + 1);
  return mesh.r.length + (mesh.edgeEnds.length / 2) * m + mesh.region.length * m * m + rings;
}

/** The grid of level n ≥ 1. */
export function cutGrid(mesh: PatchMesh, n: number): Grid {
  const patches = mesh.region.length;
  const edges = mesh.edgeEnds.length / 2;
  const corners = mesh.r.length;
  const m = 2 * n - 1;
  const side = 2 * n + 1;
  const total = countNodes(mesh, n);
  const r = new Float64Array(total);
  const z = new Float64Array(total);
  r.set(mesh.r);
  z.set(mesh.z);
  const point = new Float64Array(2);
  for (let e = 0; e < edges; e++) {
    for (let i = 0; i < m; i++) {
      edgePoint(mesh, e, (i + 1) / (2 * n), point);
      r[corners + e * m + i] = point[0];
      z[corners + e * m + i] = point[1];
    }
  }
  const cellNodes = new Int32Array(patches * n * n * 9);
  const cellRegion = new Int32Array(patches * n * n);
  const cellPatch = new Int32Array(patches * n * n);
  const lattice = new Int32Array(side * side);
  const firstInner = corners + edges * m;
  for (let p = 0; p < patches; p++) {
    fillLattice(mesh, p, n, corners, firstInner + p * m * m, lattice);
    blendInterior(lattice, side, r, z);
    for (let j = 0; j < n; j++) {
      for (let i = 0; i < n; i++) {
        const cell = (p * n + j) * n + i;
        for (let b = 0; b < 3; b++) {
          for (let a = 0; a < 3; a++) {
            cellNodes[cell * 9 + a + 3 * b] = lattice[(2 * j + b) * side + 2 * i + a];
          }
        }
        cellRegion[cell] = mesh.region[p];
        cellPatch[cell] = p;
      }
    }
  }
  const fixed = new Uint8Array(total);
  for (let i = 0; i < total; i++) if (r[i] === 0) fixed[i] = 1;
  const exterior = cutExterior(mesh, n, firstInner + patches * m * m, r, z, fixed);
  const mirrored = mesh.mirrored === true;
  return { r, z, fixed, cellNodes, cellRegion, cellPatch, level: n, exterior, mirrored };
}

/** Point at parameter t of edge e (from its first end), into out. */
function edgePoint(mesh: PatchMesh, e: number, t: number, out: Float64Array): void {
  const a = mesh.edgeEnds[2 * e];
  const b = mesh.edgeEnds[2 * e + 1];
  const radius = mesh.edgeArc[3 * e + 2];
  if (radius === 0) {
    out[0] = mesh.r[a] + t * (mesh.r[b] - mesh.r[a]);
    out[1] = mesh.z[a] + t * (mesh.z[b] - mesh.z[a]);
    return;
  }
  const cr = mesh.edgeArc[3 * e];
  const cz = mesh.edgeArc[3 * e + 1];
  const from = Math.atan2(mesh.z[a] - cz, mesh.r[a] - cr);
  let sweep = Math.atan2(mesh.z[b] - cz, mesh.r[b] - cr) - from;
  if (sweep > Math.PI) sweep -= 2 * Math.PI;
  if (sweep < -Math.PI) sweep += 2 * Math.PI;
  const angle = from + t * sweep;
  out[0] = cr + radius * Math.cos(angle);
  out[1] = cz + radius * Math.sin(angle);
}

/** Node ids of the (2n+1)² lattice of patch p: first row along edge 0, last column along edge 1. */
function fillLattice(
  mesh: PatchMesh,
  p: number,
  n: number,
  corners: number,
  inner: number,
  lattice: Int32Array,
): void {
  const side = 2 * n + 1;
  const m = 2 * n - 1;
  const last = side - 1;
  const start = [0, last, last * side + last, last * side];
  const step = [1, side, -1, -side];
  for (let k = 0; k < 4; k++) {
    const corner = mesh.corners[4 * p + k];
    lattice[start[k]] = corner;
    const e = mesh.patchEdges[4 * p + k];
    const forward = mesh.edgeEnds[2 * e] === corner;
    for (let i = 0; i < m; i++) {
      lattice[start[k] + step[k] * (i + 1)] = corners + e * m + (forward ? i : m - 1 - i);
    }
  }
  for (let j = 1; j < last; j++) {
    for (let i = 1; i < last; i++) lattice[j * side + i] = inner + (j - 1) * m + (i - 1);
  }
}

/** Coons map of the boundary nodes onto the inner nodes of one lattice. */
function blendInterior(lattice: Int32Array, side: number, r: Float64Array, z: Float64Array): void {
  const last = side - 1;
  for (let j = 1; j < last; j++) {
    for (let i = 1; i < last; i++) {
      const node = lattice[j * side + i];
      r[node] = blend(lattice, side, r, i, j);
      z[node] = blend(lattice, side, z, i, j);
    }
  }
}

/** One coordinate of the node (i, j). */
function blend(lattice: Int32Array, side: number, x: Float64Array, i: number, j: number): number {
  const last = side - 1;
  const top = last * side;
  const u = i / last;
  const v = j / last;
  const edges =
    (1 - v) * x[lattice[i]] +
    v * x[lattice[top + i]] +
    (1 - u) * x[lattice[j * side]] +
    u * x[lattice[j * side + last]];
  const corners =
    (1 - u) * (1 - v) * x[lattice[0]] +
    u * (1 - v) * x[lattice[last]] +
    u * v * x[lattice[top + last]] +
    (1 - u) * v * x[lattice[top]];
  return edges - corners;
}

/** Rings of exterior cells from the outer circle (t = 1) to infinity (t = 0). */
function cutExterior(
  mesh: PatchMesh,
  n: number,
  first: number,
  r: Float64Array,
  z: Float64Array,
  fixed: Uint8Array,
): Exterior | null {
  const outer = mesh.outer;
  if (outer === null) return null;
  const m = 2 * n - 1;
  const corners = mesh.r.length;
  const around = mesh.outerEdges.length;
  const columns = around * 2 * n + 1;
  const circle = new Int32Array(columns);
  const cosine = new Float64Array(columns);
  let corner = mesh.edgeEnds[2 * mesh.outerEdges[0]];
  if (mesh.r[corner] !== 0) corner = mesh.edgeEnds[2 * mesh.outerEdges[0] + 1];
  for (let q = 0; q < around; q++) {
    const e = mesh.outerEdges[q];
    const forward = mesh.edgeEnds[2 * e] === corner;
    circle[q * 2 * n] = corner;
    for (let i = 0; i < m; i++) circle[q * 2 * n + 1 + i] = corners + e * m + (forward ? i : m - 1 - i);
    corner = mesh.edgeEnds[2 * e + (forward ? 1 : 0)];
  }
  circle[columns - 1] = corner;
  for (let i = 0; i < columns; i++) {
    const node = circle[i];
    cosine[i] = r[node] === 0 ? Math.sign(z[node] - outer.centreZ) : (z[node] - outer.centreZ) / outer.radius;
  }
  const rows = EXTERIOR_RINGS * 2 * n;
  const nodeAt = (i: number, j: number): number => (j === 0 ? circle[i] : first + (j - 1) * columns + i);
  for (let j = 1; j <= rows; j++) {
    const t = 1 - j / rows;
    for (let i = 0; i < columns; i++) {
      const node = nodeAt(i, j);
      r[node] = fixed[circle[i]] === 1 ? 0 : t * r[circle[i]];
      z[node] = outer.centreZ + t * (z[circle[i]] - outer.centreZ);
      fixed[node] = j === rows || fixed[circle[i]] === 1 ? 1 : 0;
    }
  }
  const rings = EXTERIOR_RINGS * n;
  const cells = rings * around * n;
  const cellNodes = new Int32Array(cells * 9);
  const t = new Float64Array(cells * 9);
  const c = new Float64Array(cells * 9);
  for (let j = 0; j < rings; j++) {
    for (let i = 0; i < around * n; i++) {
      const cell = j * around * n + i;
      for (let b = 0; b < 3; b++) {
        for (let a = 0; a < 3; a++) {
          const k = cell * 9 + a + 3 * b;
          cellNodes[k] = nodeAt(2 * i + a, 2 * j + b);
          t[k] = 1 - (2 * j + b) / rows;
          c[k] = cosine[2 * i + a];
        }
      }
    }
  }
  return { radius: outer.radius, centreZ: outer.centreZ, cellNodes, t, c };
}
