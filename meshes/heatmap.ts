/**
 * Where the heat sits, as plain shapes in the half-section: what a picture needs, whatever grid it came from.
 */

/** The edge of a body in the half-section. */
export interface Outline {
  readonly role: "copper" | "part" | "guide";
  /** The body's name; for copper "turn 0", "turn 1", … as documents count them. */
  readonly name: string;
  /** Closed curve as [r, z] corners, m, without repeating the first; curved edges as many short ones. A bore is an outline of its own. */
  readonly points: readonly (readonly [number, number])[];
}

/** Power density in the heated copper and parts of one state. */
export interface HeatMap {
  /** Eight numbers a cell: r0, z0, … r3, z3 of its corners in counter-clockwise order, m, r ≥ 0. */
  readonly corners: Float64Array;
  /** One number a cell, its power density, W/m³ (rms drive); 0 where no heat arises. */
  readonly density: Float64Array;
  /** One number a cell: the index in `outlines` of (one of) its body's outlines. */
  readonly outline: Int32Array;
  readonly outlines: readonly Outline[];
}
