/**
 * Heat density inside cells, from the solution's own shape functions:
 *
 *   p = ω²σ |ψ − u|²/s + (ω Im ν/μ0) [4|ψ_s|² + |ψ_z|²/s]   (W/m³, rms amplitudes; the second term is the lag of a magnetic material)
 *
 * at the middles of m × m equal pieces of a cell's (ξ, η) square, each with its volume π ds dz.
 */
import { MU0 } from "../constants.ts";
import { type CellTables, innerTables } from "./axis.ts";
import { gather } from "./cellforms.ts";
import type { Solution } from "./prepare.ts";
import { NODES, type ShapeTable } from "./shape.ts";
import { reluctivityOf } from "./system.ts";

/** Pieces of one cell, row by row (ξ fastest). Buffers are reused: valid until the next cell is asked for. */
export interface CellSamples {
  /** Middles: m, m³, W/m³; length m². */
  readonly r: Float64Array;
  readonly z: Float64Array;
  readonly volume: Float64Array;
  readonly density: Float64Array;
  /** Corners of the pieces, m; length (m + 1)². */
  readonly cornerR: Float64Array;
  readonly cornerZ: Float64Array;
}

/** Reads m × m pieces of a cell inside the outer circle. */
export function heatSampler(solution: Solution, m: number): (cell: number) => CellSamples {
  const { grid, system } = solution.prepared;
  const middles = innerTables(grid, ...lattice(m, m, 1 / m - 1));
  const corners = innerTables(grid, ...lattice(m, m + 1, -1));
  const out = emptySamples(m);
  const s = new Float64Array(NODES);
  const z = new Float64Array(NODES);
  const re = new Float64Array(NODES);
  const im = new Float64Array(NODES);
  const nu = new Float64Array(2);
  return (cell) => {
    for (let i = 0; i < NODES; i++) {
      const node = grid.cellNodes[cell * NODES + i];
      s[i] = grid.r[node] * grid.r[node];
      z[i] = grid.z[node];
    }
    const region = grid.cellRegion[cell];
    const turn = system.turnOfCell[cell];
    const [uRe, uIm] = turn < 0 ? [0, 0] : [solution.u.re[turn], solution.u.im[turn]];
    gather(solution.psi, grid.cellNodes, cell * NODES, uRe, uIm, re, im);
    reluctivityOf(solution, region, cell, nu);
    const joule = solution.omega ** 2 * solution.materials[region].conductivity;
    const lag = (solution.omega * nu[1]) / MU0;
    readMiddles(middles(cell), s, z, re, im, joule, lag, 4 / (m * m), out);
    readCorners(corners(cell).geometry, s, z, out);
    return out;
  };
}

/** ξ and η of count × count points, steps 2/m from `first`. */
function lattice(m: number, count: number, first: number): [number[], number[]] {
  const xi: number[] = [];
  const eta: number[] = [];
  for (let j = 0; j < count; j++) {
    for (let i = 0; i < count; i++) {
      xi.push(first + (2 * i) / m);
      eta.push(first + (2 * j) / m);
    }
  }
  return [xi, eta];
}

function emptySamples(m: number): CellSamples {
  const piece = (): Float64Array => new Float64Array(m * m);
  const corner = (): Float64Array => new Float64Array((m + 1) * (m + 1));
  return {
    r: piece(),
    z: piece(),
    volume: piece(),
    density: piece(),
    cornerR: corner(),
    cornerZ: corner(),
  };
}

/** Flat arguments and one loop: runs for every sample of a part. */
function readMiddles(
  tables: CellTables,
  s: Float64Array,
  z: Float64Array,
  re: Float64Array,
  im: Float64Array,
  joule: number,
  lag: number,
  weight: number,
  out: CellSamples,
): void {
  const { n, dXi, dEta } = tables.geometry;
  const { field } = tables;
  for (let p = 0; p < out.r.length; p++) {
    let [sp, zp, sXi, sEta, zXi, zEta] = [0, 0, 0, 0, 0, 0];
    let [x, y, xXi, xEta, yXi, yEta] = [0, 0, 0, 0, 0, 0];
    for (let i = 0; i < NODES; i++) {
      const N = n[p * NODES + i];
      const a = dXi[p * NODES + i];
      const b = dEta[p * NODES + i];
      sp += N * s[i];
      zp += N * z[i];
      sXi += a * s[i];
      sEta += b * s[i];
      zXi += a * z[i];
      zEta += b * z[i];
      const F = field.n[p * NODES + i];
      const fXi = field.dXi[p * NODES + i];
      const fEta = field.dEta[p * NODES + i];
      x += F * re[i];
      y += F * im[i];
      xXi += fXi * re[i];
      xEta += fEta * re[i];
      yXi += fXi * im[i];
      yEta += fEta * im[i];
    }
    const det = sXi * zEta - sEta * zXi;
    out.r[p] = Math.sqrt(sp);
    out.z[p] = zp;
    out.volume[p] = Math.PI * det * weight;
    out.density[p] = (joule * (x * x + y * y)) / sp;
    if (lag === 0) continue;
    const bySquares = (xXi * zEta - xEta * zXi) ** 2 + (yXi * zEta - yEta * zXi) ** 2;
    const byHeights = (xEta * sXi - xXi * sEta) ** 2 + (yEta * sXi - yXi * sEta) ** 2;
    out.density[p] += (lag * (4 * bySquares + byHeights / sp)) / (det * det);
  }
}

function readCorners(table: ShapeTable, s: Float64Array, z: Float64Array, out: CellSamples): void {
  for (let p = 0; p < out.cornerR.length; p++) {
    let sp = 0;
    let zp = 0;
    for (let i = 0; i < NODES; i++) {
      sp += table.n[p * NODES + i] * s[i];
      zp += table.n[p * NODES + i] * z[i];
    }
    out.cornerR[p] = Math.sqrt(Math.max(0, sp));
    out.cornerZ[p] = zp;
  }
}
