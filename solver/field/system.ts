/**
 * The matrix of one state, cell by cell: with K, M of integrals.ts and M' = ωμ0σ M,
 *
 *   A_cell = [ νK + jM'    −jM'1 ]
 *            [ −j1ᵀM'     j1ᵀM'1 ]   (last row and column: u of the turn whose copper the cell is; only there),
 *
 * so that A [ψ; u] = [0; μ0 I]. Rows and columns of fixed nodes are left out (ψ = 0 there).
 */
import { MU0 } from "../constants.ts";
import { SolverError } from "../errors.ts";
import type { ElementStructure, ElementValues } from "../linear/structure.ts";
import type { ComplexVector, Grid, RegionMaterial } from "../types.ts";
import { type CellIntegrals, PACKED } from "./integrals.ts";
import { NODES } from "./shape.ts";

/** What the cells are made of, at which frequency. */
export interface FieldState {
  /** By region id. */
  readonly materials: readonly RegionMaterial[];
  /** rad/s, > 0. */
  readonly omega: number;
  /** ν cell by cell where it varies inside a region (saturating steel); overrides the regions'. Length: cells inside the outer circle. */
  readonly cellReluctivity?: ComplexVector;
}

/** Turns and cells of a grid. */
export interface CellTurns {
  readonly turns: number;
  /** Turn whose copper a cell inside the outer circle is, or −1. */
  readonly turnOfCell: Int32Array;
  /** Number of unknowns, ψ and u. */
  readonly unknowns: number;
}

/** Unknowns of a grid and which of them each cell couples. */
export interface System extends CellTurns {
  /** ψ unknowns first, then one u a turn. */
  readonly structure: ElementStructure;
  /** Unknown id of every node, −1 where ψ is fixed. */
  readonly unknownOfNode: Int32Array;
  /** Number of ψ unknowns: u of turn k is unknown nodal + k. */
  readonly nodal: number;
}

/** Numbers the unknowns. `turnOfRegion`: turn of each region id, or −1. */
export function numberUnknowns(grid: Grid, turnOfRegion: ArrayLike<number>): System {
  const unknownOfNode = new Int32Array(grid.fixed.length).fill(-1);
  let nodal = 0;
  for (let i = 0; i < unknownOfNode.length; i++) if (grid.fixed[i] === 0) unknownOfNode[i] = nodal++;
  const { turns, turnOfCell } = turnsOfCells(grid, turnOfRegion);
  const structure = structureOf(grid, unknownOfNode, turnOfCell, nodal, turns);
  return { structure, unknownOfNode, nodal, turns, turnOfCell, unknowns: nodal + turns };
}

/** Number of turns, and the turn of every cell. Throws SolverError `materials` when a region is missing. */
export function turnsOfCells(
  grid: Grid,
  turnOfRegion: ArrayLike<number>,
): Pick<CellTurns, "turns" | "turnOfCell"> {
  let turns = 0;
  for (let i = 0; i < turnOfRegion.length; i++) turns = Math.max(turns, turnOfRegion[i] + 1);
  const turnOfCell = new Int32Array(grid.cellRegion.length);
  for (let c = 0; c < turnOfCell.length; c++) {
    const region = grid.cellRegion[c];
    if (region >= turnOfRegion.length)
      throw new SolverError("materials", `region ${region} has no entry among ${turnOfRegion.length}`);
    turnOfCell[c] = turnOfRegion[region];
  }
  return { turns, turnOfCell };
}

function structureOf(
  grid: Grid,
  unknownOfNode: Int32Array,
  turnOfCell: Int32Array,
  nodal: number,
  turns: number,
): ElementStructure {
  const inner = turnOfCell.length;
  const outerNodes = grid.exterior?.cellNodes ?? new Int32Array(0);
  const cells = inner + outerNodes.length / NODES;
  const start = new Int32Array(cells + 1);
  const ids = new Int32Array(cells * (NODES + 1));
  const x = new Float64Array(cells);
  const y = new Float64Array(cells);
  let top = 0;
  for (let c = 0; c < cells; c++) {
    const nodes = c < inner ? grid.cellNodes : outerNodes;
    const first = (c < inner ? c : c - inner) * NODES;
    for (let i = 0; i < NODES; i++) {
      const unknown = unknownOfNode[nodes[first + i]];
      if (unknown >= 0) ids[top++] = unknown;
    }
    if (c < inner && turnOfCell[c] >= 0) ids[top++] = nodal + turnOfCell[c];
    start[c + 1] = top;
    placeCell(grid, nodes, first, c < inner ? -1 : c - inner, c, x, y);
  }
  return { unknowns: nodal + turns, start, ids: ids.slice(0, top), x, y };
}

/** Where cell c lies for the ordering: its mean point; an exterior cell lies outside the circle, at ρ = R(2 − t). */
function placeCell(
  grid: Grid,
  nodes: Int32Array,
  first: number,
  exteriorCell: number,
  c: number,
  x: Float64Array,
  y: Float64Array,
): void {
  const { exterior } = grid;
  if (exterior !== null && exteriorCell >= 0) {
    const middle = exteriorCell * NODES + 4;
    const cosine = exterior.c[middle];
    const rho = exterior.radius * (2 - exterior.t[middle]);
    x[c] = rho * Math.sqrt(Math.max(0, 1 - cosine * cosine));
    y[c] = exterior.centreZ + rho * cosine;
    return;
  }
  for (let i = 0; i < NODES; i++) {
    x[c] += grid.r[nodes[first + i]] / NODES;
    y[c] += grid.z[nodes[first + i]] / NODES;
  }
}

/** Throws SolverError `materials` unless the state describes every region of the system and every turn conducts. */
export function checkState(system: System, grid: Grid, state: FieldState): void {
  if (!(state.omega > 0 && state.omega < Infinity))
    throw new SolverError("materials", `omega must be > 0, got ${state.omega}`);
  const count = system.turnOfCell.length;
  const own = state.cellReluctivity;
  if (own !== undefined && (own.re.length !== count || own.im.length !== count))
    throw new SolverError("materials", `cellReluctivity needs ${count} numbers, got ${own.re.length}`);
  for (let c = 0; c < count; c++) {
    const region = grid.cellRegion[c];
    const material = state.materials[region];
    if (material === undefined) throw new SolverError("materials", `region ${region} has no material`);
    if (material.turn !== system.turnOfCell[c])
      throw new SolverError(
        "materials",
        `region ${region} is turn ${system.turnOfCell[c]} of the prepared grid`,
      );
    if (material.turn >= 0 && !(material.conductivity > 0))
      throw new SolverError("materials", `turn ${material.turn} does not conduct`);
  }
}

/** ν of cell c: re into out[0], im into out[1]. */
export function reluctivityOf(state: FieldState, region: number, c: number, out: Float64Array): void {
  const own = state.cellReluctivity;
  const nu = state.materials[region].reluctivity;
  out[0] = own === undefined ? nu.re : own.re[c];
  out[1] = own === undefined ? nu.im : own.im[c];
}

/** Packed element matrices of a state, in the order of the system's structure. */
export function elementValues(
  system: System,
  grid: Grid,
  integrals: CellIntegrals,
  state: FieldState,
): ElementValues {
  const { start } = system.structure;
  const cells = start.length - 1;
  let total = 0;
  for (let c = 0; c < cells; c++) {
    const n = start[c + 1] - start[c];
    total += (n * (n + 1)) / 2;
  }
  const values = { re: new Float64Array(total), im: new Float64Array(total) };
  const { stiffness, mass, exteriorStiffness } = integrals;
  const nu = new Float64Array(2);
  const inner = system.turnOfCell.length;
  let at = 0;
  for (let c = 0; c < inner; c++) {
    const region = grid.cellRegion[c];
    reluctivityOf(state, region, c, nu);
    const m = state.omega * MU0 * state.materials[region].conductivity;
    const from = c * NODES;
    at = addCell(grid.cellNodes, from, grid.fixed, stiffness, mass, c * PACKED, nu[0], nu[1], m, values, at);
    if (system.turnOfCell[c] >= 0) at = addTurnRow(grid, c, mass, m, values, at);
  }
  const outer = grid.exterior?.cellNodes ?? new Int32Array(0);
  for (let e = 0; e * NODES < outer.length; e++) {
    at = addCell(outer, e * NODES, grid.fixed, exteriorStiffness, null, e * PACKED, 1, 0, 0, values, at);
  }
  return values;
}

/** νK + j m M of one cell without its fixed rows; returns the next free place. Flat arguments because it runs once a cell. */
function addCell(
  nodes: Int32Array,
  first: number,
  fixed: Uint8Array,
  stiffness: Float64Array,
  mass: Float64Array | null,
  from: number,
  nuRe: number,
  nuIm: number,
  m: number,
  values: ElementValues,
  at: number,
): number {
  const { re, im } = values;
  let k = from;
  let out = at;
  for (let i = 0; i < NODES; i++) {
    if (fixed[nodes[first + i]] === 1) {
      k += i + 1;
      continue;
    }
    for (let j = 0; j <= i; j++, k++) {
      if (fixed[nodes[first + j]] === 1) continue;
      re[out] = nuRe * stiffness[k];
      im[out++] = nuIm * stiffness[k] + (mass === null ? 0 : m * mass[k]);
    }
  }
  return out;
}

/** The row of u: −j m M1, then j m 1ᵀM1. */
function addTurnRow(
  grid: Grid,
  c: number,
  mass: Float64Array,
  m: number,
  values: ElementValues,
  at: number,
): number {
  const sums = rowSums(mass, c);
  let out = at;
  let whole = 0;
  for (let i = 0; i < NODES; i++) {
    whole += sums[i];
    if (grid.fixed[grid.cellNodes[c * NODES + i]] === 0) values.im[out++] = -m * sums[i];
  }
  values.im[out++] = m * whole;
  return out;
}

const SUMS = new Float64Array(NODES);

/** M1 of cell c: nine numbers, valid until the next call. */
export function rowSums(mass: Float64Array, c: number): Float64Array {
  SUMS.fill(0);
  let k = c * PACKED;
  for (let i = 0; i < NODES; i++) {
    for (let j = 0; j < i; j++, k++) {
      SUMS[i] += mass[k];
      SUMS[j] += mass[k];
    }
    SUMS[i] += mass[k++];
  }
  return SUMS;
}
