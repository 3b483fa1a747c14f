/**
 * Solved fields on a logically rectangular grid, as plain shapes: what downloads and pictures of the field need. The solver's own grid
 * is made of curved patches; these are resampled from it (resample.ts). Arrays are row-major in the order of their shape.
 */

/** Nodes (i, k), i along r, k along z, at place i·nz + k; here r depends on i alone and z on k alone. */
export interface FieldGrid {
  readonly nr: number;
  readonly nz: number;
  /** [nr, nz], m. */
  readonly r: Float64Array;
  /** [nr, nz], m. */
  readonly z: Float64Array;
}

/** A complex array: rms phasors, time factor exp(+jωt), the coil's current real. */
export interface ComplexField {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** One solved state. Nodes on the surface of a body or turn carry the value just inside it. */
export interface StateFields {
  /** A_φ, [nr, nz], Wb/m; 0 on the axis. */
  readonly vectorPotential: ComplexField;
  /** B_r, then B_z, [2, nr, nz], T. */
  readonly fluxDensity: ComplexField;
  /** Mean over the cell's volume, [nr−1, nz−1], W/m³; times the volumes it adds up to the power before leads. */
  readonly powerDensity: Float64Array;
  /** Root of the mean of |J|² over the cell's volume, rms magnitude, [nr−1, nz−1], A/m². */
  readonly currentDensity: Float64Array;
}

/** Both states at the drive's working current. */
export interface Fields {
  readonly grid: FieldGrid;
  /** null when there is no part. */
  readonly loaded: StateFields | null;
  /** All parts taken out, the coil's current the same. */
  readonly empty: StateFields;
}
