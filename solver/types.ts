/**
 * The data the solver lives on, and every convention it follows.
 *
 * - SI units throughout; phasors are rms; time factor exp(+jωt).
 * - The unknown is ψ = r·A_φ (Wb/rad), a function of (s, z) with s = r². B_r = −(1/r) ∂ψ/∂z, B_z = 2 ∂ψ/∂s,
 *   so that a uniform axial field B is ψ = B s/2, held exactly by every grid.
 * - Turn k has the unknown u_k = V_k / (2πjω), V_k its voltage: E_φ = −jω (ψ − u_k)/r, J = σ E_φ.
 * - Weak form, without the 2π of the full turn, integrals over ds dz:
 *     ∫ ν [2 ψ_s v_s + ψ_z v_z/(2s)] + jωμ0 ∫ σ/(2s) (ψ − u_k)(v − w_k) = μ0 Σ I_k w_k,
 *   ν = 1/µ_r relative (complex where the material lags: Im ν ≥ 0), ψ = 0 on the axis and at infinity.
 * - Complex arrays are two Float64Arrays of equal length, `re` and `im`.
 * - A cell has nine nodes, local index a + 3b: a runs along ξ, b along η, both −1, 0, +1.
 */

/** A complex number. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

/** A complex vector: real and imaginary parts, equal lengths. */
export interface ComplexVector {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/**
 * The coarsest description of a grid: curved quadrilaterals that fit together edge to edge. Each is later cut
 * into n × n cells, so grids of every level are cut from one and the same set of patches.
 */
export interface PatchMesh {
  /** Corner positions, m; length = number of corners. r = 0 exactly on the axis. */
  readonly r: Float64Array;
  readonly z: Float64Array;
  /** Four corners a patch, counter-clockwise in the (r, z) plane with r to the right and z up. */
  readonly corners: Int32Array;
  /** Four edge ids a patch; edge i runs between corners i and i+1. */
  readonly patchEdges: Int32Array;
  /** Two corners an edge. */
  readonly edgeEnds: Int32Array;
  /** Three numbers an edge: centre r, centre z, radius (m) of the arc it lies on; radius 0 = straight. */
  readonly edgeArc: Float64Array;
  /** Region id a patch (an index into the materials of a state). */
  readonly region: Int32Array;
  /** The half circle that closes the mesh towards open space; null where the outer boundary is natural or fixed. */
  readonly outer: { readonly centreZ: number; readonly radius: number } | null;
  /** Edge ids on that half circle, from bottom to top of the angle: first at θ = π (below), last at θ = 0. Empty without `outer`. */
  readonly outerEdges: Int32Array;
  /** True: the second half of the patches are the mirror images of the first, in the same order, about the outer circle's middle. */
  readonly mirrored?: boolean;
}

/** A grid of nine-node cells, with its mapped exterior where space is open. */
export interface Grid {
  /** Node positions, m. Exterior nodes carry their Kelvin image (inside the outer circle's radius); see `exterior`. */
  readonly r: Float64Array;
  readonly z: Float64Array;
  /** 1 where ψ is fixed at 0: the axis, and infinity. */
  readonly fixed: Uint8Array;
  /** 9 node ids a cell. */
  readonly cellNodes: Int32Array;
  /** Region id a cell. */
  readonly cellRegion: Int32Array;
  /** Patch a cell was cut from. */
  readonly cellPatch: Int32Array;
  /** Cells along a patch's edge. */
  readonly level: number;
  readonly exterior: Exterior | null;
  /** As the patches'; see grid/halve.ts. */
  readonly mirrored?: boolean;
}

/**
 * The outside of the sphere of radius R about (0, centreZ), mapped by t = R/ρ, c = cos θ = (z − centreZ)/ρ onto
 * 0 ≤ t ≤ 1, −1 ≤ c ≤ 1. There the weak form is (1/R) ∫ [t² ψ_t v_t/(1−c²) + ψ_c v_c] dt dc, with no other approximation than
 * the cells themselves: a dipole is ψ ∝ t (1−c²), exactly held. (ν = 1, no currents.)
 */
export interface Exterior {
  readonly radius: number;
  readonly centreZ: number;
  /** 9 node ids an exterior cell; a runs along increasing θ, b along decreasing t. */
  readonly cellNodes: Int32Array;
  /** t and c of these nodes, 9 a cell (c is kept by cell because t = 0 is one point of space). */
  readonly t: Float64Array;
  readonly c: Float64Array;
}

/** What a region is made of, in one state (empty or loaded) at one frequency. */
export interface RegionMaterial {
  /** S/m; 0 = does not conduct. */
  readonly conductivity: number;
  /** ν = 1/µ_r, relative. */
  readonly reluctivity: Complex;
  /** Turn this region is the copper of, or −1. A conducting region with turn −1 is a part (u = 0). */
  readonly turn: number;
}

/** The coil as a circuit: which turns carry which path's current, in which sense. */
export interface Circuit {
  /** Number of turns. */
  readonly turns: number;
  /** Path (parallel strand) of each turn; all 0 when in series. */
  readonly path: Int32Array;
  /** +1 or −1 a turn. */
  readonly sense: Int8Array;
}
