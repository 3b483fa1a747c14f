/**
 * How the error of each number of a scene falls from grid to grid: the slow part's order p and its share φ (solver/refine.ts).
 *
 * The orders are theory's. At an edge of interior angle π/2 of a highly permeable body the field goes as distance^(λ−1), λ = π/(2π − π/2) = 2/3
 * (J. D. Jackson, Classical Electrodynamics, 2.11, from memory; lower permeabilities are milder), so energies and powers keep an error n^−2λ = n^(−4/3)
 * and ∮H² over the surface one of n^−(2λ−1) = n^(−1/3). At edges of good conductors the field is finite within a skin depth, which the grid resolves:
 * n⁻² in powers, n⁻¹ in ∮H².
 * The shares, and the order of the peak, are our own figures: no less than what the battery (validation/battery/) and 270 random scenes
 * (meshes/fixtures.ts) showed between levels 1 and 2, against truths two levels beyond.
 */
import type { Fall } from "../solver/index.ts";
import { skinDepth } from "./build.ts";
import type { Body } from "./scene.ts";
import { meanThickness } from "./surfaces.ts";

export type { Fall };

/** Falls of the figures of a whole scene. */
export interface Falls {
  /** R and the coil's power. */
  readonly resistance: Fall;
  /** Power of parts. */
  readonly power: Fall;
  /** X, and guides' losses. */
  readonly energy: Fall;
  /** Stray field by a sum over all sources. */
  readonly field: Fall;
}

const CONDUCTORS = 2;
const MAGNETIC = 4 / 3;

/** No magnetic body with edges. In 99 of 100 the error of level 2 was below 0.14 of the movement in R, 0.09 in powers, 0.18 in X; these allow 0.17, 0.17, 0.23. */
const SMOOTH: Falls = {
  resistance: { order: CONDUCTORS, share: 0.4 },
  power: { order: CONDUCTORS, share: 0.4 },
  energy: { order: CONDUCTORS, share: 0.6 },
  field: { order: CONDUCTORS, share: 1 },
};

/** With one: below 0.31 in R, 0.37 in powers (their kin counted), 0.61 in X; these allow 0.33, 0.46, 0.66. */
const EDGED: Falls = {
  resistance: { order: MAGNETIC, share: 0.45 },
  power: { order: MAGNETIC, share: 2 / 3 },
  energy: { order: MAGNETIC, share: 1 },
  field: { order: MAGNETIC, share: 1 },
};

/**
 * Power and magnetic energy of a body both go as its field squared. Where magnetic edges are, the fast part of a power's error may hide the slow
 * one by cancelling it in every slice alike; the energy's movement shows it. This much of it (relative) is at least what the power moved: our
 * own figure, from the battery (a core of wide skin erred by 0.6 of it).
 */
const KINSHIP = 2 / 3;

/** Weight of a body's energy as kin of its power; 0 where no magnetic body has edges. */
export const kinship = (bodies: readonly Body[]): number => (bodies.some(hasEdges) ? KINSHIP : 0);

/**
 * Where little skin effect is, R is nearly that of direct current and hardly moves, by chance less than it errs; the field that crowds the
 * current errs as X does. This much of X's movement (relative) is R's at least: our own figure, from 207 random scenes that no other of these
 * figures was taken from.
 */
export const CROWDING = 1 / 5;

/** Falls of the figures of a coil with these bodies present (none: of a pair of leads, or a coil by itself). */
export const fallsOf = (bodies: readonly Body[]): Falls => (bodies.some(hasEdges) ? EDGED : SMOOTH);

const hasEdges = ({ material, pieces }: Body): boolean =>
  material.relativePermeability > 1 && pieces.some((p) => p.kind === "polygon");

/** Peak density: a quantile, read in cells that the field's growth towards an edge crosses. */
export const PEAK: Fall = { order: 2 / 3, share: 1 };
/** Field at a point within or near copper, from the one cell that holds it. */
export const NEAR: Fall = { order: 1 / 2, share: 1 };

const SURFACE = { conductor: 1, magnetic: 1 / 3 };
/** Skin depths below this share of a magnetic body's thickness confine the growth towards its edges to a small part of its surface … */
const THIN = 1 / 4;
/** … so that no more of the movement of ∮H² than this is owed to it. */
const CONFINED = 1 / 4;

/** Fall of the surface field of a body that touches the others given. */
export function surfaceFall(body: Body, touching: readonly Body[], frequency: number): Fall {
  const edged = [body, ...touching].filter(hasEdges);
  if (edged.length === 0) return { order: SURFACE.conductor, share: 1 };
  const thin = (b: Body): boolean => skinDepth(b.material, frequency) < THIN * meanThickness(b);
  const confined = touching.every((b) => !hasEdges(b)) && edged.every(thin);
  return { order: SURFACE.magnetic, share: confined ? CONFINED : 1 };
}
