/**
 * The second-order scheme: four bilinear cells in place of every nine-node cell, on the same lattice of nodes, so that inner nodes
 * have nine-point stars. A_φ at the nodes, u_k = V_k/(2πjω) a turn:
 *
 *   [ νK + jωμ0σM   −jωμ0σc_k ] [A]   [  0   ]
 *   [ −jωμ0σc_kᵀ    jωμ0σd_k  ] [u] = [ μ0 I ]     I = 1 A in every turn, in series.
 *
 * The turns are eliminated last by their Schur complement. Under an applied field A0 = B r/2 the right-hand side is −(A − A_air) A0.
 */
import { Matrix, solve as solveDense } from "ml-matrix";
import { type Circuit, type ComplexVector, type Grid, MU0, type RegionMaterial } from "../../solver/index.ts";
import { type CellMatrices, emptyCell, fillCell } from "./cells.ts";
import { Envelope } from "./envelope.ts";

/** What drives: a uniform field (T rms) or 1 A rms through the circuit's turns in series. */
export type Drive = { readonly applied: number } | { readonly circuit: Circuit };

export interface CoarseFigures {
  /** Ω and H; NaN under an applied field. */
  readonly resistance: number;
  readonly inductance: number;
  /** W by region id, at 1 A or at the applied field. */
  readonly regionPower: Float64Array;
  readonly unknowns: number;
}

/** The four cells a nine-node cell is cut into, by local node, counter-clockwise. */
const QUARTERS = [
  [0, 1, 4, 3],
  [1, 2, 5, 4],
  [3, 4, 7, 6],
  [4, 5, 8, 7],
] as const;

interface Cell {
  readonly nodes: readonly number[];
  /** −1 outside the outer circle. */
  readonly region: number;
}

/** Terminal values and losses of a grid (ν real). */
export function coarseFigures(
  grid: Grid,
  materials: readonly RegionMaterial[],
  omega: number,
  drive: Drive,
): CoarseFigures {
  const cells = cellsOf(grid);
  const unknown = new Int32Array(grid.fixed.length).fill(-1);
  let count = 0;
  for (let i = 0; i < unknown.length; i++) if (grid.fixed[i] === 0) unknown[i] = count++;
  const matrix = new Envelope(graphOf(cells, unknown, count));
  const turns = Math.max(0, ...materials.map((m) => m.turn + 1));
  const tools = { grid, materials, omega, unknown, cell: emptyCell() };
  const columns = Array.from({ length: turns }, () => new Float64Array(count));
  const diagonal = new Float64Array(turns);
  const applied = "applied" in drive ? drive.applied : 0;
  const load = { re: new Float64Array(count), im: new Float64Array(count) };
  for (const c of cells) assembleCell(tools, c, matrix, columns, diagonal, applied, load);
  matrix.factorise();
  const { a, u } =
    "circuit" in drive ? driven(matrix, columns, diagonal, drive.circuit) : still(matrix, load);
  const regionPower = powers(tools, cells, a, u, applied);
  if (!("circuit" in drive))
    return { resistance: Number.NaN, inductance: Number.NaN, regionPower, unknowns: count };
  let [x, y] = [0, 0];
  for (let k = 0; k < turns; k++) {
    x += (drive.circuit.sense[k] ?? 0) * u.re[k]!;
    y += (drive.circuit.sense[k] ?? 0) * u.im[k]!;
  }
  return {
    resistance: -2 * Math.PI * omega * y,
    inductance: 2 * Math.PI * x,
    regionPower,
    unknowns: count + turns,
  };
}

function cellsOf(grid: Grid): Cell[] {
  const cells: Cell[] = [];
  const push = (nodes: Int32Array, count: number, regionOf: (c: number) => number): void => {
    for (let c = 0; c < count; c++) {
      for (const quarter of QUARTERS) {
        cells.push({ nodes: quarter.map((k) => nodes[9 * c + k]!), region: regionOf(c) });
      }
    }
  };
  push(grid.cellNodes, grid.cellRegion.length, (c) => grid.cellRegion[c]!);
  if (grid.exterior !== null) push(grid.exterior.cellNodes, grid.exterior.cellNodes.length / 9, () => -1);
  return cells;
}

function graphOf(cells: readonly Cell[], unknown: Int32Array, count: number): number[][] {
  const sets = Array.from({ length: count }, () => new Set<number>());
  for (const { nodes } of cells) {
    for (const i of nodes) {
      for (const j of nodes) {
        const [p, q] = [unknown[i]!, unknown[j]!];
        if (p >= 0 && q >= 0 && p !== q) sets[p]!.add(q);
      }
    }
  }
  return sets.map((s) => [...s]);
}

interface Tools {
  readonly grid: Grid;
  readonly materials: readonly RegionMaterial[];
  readonly omega: number;
  readonly unknown: Int32Array;
  readonly cell: CellMatrices;
}

/** Integrals of a cell into `tools.cell`; its ν and ωμ0σ. */
function readCell(tools: Tools, { nodes, region }: Cell): { nu: number; sigma: number; turn: number } {
  const { grid, materials, omega, cell } = tools;
  fillCell(
    nodes.map((i) => grid.r[i]!),
    nodes.map((i) => grid.z[i]!),
    region < 0,
    cell,
  );
  const material = materials[region];
  if (material === undefined) return { nu: 1, sigma: 0, turn: -1 };
  return { nu: material.reluctivity.re, sigma: omega * MU0 * material.conductivity, turn: material.turn };
}

function assembleCell(
  tools: Tools,
  c: Cell,
  matrix: Envelope,
  columns: readonly Float64Array[],
  diagonal: Float64Array,
  applied: number,
  load: { readonly re: Float64Array; readonly im: Float64Array },
): void {
  const { nu, sigma, turn } = readCell(tools, c);
  const { k, m, c: area, d } = tools.cell;
  for (let i = 0; i < 4; i++) {
    const p = tools.unknown[c.nodes[i]!]!;
    if (p < 0) continue;
    if (turn >= 0) columns[turn]![p]! += sigma * area[i]!;
    for (let j = 0; j < 4; j++) {
      const q = tools.unknown[c.nodes[j]!]!;
      const far = (applied * tools.grid.r[c.nodes[j]!]!) / 2;
      if (c.region >= 0) load.re[p]! -= (nu - 1) * k[4 * i + j]! * far;
      load.im[p]! -= sigma * m[4 * i + j]! * far;
      if (q >= 0) matrix.add(p, q, nu * k[4 * i + j]!, sigma * m[4 * i + j]!);
    }
  }
  if (turn >= 0) diagonal[turn]! += sigma * d;
}

interface Field {
  readonly a: ComplexVector;
  readonly u: ComplexVector;
}

function still(matrix: Envelope, load: ComplexVector): Field {
  return { a: matrix.solve(load), u: { re: new Float64Array(0), im: new Float64Array(0) } };
}

/** (j diag d − Cᵀ A⁻¹ C (−j)²) u = μ0 I by one solution a turn; then A = j A⁻¹ C u. */
function driven(
  matrix: Envelope,
  columns: readonly Float64Array[],
  diagonal: Float64Array,
  circuit: Circuit,
): Field {
  const n = columns.length;
  const zero = new Float64Array(columns[0]?.length ?? 0);
  // w_k = A⁻¹ (j c_k): the field of u_k = 1.
  const fields = columns.map((c) => matrix.solve({ re: zero, im: c }));
  const system = Matrix.zeros(2 * n, 2 * n);
  const rhs = Matrix.zeros(2 * n, 1);
  for (let k = 0; k < n; k++) {
    rhs.set(k, 0, MU0 * (circuit.sense[k] ?? 0));
    for (let l = 0; l < n; l++) {
      // −j c_kᵀ w_l, and j d_k on the diagonal.
      const re = dot(columns[k]!, fields[l]!.im);
      const im = -dot(columns[k]!, fields[l]!.re) + (k === l ? diagonal[k]! : 0);
      system.set(k, l, re);
      system.set(k, n + l, -im);
      system.set(n + k, l, im);
      system.set(n + k, n + l, re);
    }
  }
  const solved = solveDense(system, rhs).to1DArray();
  const u = { re: Float64Array.from(solved.slice(0, n)), im: Float64Array.from(solved.slice(n)) };
  const a = { re: new Float64Array(zero.length), im: new Float64Array(zero.length) };
  fields.forEach((w, k) => {
    for (let i = 0; i < zero.length; i++) {
      a.re[i]! += w.re[i]! * u.re[k]! - w.im[i]! * u.im[k]!;
      a.im[i]! += w.re[i]! * u.im[k]! + w.im[i]! * u.re[k]!;
    }
  });
  return { a, u };
}

function dot(x: Float64Array, y: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < x.length; i++) sum += x[i]! * y[i]!;
  return sum;
}

/** 2πω²σ ∫ |A − u/r|² r dr dz by region. */
function powers(
  tools: Tools,
  cells: readonly Cell[],
  a: ComplexVector,
  u: ComplexVector,
  applied: number,
): Float64Array {
  const out = new Float64Array(tools.materials.length);
  for (const c of cells) {
    const { sigma, turn } = readCell(tools, c);
    if (sigma === 0) continue;
    for (const [part, turns, far] of [
      [a.re, u.re, applied],
      [a.im, u.im, 0],
    ] as const) {
      const v = c.nodes.map((i) => {
        const p = tools.unknown[i]!;
        return (p < 0 ? 0 : part[p]!) + (far * tools.grid.r[i]!) / 2;
      });
      const volt = turn < 0 ? 0 : turns[turn]!;
      let sum = volt * volt * tools.cell.d;
      for (let i = 0; i < 4; i++) {
        sum -= 2 * volt * tools.cell.c[i]! * v[i]!;
        for (let j = 0; j < 4; j++) sum += tools.cell.m[4 * i + j]! * v[i]! * v[j]!;
      }
      out[c.region]! += ((2 * Math.PI * tools.omega * sigma) / MU0) * sum;
    }
  }
  return out;
}
