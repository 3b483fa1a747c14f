/** What all states and frequencies on one grid have in common: the cells' integrals, the unknowns, their elimination order. */
import { SolverError } from "../errors.ts";
import { type Analysis, analyse } from "../linear/direct.ts";
import type { Complex, ComplexVector, Grid } from "../types.ts";
import { type CellIntegrals, integrateCells } from "./integrals.ts";
import { type CellTurns, type FieldState, numberUnknowns, type System } from "./system.ts";

/** What the reading of a solution needs of its grid. */
export interface Laid {
  readonly grid: Grid;
  readonly integrals: CellIntegrals;
  readonly system: CellTurns;
}

/** A grid made ready; reused for both states and every frequency. */
export interface Prepared extends Laid {
  readonly system: System;
  readonly analysis: Analysis;
}

/** A mirror-symmetric grid made ready by half; see fold.ts. */
export interface Folded extends Laid {
  readonly half: Prepared;
  /** Node of the half for every node, turn of the half for every turn. */
  readonly nodeOf: Int32Array;
  readonly turnOf: Int32Array;
  /** Per turn of the half: 1 where it stands for a pair, ½ where half of it is there. */
  readonly share: Float64Array;
}

/** Hears the done fraction 0…1 of a long step; may throw, which ends the step. */
export type Tick = (fraction: number) => void;

/** A solved field. */
export interface Solution extends FieldState {
  readonly prepared: Laid;
  /** ψ at every node of the grid, Wb/rad rms; 0 on fixed nodes. With an applied field: the whole field inside the outer circle, the reaction alone beyond. */
  readonly psi: ComplexVector;
  /** u_k of every turn, Wb/rad. */
  readonly u: ComplexVector;
  /** Uniform axial field far away, T rms; 0 when coils or prescribed currents drive. */
  readonly applied: number;
  /** Componentwise backward error of the linear solution, worst right-hand side. */
  readonly residual: number;
}

/** A field driven through the coil's terminals by 1 A rms in all. */
export interface CoilSolution extends Solution {
  /** V/I at the terminals, Ω. */
  readonly impedance: Complex;
  /** Current of each parallel path, A; they add up to 1. */
  readonly pathCurrents: ComplexVector;
  /** Current of each turn along +φ, A: its path's, with the turn's sense. */
  readonly turnCurrents: ComplexVector;
  /** Z_pq = V_p/I_q of the paths alone, row by row, Ω; one number for a series coil. */
  readonly pathImpedances: ComplexVector;
}

/**
 * Integrals, numbering and elimination order of a grid. `turnOfRegion`: turn whose copper each region is, or −1.
 * Throws SolverError `turned` when a cell is turned over, `materials` when a region is missing.
 */
export function prepare(grid: Grid, turnOfRegion: ArrayLike<number>, tick?: Tick): Prepared {
  const integrals = integrateCells(grid, tick === undefined ? undefined : (f) => tick(f / 2));
  const turned = integrals.leastJacobian.findIndex((j) => !(j > 0));
  if (turned >= 0)
    throw new SolverError("turned", `cell ${turned} of region ${grid.cellRegion[turned]} is turned over`);
  const system = numberUnknowns(grid, turnOfRegion);
  tick?.(0.5);
  const analysis = analyse(system.structure);
  tick?.(1);
  return { grid, integrals, system, analysis };
}
