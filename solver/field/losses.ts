/**
 * Where the power goes. With the matrices the field was solved with,
 *
 *   P_cell = 2πω²σ dᵀM d̄ + (2πω/μ0) Im ν ψᵀK ψ̄,   d = ψ − u        (W: Joule heat, and the lag of a magnetic material)
 *   W_cell = (π/μ0) Re ν ψᵀK ψ̄                                       (J: mean magnetic energy)
 *
 * Multiplying A [ψ; u] = [0; μ0 I] by its conjugate gives Σ V_k I_k* = Σ P + 2jω Σ W term by term, so the balance
 * holds to rounding on any grid (it tests the solution, not the accuracy).
 */
import { MU0 } from "../constants.ts";
import { gather, quadraticForm } from "./cellforms.ts";
import type { CoilSolution, Solution } from "./prepare.ts";
import { NODES } from "./shape.ts";
import { reluctivityOf } from "./system.ts";

/** Powers (W) and mean magnetic energies (J) of a solution, at its own current or field. */
export interface Losses {
  /** Power of every cell inside the outer circle. */
  readonly cellPower: Float64Array;
  readonly cellEnergy: Float64Array;
  /** By region id. */
  readonly regionPower: Float64Array;
  readonly regionEnergy: Float64Array;
  readonly turnPower: Float64Array;
  readonly totalPower: number;
  /** With the exterior. */
  readonly totalEnergy: number;
  readonly exteriorEnergy: number;
}

/** Powers and energies of a solution. */
export function lossesOf(solution: Solution): Losses {
  const { prepared, psi, u, omega, materials } = solution;
  const { grid, integrals, system } = prepared;
  const cells = grid.cellRegion.length;
  const cellPower = new Float64Array(cells);
  const cellEnergy = new Float64Array(cells);
  const regionPower = new Float64Array(materials.length);
  const regionEnergy = new Float64Array(materials.length);
  const turnPower = new Float64Array(system.turns);
  const re = new Float64Array(NODES);
  const im = new Float64Array(NODES);
  const nu = new Float64Array(2);
  for (let c = 0; c < cells; c++) {
    const region = grid.cellRegion[c];
    const sigma = materials[region].conductivity;
    const turn = system.turnOfCell[c];
    reluctivityOf(solution, region, c, nu);
    gather(psi, grid.cellNodes, c * NODES, 0, 0, re, im);
    const q = quadraticForm(integrals.stiffness, c, re, im);
    cellEnergy[c] = (Math.PI / MU0) * nu[0] * q;
    cellPower[c] = ((2 * Math.PI * omega) / MU0) * nu[1] * q;
    if (sigma > 0) {
      if (turn >= 0) gather(psi, grid.cellNodes, c * NODES, u.re[turn], u.im[turn], re, im);
      cellPower[c] += 2 * Math.PI * omega * omega * sigma * quadraticForm(integrals.mass, c, re, im);
    }
    regionPower[region] += cellPower[c];
    regionEnergy[region] += cellEnergy[c];
    if (turn >= 0) turnPower[turn] += cellPower[c];
  }
  const exteriorEnergy = energyOutside(solution);
  return {
    cellPower,
    cellEnergy,
    regionPower,
    regionEnergy,
    turnPower,
    totalPower: sum(regionPower),
    totalEnergy: sum(regionEnergy) + exteriorEnergy,
    exteriorEnergy,
  };
}

/** Energy beyond the outer circle (of the reaction alone under an applied field). */
function energyOutside(solution: Solution): number {
  const { grid, integrals } = solution.prepared;
  const nodes = grid.exterior?.cellNodes ?? new Int32Array(0);
  const re = new Float64Array(NODES);
  const im = new Float64Array(NODES);
  let energy = 0;
  for (let c = 0; c * NODES < nodes.length; c++) {
    gather(solution.psi, nodes, c * NODES, 0, 0, re, im);
    energy += (Math.PI / MU0) * quadraticForm(integrals.exteriorStiffness, c, re, im);
  }
  return energy;
}

/** |Re(V I*) − Σ P| / Re(V I*) and the same of the reactive power, |Im(V I*) − 2ωΣW| / |V I*|, at I = 1 A. */
export function powerBalance(solution: CoilSolution, losses: Losses): { active: number; reactive: number } {
  const { re, im } = solution.impedance;
  return {
    active: Math.abs(re - losses.totalPower) / re,
    reactive: Math.abs(im - 2 * solution.omega * losses.totalEnergy) / Math.hypot(re, im),
  };
}

function sum(x: Float64Array): number {
  let total = 0;
  for (let i = 0; i < x.length; i++) total += x[i];
  return total;
}
