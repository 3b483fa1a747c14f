/**
 * Functions for ψ in cells that touch the axis. There ψ = s f with f smooth, so every function must fall with s: the biquadratic ones fall with r
 * on an edge that leaves the axis at a slant, and B_z = 2ψ_s would be infinite. With x = −1 on the axis, m(y) the place of the middle nodes,
 * S = Σ N_i s_i the cell's own s, N̂_1 = (1−x)/(1−m), N̂_2 = (x−m)/(1−m):
 *
 *   a side on the axis:     F_ij = S(x,y)/S(x_i,y) · N̂_i(x) · L_j(y),   i = 1, 2, x_1 = m, x_2 = 1
 *   a corner on the axis:   F_i0 = N_i0 + [s_0(x)/s_i0 · N̂_i(x) − L_i(x)] (1−y)/2, likewise on the other edge; F = N else.
 *
 * ψ = s is exact in both (ΣN̂ = 1), an edge's trace depends on its own nodes alone, and edges off the axis keep their quadratics: neighbours fit.
 * Functions of nodes on the axis, where ψ = 0, are left 0. Our own construction.
 */
import type { Exterior, Grid } from "../types.ts";
import {
  edgeKind,
  emptyTable,
  kindOfCell,
  middleOf,
  NODES,
  quadratics,
  type ShapeTable,
  shapeAt,
} from "./shape.ts";

/** How a cell meets the axis: 0 not; 1 … 4 with its side a = 0, a = 2, b = 0, b = 2; 5 … 8 with its corner (0,0), (2,0), (0,2), (2,2). */
export function touchOfCell(r: Float64Array, nodes: Int32Array, first: number): number {
  const on = (i: number): boolean => r[nodes[first + i]] === 0;
  if (on(0) && on(3) && on(6)) return 1;
  if (on(2) && on(5) && on(8)) return 2;
  if (on(0) && on(1) && on(2)) return 3;
  if (on(6) && on(7) && on(8)) return 4;
  if (on(0)) return 5;
  if (on(2)) return 6;
  if (on(6)) return 7;
  return on(8) ? 8 : 0;
}

/** True where a whole side lies on the axis. */
export function sideOnAxis(touch: number): boolean {
  return touch >= 1 && touch <= 4;
}

/** Shape functions of one cell at fixed points: the map's, and those ψ is made of (the same table off the axis). */
export interface CellTables {
  readonly geometry: ShapeTable;
  readonly field: ShapeTable;
}

/** Tables of cells inside the outer circle at points (ξ_i, η_i); valid until the next cell that touches the axis is asked for. */
export function innerTables(
  grid: Grid,
  xi: readonly number[],
  eta: readonly number[],
): (cell: number) => CellTables {
  const read = tableReader(xi, eta);
  const s = new Float64Array(NODES);
  return (cell) => {
    const first = cell * NODES;
    const touch = touchOfCell(grid.r, grid.cellNodes, first);
    if (touch === 0) return read(0, 0, s);
    for (let i = 0; i < NODES; i++) s[i] = grid.r[grid.cellNodes[first + i]] ** 2;
    return read(kindOfCell(grid.r, grid.z, grid.cellNodes, first), touch, s);
  };
}

/**
 * The same of exterior cells. Only s/s_i enters, so 1 − c² stands for s; the edges that leave the axis are those of the
 * circle, so that both sides fit.
 */
export function exteriorTables(
  grid: Grid,
  exterior: Exterior,
  xi: readonly number[],
  eta: readonly number[],
): (cell: number) => CellTables {
  const read = tableReader(xi, eta);
  const s = new Float64Array(NODES);
  return (cell) => {
    const first = cell * NODES;
    const pole = [0, 2].findIndex((a) => Math.abs(exterior.c[first + a]) === 1);
    if (pole < 0) return read(0, 0, s);
    for (let i = 0; i < NODES; i++) s[i] = (1 - exterior.c[first + i]) * (1 + exterior.c[first + i]);
    const nodes = exterior.cellNodes;
    const along = edgeKind(grid.r, grid.z, nodes[first], nodes[first + 1], nodes[first + 2]);
    return read(along + 3 * along, 1 + pole, s);
  };
}

function tableReader(
  xi: readonly number[],
  eta: readonly number[],
): (kind: number, touch: number, s: Float64Array) => CellTables {
  const ordinary = emptyTable(xi.length);
  for (let p = 0; p < xi.length; p++) shapeAt(0, xi[p], eta[p], ordinary, p);
  const plain = { geometry: ordinary, field: ordinary };
  const special = { geometry: emptyTable(xi.length), field: emptyTable(xi.length) };
  return (kind, touch, s) => {
    if (touch === 0) return plain;
    for (let p = 0; p < xi.length; p++) {
      shapeAt(kind, xi[p], eta[p], special.geometry, p);
      fieldAt(kind, touch, s, xi[p], eta[p], special.field, p);
    }
    return special;
  };
}

/** ψ's functions at (ξ, η) of a cell of this kind and touch with the nodes' s. */
export function fieldAt(
  kind: number,
  touch: number,
  s: Float64Array,
  xi: number,
  eta: number,
  out: ShapeTable,
  at = 0,
): void {
  if (touch === 0) shapeAt(kind, xi, eta, out, at);
  else if (sideOnAxis(touch)) sideFunctions(kind, touch, s, xi, eta, out, at);
  else cornerFunctions(kind, touch, s, xi, eta, out, at);
}

const HERE = emptyTable(1);
const THERE = emptyTable(1);
const L = new Float64Array(9);

/** S, ∂S/∂ξ, ∂S/∂η. */
function squareRadius(
  kind: number,
  s: Float64Array,
  xi: number,
  eta: number,
  table: ShapeTable,
): [number, number, number] {
  shapeAt(kind, xi, eta, table);
  let [v, a, b] = [0, 0, 0];
  for (let i = 0; i < NODES; i++) {
    v += table.n[i] * s[i];
    a += table.dXi[i] * s[i];
    b += table.dEta[i] * s[i];
  }
  return [v, a, b];
}

/** Digit (edge kind) of edge e = 0 … 3 of a cell's kind. */
function digit(kind: number, e: number): number {
  return Math.floor(kind / 3 ** e) % 3;
}

/** x = sign·(ξ or η) leads away from the axis, y = the other coordinate as it is. */
function sideFunctions(
  kind: number,
  touch: number,
  s: Float64Array,
  xi: number,
  eta: number,
  out: ShapeTable,
  at: number,
): void {
  const alongXi = touch <= 2;
  const sign = touch % 2 === 1 ? 1 : -1;
  const x = sign * (alongXi ? xi : eta);
  const y = alongXi ? eta : xi;
  const first = alongXi ? 0 : 2;
  const m0 = -Math.abs(middleOf(digit(kind, first)));
  const m1 = -Math.abs(middleOf(digit(kind, first + 1)));
  const m = (m0 * (1 - y) + m1 * (1 + y)) / 2;
  const dm = (m1 - m0) / 2;
  const [S, sA, sB] = squareRadius(kind, s, xi, eta, HERE);
  const sx = sign * (alongXi ? sA : sB);
  const sy = alongXi ? sB : sA;
  quadratics(y, 0, L);
  const from = at * NODES;
  out.n.fill(0, from, from + NODES);
  out.dXi.fill(0, from, from + NODES);
  out.dEta.fill(0, from, from + NODES);
  for (let i = 1; i <= 2; i++) {
    const xi1 = i === 1 ? m : 1;
    const [Si, a, b] = squareRadius(kind, s, alongXi ? sign * xi1 : y, alongXi ? y : sign * xi1, THERE);
    const dSi = (alongXi ? b : a) + (i === 1 ? sign * dm * (alongXi ? a : b) : 0);
    const h = i === 1 ? (1 - x) / (1 - m) : (x - m) / (1 - m);
    const hx = (i === 1 ? -1 : 1) / (1 - m);
    const hm = (i === 1 ? 1 - x : x - 1) / ((1 - m) * (1 - m));
    for (let j = 0; j < 3; j++) {
      const p = (h * L[j]) / Si;
      const px = (hx * L[j]) / Si;
      const py = (hm * dm * L[j] + h * L[3 + j]) / Si - (p * dSi) / Si;
      const away = sign === 1 ? i : 2 - i;
      const k = from + (alongXi ? away + 3 * j : j + 3 * away);
      const dx = sign * (sx * p + S * px);
      const dy = sy * p + S * py;
      out.n[k] = S * p;
      out.dXi[k] = alongXi ? dx : dy;
      out.dEta[k] = alongXi ? dy : dx;
    }
  }
}

/** Corrects the two edges that leave the corner. */
function cornerFunctions(
  kind: number,
  touch: number,
  s: Float64Array,
  xi: number,
  eta: number,
  out: ShapeTable,
  at: number,
): void {
  const a0 = touch === 6 || touch === 8 ? 2 : 0;
  const b0 = touch === 7 || touch === 8 ? 2 : 0;
  shapeAt(kind, xi, eta, out, at);
  const from = at * NODES;
  const edge = new Float64Array(6);
  const fadeXi = 1 - Math.abs(a0 - 1 - xi) / 2;
  const fadeEta = 1 - Math.abs(b0 - 1 - eta) / 2;
  const row = 3 * b0;
  axisEdge(s[row], s[row + 1], s[row + 2], digit(kind, b0 / 2), xi, edge);
  for (let a = 0; a < 3; a++) {
    const k = from + row + a;
    out.n[k] += (edge[a] - L[a]) * fadeEta;
    out.dXi[k] += (edge[3 + a] - L[3 + a]) * fadeEta;
    out.dEta[k] += ((edge[a] - L[a]) * (b0 - 1)) / 2;
  }
  axisEdge(s[a0], s[a0 + 3], s[a0 + 6], digit(kind, 2 + a0 / 2), eta, edge);
  for (let b = 0; b < 3; b++) {
    const k = from + a0 + 3 * b;
    out.n[k] += (edge[b] - L[b]) * fadeXi;
    out.dEta[k] += (edge[3 + b] - L[3 + b]) * fadeXi;
    out.dXi[k] += ((edge[b] - L[b]) * (a0 - 1)) / 2;
  }
  const corner = from + a0 + 3 * b0;
  out.n[corner] = 0;
  out.dXi[corner] = 0;
  out.dEta[corner] = 0;
}

/**
 * Traces of ψ's three functions on an edge of a kind whose nodes have these s, then their derivatives, at x; into out (6 numbers). Edges off
 * the axis keep their quadratics. The plain quadratics are left in L.
 */
export function axisEdge(
  s0: number,
  s1: number,
  s2: number,
  kind: number,
  x: number,
  out: Float64Array,
): void {
  const m = middleOf(kind);
  quadratics(x, m, L);
  if ((s0 === 0) === (s2 === 0)) {
    for (let i = 0; i < 6; i++) out[i] = L[i];
    return;
  }
  const end = s0 === 0 ? 2 : 0;
  const far = end - 1;
  const s = L[0] * s0 + L[1] * s1 + L[2] * s2;
  const ds = L[3] * s0 + L[4] * s1 + L[5] * s2;
  const sEnd = s0 === 0 ? s2 : s0;
  const h = (x - m) / (far - m);
  const dh = 1 / (far - m);
  out.fill(0, 0, 6);
  out[end] = (s / sEnd) * h;
  out[3 + end] = (ds * h + s * dh) / sEnd;
  out[1] = (s / s1) * (1 - h);
  out[4] = (ds * (1 - h) - s * dh) / s1;
}
