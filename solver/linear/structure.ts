/** A = Σ_e P_eᵀ A_e P_e: the pattern and the values of a complex symmetric matrix given by its elements, never assembled. */

/** Which unknowns each element couples, and where it lies. */
export interface ElementStructure {
  /** Number of unknowns; every unknown belongs to at least one element. */
  readonly unknowns: number;
  /** Length elements + 1: element e owns ids[start[e]] … ids[start[e+1] − 1]. */
  readonly start: Int32Array;
  /** Unknown ids, each in 0 … unknowns − 1, none twice inside one element. */
  readonly ids: Int32Array;
  /** A representative point per element, any unit: a hint for the ordering, without influence on the solution. */
  readonly x: Float64Array;
  readonly y: Float64Array;
}

/** Packed lower triangles by rows (a00, a10, a11, a20, …), m(m+1)/2 numbers for an element of m unknowns, element after element. */
export interface ElementValues {
  readonly re: Float64Array;
  readonly im: Float64Array;
}
