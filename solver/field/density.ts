/**
 * Heat density inside cells, from the solution's own shape functions:
 *
 *   p = ω²σ |ψ − u|²/s + (ω Im ν/μ0) [4|ψ_s|² + |ψ_z|²/s]   (W/m³, rms amplitudes; the second term is the lag of a magnetic material)
 *
 * at the middles and the corners of m × m equal pieces of a cell's (ξ, η) square, each with its volume π ds dz. The density of the outermost
 * corners is read 10⁻⁴ of the cell inside its edges, off the axis, where the formula is 0/0.
 */
import { MU0 } from "../constants.ts";
import { type CellTables, innerTables } from "./axis.ts";
import { gather } from "./cellforms.ts";
import type { Solution } from "./prepare.ts";
import { NODES, type ShapeTable } from "./shape.ts";
import { reluctivityOf } from "./system.ts";

/** How far inside the cell's edges the outermost corners' density is read, in (ξ, η). */
const DRAWN_IN = 1e-4;

/** Pieces of one cell, row by row (ξ fastest). Buffers are reused: valid until the next cell is asked for. */
export interface CellSamples {
  /** Middles: m, m³, W/m³; length m². */
  readonly r: Float64Array;
  readonly z: Float64Array;
  readonly volume: Float64Array;
  readonly density: Float64Array;
  /** The part of the density that currents make, W/m³: |J|²/σ. */
  readonly joule: Float64Array;
  /** Corners of the pieces: m, W/m³; length (m + 1)². */
  readonly cornerR: Float64Array;
  readonly cornerZ: Float64Array;
  readonly cornerDensity: Float64Array;
}

/** Where densities are wanted; the others are not read, and their numbers mean nothing. */
export type Wanted = "middles" | "corners" | "both";

/** Reads m × m pieces of a cell inside the outer circle. Places and volumes are always there, `joule` with the middles' densities. */
export function heatSampler(
  solution: Solution,
  m: number,
  wanted: Wanted = "both",
): (cell: number) => CellSamples {
  const { grid, system } = solution.prepared;
  const middles = innerTables(grid, ...lattice(m, 1 - 1 / m));
  const corners = innerTables(grid, ...lattice(m + 1, 1));
  const drawnIn = innerTables(grid, ...lattice(m + 1, 1 - DRAWN_IN));
  const out = emptySamples(m);
  const cornerJoule = new Float64Array(out.cornerDensity.length);
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
    const uRe = turn < 0 ? 0 : solution.u.re[turn];
    const uIm = turn < 0 ? 0 : solution.u.im[turn];
    gather(solution.psi, grid.cellNodes, cell * NODES, uRe, uIm, re, im);
    reluctivityOf(solution, region, cell, nu);
    const joule = solution.omega ** 2 * solution.materials[region].conductivity;
    const lag = (solution.omega * nu[1]) / MU0;
    const heat = { s, z, re, im, joule, lag };
    const inside = middles(cell);
    readVolumes(inside.geometry, s, z, (4 * Math.PI) / (m * m), out);
    if (wanted !== "corners") readDensities(inside, heat, out.density, out.joule);
    if (wanted !== "middles") readDensities(drawnIn(cell), heat, out.cornerDensity, cornerJoule);
    readPlaces(corners(cell).geometry, s, z, out.cornerR, out.cornerZ);
    return out;
  };
}

/** ξ and η of count × count points evenly from −end to end. */
function lattice(count: number, end: number): [number[], number[]] {
  const xi: number[] = [];
  const eta: number[] = [];
  const at = (i: number): number => (count === 1 ? 0 : end * ((2 * i) / (count - 1) - 1));
  for (let j = 0; j < count; j++) {
    for (let i = 0; i < count; i++) {
      xi.push(at(i));
      eta.push(at(j));
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
    joule: piece(),
    cornerR: corner(),
    cornerZ: corner(),
    cornerDensity: corner(),
  };
}

/** A cell's nodal values, and the factors σω² and ω Im ν/μ0. */
interface CellHeat {
  readonly s: Float64Array;
  readonly z: Float64Array;
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly joule: number;
  readonly lag: number;
}

/** Places and volumes of the pieces; `whole` times the determinant is a piece's volume. */
function readVolumes(
  { n, dXi, dEta }: ShapeTable,
  s: Float64Array,
  z: Float64Array,
  whole: number,
  out: CellSamples,
): void {
  const { r: outR, z: outZ, volume } = out;
  for (let p = 0; p < outR.length; p++) {
    let sp = 0;
    let zp = 0;
    let sXi = 0;
    let sEta = 0;
    let zXi = 0;
    let zEta = 0;
    for (let i = 0; i < NODES; i++) {
      const k = p * NODES + i;
      sp += n[k] * s[i];
      zp += n[k] * z[i];
      sXi += dXi[k] * s[i];
      sEta += dEta[k] * s[i];
      zXi += dXi[k] * z[i];
      zEta += dEta[k] * z[i];
    }
    outR[p] = Math.sqrt(sp);
    outZ[p] = zp;
    volume[p] = whole * (sXi * zEta - sEta * zXi);
  }
}

/** What currents make, and what the lag adds, at the tables' points. */
function readDensities(tables: CellTables, heat: CellHeat, density: Float64Array, joule: Float64Array): void {
  const { n } = tables.geometry;
  const field = tables.field.n;
  const { s, re, im } = heat;
  for (let p = 0; p < density.length; p++) {
    let sp = 0;
    let x = 0;
    let y = 0;
    for (let i = 0; i < NODES; i++) {
      const k = p * NODES + i;
      sp += n[k] * s[i];
      x += field[k] * re[i];
      y += field[k] * im[i];
    }
    joule[p] = (heat.joule * (x * x + y * y)) / sp;
    density[p] = joule[p];
  }
  if (heat.lag !== 0) addLag(tables, heat, density);
}

/** The lag's part of the density. One long loop over all sums it takes. */
function addLag(tables: CellTables, heat: CellHeat, density: Float64Array): void {
  const { n, dXi, dEta } = tables.geometry;
  const { field } = tables;
  const { s, z, re, im, lag } = heat;
  for (let p = 0; p < density.length; p++) {
    let sp = 0;
    let sXi = 0;
    let sEta = 0;
    let zXi = 0;
    let zEta = 0;
    let xXi = 0;
    let xEta = 0;
    let yXi = 0;
    let yEta = 0;
    for (let i = 0; i < NODES; i++) {
      const k = p * NODES + i;
      sp += n[k] * s[i];
      sXi += dXi[k] * s[i];
      sEta += dEta[k] * s[i];
      zXi += dXi[k] * z[i];
      zEta += dEta[k] * z[i];
      xXi += field.dXi[k] * re[i];
      xEta += field.dEta[k] * re[i];
      yXi += field.dXi[k] * im[i];
      yEta += field.dEta[k] * im[i];
    }
    const det = sXi * zEta - sEta * zXi;
    const bySquares = (xXi * zEta - xEta * zXi) ** 2 + (yXi * zEta - yEta * zXi) ** 2;
    const byHeights = (xEta * sXi - xXi * sEta) ** 2 + (yEta * sXi - yXi * sEta) ** 2;
    density[p] += (lag * (4 * bySquares + byHeights / sp)) / (det * det);
  }
}

/** Places alone. */
function readPlaces(
  { n }: ShapeTable,
  s: Float64Array,
  z: Float64Array,
  outR: Float64Array,
  outZ: Float64Array,
): void {
  for (let p = 0; p < outR.length; p++) {
    let sp = 0;
    let zp = 0;
    for (let i = 0; i < NODES; i++) {
      sp += n[p * NODES + i] * s[i];
      zp += n[p * NODES + i] * z[i];
    }
    outR[p] = Math.sqrt(Math.max(0, sp));
    outZ[p] = zp;
  }
}
