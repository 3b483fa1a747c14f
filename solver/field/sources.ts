/**
 * Fields that no coil of the document drives, for checks against closed forms.
 *
 * Applied axial field B: ψ = ψ0 + φ, ψ0 = B s/2, A φ = −(A − A_air) ψ0 with ν = 1, σ = 0 in A_air; the boundary acts on φ alone,
 * so that a natural outer boundary keeps H = B/μ0 there and an exterior lets φ fall to 0 at infinity. Turns carry no net current.
 *
 * Prescribed current density J along φ: ∫ over r dr dφ dz of J · (v/r) is, without 2π, b_i = μ0 ∫ J N_i dr dz = μ0 ∫ J N_i ds dz/(2√s).
 */
import { MU0 } from "../constants.ts";
import { solveRefined } from "../linear/direct.ts";
import type { Complex, ComplexVector } from "../types.ts";
import { innerTables } from "./axis.ts";
import { gather, multiply } from "./cellforms.ts";
import type { Prepared, Solution, Tick } from "./prepare.ts";
import { GAUSS16, NODES } from "./shape.ts";
import { factoriseState, fieldOf } from "./solve.ts";
import { checkState, type FieldState, reluctivityOf, rowSums } from "./system.ts";

/** The field under a uniform axial field of `tesla` (rms) far away. */
export function solveApplied(prepared: Prepared, state: FieldState, tesla: number, tick?: Tick): Solution {
  checkState(prepared.system, prepared.grid, state);
  const rhs = appliedLoad(prepared, state, tesla);
  const { values, factor } = factoriseState(prepared, state, tick);
  const { x, residual } = solveRefined(factor, values, rhs);
  const field = fieldOf(prepared, state, x);
  const inside = new Uint8Array(field.psi.re.length);
  for (const node of prepared.grid.cellNodes) inside[node] = 1;
  for (let i = 0; i < inside.length; i++)
    if (inside[i] === 1) field.psi.re[i] += (tesla * prepared.grid.r[i] ** 2) / 2;
  return { ...field, applied: tesla, residual };
}

/** −(A − A_air) [ψ0; 0], cell by cell. */
function appliedLoad(prepared: Prepared, state: FieldState, tesla: number): ComplexVector {
  const { grid, integrals, system } = prepared;
  const n = system.structure.unknowns;
  const rhs = { re: new Float64Array(n), im: new Float64Array(n) };
  const psi0 = new Float64Array(NODES);
  const y = new Float64Array(NODES);
  const nu = new Float64Array(2);
  for (let c = 0; c < grid.cellRegion.length; c++) {
    const region = grid.cellRegion[c];
    const m = state.omega * MU0 * state.materials[region].conductivity;
    reluctivityOf(state, region, c, nu);
    for (let i = 0; i < NODES; i++) psi0[i] = (tesla * grid.r[grid.cellNodes[c * NODES + i]] ** 2) / 2;
    multiply(integrals.stiffness, c, psi0, y);
    addLoad(prepared, c, y, 1 - nu[0], -nu[1], rhs);
    if (m === 0) continue;
    multiply(integrals.mass, c, psi0, y);
    addLoad(prepared, c, y, 0, -m, rhs);
    const turn = system.turnOfCell[c];
    if (turn < 0) continue;
    const sums = rowSums(integrals.mass, c);
    for (let i = 0; i < NODES; i++) rhs.im[system.nodal + turn] += m * sums[i] * psi0[i];
  }
  return rhs;
}

/** rhs += (re + j im) y at the free nodes of cell c. */
function addLoad(
  prepared: Prepared,
  c: number,
  y: Float64Array,
  re: number,
  im: number,
  rhs: ComplexVector,
): void {
  const { grid, system } = prepared;
  for (let i = 0; i < NODES; i++) {
    const unknown = system.unknownOfNode[grid.cellNodes[c * NODES + i]];
    if (unknown < 0) continue;
    rhs.re[unknown] += re * y[i];
    rhs.im[unknown] += im * y[i];
  }
}

/** A region that carries, or only watches, a uniform current density. */
export interface Winding {
  readonly region: number;
  /** A/m² rms along +φ; 0 for a region that only watches. */
  readonly density: Complex;
}

/** What a winding of a prescribed solution measures. */
export interface Linkage {
  /** Area of its section, m². */
  readonly area: number;
  /** Its whole current, A rms. */
  readonly current: Complex;
  /** Flux linkage of one turn spread evenly over the section: the section's mean of 2πψ, Wb rms. V = jω linkage. */
  readonly linkage: Complex;
}

/** The field of uniform current densities, and the flux each winding links. Windings' regions should not conduct. */
export function solvePrescribed(
  prepared: Prepared,
  state: FieldState,
  windings: readonly Winding[],
  tick?: Tick,
): Solution & { readonly linkages: readonly Linkage[] } {
  const n = prepared.system.structure.unknowns;
  const rhs = { re: new Float64Array(n), im: new Float64Array(n) };
  const loads = sectionIntegrals(prepared);
  const regions = prepared.grid.cellRegion;
  for (let c = 0; c < regions.length; c++) {
    const y = loads.subarray(c * NODES, (c + 1) * NODES);
    for (const { region, density } of windings)
      if (region === regions[c]) addLoad(prepared, c, y, MU0 * density.re, MU0 * density.im, rhs);
  }
  const { values, factor } = factoriseState(prepared, state, tick);
  const { x, residual } = solveRefined(factor, values, rhs);
  const solution = { ...fieldOf(prepared, state, x), applied: 0, residual };
  return { ...solution, linkages: windings.map((w) => linkageOf(solution, loads, w)) };
}

/** ∫ N_i dr dz, nine numbers a cell. */
function sectionIntegrals(prepared: Prepared): Float64Array {
  const { grid } = prepared;
  const out = new Float64Array(grid.cellNodes.length);
  const tables = innerTables(grid, GAUSS16.xi, GAUSS16.eta);
  for (let c = 0; c < grid.cellRegion.length; c++) {
    const { geometry, field } = tables(c);
    const { n, dXi, dEta } = geometry;
    for (let p = 0; p < GAUSS16.w.length; p++) {
      let [s, sXi, sEta, zXi, zEta] = [0, 0, 0, 0, 0];
      for (let i = 0; i < NODES; i++) {
        const node = grid.cellNodes[c * NODES + i];
        const k = p * NODES + i;
        const si = grid.r[node] ** 2;
        s += n[k] * si;
        sXi += dXi[k] * si;
        sEta += dEta[k] * si;
        zXi += dXi[k] * grid.z[node];
        zEta += dEta[k] * grid.z[node];
      }
      const w = (GAUSS16.w[p] * (sXi * zEta - sEta * zXi)) / (2 * Math.sqrt(s));
      for (let i = 0; i < NODES; i++) out[c * NODES + i] += w * field.n[p * NODES + i];
    }
  }
  return out;
}

function linkageOf(solution: Solution, loads: Float64Array, winding: Winding): Linkage {
  const { grid } = solution.prepared;
  const re = new Float64Array(NODES);
  const im = new Float64Array(NODES);
  let [area, x, y] = [0, 0, 0];
  for (let c = 0; c < grid.cellRegion.length; c++) {
    if (grid.cellRegion[c] !== winding.region) continue;
    gather(solution.psi, grid.cellNodes, c * NODES, 0, 0, re, im);
    for (let i = 0; i < NODES; i++) {
      const w = loads[c * NODES + i];
      area += w;
      x += w * re[i];
      y += w * im[i];
    }
  }
  const { density } = winding;
  return {
    area,
    current: { re: density.re * area, im: density.im * area },
    linkage: { re: (2 * Math.PI * x) / area, im: (2 * Math.PI * y) / area },
  };
}
