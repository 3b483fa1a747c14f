/**
 * The integrals of every cell that depend on its shape alone, over ds dz with s = r²:
 *
 *   K_ij = ∫ [2 ∂_sN_i ∂_sN_j + ∂_zN_i ∂_zN_j/(2s)],   M_ij = ∫ N_iN_j/(2s),   4 × 4 Gauss points a cell,
 *
 * and outside the outer circle K_ij = (1/R) ∫ [t² ∂_tN_i ∂_tN_j/(1−c²) + ∂_cN_i ∂_cN_j] dt dc, the same form after t = R/ρ, c = cos θ
 * (weak form: head of ../types.ts; the mapping of open space: Freeman & Lowther, IEEE Trans. Magn. 25 (1989) 2810, from memory).
 * Gauss points never lie on the axis, at c = ±1 or at t = 0. Cells that touch the axis: axis.ts.
 */
import type { Exterior, Grid } from "../types.ts";
import { type CellTables, exteriorTables, innerTables, touchOfCell } from "./axis.ts";
import { GAUSS16, kindOfCell, NODES } from "./shape.ts";

/** Numbers in a packed lower triangle of nine rows. */
export const PACKED = 45;
const POINTS = 16;
/** Cells between two calls of `tick`. */
const STRIDE = 1024;

/** Geometry-only integrals of a grid. */
export interface CellIntegrals {
  /** Kind (see shape.ts) of every cell inside the outer circle. */
  readonly kind: Uint8Array;
  /** How each of them meets the axis (see axis.ts); 0 nearly everywhere. */
  readonly touch: Uint8Array;
  /** K with ν = 1, packed lower by rows, 45 numbers a cell, 1/m. */
  readonly stiffness: Float64Array;
  /** M, packed likewise, m. */
  readonly mass: Float64Array;
  /** Least of the map's determinant over the Gauss points divided by its mean; > 0 in a valid cell, 1 in a rectangle off the axis at s ≈ const. */
  readonly leastJacobian: Float64Array;
  /** K of the exterior cells, 45 numbers a cell; empty without an exterior. */
  readonly exteriorStiffness: Float64Array;
}

/** All integrals of a grid. `tick` hears the done fraction now and then and may throw to abort. */
export function integrateCells(grid: Grid, tick?: (fraction: number) => void): CellIntegrals {
  const cells = grid.cellRegion.length;
  const kind = new Uint8Array(cells);
  const touch = new Uint8Array(cells);
  const stiffness = new Float64Array(cells * PACKED);
  const mass = new Float64Array(cells * PACKED);
  const leastJacobian = new Float64Array(cells);
  const tables = innerTables(grid, GAUSS16.xi, GAUSS16.eta);
  const s = new Float64Array(NODES);
  const z = new Float64Array(NODES);
  for (let c = 0; c < cells; c++) {
    if (c % STRIDE === 0) tick?.(c / cells);
    for (let i = 0; i < NODES; i++) {
      const node = grid.cellNodes[c * NODES + i];
      s[i] = grid.r[node] * grid.r[node];
      z[i] = grid.z[node];
    }
    kind[c] = kindOfCell(grid.r, grid.z, grid.cellNodes, c * NODES);
    touch[c] = touchOfCell(grid.r, grid.cellNodes, c * NODES);
    leastJacobian[c] = integrateCell(tables(c), s, z, stiffness, mass, c * PACKED);
  }
  const exteriorStiffness =
    grid.exterior === null ? new Float64Array(0) : integrateExterior(grid, grid.exterior);
  return { kind, touch, stiffness, mass, leastJacobian, exteriorStiffness };
}

const GS = new Float64Array(NODES * POINTS);
const GZ = new Float64Array(NODES * POINTS);
const NN = new Float64Array(NODES * POINTS);

/** K and M of one cell at `at`; returns least over mean determinant. Long because it is the hot loop of a grid. */
function integrateCell(
  tables: CellTables,
  s: Float64Array,
  z: Float64Array,
  stiffness: Float64Array,
  mass: Float64Array,
  at: number,
): number {
  const { n, dXi, dEta } = tables.geometry;
  const { field } = tables;
  let least = Infinity;
  let area = 0;
  for (let p = 0; p < POINTS; p++) {
    const q = p * NODES;
    let sp = 0;
    let sXi = 0;
    let sEta = 0;
    let zXi = 0;
    let zEta = 0;
    for (let i = 0; i < NODES; i++) {
      const si = s[i];
      const zi = z[i];
      sp += n[q + i] * si;
      sXi += dXi[q + i] * si;
      sEta += dEta[q + i] * si;
      zXi += dXi[q + i] * zi;
      zEta += dEta[q + i] * zi;
    }
    const det = sXi * zEta - sEta * zXi;
    if (det < least) least = det;
    const w = GAUSS16.w[p];
    area += w * det;
    const fs = Math.sqrt((2 * w) / Math.abs(det));
    const fz = Math.sqrt(w / (2 * sp * Math.abs(det)));
    const fn = Math.sqrt((w * Math.abs(det)) / (2 * sp));
    for (let i = 0; i < NODES; i++) {
      const a = field.dXi[q + i];
      const b = field.dEta[q + i];
      GS[i * POINTS + p] = fs * (a * zEta - b * zXi);
      GZ[i * POINTS + p] = fz * (b * sXi - a * sEta);
      NN[i * POINTS + p] = fn * field.n[q + i];
    }
  }
  addProducts(GS, stiffness, at);
  addProducts(GZ, stiffness, at);
  addProducts(NN, mass, at);
  return (4 * least) / Math.abs(area);
}

/** out_ij += Σ_p g_ip g_jp, packed lower. */
function addProducts(g: Float64Array, out: Float64Array, at: number): void {
  let k = at;
  for (let i = 0; i < NODES; i++) {
    const a = i * POINTS;
    for (let j = 0; j <= i; j++) {
      const b = j * POINTS;
      let even = 0;
      let odd = 0;
      for (let p = 0; p < POINTS; p += 2) {
        even += g[a + p] * g[b + p];
        odd += g[a + p + 1] * g[b + p + 1];
      }
      out[k++] += even + odd;
    }
  }
}

/** K of the exterior cells. */
function integrateExterior(grid: Grid, exterior: Exterior): Float64Array {
  const cells = exterior.cellNodes.length / NODES;
  const out = new Float64Array(cells * PACKED);
  const tables = exteriorTables(grid, exterior, GAUSS16.xi, GAUSS16.eta);
  for (let c = 0; c < cells; c++) integrateExteriorCell(tables(c), exterior, c, out);
  return out;
}

/** One exterior cell; the determinant's sign depends on which way the rings run and is of no matter. */
function integrateExteriorCell(
  tables: CellTables,
  exterior: Exterior,
  cell: number,
  out: Float64Array,
): void {
  const { n, dXi, dEta } = tables.geometry;
  const { field } = tables;
  const { t, c, radius } = exterior;
  const first = cell * NODES;
  for (let p = 0; p < POINTS; p++) {
    const q = p * NODES;
    let [tp, cp, tXi, tEta, cXi, cEta] = [0, 0, 0, 0, 0, 0];
    for (let i = 0; i < NODES; i++) {
      tp += n[q + i] * t[first + i];
      cp += n[q + i] * c[first + i];
      tXi += dXi[q + i] * t[first + i];
      tEta += dEta[q + i] * t[first + i];
      cXi += dXi[q + i] * c[first + i];
      cEta += dEta[q + i] * c[first + i];
    }
    const det = tXi * cEta - tEta * cXi;
    const scale = Math.sqrt(GAUSS16.w[p] / (radius * Math.abs(det)));
    const ft = (scale * tp) / Math.sqrt((1 - cp) * (1 + cp));
    for (let i = 0; i < NODES; i++) {
      GS[i * POINTS + p] = ft * (field.dXi[q + i] * cEta - field.dEta[q + i] * cXi);
      GZ[i * POINTS + p] = scale * (field.dEta[q + i] * tXi - field.dXi[q + i] * tEta);
    }
  }
  addProducts(GS, out, cell * PACKED);
  addProducts(GZ, out, cell * PACKED);
}
